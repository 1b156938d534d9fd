/** Definitions that cannot be read: what is wrong, where, and what is accepted. */
import { describe, expect, it } from 'vitest';
import { analyseDefinition } from '@/lib/facts/analyse-definition';

type Term = [level: unknown, offset: unknown, coefficient: string];
const table = (equation: string, terms: readonly Term[], more: object = {}) => ({
  kind: 'scheme',
  equation,
  form: 'table',
  terms: terms.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
  ...more,
});
const stencil = (more: object) => ({
  kind: 'stencil',
  dims: 1,
  derivative: 1,
  offsets: ['-1', '0', '1'],
  weights: null,
  ...more,
});
const forwardEuler = { kind: 'runge-kutta', A: [['0']], b: ['1'] };
const lines = (more: object) => ({
  kind: 'scheme',
  equation: 'advection',
  form: 'lines',
  space: [stencil({})],
  time: forwardEuler,
  ...more,
});
const system = (more: object) => ({
  kind: 'scheme',
  equation: 'wave',
  form: 'system',
  unknowns: ['p', 'v'],
  equations: [
    {
      terms: [
        { unknown: 'p', level: 1, offset: 0, coefficient: '1' },
        { unknown: 'p', level: 0, offset: 0, coefficient: '-1' },
      ],
    },
    {
      terms: [
        { unknown: 'v', level: '1/2', offset: '1/2', coefficient: '1' },
        { unknown: 'v', level: '-1/2', offset: '1/2', coefficient: '-1' },
      ],
    },
  ],
  ...more,
});
const upwind: Term[] = [
  [1, 0, '1'],
  [0, 0, '-1 + lambda'],
  [0, -1, '-lambda'],
];
const withCoefficient = (text: string) =>
  table('advection', [
    [1, 0, '1'],
    [0, 0, text],
  ]);

const REFUSED: [sentence: string, definition: unknown, pointer: string, code: string, column?: number][] = [
  ['a scheme with one time level', table('advection', [[1, 0, '1']]), '/terms', 'one-level'],
  [
    'a scheme whose newest level cancels',
    table('advection', [
      [1, 0, 'lambda - lambda'],
      [0, 0, '1'],
    ]),
    '/terms',
    'one-level',
  ],
  ['a symbol of another equation', withCoefficient('-1+nu'), '/terms/1/coefficient', 'unknown-symbol', 4],
  ['a square root', withCoefficient('-1+sqrt(lambda)'), '/terms/1/coefficient', 'not-rational', 4],
  ['a fractional exponent', withCoefficient('lambda^(1/2)'), '/terms/1/coefficient', 'not-rational', 9],
  ['a symbol as exponent', withCoefficient('2^lambda'), '/terms/1/coefficient', 'not-rational', 3],
  ['the imaginary unit in a real equation', withCoefficient('1 + i'), '/terms/1/coefficient', 'not-complex', 5],
  ['a factor without a sign of multiplication', withCoefficient('2lambda'), '/terms/1/coefficient', 'syntax', 2],
  ['an open bracket', withCoefficient('(1 + lambda'), '/terms/1/coefficient', 'syntax', 12],
  ['a comparison', withCoefficient('lambda < 1'), '/terms/1/coefficient', 'syntax', 8],
  ['an assignment', withCoefficient('lambda = 1'), '/terms/1/coefficient', 'syntax', 8],
  ['a divisor that is zero', withCoefficient('1/(lambda - lambda)'), '/terms/1/coefficient', 'division-by-zero', 4],
  [
    'a power that would grow without bound',
    withCoefficient('((lambda + 1)^16)^16'),
    '/terms/1/coefficient',
    'too-large',
    3,
  ],
  [
    'an expression of more than 200 characters',
    withCoefficient('1'.repeat(201)),
    '/terms/1/coefficient',
    'out-of-range',
  ],
  [
    'an offset with too few components',
    table('advection-2d', [
      [1, 0, '1'],
      [0, [0, 0], '-1'],
    ]),
    '/terms/0/offset',
    'offset-components',
  ],
  [
    'a half level in a table',
    table('advection', [
      ['1/2', 0, '1'],
      [0, 0, '-1'],
    ]),
    '/terms/0/level',
    'half-level',
  ],
  [
    'an offset far away',
    table('advection', [
      [1, 0, '1'],
      [0, 17, '-1'],
    ]),
    '/terms/1/offset',
    'offset-too-far',
  ],
  [
    'an offset off the grid',
    table('advection', [
      [1, 0, '1'],
      [0, '1/3', '-1'],
    ]),
    '/terms/1/offset',
    'off-grid',
  ],
  [
    'more than eight levels',
    table('advection', [
      [1, 0, '1'],
      [-7, 0, '-1'],
    ]),
    '/terms',
    'too-many-levels',
  ],
  [
    'more than 64 terms',
    table(
      'advection',
      Array.from({ length: 65 }, (): Term => [0, 0, '1']),
    ),
    '/terms',
    'too-many',
  ],
  ['an equation the book does not know', table('burgers', upwind), '/equation', 'unknown-value'],
  ['a form the book does not know', { kind: 'scheme', equation: 'advection', form: 'list' }, '/form', 'unknown-value'],
  ['a definition without a kind', { dims: 1 }, '/kind', 'missing'],
  ['a definition that is no object', 'upwind', '', 'wrong-type'],
  [
    'a path between numbers that the equation has not',
    table('advection', upwind, { path: 'lambda_x=lambda_y' }),
    '/path',
    'bad-path',
  ],
  [
    'a fixed number that is no number',
    table('advection', upwind, { fixed: { theta: '1/0' } }),
    '/fixed/theta',
    'not-a-number',
  ],
  [
    'a first-derivative stencil for diffusion',
    lines({ equation: 'diffusion' }),
    '/space/0/derivative',
    'wrong-derivative',
  ],
  ['one stencil for two operator terms', lines({ equation: 'advection-diffusion' }), '/space', 'stencil-count'],
  [
    'a staggered stencil on one grid',
    lines({ space: [stencil({ offsets: ['-1/2', '1/2'] })] }),
    '/space/0/offsets/0',
    'off-grid',
  ],
  [
    'a tableau of unequal lengths',
    lines({ time: { kind: 'runge-kutta', A: [['0'], ['1']], b: ['1/2', '1/2'] } }),
    '/time/A/0',
    'length-mismatch',
  ],
  [
    'a multistep method without a new level',
    lines({ time: { kind: 'multistep', alpha: ['-1', '0'], beta: ['1', '0'] } }),
    '/time/alpha/1',
    'zero-leading-coefficient',
  ],
  [
    'lists of unequal length',
    lines({ time: { kind: 'multistep', alpha: ['-1', '1'], beta: ['1', '0', '0'] } }),
    '/time/beta',
    'length-mismatch',
  ],
  [
    'an IMEX method for one operator',
    lines({
      time: { kind: 'imex-multistep', alpha: ['-1', '1'], beta_explicit: ['1', '0'], beta_implicit: ['0', '1'] },
    }),
    '/time',
    'imex-needs-two-terms',
  ],
  ['offsets given twice', stencil({ offsets: ['-1', '1/2', '2/4'] }), '/offsets/2', 'duplicate-offset'],
  ['too few points', stencil({ derivative: 2, offsets: ['0', '1'] }), '/offsets', 'too-few-points'],
  ['weights of another length', stencil({ weights: ['-1/2', '1/2'] }), '/weights', 'length-mismatch'],
  ['a weight that is no number', stencil({ weights: ['-1/2', 'a', '1/2'] }), '/weights/1', 'bad-value'],
  [
    'a left-hand side that sums to zero',
    stencil({ lhs: { offsets: ['-1', '1'], weights: ['1', '-1'] } }),
    '/lhs',
    'zero-lhs',
  ],
  [
    'an operator beyond the dimensions',
    { kind: 'stencil', dims: 2, operator: { zz: '1' }, offsets: [['0', '0']], weights: ['1'] },
    '/operator/zz',
    'unknown-direction',
  ],
  [
    'several dimensions without an operator',
    { kind: 'stencil', dims: 2, derivative: 1, offsets: [['0', '0']], weights: ['1'] },
    '/derivative',
    'missing-operator',
  ],
  [
    'moments that leave weights free',
    {
      kind: 'stencil',
      dims: 2,
      operator: { xx: '1', yy: '1' },
      offsets: [-1, 0, 1].flatMap((x) => [-1, 0, 1].map((y) => [x, y])),
      weights: null,
    },
    '/offsets',
    'undetermined',
  ],
  [
    'an unknown that is not declared',
    system({ unknowns: ['p', 'w'] }),
    '/equations/1/terms/0/unknown',
    'unknown-unknown',
  ],
  ['fewer equations than unknowns', system({ unknowns: ['p', 'v', 'w'] }), '/equations', 'count-mismatch'],
];

describe('a definition is refused with its place and a sentence', () => {
  it.each(REFUSED)('%s', (_sentence, definition, pointer, code, column) => {
    const analysis = analyseDefinition(definition);
    expect(analysis.verdict).toBe('invalid');
    expect(analysis.facts).toBeNull();
    const problem = analysis.problems.find((p) => p.code === code && p.pointer.startsWith(pointer));
    expect(problem, JSON.stringify(analysis.problems)).toBeDefined();
    expect(problem!.severity).toBe('error');
    expect(problem!.message).toMatch(/ /);
    if (column !== undefined) expect(problem!.column).toBe(column);
  });
});

describe('a definition that can be read, but not as meant', () => {
  it('sums repeated terms with a warning and is then the upwind scheme', () => {
    const repeated = table('advection', [
      [1, 0, '1'],
      [0, 0, '-1'],
      [0, 0, 'lambda'],
      [0, -1, '-lambda'],
    ]);
    const [once, twice] = [analyseDefinition(table('advection', upwind)), analyseDefinition(repeated)];
    expect(twice.problems).toMatchObject([{ severity: 'warning', pointer: '/terms/2', code: 'repeated-term' }]);
    expect(twice.facts).toEqual(once.facts);
  });

  it.each([
    [
      'whose coefficients do not sum to zero',
      [
        [1, 0, '1'],
        [0, 0, '-1/3'],
      ] as Term[],
      'sum to 2/3',
    ],
    [
      'that solves for twice the speed',
      [
        [1, 0, '1'],
        [0, 0, '-1 + 2*lambda'],
        [0, -1, '-2*lambda'],
      ] as Term[],
      '(-lambda) times the derivative of order 1',
    ],
    [
      'without a time derivative',
      [
        [1, 0, '1'],
        [0, 0, '-2'],
        [-1, 0, '1'],
      ] as Term[],
      'first time derivative',
    ],
  ])('is called inconsistent: a scheme %s', (_what, terms, words) => {
    const analysis = analyseDefinition(table('advection', terms));
    expect(analysis.verdict).toBe('inconsistent');
    expect(analysis.problems[0]?.message).toContain(words);
  });

  it('says what the weights of a wrong stencil sum to', () => {
    const analysis = analyseDefinition(stencil({ weights: ['0', '1/3', '0'] }));
    expect(analysis.verdict).toBe('inconsistent');
    expect(analysis.problems[0]?.message).toContain('does not approximate u_x: the weights sum to 1/3');
  });
});
