/** Exact rational arithmetic on pairs of bigints in lowest terms, with a positive denominator. */

export interface Rational {
  readonly num: bigint;
  /** Positive, coprime to `num`. */
  readonly den: bigint;
}

const absOf = (a: bigint) => (a < 0n ? -a : a);

export function gcd(a: bigint, b: bigint): bigint {
  a = absOf(a);
  b = absOf(b);
  while (b !== 0n) [a, b] = [b, a % b];
  return a;
}

/** @throws {RangeError} if `den` is 0 */
export function rational(num: bigint | number, den: bigint | number = 1n): Rational {
  let p = BigInt(num);
  let q = BigInt(den);
  if (q === 0n) throw new RangeError('rational: denominator is 0');
  if (q < 0n) [p, q] = [-p, -q];
  const g = gcd(p, q);
  return g === 1n ? { num: p, den: q } : { num: p / g, den: q / g };
}

export const ZERO: Rational = { num: 0n, den: 1n };
export const ONE: Rational = { num: 1n, den: 1n };

export const add = (a: Rational, b: Rational) =>
  a.den === b.den ? rational(a.num + b.num, a.den) : rational(a.num * b.den + b.num * a.den, a.den * b.den);
export const neg = (a: Rational): Rational => ({ num: -a.num, den: a.den });
export const sub = (a: Rational, b: Rational) => add(a, neg(b));
export const mul = (a: Rational, b: Rational) => rational(a.num * b.num, a.den * b.den);
/** @throws {RangeError} if `b` is 0 */
export const div = (a: Rational, b: Rational) => rational(a.num * b.den, a.den * b.num);
/** a^k for an integer k, negative only where a ≠ 0. */
export const power = (a: Rational, k: number): Rational =>
  k < 0 ? rational(a.den ** BigInt(-k), a.num ** BigInt(-k)) : { num: a.num ** BigInt(k), den: a.den ** BigInt(k) };
export const abs = (a: Rational): Rational => (a.num < 0n ? { num: -a.num, den: a.den } : a);
export const isZero = (a: Rational) => a.num === 0n;
export const equals = (a: Rational, b: Rational) => a.num === b.num && a.den === b.den;
export const sign = (a: Rational): -1 | 0 | 1 => (a.num > 0n ? 1 : a.num < 0n ? -1 : 0);
export const compare = (a: Rational, b: Rational): number => {
  const d = a.num * b.den - b.num * a.den;
  return d < 0n ? -1 : d > 0n ? 1 : 0;
};

/**
 * Reads an integer, a fraction "p/q" or a decimal (taken as the exact decimal; "p.d/q" is allowed too).
 * @throws {RangeError} naming the text, where it is none of these or the denominator is 0
 */
export function parseRational(text: string): Rational {
  const match = /^([+-]?)(\d*)(?:\.(\d*))?(?:\/(\d+))?$/.exec(text.trim());
  if (!match || (match[2] === '' && !match[3]))
    throw new RangeError(`parseRational: '${text}' is not an integer, a fraction p/q or a decimal`);
  const fraction = match[3] ?? '';
  const num = BigInt((match[2] ?? '') + fraction || '0');
  const den = 10n ** BigInt(fraction.length) * BigInt(match[4] ?? '1');
  if (den === 0n) throw new RangeError(`parseRational: '${text}' divides by 0`);
  return rational(match[1] === '-' ? -num : num, den);
}

/** "p" or "p/q". */
export const formatRational = (a: Rational) => (a.den === 1n ? String(a.num) : `${a.num}/${a.den}`);

/** The nearest double up to one unit in the last place, also where numerator and denominator exceed the range of a double. */
export function toNumber(a: Rational): number {
  const p = absOf(a.num);
  const size = Math.max(p.toString(2).length, a.den.toString(2).length);
  if (size <= 1000) {
    if (size <= 53) return Number(a.num) / Number(a.den);
  }
  const shift = BigInt(Math.max(0, 64 + a.den.toString(2).length - p.toString(2).length));
  const quotient = (p << shift) / a.den;
  const value = Number(quotient) * 2 ** -Number(shift);
  return a.num < 0n ? -value : value;
}
