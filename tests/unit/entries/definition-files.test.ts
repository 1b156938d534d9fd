import { describe, expect, it } from 'vitest';
import { blankDefinition, BLANKS } from '@/lib/entries/blank-definition';
import { csvRows, csvText } from '@/lib/entries/csv';
import { Definition } from '@/lib/entries/definition';
import { definitionCsv, FILE_CHARACTERS_MAX, readDefinitionCsv } from '@/lib/entries/definition-csv';
import { definitionJson, readDefinitionJson } from '@/lib/entries/definition-json';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { EQUATIONS } from '@/lib/numerics/equation';

const table = blankDefinition('table', 'advection');
const stencil = blankDefinition('stencil', 'advection');
const method = blankDefinition('time-method', 'advection');
const errorsOf = (text: string, into: Definition) => {
  const outcome = readDefinitionCsv(text, into);
  return 'errors' in outcome ? outcome.errors : [];
};

describe('comma-separated values', () => {
  it('reads quotes, doubled quotes, line ends of every kind and a byte order mark', () => {
    expect(csvRows('\uFEFFa,"b, c"\r\n"say ""x""",2\n\n,\nlast').map(({ line, fields }) => [line, ...fields])).toEqual([
      [1, 'a', 'b, c'],
      [2, 'say "x"', '2'],
      [5, 'last'],
    ]);
  });
  it('counts lines also within quotes', () => {
    expect(csvRows('"one\ntwo",x\nnext').map(({ line }) => line)).toEqual([1, 3]);
  });
  it('reads what it writes', () => {
    const rows = [
      ['a,b', 'c"d'],
      ['', 'e\nf'],
    ];
    expect(csvRows(csvText(rows)).map(({ fields }) => fields)).toEqual(rows);
  });
});

describe('a definition as CSV', () => {
  it.each([
    [
      'Lax-Friedrichs',
      {
        ...table,
        terms: [
          { level: '1', offset: '0', coefficient: '1' },
          { level: '0', offset: '1', coefficient: '-(1 - lambda)/2' },
          { level: '0', offset: '-1', coefficient: '-(1 + lambda)/2' },
        ],
      },
    ],
    ['a scheme of the plane', blankDefinition('table', 'diffusion-2d')],
    ['a stencil with its weights', { ...stencil, weights: ['-1/2', '0', '1/2'] }],
    ['a stencil without', stencil],
    [
      'a tableau',
      {
        kind: 'time-method',
        time: {
          kind: 'runge-kutta',
          A: [
            ['0', '0'],
            ['1/2', '0'],
          ],
          b: ['0', '1'],
          c: ['0', '1/2'],
        },
      },
    ],
    ['a tableau without c', { kind: 'time-method', time: { kind: 'runge-kutta', A: [['0']], b: ['1'] } }],
    [
      'a multistep method',
      { kind: 'time-method', time: { kind: 'multistep', alpha: ['0', '-1', '1'], beta: ['-1/2', '3/2', '0'] } },
    ],
  ])('comes back as it went: %s', (_, input) => {
    const definition = Definition.parse(input);
    const text = definitionCsv(definition);
    expect(readDefinitionCsv(text ?? '', definition)).toEqual({ definition });
  });

  it('tells every wrong line by its number', () => {
    const text = 'level,offset,coefficient\n1,0,1\n0,0\n0,half,2\n0,1,lambda,5\n0,-1,\n';
    expect(errorsOf(text, table)).toEqual([
      { line: 3, message: '2 columns; accepted: 3, as in level,offset,coefficient' },
      { line: 4, message: expect.stringContaining("the offset 'half' cannot be read") as string },
      { line: 5, message: '4 columns; accepted: 3, as in level,offset,coefficient' },
      { line: 6, message: expect.stringContaining('the coefficient is missing') as string },
    ]);
  });

  it.each([
    ['another heading', 'offset,level,coefficient\n0,1,1\n', table, 'must read level,offset,coefficient'],
    ['nothing at all', '', table, 'must read'],
    ['no line below the heading', 'level,offset,coefficient\n', table, 'nothing stands below'],
    ['some weights only', 'offset,weight\n-1,1\n1,\n', stencil, '1 of 2 weights'],
    ['a tableau without b', 'c,a1\n0,0\n', method, 'the last line must be b'],
    ['a tableau with a short row', 'c,a1,a2\n0,0,0\n1/2,1/2\nb,0,1\n', method, '2 columns; accepted: 3'],
    ['levels with a gap', 'level,alpha,beta\n-1,1,0\n1,1,1\n', method, 'whole levels without gaps'],
    ['bytes that are no text', 'level,\0', table, 'not text'],
  ])('refuses %s', (_, text, into, words) => {
    expect(
      errorsOf(text, into)
        .map(({ message }) => message)
        .join('; '),
    ).toContain(words);
  });

  it('refuses a file that is far too large before it is read, and more terms than a table has', () => {
    expect(errorsOf('x'.repeat(FILE_CHARACTERS_MAX + 1), table)[0]?.message).toContain('accepted: at most');
    const many = `level,offset,coefficient\n${'0,1,1\n'.repeat(65)}`;
    expect(errorsOf(many, table).at(-1)?.message).toContain('65 terms are too many; accepted: at most 64');
  });

  it('has no table for what only JSON can carry', () => {
    expect(definitionCsv(blankDefinition('lines', 'diffusion'))).toBeNull();
    expect(definitionCsv(blankDefinition('system', 'wave'))).toBeNull();
  });
});

describe('a definition as JSON', () => {
  it('comes back as it went', () => {
    for (const blank of BLANKS) {
      const definition = blankDefinition(blank, 'wave');
      expect(readDefinitionJson(definitionJson(definition), definition)).toEqual({ definition });
    }
  });
  it('tells the line of a slip of the pen', () => {
    const outcome = readDefinitionJson('{\n  "kind": "stencil",\n  "offsets": [1, 2\n', stencil);
    expect('errors' in outcome && outcome.errors[0]?.message).toContain('not JSON');
    expect('errors' in outcome && outcome.errors[0]?.line).toBeGreaterThanOrEqual(3);
  });
  it('tells the line of what does not belong', () => {
    const text = definitionJson(table).replace(
      '"offset": "0",\n      "coefficient": "-1"',
      '"offset": "zero",\n      "coefficient": "-1"',
    );
    const outcome = readDefinitionJson(text, table);
    const lines = text.split('\n');
    expect('errors' in outcome && lines[(outcome.errors[0]?.line ?? 0) - 1]).toContain('zero');
  });
  it('refuses another equation or kind than the draft is booked under', () => {
    const other = readDefinitionJson(definitionJson(blankDefinition('table', 'diffusion')), table);
    expect('errors' in other && other.errors[0]?.message).toContain('accepted in this draft: AD');
    const plane = readDefinitionJson(definitionJson(blankDefinition('table', 'advection-2d')), table);
    expect('errors' in plane && plane.errors[0]?.message).toContain('advection');
  });
});

describe('a blank', () => {
  it.each(EQUATIONS)('has a shape that the book accepts, for %s', (equation) => {
    for (const blank of BLANKS)
      expect(Definition.safeParse(blankDefinition(blank, equation)).success, blank).toBe(true);
  });
  it.each(['lines', 'system', 'stencil', 'time-method'] as const)('of kind %s has facts at once', (blank) => {
    expect(analyseDefinition(blankDefinition(blank, 'wave')).verdict).toBe('facts');
  });
});
