/**
 * Resultants and discriminants of bivariate polynomials, eliminating the outer variable: computed modulo primes at
 * values of the inner variable, interpolated and lifted by the Chinese remainder theorem.
 *
 * @see G. E. Collins, The calculation of multivariate polynomial resultants, J. ACM 18 (1971) 515–532
 */
import {
  type BivariatePolynomial,
  innerDegree,
  modularAtInner,
  modularRows,
  outerDerivative,
} from './bivariate-polynomial';
import { type IntegerPolynomial, trimmed } from './integer-polynomial';
import { ChineseRemainder, interpolate, modularResultant, type PrimeField, primeField } from './prime-field';

/** log2 of a bound of Σ|coefficients| of all rows. */
function norms(a: BivariatePolynomial): number {
  let sum = 0n;
  for (const row of a) for (const c of row) sum += c < 0n ? -c : c;
  return sum.toString(2).length;
}

/**
 * Resultant in the outer variable, as a polynomial in the inner one; [] where both share a factor.
 * @param check called between steps; may throw to stop
 */
export function resultant(
  a: BivariatePolynomial,
  b: BivariatePolynomial,
  check: () => void = () => undefined,
): IntegerPolynomial {
  const [m, n] = [a.length - 1, b.length - 1];
  if (m < 0 || n < 0) return [];
  // The sum of |coefficients| of a product is at most the product of sums: every row of Sylvester's matrix sums to one of two.
  const bits = n * norms(a) + m * norms(b) + 2;
  const size = n * innerDegree(a) + m * innerDegree(b) + 1;
  const remainder = new ChineseRemainder(size);
  const all: Powers = { low: 0, high: size - 1 };
  let powers = all;
  // Three primes in a row without a change end it early: the chance of an error is below 2^-75 per coefficient.
  for (let k = 0, known = 0, unchanged = 0; known < bits && unchanged < 3; k++) {
    check();
    const field = primeField(k);
    const [rowsA, rowsB] = [modularRows(field, a), modularRows(field, b)];
    const valueAt = (at: number) =>
      modularResultant(field, modularAtInner(field, rowsA, at), modularAtInner(field, rowsB, at), m, n);
    const narrow = powers === all ? null : imageWithin(field, powers, valueAt, check);
    const image = narrow ?? imageWithin(field, all, valueAt, check) ?? [];
    powers = narrow ? powers : occurring(image, size);
    unchanged = remainder.include(field, image) ? 0 : unchanged + 1;
    known += Math.log2(field.prime);
  }
  return trimmed(remainder.lifted());
}

/** Powers of the inner variable between which all terms lie: most resultants have a high power of it as a factor. */
interface Powers {
  readonly low: number;
  readonly high: number;
}

function occurring(image: readonly number[], size: number): Powers {
  const low = image.findIndex((c) => c !== 0);
  return low < 0 ? { low: 0, high: size - 1 } : { low, high: image.findLastIndex((c) => c !== 0) };
}

/** The polynomial with these powers through the values; null where one value more does not lie on it. */
function imageWithin(
  field: PrimeField,
  { low, high }: Powers,
  valueAt: (at: number) => number,
  check: () => void,
): number[] | null {
  const nodes = Array.from({ length: high - low + 1 }, (_, k) => k + 1);
  const reducedAt = (at: number) => field.mul(valueAt(at), field.inverse(field.power(at, low)));
  const values = nodes.map((at, index) => {
    if (index % 32 === 0) check();
    return reducedAt(at);
  });
  const shifted = interpolate(field, nodes, values);
  const beyond = nodes.length + 1;
  const expected = shifted.reduceRight((sum, c) => field.add(field.mul(sum, beyond), c), 0);
  return expected === reducedAt(beyond) ? [...new Array<number>(low).fill(0), ...shifted] : null;
}

/** Resultant of a and its derivative in the outer variable: the discriminant times the leading coefficient. */
export const discriminant = (a: BivariatePolynomial, check?: () => void): IntegerPolynomial =>
  a.length <= 2 ? (a[1] ?? []) : resultant(a, outerDerivative(a), check);
