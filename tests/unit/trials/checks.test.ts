import { describe, expect, it } from 'vitest';
import type { SchemeDefinition, StencilDefinition, TimeMethod } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { parseRational } from '@/lib/numerics/rational';
import { judgeCheck } from '@/lib/trials/check';
import type { BoundEnd, MarchSubject, StencilSubject, Subject } from '@/lib/trials/subject';
import { planTrial } from '@/lib/trials/trial-plan';
import { simulatePlan, type Flaws } from './simulated-kernel';

const LONG_MS = 60_000;

const end = (parameter: string, bound: number, outward: 1 | -1 = 1): BoundEnd => ({
  parameter,
  bound,
  text: String(bound),
  inside: 0.99 * bound,
  outward,
  vector: (value) => [value],
});

type Term = [level: string, offset: string, coefficient: string];
const table = (equation: 'advection' | 'diffusion' | 'wave', terms: Term[]): SchemeDefinition => ({
  kind: 'scheme',
  form: 'table',
  equation,
  terms: terms.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
});
const central1: StencilDefinition = {
  kind: 'stencil',
  dims: 1,
  derivative: 1,
  offsets: ['-1', '0', '1'],
  weights: ['-1/2', '0', '1/2'],
};
const lines = (time: TimeMethod, space = central1): SchemeDefinition => ({
  kind: 'scheme',
  form: 'lines',
  equation: 'advection',
  space: [space],
  time,
});

function march(definition: SchemeDefinition, more: Partial<MarchSubject>): MarchSubject {
  const { scheme } = canonicalScheme(definition);
  if (scheme?.form !== 'scalar') throw new Error('the test names no scalar scheme');
  const levels = scheme.terms.map(({ level }) => Number(level.num));
  return {
    kind: 'march',
    scheme,
    keptLevels: Math.max(...levels) - Math.min(...levels),
    halo: 3,
    order: 2,
    refine: 'grid',
    spaceSymbol: null,
    working: [[0.7], [0.3]],
    stable: true,
    ends: [],
    farInside: null,
    checksBound: true,
    verdict: 'conditionally stable',
    operations: 8,
    bytes: 24,
    ...more,
  };
}

const RK4: TimeMethod = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  b: ['1/6', '1/3', '1/3', '1/6'],
};
const AB2: TimeMethod = { kind: 'multistep', alpha: ['0', '-1', '1'], beta: ['-1/2', '3/2', '0'] };
const AB3: TimeMethod = {
  kind: 'multistep',
  alpha: ['0', '0', '-1', '1'],
  beta: ['5/12', '-16/12', '23/12', '0'],
};

const LEAPFROG = table('advection', [
  ['1', '0', '1'],
  ['-1', '0', '-1'],
  ['0', '1', 'lambda'],
  ['0', '-1', '-lambda'],
]);
const UPWIND = table('advection', [
  ['1', '0', '1'],
  ['0', '0', '-(1-lambda)'],
  ['0', '-1', '-lambda'],
]);
const FTCS_ADVECTION = table('advection', [
  ['1', '0', '1'],
  ['0', '0', '-1'],
  ['0', '1', 'lambda/2'],
  ['0', '-1', '-lambda/2'],
]);
const FTCS_DIFFUSION = table('diffusion', [
  ['1', '0', '1'],
  ['0', '0', '-(1-2*r)'],
  ['0', '1', '-r'],
  ['0', '-1', '-r'],
]);
const RICHARDSON = table('diffusion', [
  ['1', '0', '1'],
  ['-1', '0', '-1'],
  ['0', '0', '4*r'],
  ['0', '1', '-2*r'],
  ['0', '-1', '-2*r'],
]);
const DUFORT_FRANKEL = table('diffusion', [
  ['1', '0', '1+2*r'],
  ['-1', '0', '-(1-2*r)'],
  ['0', '1', '-2*r'],
  ['0', '-1', '-2*r'],
]);
const WAVE = table('wave', [
  ['1', '0', '1'],
  ['0', '0', '-2*(1-lambda^2)'],
  ['-1', '0', '1'],
  ['0', '1', '-lambda^2'],
  ['0', '-1', '-lambda^2'],
]);
const UNSTABLE = {
  stable: false,
  working: [[0.4], [0.1]],
  checksBound: false,
  verdict: 'unstable for all nonzero values',
};

const SUBJECTS: [name: string, subject: MarchSubject, bound: number | undefined][] = [
  ['leapfrog', march(LEAPFROG, { ends: [end('lambda', 1), end('lambda', -1, -1)] }), 1],
  ['upwind', march(UPWIND, { order: 1, ends: [end('lambda', 1)] }), 1],
  ['forward Euler with central differences', march(FTCS_ADVECTION, { order: 1, ...UNSTABLE }), undefined],
  ['explicit diffusion', march(FTCS_DIFFUSION, { working: [[0.4], [0.2]], ends: [end('r', 0.5)] }), 0.5],
  ['Richardson', march(RICHARDSON, UNSTABLE), undefined],
  ['DuFort-Frankel', march(DUFORT_FRANKEL, { farInside: [20], verdict: 'unconditionally stable' }), undefined],
  ['the wave equation', march(WAVE, { ends: [end('lambda', 1)] }), 1],
  // From memory: 2 sqrt(2) is the reach of the classical four stages along the imaginary axis.
  [
    'RK4 with central differences',
    march(lines(RK4), { working: [[1.9]], ends: [end('lambda', 2 * Math.SQRT2)] }),
    2 * Math.SQRT2,
  ],
  // Durran, Mon. Wea. Rev. 119 (1991) 702-720, prints 0.724; the further digits are from memory.
  ['AB3 with central differences', march(lines(AB3), { working: [[0.5]], ends: [end('lambda', 0.723627)] }), 0.723627],
  [
    'AB2 with central differences',
    march(lines(AB2), { ...UNSTABLE, verdict: 'weakly unstable for all nonzero values' }),
    undefined,
  ],
  [
    'RK4 in time alone',
    march(lines(RK4), {
      order: 4,
      refine: 'time',
      working: [[1.9]],
      ends: [end('lambda', 2 * Math.SQRT2)],
      spaceSymbol: ([lambda], theta) => [0, -lambda! * Math.sin(theta)],
    }),
    2 * Math.SQRT2,
  ],
];

function outcomes(subject: Subject, flaws: Flaws = {}): Record<string, string> {
  const plan = planTrial(subject);
  const answers = simulatePlan(subject, plan, flaws);
  return Object.fromEntries(
    plan.checks.map((check) => {
      const view = judgeCheck(check, answers, 'c');
      return [check.name, `${view.outcome}${view.outcome === 'failed' ? `: ${view.measured} (${view.target})` : ''}`];
    }),
  );
}

describe('a kernel that does what its definition says', () => {
  it.each(SUBJECTS)('passes every finding of %s', { timeout: LONG_MS }, (_, subject, bound) => {
    expect(outcomes(subject, bound === undefined ? {} : { bound })).toEqual({
      'exact-step': 'passed',
      amplification: 'passed',
      refinement: 'passed',
      margin: 'passed',
      pace: 'passed',
    });
  });
});

describe('a kernel with a flaw fails the finding that is about it', () => {
  const leapfrog = SUBJECTS[0]![1];
  const flipped = { factor: (term: number) => (term === 1 ? -1 : 1), bound: 1 };

  it('fails exact step, amplification and refinement with one flipped sign', { timeout: LONG_MS }, () => {
    const found = outcomes(leapfrog, flipped);
    expect(found['exact-step']).toMatch(/^failed/);
    expect(found['amplification']).toMatch(/^failed/);
    expect(found['refinement']).toMatch(/^failed/);
  });

  it('fails exact step with a coefficient that is off in its tenth digit', { timeout: LONG_MS }, () => {
    const found = outcomes(leapfrog, { factor: (term) => (term === 1 ? 1 + 1e-10 : 1), bound: 1 });
    expect(found['exact-step']).toMatch(/^failed/);
  });

  it('fails refinement with a start-up of too low an order', { timeout: LONG_MS }, () => {
    const found = outcomes(leapfrog, { startTerms: 0, bound: 1 });
    expect(found['refinement']).toMatch(/^failed/);
    expect(found['exact-step']).toBe('passed');
  });

  it.each([
    ['too small', 0.8],
    ['too large', 1.5],
  ])('fails margin where the kernel checks a bound that is %s', { timeout: LONG_MS }, (_, bound) => {
    expect(outcomes(leapfrog, { bound })['margin']).toMatch(/^failed/);
  });

  it.each([
    ['too large', 1.05],
    ['too small', 0.6],
  ])('fails margin where the facts give a bound that is %s', { timeout: LONG_MS }, (_, bound) => {
    const wrong = { ...leapfrog, working: [[0.5]], ends: [end('lambda', bound)] };
    expect(outcomes(wrong, { bound })['margin']).toMatch(/^failed/);
  });

  it('fails margin where the facts call a scheme unstable that is not', { timeout: LONG_MS }, () => {
    const unstable = march(FTCS_ADVECTION, { order: 1, ...UNSTABLE });
    // The kernel does upwind differences in place of central ones.
    const upwind = (term: number) => [1, 0, 2][term]!;
    expect(outcomes(unstable, { factor: upwind })['margin']).toMatch(/^failed/);
  });

  it('fails refinement where the facts give an order that is too high', { timeout: LONG_MS }, () => {
    const subject = { ...SUBJECTS[1]![1], order: 2 };
    expect(outcomes(subject, { bound: 1 })['refinement']).toMatch(/^failed/);
  });
});

describe('stencils', () => {
  const stencil = (offsets: number[], weights: string[], more: Partial<StencilSubject>): StencilSubject => ({
    kind: 'stencil',
    offsets,
    weights: weights.map(parseRational),
    derivative: 1,
    shift: 0,
    order: 2,
    halo: 3,
    operations: 8,
    bytes: 16,
    ...more,
  });
  const fourth = stencil([-2, -1, 1, 2], ['1/12', '-2/3', '2/3', '-1/12'], { order: 4 });

  it.each<[string, StencilSubject]>([
    ['the fourth-order first derivative', fourth],
    [
      'the fourth-order second derivative',
      stencil([-2, -1, 0, 1, 2], ['-1/12', '4/3', '-5/2', '4/3', '-1/12'], { derivative: 2, order: 4 }),
    ],
    ['a one-sided first derivative', stencil([0, 1, 2], ['-3/2', '2', '-1/2'], {})],
    ['a staggered first derivative', stencil([0, 1], ['-1', '1'], { shift: 0.5 })],
    ['a fourth derivative', stencil([-2, -1, 0, 1, 2], ['1', '-4', '6', '-4', '1'], { derivative: 4 })],
    [
      'an eighth-order first derivative',
      stencil([-4, -3, -2, -1, 1, 2, 3, 4], ['1/280', '-4/105', '1/5', '-4/5', '4/5', '-1/5', '4/105', '-1/280'], {
        order: 8,
      }),
    ],
  ])('pass with %s', { timeout: LONG_MS }, (_, subject) => {
    expect(outcomes(subject)).toEqual({
      'exact-step': 'passed',
      amplification: 'passed',
      refinement: 'passed',
      margin: 'not-applicable',
      pace: 'passed',
    });
  });

  it('fail exact step, response and refinement with one flipped sign', { timeout: LONG_MS }, () => {
    const found = outcomes(fourth, { factor: (term) => (term === 0 ? -1 : 1) });
    for (const name of ['exact-step', 'amplification', 'refinement']) expect(found[name]).toMatch(/^failed/);
  });
});
