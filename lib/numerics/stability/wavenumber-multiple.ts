/**
 * Bounds that are a number of the time method over the largest modified wavenumber of the stencil: "sqrt(3)/kappa_max".
 * Recognised for advection with antisymmetric differences, where parameter and wave enter as λ κ(θ) only.
 */
import { type PrimeField, primeField } from '../prime-field';
import { type Rational, rational } from '../rational';
import { AlgebraicNumber } from '../algebraic-number';
import { type IntegerPolynomial, multiply, squareFreePart, subtract } from '../integer-polynomial';
import { refinedValue, squareRootParts } from './closed-form';
import { agrees, inPrintedUnits, printedValue } from './printed-value';
import type { WavePolynomial, WaveTerm } from './wave-polynomial';

/** Squares of time-method limits have short denominators; longer ones would be met by chance. */
const DENOMINATOR_MAX = 3000n;
/** Of the fraction looked for in double precision; the form that comes of it is then checked to 25 digits. */
const AGREEMENT = 2e-14;
/** printedValue counts in units of this. */
const PRINTED_UNIT = 1e-40;

const PLACES = [1_234_577, 7_654_319, 2_718_281] as const;

function valueOf(field: PrimeField, terms: readonly WaveTerm[], w: number): number {
  return terms.reduce((sum, { re, wave }) => field.add(sum, field.mul(field.reduce(re), field.power(w, wave))), 0);
}

/** The terms of first power, if all powers j of the parameter come with their j-th power. */
function commonDifference(wave: WavePolynomial): { difference: readonly WaveTerm[]; origin: number } | null {
  if (!wave.real) return null;
  const constants = wave.levels.flat().filter(({ power }) => power === 0);
  const origin = constants[0]?.wave;
  if (origin === undefined || constants.some((term) => term.wave !== origin)) return null;
  const difference = wave.levels
    .map((terms) => terms.filter(({ power }) => power === 1))
    .find((terms) => terms.length > 0);
  if (!difference) return null;
  const field = primeField(0);
  const shift = PLACES.map((w) => field.inverse(field.power(w, origin)));
  const symbol = PLACES.map((w, k) => field.mul(valueOf(field, difference, w), shift[k]!));
  for (const terms of wave.levels)
    for (let power = 1; power <= wave.parameterDegree; power++) {
      const row = terms.filter((term) => term.power === power);
      const ratios = PLACES.map((w, k) =>
        field.mul(field.mul(valueOf(field, row, w), shift[k]!), field.inverse(field.power(symbol[k]!, power))),
      );
      if (ratios.some((ratio) => ratio !== ratios[0])) return null;
    }
  return { difference, origin };
}

/** k and w_k of an antisymmetric difference Σ w_k sin kθ · 2i with a slope at θ = 0, k > 0; null where it is not one. */
function sineWeights(difference: readonly WaveTerm[], origin: number): { k: number; weight: bigint }[] | null {
  const weights = difference.map(({ re, wave }) => ({ k: wave - origin, weight: re }));
  const isOdd = weights.every(({ k, weight }) => weights.some((other) => other.k === -k && other.weight === -weight));
  const slope = weights.reduce((sum, { k, weight }) => sum + BigInt(k) * weight, 0n);
  return isOdd && slope !== 0n ? weights.filter(({ k }) => k > 0) : null;
}

/** max |κ(θ)| of κ(θ) = Σ w_k sin kθ / Σ k w_k, squared, to 40 decimals: its waves are roots of Σ k w_k T_k(cos θ). */
function largestWavenumberSquared(weights: readonly { k: number; weight: bigint }[]): bigint {
  const reach = Math.max(...weights.map(({ k }) => k));
  const first: IntegerPolynomial[] = [[1n], [0n, 1n]];
  const second: IntegerPolynomial[] = [[1n], [0n, 2n]];
  for (const family of [first, second])
    while (family.length <= reach) family.push(subtract(multiply([0n, 2n], family.at(-1)!), family.at(-2)!));
  const sum = (term: (w: { k: number; weight: bigint }) => IntegerPolynomial) =>
    weights.reduce<IntegerPolynomial>(
      (total, w) =>
        subtract(
          total,
          term(w).map((c) => -c),
        ),
      [],
    );
  const rate = sum(({ k, weight }) => first[k]!.map((c) => c * weight * BigInt(k)));
  const shape = sum(({ k, weight }) => second[k - 1]!.map((c) => c * weight));
  const slope = weights.reduce((total, { k, weight }) => total + BigInt(k) * weight, 0n);
  let largest = 0n;
  for (const cosine of AlgebraicNumber.rootsOf(squareFreePart(rate))) {
    // κ is flat there: an error of 2^−100 in the cosine is one of 2^−200 in κ.
    const { num, den } = cosine.refine(100).lo;
    if (num * num > den * den) continue;
    const height = shape.reduceRight<{ num: bigint; den: bigint }>(
      (value, c) => ({ num: value.num * num + c * value.den * den, den: value.den * den }),
      { num: 0n, den: 1n },
    );
    const value = inPrintedUnits({
      num: (den * den - num * num) * height.num ** 2n,
      den: den * den * height.den ** 2n * slope ** 2n,
    });
    if (value > largest) largest = value;
  }
  return largest;
}

/** The fraction with the smallest denominator that agrees with a positive number; null where none is short. */
function shortFraction(x: number): Rational | null {
  let [p0, q0, p1, q1] = [0n, 1n, 1n, 0n];
  for (let rest = x, k = 0; k < 12; k++) {
    const digit = BigInt(Math.floor(rest));
    [p0, q0, p1, q1] = [p1, q1, digit * p1 + p0, digit * q1 + q0];
    if (q1 > DENOMINATOR_MAX) return null;
    if (Math.abs(Number(p1) / Number(q1) - x) <= AGREEMENT * x) return rational(p1, q1);
    rest = 1 / (rest - Number(digit));
  }
  return null;
}

/** @param bound an end of a stable interval */
export function wavenumberMultiple(wave: WavePolynomial, bound: AlgebraicNumber): string | null {
  const common = commonDifference(wave);
  const weights = common && sineWeights(common.difference, common.origin);
  if (!weights) return null;
  const square = largestWavenumberSquared(weights);
  const largest = printedValue('sqrt(square)', { square });
  const near = bound.toNumber();
  const fraction = shortFraction((near * Number(largest) * PRINTED_UNIT) ** 2);
  if (!fraction) return null;
  const { outside, inside } = squareRootParts(fraction);
  const head = inside === 1n ? String(outside.num) : `${outside.num === 1n ? '' : `${outside.num}*`}sqrt(${inside})`;
  const foot = outside.den === 1n ? 'kappa_max' : `(${outside.den}*kappa_max)`;
  const text = `${near < 0 ? '-' : ''}${head}/${foot}`;
  return agrees(printedValue(text, { kappa_max: largest }), refinedValue(bound)) ? text : null;
}
