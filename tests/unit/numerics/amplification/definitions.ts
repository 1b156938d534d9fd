/** Definitions that several tests of amplification share. */
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';

export function schemeFrom(definition: unknown): CanonicalScheme {
  const { scheme, problems } = canonicalScheme(SchemeDefinition.parse(definition));
  if (!scheme) throw new Error(problems.map((p) => p.message).join(' '));
  return scheme;
}

export const stencil = (derivative: number, ...offsets: (string | number)[]) => ({
  kind: 'stencil',
  dims: 1,
  derivative,
  offsets: offsets.map(String),
  weights: null,
});
export const lines = (equation: string, space: unknown[], time: unknown, more: object = {}) =>
  schemeFrom({ kind: 'scheme', equation, form: 'lines', space, time, ...more });
export const multistep = (alpha: string[], beta: string[]) => ({ kind: 'multistep', alpha, beta });
export const LEAPFROG = multistep(['-1', '0', '1'], ['0', '2', '0']);
export const EULER = multistep(['-1', '1'], ['1', '0']);
export const CRANK_NICOLSON = multistep(['-1', '1'], ['1/2', '1/2']);
export const RK2 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0'],
    ['1/2', '0'],
  ],
  b: ['0', '1'],
};
export const RK4 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  b: ['1/6', '1/3', '1/3', '1/6'],
};
export const central = stencil(1, -1, 0, 1);
export const table = (equation: string, terms: readonly (readonly [number, unknown, string])[], more: object = {}) =>
  schemeFrom({
    kind: 'scheme',
    equation,
    form: 'table',
    terms: terms.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
    ...more,
  });

/** Velocity-pressure system, staggered in space and time, second order, in 2 dimensions. */
export const STAGGERED_2D = {
  kind: 'scheme',
  equation: 'wave-2d',
  form: 'system',
  unknowns: ['p', 'vx', 'vy'],
  equations: [
    {
      terms: [
        { unknown: 'p', level: '1', offset: ['0', '0'], coefficient: '1' },
        { unknown: 'p', level: '0', offset: ['0', '0'], coefficient: '-1' },
        { unknown: 'vx', level: '1/2', offset: ['1/2', '0'], coefficient: 'lambda' },
        { unknown: 'vx', level: '1/2', offset: ['-1/2', '0'], coefficient: '-lambda' },
        { unknown: 'vy', level: '1/2', offset: ['0', '1/2'], coefficient: 'lambda' },
        { unknown: 'vy', level: '1/2', offset: ['0', '-1/2'], coefficient: '-lambda' },
      ],
    },
    {
      terms: [
        { unknown: 'vx', level: '1/2', offset: ['1/2', '0'], coefficient: '1' },
        { unknown: 'vx', level: '-1/2', offset: ['1/2', '0'], coefficient: '-1' },
        { unknown: 'p', level: '0', offset: ['1', '0'], coefficient: 'lambda' },
        { unknown: 'p', level: '0', offset: ['0', '0'], coefficient: '-lambda' },
      ],
    },
    {
      terms: [
        { unknown: 'vy', level: '1/2', offset: ['0', '1/2'], coefficient: '1' },
        { unknown: 'vy', level: '-1/2', offset: ['0', '1/2'], coefficient: '-1' },
        { unknown: 'p', level: '0', offset: ['0', '1'], coefficient: 'lambda' },
        { unknown: 'p', level: '0', offset: ['0', '0'], coefficient: '-lambda' },
      ],
    },
  ],
};

/** Two-dimensional Lax-Wendroff with the cross derivative. */
export const LAX_WENDROFF_2D: readonly (readonly [number, unknown, string])[] = [
  [1, [0, 0], '1'],
  [0, [0, 0], '-1+lambda_x^2+lambda_y^2'],
  [0, [1, 0], 'lambda_x/2-lambda_x^2/2'],
  [0, [-1, 0], '-lambda_x/2-lambda_x^2/2'],
  [0, [0, 1], 'lambda_y/2-lambda_y^2/2'],
  [0, [0, -1], '-lambda_y/2-lambda_y^2/2'],
  [0, [1, 1], '-lambda_x*lambda_y/4'],
  [0, [-1, -1], '-lambda_x*lambda_y/4'],
  [0, [1, -1], 'lambda_x*lambda_y/4'],
  [0, [-1, 1], 'lambda_x*lambda_y/4'],
];
