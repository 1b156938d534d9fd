/** The fields that trials march: smooth ones of which the exact solution is known, and random ones that repeat. */
import type { Complex } from './characteristic';
import { pointsOf } from './grid';

/** One wave of a smooth field: whole waves around the grid, amplitude and phase in radians. */
export interface Wave {
  readonly count: number;
  readonly amplitude: number;
  readonly phase: number;
}

/** Two waves of different length, so that neither a symmetry nor a special wave hides an error. */
export const SMOOTH_WAVES: readonly Wave[] = [
  { count: 1, amplitude: 1, phase: 0.3 },
  { count: 2, amplitude: 0.5, phase: 1.1 },
];

/**
 * Σ amplitude · Re(factor · e^(i(2π count (j + shift) / n + phase))) at the n points of a periodic grid.
 * @param factor what each wave, of angle theta a point, has been multiplied by
 * @param shift  where the values stand, in grid spacings from the points
 */
export function smoothField(
  waves: readonly Wave[],
  n: number,
  factor: (theta: number) => Complex,
  shift = 0,
): Float64Array {
  const values = new Float64Array(n);
  for (const wave of waves) {
    const theta = (2 * Math.PI * wave.count) / n;
    const [re, im] = factor(theta);
    for (let j = 0; j < n; j++) {
      const angle = theta * (j + shift) + wave.phase;
      values[j]! += wave.amplitude * (re * Math.cos(angle) - im * Math.sin(angle));
    }
  }
  return values;
}

/** The same on a grid of two or three dimensions: the first wave runs across it, the second one otherwise. */
const GRID_COUNTS: readonly (readonly number[])[] = [
  [1, 1, 1],
  [1, -1, 0],
];

/** Whole waves along x, y, z of each smooth wave. */
export const waveCounts = (dims: 1 | 2 | 3): number[][] =>
  SMOOTH_WAVES.map(({ count }, k) => (dims === 1 ? [count] : [...GRID_COUNTS[k]!].slice(0, dims)));

/**
 * The two smooth waves on a periodic grid of as many points along every axis.
 * @param factor what each wave has been multiplied by
 */
export function smoothGridField(grid: readonly number[], factor: (theta: readonly number[]) => Complex): Float64Array {
  const values = new Float64Array(pointsOf(grid));
  waveCounts(grid.length as 1 | 2 | 3).forEach((counts, k) => {
    const { amplitude, phase } = SMOOTH_WAVES[k]!;
    const theta = counts.map((count, axis) => (2 * Math.PI * count) / grid[axis]!);
    const [re, im] = factor(theta);
    for (let at = 0; at < values.length; at++) {
      let rest = at;
      let angle = phase;
      grid.forEach((n, axis) => {
        angle += theta[axis]! * (rest % n);
        rest = Math.floor(rest / n);
      });
      values[at]! += amplitude * (re * Math.cos(angle) - im * Math.sin(angle));
    }
  });
  return values;
}

/** Bits behind the binary point of a random value: few enough for exact sums, enough to fill every bit of a product. */
export const RANDOM_BITS = 40;

/**
 * Values in (−1, 1), multiples of 2^−RANDOM_BITS, the same for the same seed.
 * @see G. Marsaglia, J. Statistical Software 8 (2003) 14: xorshift
 */
export function randomField(n: number, seed: number): Float64Array {
  let state = (seed * 2654435761 + 88172645) >>> 0 || 1;
  const next = () => {
    state ^= state << 13;
    state >>>= 0;
    state ^= state >>> 17;
    state ^= state << 5;
    state >>>= 0;
    return state;
  };
  for (let k = 0; k < 16; k++) next();
  return Float64Array.from({ length: n }, () => {
    const high = next() % 2 ** 20;
    const low = next() % 2 ** 20;
    const size = (high * 2 ** 20 + low) / 2 ** RANDOM_BITS;
    return next() % 2 === 0 ? size : -size;
  });
}
