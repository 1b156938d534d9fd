/** Weighted sums in exact integer arithmetic, to tell how many roundings a kernel's result is away from them. */
import { toNumber, type Rational } from '@/lib/numerics/rational';
import { neighbour } from './grid';
import { RANDOM_BITS } from './smooth-field';

export interface Part {
  readonly weight: Rational;
  /** Which of the given levels, oldest first. */
  readonly level: number;
  /** In grid points along x, and along y and z where there are several dimensions. */
  readonly offset: number;
  readonly across?: readonly number[] | undefined;
}

/** A finite double as mantissa · 2^exponent. */
function decompose(value: number): { mantissa: bigint; exponent: number } {
  const bits = new BigUint64Array(new Float64Array([value]).buffer)[0]!;
  const fraction = bits & 0xfffffffffffffn;
  const biased = Number((bits >> 52n) & 0x7ffn);
  const mantissa = biased === 0 ? fraction : fraction | 0x10000000000000n;
  return { mantissa: bits >> 63n ? -mantissa : mantissa, exponent: (biased || 1) - 1075 };
}

const EPSILON = 2 ** -52;

/**
 * Largest distance between a result and Σ weight · level(i + offset) on a periodic grid, in units of
 * 2^−52 · Σ |weight| · |level(i + offset)|: the rounding of one sum of that size.
 * @param levels n values each, multiples of 2^−RANDOM_BITS
 * @param result n values; one that is not finite gives Infinity
 * @param grid   points along x, y, z; without it the values are one row
 */
export function distanceInRoundings(
  parts: readonly Part[],
  levels: readonly Float64Array[],
  result: Float64Array,
  grid: readonly number[] = [result.length],
): { worst: number; at: number } {
  const n = result.length;
  const common = parts.reduce((den, { weight }) => (den % weight.den === 0n ? den : den * weight.den), 1n);
  const weights = parts.map(({ weight }) => (weight.num * common) / weight.den);
  const sizes = parts.map(({ weight }) => Math.abs(toNumber(weight)));
  const whole = levels.map((values) => Array.from(values, (value) => BigInt(value * 2 ** RANDOM_BITS)));
  let worst = { worst: 0, at: 0 };
  for (let i = 0; i < n; i++) {
    if (!Number.isFinite(result[i]!)) return { worst: Infinity, at: i };
    let sum = 0n;
    let scale = 0;
    parts.forEach(({ level, offset, across = [] }, k) => {
      const j = neighbour(grid, i, [offset, ...across]);
      sum += weights[k]! * whole[level]![j]!;
      scale += sizes[k]! * Math.abs(levels[level]![j]!);
    });
    const { mantissa, exponent } = decompose(result[i]!);
    const shift = exponent + RANDOM_BITS;
    const down = BigInt(Math.max(0, -shift));
    const difference = mantissa * common * 2n ** BigInt(Math.max(0, shift)) - (sum << down);
    const distance = Math.abs(toNumber({ num: difference, den: common << (BigInt(RANDOM_BITS) + down) }));
    const roundings = distance === 0 ? 0 : distance / (EPSILON * scale);
    if (roundings > worst.worst) worst = { worst: roundings, at: i };
  }
  return worst;
}
