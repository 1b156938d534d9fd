/**
 * Bounds that are a number of the time method over the largest modified wavenumber of the stencil: "sqrt(3)/kappa_max".
 * Recognised for advection with antisymmetric differences, where parameter and wave enter as λ κ(θ) only.
 */
import { type PrimeField, primeField } from '../prime-field';
import { type Rational, rational } from '../rational';
import { squareRootParts } from './closed-form';
import type { WavePolynomial, WaveTerm } from './wave-polynomial';

/** Squares of time-method limits have short denominators; longer ones would be met by chance. */
const DENOMINATOR_MAX = 3000n;
const AGREEMENT = 2e-14;

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

/** max κ(θ) of an antisymmetric difference with κ(θ) ~ θ, or null where it is not one. */
function largestWavenumber(difference: readonly WaveTerm[], origin: number): number | null {
  const weights = difference.map(({ re, wave }) => ({ k: wave - origin, weight: Number(re) }));
  const isOdd = weights.every(({ k, weight }) => weights.some((other) => other.k === -k && other.weight === -weight));
  const slope = weights.reduce((sum, { k, weight }) => sum + k * weight, 0);
  if (!isOdd || slope === 0) return null;
  const kappa = (theta: number) =>
    weights.reduce((sum, { k, weight }) => sum + (weight * Math.sin(k * theta)) / slope, 0);
  const sizes = Array.from({ length: 1025 }, (_, j) => Math.abs(kappa((Math.PI * j) / 1024)));
  const best = sizes.indexOf(Math.max(...sizes));
  let [lo, hi] = [(Math.PI * (best - 1)) / 1024, (Math.PI * (best + 1)) / 1024];
  for (let round = 0; round < 60; round++) {
    const [left, right] = [lo + (hi - lo) / 3, hi - (hi - lo) / 3];
    if (Math.abs(kappa(left)) < Math.abs(kappa(right))) lo = left;
    else hi = right;
  }
  return Math.abs(kappa((lo + hi) / 2));
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

/** @param bound an end of a stable interval, to the precision of a double */
export function wavenumberMultiple(wave: WavePolynomial, bound: number): string | null {
  const common = commonDifference(wave);
  const largest = common && largestWavenumber(common.difference, common.origin);
  if (!largest || !Number.isFinite(bound)) return null;
  const square = shortFraction((bound * largest) ** 2);
  if (!square) return null;
  const { outside, inside } = squareRootParts(square);
  const head = inside === 1n ? String(outside.num) : `${outside.num === 1n ? '' : `${outside.num}*`}sqrt(${inside})`;
  const foot = outside.den === 1n ? 'kappa_max' : `(${outside.den}*kappa_max)`;
  return `${bound < 0 ? '-' : ''}${head}/${foot}`;
}
