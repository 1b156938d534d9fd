/**
 * Growth of single waves under a scheme, in double precision: what a trial holds a compiled kernel against.
 * It is computed from the canonical scheme alone, apart from the facts, so that a wrong fact meets a second opinion.
 */
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import { symbolTerms } from '@/lib/numerics/equation-terms';
import { compileScheme, polynomialAt, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { evaluate } from '@/lib/numerics/polynomial';
import { complexSqrt, polynomialRoots } from '@/lib/numerics/roots';
import { anglesOf, wavesAround } from './grid';

/** Real and imaginary part. */
export type Complex = readonly [number, number];

export const times = (a: Complex, b: Complex): Complex => [a[0] * b[0] - a[1] * b[1], a[0] * b[1] + a[1] * b[0]];
export const over = (a: Complex, b: Complex): Complex => {
  const d = b[0] * b[0] + b[1] * b[1];
  return [(a[0] * b[0] + a[1] * b[1]) / d, (a[1] * b[0] - a[0] * b[1]) / d];
};
export const minus = (a: Complex, b: Complex): Complex => [a[0] - b[0], a[1] - b[1]];
export const modulus = (a: Complex) => Math.hypot(a[0], a[1]);
export const expOf = (a: Complex): Complex => {
  const size = Math.exp(a[0]);
  return [size * Math.cos(a[1]), size * Math.sin(a[1])];
};
/** a^k for a whole k ≥ 0, by squaring. */
export function powerOf(a: Complex, k: number): Complex {
  let result: Complex = [1, 0];
  for (let base = a, rest = k; rest > 0; rest = Math.floor(rest / 2), base = times(base, base))
    if (rest % 2 === 1) result = times(result, base);
  return result;
}

/** Angle of a wave a point, in radians: one number in one dimension, one for each of x, y, z in several. */
export type Angle = number | readonly number[];

const components = (theta: Angle): readonly number[] => (typeof theta === 'number' ? [theta] : theta);
const partOf = (theta: Angle, part: number): Angle =>
  typeof theta === 'number' ? theta * part : theta.map((angle) => angle * part);

/** Logarithm of the factor by which the wave e^(i·theta·j) multiplies in one step. */
export type Symbol = (theta: Angle) => Complex;

/** A scheme at fixed parameter values. */
export interface SampledScheme {
  /** One root for each kept level; [] where the newest level vanishes for this wave, which then has no next value. */
  readonly roots: (theta: Angle) => Complex[];
  /** The equation's own factor. For the wave equation, that of one of the two travelling waves. */
  readonly exact: Symbol;
}

/** @param parameters values in the order of `scheme.parameters` */
export function sampleScheme(scheme: CanonicalScheme, parameters: readonly number[]): SampledScheme {
  const compiled: NumericScheme = compileScheme(scheme);
  const terms = symbolTerms(scheme).map(({ powers, coefficient }) => ({
    powers,
    value: evaluate(coefficient, parameters),
  }));
  return {
    roots: (theta) => {
      const found = polynomialRoots(polynomialAt(compiled, parameters, components(theta)));
      const roots = Array.from(found.re, (re, k): Complex => [re, found.im[k]!]);
      return roots.every(([re]) => Number.isFinite(re)) ? roots : [];
    },
    exact: (theta) => {
      const sum = terms.reduce<Complex>(
        (total, { powers, value }) => {
          const part = powers.reduce<Complex>(
            (product, power, axis) => times(product, powerOf([0, components(theta)[axis]!], power)),
            value,
          );
          return [total[0] + part[0], total[1] + part[1]];
        },
        [0, 0],
      );
      return scheme.timeOrder === 2 ? complexSqrt(...sum) : sum;
    },
  };
}

/** Smallest distance between two of the roots; infinite for one root. */
export const separation = (roots: readonly Complex[]) =>
  roots.reduce(
    (least, a, k) => roots.slice(k + 1).reduce((inner, b) => Math.min(inner, modulus(minus(a, b))), least),
    Infinity,
  );

/** Largest factor over the waves of a periodic grid of these points along x, y, z; the mean is left out. */
export function gridGrowth(sampled: SampledScheme, grid: readonly number[]): { growth: number; theta: Angle } {
  let worst: { growth: number; theta: Angle } = { growth: 0, theta: 0 };
  for (const counts of wavesAround(grid)) {
    const theta = anglesOf(counts, grid);
    for (const root of sampled.roots(theta)) if (modulus(root) > worst.growth) worst = { growth: modulus(root), theta };
  }
  return worst;
}

const nearest = (roots: readonly Complex[], to: Complex): Complex | undefined =>
  roots.reduce<Complex | undefined>(
    (best, root) => (!best || modulus(minus(root, to)) < modulus(minus(best, to)) ? root : best),
    undefined,
  );

const CONTINUATION_STEPS = 64;

/** The root that stands for the solution: continued from theta = 0, where it follows `symbol`. */
export function principalRoot(sampled: SampledScheme, theta: Angle, symbol: Symbol): Complex | undefined {
  let before: Complex = [1, 0];
  let last: Complex | undefined;
  for (let k = 1; k <= CONTINUATION_STEPS; k++) {
    const at = partOf(theta, k / CONTINUATION_STEPS);
    // Near 0 the exact factor predicts best; later the last two roots do, which holds where roots cross.
    const predicted: Complex = k <= 2 || !last ? expOf(symbol(at)) : [2 * last[0] - before[0], 2 * last[1] - before[1]];
    const root = nearest(sampled.roots(at), predicted);
    if (!root) return undefined;
    before = last ?? [1, 0];
    last = root;
  }
  return last;
}
