/**
 * The curve in the plane of wave and parameter off which the number of roots outside the unit circle cannot change.
 *
 * Its factors, for P(z) = Σ a_k z^k with mirror P*(z) = Σ conj(a_(m−k)) z^k:
 *   lead         |a_m|²: a root passes through infinity, the step is not solvable
 *   crossing     first nonvanishing principal subresultant of P and P*: a root meets the unit circle
 *   coincidence  where P and P* share a factor (conservative schemes): first nonvanishing principal subresultant
 *                of P and P', where its roots may leave the circle in pairs
 * Each is computed modulo primes at waves and parameters, interpolated and lifted.
 */
import type { BivariatePolynomial } from '../bivariate-polynomial';
import { trimmed } from '../integer-polynomial';
import { ChineseRemainder, interpolate, modularDeterminant, type PrimeField, primeField } from '../prime-field';
import { rootCount, type WavePolynomial, type WaveTerm } from './wave-polynomial';

/** The outer variable of the curve: cos θ on [−1, 1], or tan(θ/2) on the whole line with θ = π at infinity. */
export type WaveVariable = 'cosine' | 'tangent';

export interface CurveFactor {
  readonly kind: 'lead' | 'crossing' | 'coincidence';
  /** Outer variable: the wave; inner: the parameter. */
  readonly polynomial: BivariatePolynomial;
}

export interface CrossingCurve {
  readonly variable: WaveVariable;
  readonly factors: readonly CurveFactor[];
  /** Number of roots that P shares with its mirror for every wave and parameter: m for conservative schemes. */
  readonly conservativeRoots: number;
}

/** Coefficients a_k and their conjugates at one wave and parameter of a prime field. */
type Evaluate = (field: PrimeField, levels: readonly number[], conjugates: readonly number[]) => number;

interface Quantity {
  readonly evaluate: Evaluate;
  /** Largest |exponent| of w. */
  readonly waveDegree: number;
  readonly parameterDegree: number;
  /** log2 of a bound of the sum of |coefficients| as a Laurent polynomial. */
  readonly bits: number;
}

/** Determinant whose rows are shifts of two polynomials: the g-th principal subresultant coefficient. */
function principalSubresultant(field: PrimeField, p: readonly number[], q: readonly number[], g: number): number {
  const [m, n] = [p.length - 1, q.length - 1];
  const size = m + n - 2 * g;
  const row = (a: readonly number[], shift: number) =>
    Array.from({ length: size }, (_, column) => a[m + n - g - 1 - column - shift] ?? 0);
  const rows: number[][] = [];
  for (let shift = n - g - 1; shift >= 0; shift--) rows.push(row(p, shift));
  for (let shift = m - g - 1; shift >= 0; shift--) rows.push(row(q, shift));
  return modularDeterminant(field, rows);
}

const reversed = (a: readonly number[]) => [...a].reverse();
const slope = (field: PrimeField, a: readonly number[]) => a.slice(1).map((c, k) => field.mul(c, k + 1));

const crossingAt =
  (g: number): Evaluate =>
  (field, levels, conjugates) => {
    const value = principalSubresultant(field, levels, reversed(conjugates), g);
    return g === 0 ? value : field.mul(value, principalSubresultant(field, conjugates, reversed(levels), g));
  };

const coincidenceAt =
  (h: number): Evaluate =>
  (field, levels, conjugates) =>
    field.mul(
      principalSubresultant(field, levels, slope(field, levels), h),
      principalSubresultant(field, conjugates, slope(field, conjugates), h),
    );

const size = (a: bigint) => (a < 0n ? -a : a);
const log2Norm = (terms: readonly WaveTerm[]) =>
  terms.reduce((sum, { re, im }) => sum + size(re) + size(im), 1n).toString(2).length;
const spanOf = (terms: readonly WaveTerm[]) =>
  Math.max(...terms.map((term) => term.wave)) - Math.min(...terms.map((term) => term.wave));
const powerOf = (terms: readonly WaveTerm[]) => Math.max(...terms.map((term) => term.power));

/** Values of all coefficients, as polynomials in the parameter, at one wave of the field. */
function atFieldWave(field: PrimeField, wave: WavePolynomial, w: number, conjugate: boolean): number[][] {
  const base = conjugate ? field.inverse(w) : w;
  const unit = conjugate ? field.sub(0, field.imaginary) : field.imaginary;
  const powers = [1];
  for (let k = 0; k < wave.span; k++) powers.push(field.mul(powers[k]!, base));
  return wave.levels.map((terms) => {
    const row = new Array<number>(wave.parameterDegree + 1).fill(0);
    for (const { wave: exponent, power, re, im } of terms) {
      const value = field.add(field.reduce(re), field.mul(unit, field.reduce(im)));
      row[power] = field.add(row[power]!, field.mul(value, powers[exponent]!));
    }
    return row;
  });
}

function horner(field: PrimeField, row: readonly number[], at: number): number {
  let value = 0;
  for (let k = row.length - 1; k >= 0; k--) value = field.add(field.mul(value, at), row[k]!);
  return value;
}

function valueAt(field: PrimeField, wave: WavePolynomial, evaluate: Evaluate, w: number, parameter: number): number {
  const levels = atFieldWave(field, wave, w, false).map((row) => horner(field, row, parameter));
  const conjugates = atFieldWave(field, wave, w, true).map((row) => horner(field, row, parameter));
  return evaluate(field, levels, conjugates);
}

/** First g at which the quantity does not vanish identically, judged at two places of a large field. */
function firstNonvanishing(wave: WavePolynomial, at: (g: number) => Evaluate, most: number): number {
  const field = primeField(0);
  for (let g = 0; g < most; g++) {
    if (valueAt(field, wave, at(g), 1_234_577, 7_654_319) !== 0) return g;
    if (valueAt(field, wave, at(g), 3_456_789, 9_876_543) !== 0) return g;
  }
  return most;
}

function quantities(wave: WavePolynomial): { kind: CurveFactor['kind']; quantity: Quantity }[] & { shared: number } {
  const m = rootCount(wave);
  const norm = log2Norm(wave.levels.flat());
  const newest = wave.levels[m]!;
  const result: { kind: CurveFactor['kind']; quantity: Quantity }[] = [];
  if (newest.length > 1 || newest.some((term) => term.power > 0))
    result.push({
      kind: 'lead',
      quantity: {
        evaluate: (field, levels, conjugates) => field.mul(levels[m]!, conjugates[m]!),
        waveDegree: spanOf(newest),
        parameterDegree: 2 * powerOf(newest),
        bits: 2 * log2Norm(newest),
      },
    });
  const g = firstNonvanishing(wave, crossingAt, m);
  if (g < m) {
    const copies = g === 0 ? 1 : 2;
    result.push({
      kind: 'crossing',
      quantity: {
        evaluate: crossingAt(g),
        waveDegree: copies * (m - g) * wave.span,
        parameterDegree: copies * 2 * (m - g) * wave.parameterDegree,
        bits: copies * 2 * (m - g) * norm,
      },
    });
  }
  if (g === 2 && m === 2) {
    // a_1² − 4 a_0 a_2 up to a factor of modulus 1, since |a_0| = |a_2| and a_1 conj(a_0) = a_2 conj(a_1).
    result.push({
      kind: 'coincidence',
      quantity: {
        evaluate: (field, levels, conjugates) =>
          field.sub(field.mul(levels[1]!, conjugates[1]!), field.mul(4, field.mul(levels[2]!, conjugates[2]!))),
        waveDegree: wave.span,
        parameterDegree: 2 * wave.parameterDegree,
        bits: 2 * norm + 3,
      },
    });
  } else if (g >= 2) {
    const h = firstNonvanishing(wave, coincidenceAt, m - 1);
    const rows = 2 * m - 1 - 2 * h;
    if (h < m - 1)
      result.push({
        kind: 'coincidence',
        quantity: {
          evaluate: coincidenceAt(h),
          waveDegree: rows * wave.span,
          parameterDegree: 2 * rows * wave.parameterDegree,
          bits: 2 * rows * (norm + Math.ceil(Math.log2(m + 1))),
        },
      });
  }
  return Object.assign(result, { shared: g });
}

/** Whether a quantity takes the same value at w and 1/w, judged at two places: it is then a polynomial in cos θ. */
function isEven(wave: WavePolynomial, { evaluate }: Quantity): boolean {
  if (wave.real) return true;
  const field = primeField(0);
  return [1_357_911, 2_468_101].every(
    (w) => valueAt(field, wave, evaluate, w, 5_555_557) === valueAt(field, wave, evaluate, field.inverse(w), 5_555_557),
  );
}

function reconstructed(
  wave: WavePolynomial,
  quantity: Quantity,
  variable: WaveVariable,
  check: () => void,
): BivariatePolynomial {
  const { evaluate, waveDegree, parameterDegree } = quantity;
  const outerSize = (variable === 'cosine' ? waveDegree : 2 * waveDegree) + 1;
  const innerSize = parameterDegree + 1;
  const bits = quantity.bits + 2 * waveDegree + 2;
  const parameters = Array.from({ length: innerSize }, (_, k) => k + 1);
  const remainder = new ChineseRemainder(outerSize * innerSize);
  for (let k = 0, known = 0, unchanged = 0; known < bits && unchanged < 3; k++) {
    check();
    const field = primeField(k);
    const places: number[] = [];
    const columns: number[][] = [];
    for (let at = 1; places.length < outerSize; at++) {
      check();
      const [w, place, factor] = wavePlace(field, variable, at, waveDegree);
      if (w === 0 || places.includes(place)) continue;
      const levels = atFieldWave(field, wave, w, false);
      const conjugates = atFieldWave(field, wave, w, true);
      const values = parameters.map((p) =>
        field.mul(
          factor,
          evaluate(
            field,
            levels.map((row) => horner(field, row, p)),
            conjugates.map((row) => horner(field, row, p)),
          ),
        ),
      );
      places.push(place);
      columns.push(interpolate(field, parameters, values));
    }
    const flat = new Array<number>(outerSize * innerSize);
    for (let power = 0; power < innerSize; power++)
      interpolate(
        field,
        places,
        columns.map((column) => column[power]!),
      ).forEach((c, row) => (flat[row * innerSize + power] = c));
    unchanged = remainder.include(field, flat) ? 0 : unchanged + 1;
    known += Math.log2(field.prime);
  }
  const lifted = remainder.lifted();
  const rows = Array.from({ length: outerSize }, (_, row) =>
    trimmed(lifted.slice(row * innerSize, (row + 1) * innerSize)),
  );
  while (rows.length > 0 && rows.at(-1)!.length === 0) rows.pop();
  return rows;
}

/** A wave of the field, its place in the outer variable, and the factor (1 + x²)^degree that clears denominators. */
function wavePlace(
  field: PrimeField,
  variable: WaveVariable,
  at: number,
  waveDegree: number,
): [number, number, number] {
  if (variable === 'cosine') {
    const w = at + 1;
    return [w, field.mul(field.add(w, field.inverse(w)), (field.prime + 1) / 2), 1];
  }
  const ix = field.mul(field.imaginary, at);
  const [up, down] = [field.add(1, ix), field.sub(1, ix)];
  if (up === 0 || down === 0) return [0, at, 0];
  return [field.mul(up, field.inverse(down)), at, field.power(field.mul(up, down), waveDegree)];
}

/** @param check called between steps; may throw to stop */
export function crossingCurve(wave: WavePolynomial, check: () => void = () => undefined): CrossingCurve {
  const parts = quantities(wave);
  const variable = parts.every(({ quantity }) => isEven(wave, quantity)) ? 'cosine' : 'tangent';
  return {
    variable,
    conservativeRoots: parts.shared,
    factors: parts.map(({ kind, quantity }) => ({
      kind,
      polynomial: reconstructed(wave, quantity, variable, check),
    })),
  };
}
