/**
 * Whether roots that doubles cannot part on the unit circle are one multiple root. At a rational parameter and one of
 * the waves 0, π/2, π this is decided exactly; elsewhere with 77 digits: a k-fold root is a zero of the (k − 1)st
 * derivative at which the polynomial itself is 0 too.
 */
import type { Rational } from '../rational';
import { integerSquareRoot } from '../simple-rational';
import { rootPosition } from './schur-cohn';
import { atWave, type WavePolynomial } from './wave-polynomial';

/** A number and its imaginary part in units of 2^−BITS. */
interface Fixed {
  readonly re: bigint;
  readonly im: bigint;
}

const BITS = 256n;
/** What is smaller than 2^−SMALL_BITS of its terms is 0: places are known to 2^−150. */
const SMALL_BITS = 100n;
const ROUNDS = 60;

const add = (a: Fixed, b: Fixed): Fixed => ({ re: a.re + b.re, im: a.im + b.im });
const multiply = (a: Fixed, b: Fixed): Fixed => ({
  re: (a.re * b.re - a.im * b.im) >> BITS,
  im: (a.re * b.im + a.im * b.re) >> BITS,
});
const fixed = ({ num, den }: Rational): bigint => (num << BITS) / den;
const ofNumber = (x: number): bigint => BigInt(Math.round(x * 2 ** 52)) << (BITS - 52n);
const size = ({ re, im }: Fixed): bigint => integerSquareRoot(re * re + im * im);

function divide(a: Fixed, b: Fixed): Fixed | null {
  const norm = b.re * b.re + b.im * b.im;
  if (norm === 0n) return null;
  return {
    re: ((a.re * b.re + a.im * b.im) << BITS) / norm,
    im: ((a.im * b.re - a.re * b.im) << BITS) / norm,
  };
}

/** A place in the wave variable: cos θ with the sign of sin θ, or tan(θ/2). */
export type ExactPlace = { readonly cosine: Rational; readonly side: 1 | -1 } | { readonly tangent: Rational };

function waveAt(place: ExactPlace): Fixed {
  const one = 1n << BITS;
  if ('cosine' in place) {
    const re = fixed(place.cosine);
    const rest = one * one - re * re;
    const im = rest > 0n ? integerSquareRoot(rest) : 0n;
    return { re, im: place.side < 0 ? -im : im };
  }
  const x = fixed(place.tangent);
  return divide({ re: one, im: x }, { re: one, im: -x }) ?? { re: one, im: 0n };
}

function levelsAt(wave: WavePolynomial, parameter: Rational, place: ExactPlace): Fixed[] {
  const w = waveAt(place);
  const p = fixed(parameter);
  const powersOf = (base: Fixed, count: number) => {
    const powers: Fixed[] = [{ re: 1n << BITS, im: 0n }];
    for (let k = 0; k < count; k++) powers.push(multiply(powers[k]!, base));
    return powers;
  };
  const waves = powersOf(w, wave.span);
  const parameters = powersOf({ re: p, im: 0n }, wave.parameterDegree);
  return wave.levels.map((terms) =>
    terms.reduce<Fixed>(
      (sum, { re, im, wave: k, power }) => {
        const value = multiply(waves[k]!, parameters[power]!);
        return add(sum, { re: re * value.re - im * value.im, im: re * value.im + im * value.re });
      },
      { re: 0n, im: 0n },
    ),
  );
}

const slope = (a: readonly Fixed[]): Fixed[] =>
  a.slice(1).map(({ re, im }, k) => ({ re: re * BigInt(k + 1), im: im * BigInt(k + 1) }));
const valueAt = (a: readonly Fixed[], z: Fixed): Fixed =>
  a.reduceRight<Fixed>((sum, c) => add(multiply(sum, z), c), { re: 0n, im: 0n });

/**
 * @param parameter within 2^−160 of the special value, or equal to it
 * @param near      a point between the roots in question, as doubles
 * @param count     how many of them lie there
 * @returns whether they are one root of that multiplicity on the unit circle
 */
export function isMultipleUnitRoot(
  wave: WavePolynomial,
  parameter: Rational,
  place: ExactPlace,
  near: readonly [number, number],
  count: number,
): boolean {
  const levels = levelsAt(wave, parameter, place);
  let upper: Fixed[] = levels;
  for (let k = 1; k < count; k++) upper = slope(upper);
  const lower = slope(upper);
  let z: Fixed = { re: ofNumber(near[0]), im: ofNumber(near[1]) };
  for (let round = 0; round < ROUNDS; round++) {
    const step = divide(valueAt(upper, z), valueAt(lower, z));
    if (!step) return true;
    z = { re: z.re - step.re, im: z.im - step.im };
    if (size(step) < 1n << 32n) break;
  }
  const scale = levels.reduce((sum, c) => sum + size(c), 0n);
  const offCircle = size(z) - (1n << BITS);
  const isOnCircle = (offCircle < 0n ? -offCircle : offCircle) << SMALL_BITS < 1n << BITS;
  return isOnCircle && size(valueAt(levels, z)) << SMALL_BITS < scale;
}

/** Exact at θ = 0, π and ±π/2 for a rational parameter; null at other waves. */
export function exactMultiplicity(
  wave: WavePolynomial,
  parameter: Rational,
  theta: number,
): 'multiple' | 'not multiple' | null {
  const corner = (
    [
      [0, 1n, 0n],
      [Math.PI, 0n, 1n],
      [Math.PI / 2, 1n, 1n],
      [-Math.PI / 2, 1n, -1n],
    ] as const
  ).find(([angle]) => Math.abs(Math.abs(angle) === Math.PI ? Math.abs(theta) - Math.PI : theta - angle) < 1e-12);
  if (!corner) return null;
  const position = rootPosition(atWave(wave, parameter, corner[1], corner[2]));
  return position === 'outside' || position === 'degenerate'
    ? null
    : position === 'multiple on circle'
      ? 'multiple'
      : 'not multiple';
}
