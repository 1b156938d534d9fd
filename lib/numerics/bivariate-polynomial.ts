/** Polynomials over Z in two variables, dense: the k-th entry is the coefficient, in the inner variable, of outer^k. */
import {
  add,
  content,
  exactQuotient,
  gcd,
  type IntegerPolynomial,
  multiply,
  primitivePart,
  squareFreePart,
  subtract,
  times,
  trimmed,
} from './integer-polynomial';
import { ChineseRemainder, interpolate, modularGcd, type PrimeField, primeField, trimModular } from './prime-field';
import { gcd as gcdOfIntegers } from './rational';

export type BivariatePolynomial = readonly IntegerPolynomial[];

function trimmedOuter(a: IntegerPolynomial[]): BivariatePolynomial {
  while (a.length > 0 && a[a.length - 1]!.length === 0) a.pop();
  return a;
}

export const innerDegree = (a: BivariatePolynomial) => a.reduce((most, c) => Math.max(most, c.length - 1), 0);

/** Divided by the integer content. */
export function primitive(a: BivariatePolynomial): BivariatePolynomial {
  let common = 0n;
  for (const row of a) for (const c of row) if (common !== 1n && c !== 0n) common = gcdOfIntegers(common, c);
  return common <= 1n ? a : a.map((row) => row.map((c) => c / common));
}

/** Rows and columns exchanged: inner and outer variable change places. */
export function transposed(a: BivariatePolynomial): BivariatePolynomial {
  const columns = Array.from({ length: innerDegree(a) + 1 }, (_, k) => trimmed(a.map((row) => row[k] ?? 0n)));
  return trimmedOuter(columns);
}

/** Greatest common divisor, in the inner variable, of all coefficients. */
export function innerContent(a: BivariatePolynomial): IntegerPolynomial {
  let common: IntegerPolynomial = [];
  for (const row of a) {
    if (row.length === 0) continue;
    common = gcd(common, row);
    if (common.length === 1) break;
  }
  return common;
}

export const dividedByInner = (a: BivariatePolynomial, divisor: IntegerPolynomial): BivariatePolynomial =>
  divisor.length <= 1 ? a : a.map((row) => exactQuotient(row, divisor)!);

/** den^degree · a(outer, num/den) as a polynomial in the outer variable, divided by its content (sign kept). */
export function atInner(a: BivariatePolynomial, num: bigint, den: bigint): IntegerPolynomial {
  const n = innerDegree(a);
  const powers = Array.from({ length: n + 1 }, (_, k) => num ** BigInt(k) * den ** BigInt(n - k));
  return trimmed(a.map((row) => row.reduce((sum, c, k) => sum + c * powers[k]!, 0n)));
}

/** a(at, inner) for an integer value of the outer variable. */
export function atOuter(a: BivariatePolynomial, at: bigint): IntegerPolynomial {
  let value: IntegerPolynomial = [];
  for (let k = a.length - 1; k >= 0; k--)
    value = add(
      value.map((c) => c * at),
      a[k]!,
    );
  return trimmed([...value]);
}

export const outerDerivative = (a: BivariatePolynomial): BivariatePolynomial =>
  a.slice(1).map((row, k) => row.map((c) => c * BigInt(k + 1)));

/** a / b, or null where b does not divide a over Z. */
export function exactBivariateQuotient(a: BivariatePolynomial, b: BivariatePolynomial): BivariatePolynomial | null {
  if (a.length < b.length) return a.length === 0 ? [] : null;
  const rest = [...a];
  const head = b[b.length - 1]!;
  const quotient = new Array<IntegerPolynomial>(a.length - b.length + 1).fill([]);
  for (let k = quotient.length - 1; k >= 0; k--) {
    const top = rest[k + b.length - 1]!;
    if (top.length === 0) continue;
    const factor = exactQuotient(top, head);
    if (!factor) return null;
    quotient[k] = factor;
    for (let j = 0; j < b.length; j++) rest[k + j] = subtract(rest[k + j]!, multiply(factor, b[j]!));
  }
  return rest.every((row) => row.length === 0) ? trimmedOuter(quotient) : null;
}

/** Images modulo a prime of all rows. */
export const modularRows = (field: PrimeField, a: BivariatePolynomial): number[][] =>
  a.map((row) => row.map((c) => field.reduce(c)));

/** Value of every row at an element of the field: a polynomial in the outer variable. */
export function modularAtInner(field: PrimeField, rows: readonly number[][], at: number): number[] {
  return rows.map((row) => {
    let value = 0;
    for (let k = row.length - 1; k >= 0; k--) value = field.add(field.mul(value, at), row[k]!);
    return value;
  });
}

/** Generic degree, in the outer variable, of the common divisor; found at one random place, so it may be too large, never too small. */
function commonDegree(a: BivariatePolynomial, b: BivariatePolynomial): number {
  const field = primeField(0);
  const [rowsA, rowsB] = [modularRows(field, a), modularRows(field, b)];
  let least = Infinity;
  for (const at of [1_234_577, 7_654_319]) {
    const image = modularGcd(
      field,
      trimModular(modularAtInner(field, rowsA, at)),
      trimModular(modularAtInner(field, rowsB, at)),
    );
    least = Math.min(least, image.length - 1);
  }
  return least;
}

/**
 * Greatest common divisor as polynomials in the outer variable, without inner content; [[1n]] where coprime.
 * Images modulo primes and at values of the inner variable, proved by division.
 * @param check called between steps; may throw to stop
 */
export function bivariateGcd(
  a: BivariatePolynomial,
  b: BivariatePolynomial,
  check: () => void = () => undefined,
): BivariatePolynomial {
  if (a.length === 0) return b;
  if (b.length === 0) return a;
  let size = commonDegree(a, b);
  if (size === 0) return [[1n]];
  const [headA, headB] = [a[a.length - 1]!, b[b.length - 1]!];
  const head = times(gcd(headA, headB), gcdOfIntegers(content(headA), content(headB)));
  const nodes = Math.min(innerDegree(a), innerDegree(b)) + head.length;
  let remainder = new ChineseRemainder((size + 1) * nodes);
  for (let k = 1, used = 0; ; k++) {
    check();
    const field = primeField(k);
    const [rowsA, rowsB] = [modularRows(field, a), modularRows(field, b)];
    const headImage = head.map((c) => field.reduce(c));
    const places: number[] = [];
    const images: number[][] = [];
    for (let at = 1; places.length < nodes; at++) {
      check();
      const left = trimModular(modularAtInner(field, rowsA, at));
      const right = trimModular(modularAtInner(field, rowsB, at));
      if (left.length < a.length || right.length < b.length) continue;
      const image = modularGcd(field, left, right);
      if (image.length - 1 > size) continue;
      if (image.length - 1 < size) {
        size = image.length - 1;
        if (size === 0) return [[1n]];
        remainder = new ChineseRemainder((size + 1) * nodes);
        places.length = 0;
        images.length = 0;
        used = 0;
      }
      const scale = modularAtInner(field, [headImage], at)[0]!;
      places.push(at);
      images.push(image.map((c) => field.mul(c, scale)));
    }
    const flat: number[] = [];
    for (let row = 0; row <= size; row++)
      flat.push(
        ...interpolate(
          field,
          places,
          images.map((image) => image[row]!),
        ),
      );
    remainder.include(field, flat);
    if (++used % 2 === 1 && used > 1) continue;
    const lifted = remainder.lifted();
    const rows = Array.from({ length: size + 1 }, (_, row) => trimmed(lifted.slice(row * nodes, (row + 1) * nodes)));
    const candidate = primitive(dividedByInner(rows, primitivePart(innerContent(rows))));
    if (exactBivariateQuotient(a, candidate) && exactBivariateQuotient(b, candidate)) return candidate;
  }
}

/** The three kinds of factors of a bivariate polynomial. */
export interface SplitBivariate {
  /** Square-free, in the inner variable only. */
  readonly inner: IntegerPolynomial;
  /** Square-free, in the outer variable only. */
  readonly outer: IntegerPolynomial;
  /** Square-free, without content in either variable; [[1n]] where nothing is left. */
  readonly mixed: BivariatePolynomial;
}

/** The square-free part of a nonzero polynomial, split by the variables its factors depend on. */
export function splitSquareFree(a: BivariatePolynomial, check?: () => void): SplitBivariate {
  const inner = innerContent(a);
  const withoutInner = primitive(dividedByInner(a, inner));
  const flipped = transposed(withoutInner);
  const outer = innerContent(flipped);
  const mixed = primitive(transposed(dividedByInner(flipped, outer)));
  const repeated = mixed.length > 1 ? bivariateGcd(mixed, outerDerivative(mixed), check) : [[1n]];
  return {
    inner: squareFreePart(inner, check),
    outer: squareFreePart(outer, check),
    mixed:
      mixed.length <= 1 ? [[1n]] : repeated.length <= 1 ? mixed : primitive(exactBivariateQuotient(mixed, repeated)!),
  };
}
