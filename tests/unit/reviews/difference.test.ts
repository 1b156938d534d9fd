import { describe, expect, it } from 'vitest';
import { Definition } from '@/lib/entries/definition';
import { definitionRows } from '@/lib/reviews/difference/definition-rows';
import { findingDifference } from '@/lib/reviews/difference/finding-difference';
import { readingDifference } from '@/lib/reviews/difference/reading-difference';
import { type Side, changedParts, revisionDifference } from '@/lib/reviews/difference/revision-difference';
import { isChanged, rowDifference } from '@/lib/reviews/difference/row-difference';
import type { FindingView } from '@/lib/trials/trial';

const LEAPFROG = Definition.parse({
  kind: 'scheme',
  form: 'table',
  equation: 'advection',
  terms: [
    { level: 1, offset: 0, coefficient: '1' },
    { level: -1, offset: 0, coefficient: '-1' },
    { level: 0, offset: 1, coefficient: 'lambda' },
    { level: 0, offset: -1, coefficient: '-lambda' },
  ],
});
const withTerm = (k: number, coefficient: string) =>
  Definition.parse({
    ...LEAPFROG,
    terms: 'terms' in LEAPFROG ? LEAPFROG.terms.map((term, j) => (j === k ? { ...term, coefficient } : term)) : [],
  });

const aSide = (more: Partial<Side> = {}): Side => ({
  revision: 1,
  title: 'Leapfrog',
  gist: 'Keeps every wave.',
  synonyms: ['CTCS'],
  notes: 'The midpoint rule.',
  references: [],
  definition: LEAPFROG,
  facts: null,
  summary: null,
  latestTrial: null,
  ...more,
});
const finding = (more: Partial<FindingView>): FindingView => ({
  name: 'refinement',
  language: 'c',
  outcome: 'passed',
  measured: '2.00',
  target: '2 +- 0.05',
  how: 'On five grids.',
  data: null,
  ...more,
});

describe('the difference of two definitions', () => {
  it('names a coefficient by its point in time and space', () => {
    expect(definitionRows(LEAPFROG)).toContainEqual({ place: 'u at n + 1; i', value: '1' });
    expect(definitionRows(LEAPFROG)).toContainEqual({ place: 'u at n; i − 1', value: '-lambda' });
  });

  it('finds the one sign that was flipped', () => {
    const changes = rowDifference(definitionRows(LEAPFROG), definitionRows(withTerm(3, 'lambda')));
    expect(changes.filter(isChanged)).toEqual([{ place: 'u at n; i − 1', was: '-lambda', now: 'lambda' }]);
  });

  it('does not mind the order in which points are written', () => {
    const turned = Definition.parse({ ...LEAPFROG, terms: 'terms' in LEAPFROG ? LEAPFROG.terms.toReversed() : [] });
    expect(rowDifference(definitionRows(LEAPFROG), definitionRows(turned)).filter(isChanged)).toEqual([]);
  });

  it('keeps apart two terms at one point, and shows the one that is gone where it stood', () => {
    const twice = [
      { place: 'a', value: '1' },
      { place: 'b', value: '2' },
      { place: 'c', value: '3' },
    ];
    expect(rowDifference(twice, [twice[0]!, twice[2]!]).map(({ place, now }) => [place, now])).toEqual([
      ['a', '1'],
      ['b', null],
      ['c', '3'],
    ]);
  });

  it.each([
    [
      'a stencil',
      { kind: 'stencil', derivative: 1, offsets: [-1, 1], weights: ['-1/2', '1/2'] },
      'Weight at i − 1',
      '−1/2',
    ],
    [
      'a stencil of highest order',
      { kind: 'stencil', derivative: 1, offsets: [-1, 1] },
      'Weights',
      'those of highest order at i − 1; i + 1',
    ],
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
        },
      },
      'a₂₁',
      '1/2',
    ],
    [
      'a multistep method',
      { kind: 'time-method', time: { kind: 'multistep', alpha: ['-1', '1'], beta: ['3/2', '-1/2'] } },
      'β₁',
      '−1/2',
    ],
  ])('has a row for every number of %s', (_kind, definition, place, value) => {
    expect(definitionRows(Definition.parse(definition))).toContainEqual({ place, value });
  });
});

describe('the difference of readings', () => {
  it('strikes the value that changed, keeps what is the same, and tells what is gone', () => {
    const was = [
      { term: 'Bound', value: '|λ| ≤ 0.73', how: 'rounded' },
      { term: 'Arrays', value: '3', how: 'one a level' },
      { term: 'Halo', value: '2 | 2', how: 'one exchange' },
    ];
    const now = [
      { term: 'Bound', value: [{ text: '|λ| ≤ 0.7287', italic: false }], how: 'exact' },
      { term: 'Halo', value: '2 | 2', how: 'two exchanges' },
    ];
    expect(readingDifference(was, now)).toEqual([
      { term: 'Bound', was: '|λ| ≤ 0.73', now: '|λ| ≤ 0.7287', how: 'exact', howWas: null },
      { term: 'Halo', was: '2 | 2', now: '2 | 2', how: 'two exchanges', howWas: 'one exchange' },
      { term: 'Arrays', was: '3', now: null, how: 'one a level', howWas: null },
    ]);
  });
});

describe('the difference of findings', () => {
  it('tells of another figure or outcome, language by language', () => {
    const was = [finding({}), finding({ language: 'fortran' })];
    const now = [finding({ measured: '1.40', outcome: 'failed' }), finding({ language: 'fortran' })];
    expect(findingDifference(was, now)).toEqual([
      {
        name: 'refinement',
        language: 'c',
        was: { measured: '2.00', outcome: 'passed' },
        now: { measured: '1.40', outcome: 'failed' },
      },
    ]);
  });

  it('leaves out how fast the machine was, but not that it did not run', () => {
    const pace = finding({ name: 'pace', measured: '900 Mpoints/s' });
    expect(findingDifference([pace], [{ ...pace, measured: '850 Mpoints/s' }])).toEqual([]);
    expect(findingDifference([pace], [{ ...pace, outcome: 'not-run' }])).toHaveLength(1);
  });

  it('tells of what is new and what is gone', () => {
    expect(findingDifference([finding({ name: 'margin' })], [finding({ name: 'guards' })])).toMatchObject([
      { name: 'guards', was: null },
      { name: 'margin', now: null },
    ]);
  });
});

describe('the difference of two revisions', () => {
  it('has nothing in it where they are the same', () => {
    expect(changedParts(revisionDifference(aSide(), aSide({ revision: 2 })))).toEqual([]);
  });

  it('strikes nothing in the first revision of an entry', () => {
    const difference = revisionDifference(null, aSide());
    expect(changedParts(difference)).toEqual([]);
    expect(difference.notes).toMatchObject([{ kind: 'same', text: 'The midpoint rule.' }]);
    expect(difference.rule.was).toEqual([]);
  });

  it('names the parts that changed, and sets both rules', () => {
    const now = aSide({
      title: 'Leapfrog, centred',
      notes: 'The midpoint rule.\nStart with one step.',
      definition: withTerm(2, '2*lambda'),
    });
    const difference = revisionDifference(aSide(), now);
    expect(changedParts(difference)).toEqual(['name and gist', 'definition', 'notes']);
    expect(difference.rule.was).not.toEqual(difference.rule.now);
    expect(difference.rule.was.length).toBeGreaterThan(0);
  });
});
