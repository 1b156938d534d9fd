/** Univariate polynomials over Z as dense bigint arrays: ascending coefficients, no trailing zeros; zero is []. */
import { ChineseRemainder, modularGcd, primeField, trimModular } from './prime-field';
import { gcd as gcdOfIntegers } from './rational';

export type IntegerPolynomial = readonly bigint[];

export function trimmed(a: bigint[]): IntegerPolynomial {
  while (a.length > 0 && a[a.length - 1] === 0n) a.pop();
  return a;
}

/** −1 for the zero polynomial. */
export const degree = (a: IntegerPolynomial) => a.length - 1;
export const leading = (a: IntegerPolynomial) => a[a.length - 1] ?? 0n;

export function add(a: IntegerPolynomial, b: IntegerPolynomial): IntegerPolynomial {
  return trimmed(Array.from({ length: Math.max(a.length, b.length) }, (_, k) => (a[k] ?? 0n) + (b[k] ?? 0n)));
}
export const negate = (a: IntegerPolynomial): IntegerPolynomial => a.map((c) => -c);
export const subtract = (a: IntegerPolynomial, b: IntegerPolynomial) => add(a, negate(b));
export const times = (a: IntegerPolynomial, factor: bigint): IntegerPolynomial =>
  factor === 0n ? [] : a.map((c) => c * factor);

export function multiply(a: IntegerPolynomial, b: IntegerPolynomial): IntegerPolynomial {
  if (a.length === 0 || b.length === 0) return [];
  const product = new Array<bigint>(a.length + b.length - 1).fill(0n);
  for (let j = 0; j < a.length; j++) for (let k = 0; k < b.length; k++) product[j + k]! += a[j]! * b[k]!;
  return trimmed(product);
}

export const derivative = (a: IntegerPolynomial): IntegerPolynomial => a.slice(1).map((c, k) => c * BigInt(k + 1));

/** Greatest common divisor of the coefficients, not negative. */
export function content(a: IntegerPolynomial): bigint {
  let common = 0n;
  for (const c of a) {
    if (common === 1n) break;
    if (c !== 0n) common = gcdOfIntegers(common, c);
  }
  return common;
}

/** Divided by its content, leading coefficient positive. */
export function primitivePart(a: IntegerPolynomial): IntegerPolynomial {
  if (a.length === 0) return a;
  const divisor = content(a) * (leading(a) < 0n ? -1n : 1n);
  return divisor === 1n ? a : a.map((c) => c / divisor);
}

/** a / b over Z, or null where the division leaves a remainder. */
export function exactQuotient(a: IntegerPolynomial, b: IntegerPolynomial): IntegerPolynomial | null {
  if (b.length === 0) throw new RangeError('exactQuotient: division by the zero polynomial');
  if (a.length === 0) return [];
  if (a.length < b.length) return null;
  const rest = [...a];
  const head = leading(b);
  const quotient = new Array<bigint>(a.length - b.length + 1).fill(0n);
  for (let k = quotient.length - 1; k >= 0; k--) {
    const top = rest[k + b.length - 1]!;
    if (top === 0n) continue;
    if (top % head !== 0n) return null;
    const factor = top / head;
    quotient[k] = factor;
    for (let j = 0; j < b.length; j++) rest[k + j]! -= factor * b[j]!;
  }
  return rest.some((c) => c !== 0n) ? null : quotient;
}

/** Remainder of lc(b)^(deg a − deg b + 1 rounded up to even) · a by b: a positive multiple of the remainder over Q. */
export function pseudoRemainder(a: IntegerPolynomial, b: IntegerPolynomial): IntegerPolynomial {
  if (b.length === 0) throw new RangeError('pseudoRemainder: division by the zero polynomial');
  const rest = [...a];
  const head = leading(b);
  let steps = 0;
  for (let top = a.length - 1; top >= b.length - 1; top--) {
    const factor = rest[top]!;
    for (let k = 0; k < top; k++) rest[k]! *= head;
    for (let j = 0; j < b.length - 1; j++) rest[top - b.length + 1 + j]! -= factor * b[j]!;
    rest.length = top;
    steps++;
  }
  const positive = head < 0n && steps % 2 === 1 ? rest.map((c) => -c) : rest;
  return trimmed(positive);
}

const unhurried = () => undefined;

/**
 * Primitive greatest common divisor by images modulo primes, proved by division.
 * @param check called between steps; may throw to stop
 */
export function gcd(a: IntegerPolynomial, b: IntegerPolynomial, check: () => void = unhurried): IntegerPolynomial {
  const [f, g] = [primitivePart(a), primitivePart(b)];
  if (f.length === 0) return g;
  if (g.length === 0) return f;
  const head = gcdOfIntegers(leading(f), leading(g));
  let remainder: ChineseRemainder | null = null;
  let size = Infinity;
  for (let k = 0; ; k++) {
    check();
    const field = primeField(k);
    if (field.reduce(leading(f)) === 0 || field.reduce(leading(g)) === 0) continue;
    const image = modularGcd(
      field,
      trimModular(f.map((c) => field.reduce(c))),
      trimModular(g.map((c) => field.reduce(c))),
    );
    if (image.length === 1) return [1n];
    if (image.length > size) continue;
    if (image.length < size || !remainder) {
      size = image.length;
      remainder = new ChineseRemainder(size);
    }
    const scale = field.reduce(head);
    const changed = remainder.include(
      field,
      image.map((c) => field.mul(c, scale)),
    );
    if (changed) continue;
    const candidate = primitivePart(trimmed(remainder.lifted()));
    if (exactQuotient(f, candidate) && exactQuotient(g, candidate)) return candidate;
  }
}

/** Primitive polynomial with the same roots, each simple. */
export function squareFreePart(a: IntegerPolynomial, check?: () => void): IntegerPolynomial {
  const f = primitivePart(a);
  if (f.length <= 2) return f;
  const common = gcd(f, derivative(f), check);
  return common.length === 1 ? f : primitivePart(exactQuotient(f, common)!);
}

/** Factors fₖ, square-free and coprime, with a = content · Π fₖᵏ (Yun's algorithm); constant factors are left out. */
export function squareFreeDecomposition(
  a: IntegerPolynomial,
  check?: () => void,
): { factor: IntegerPolynomial; multiplicity: number }[] {
  const f = primitivePart(a);
  if (f.length <= 1) return [];
  const common = gcd(f, derivative(f), check);
  let rest = exactQuotient(f, common)!;
  let slope = exactQuotient(derivative(f), common)!;
  const factors: { factor: IntegerPolynomial; multiplicity: number }[] = [];
  for (let multiplicity = 1; rest.length > 1; multiplicity++) {
    const difference = subtract(slope, derivative(rest));
    const factor = difference.length === 0 ? primitivePart(rest) : gcd(rest, difference, check);
    if (factor.length > 1) factors.push({ factor, multiplicity });
    rest = exactQuotient(rest, factor)!;
    slope = difference.length === 0 ? [] : exactQuotient(difference, factor)!;
  }
  return factors;
}

/** den^deg(a) · a(num / den), for a positive den: an integer with the sign of a there. */
export function scaledValue(a: IntegerPolynomial, num: bigint, den: bigint): bigint {
  let value = 0n;
  if (den === 1n) {
    for (let k = a.length - 1; k >= 0; k--) value = value * num + a[k]!;
    return value;
  }
  let scale = 1n;
  for (let k = a.length - 1; k >= 0; k--) {
    value = value * num + a[k]! * scale;
    scale *= den;
  }
  return value;
}

export function signAt(a: IntegerPolynomial, num: bigint, den: bigint): -1 | 0 | 1 {
  const value = scaledValue(a, num, den);
  return value > 0n ? 1 : value < 0n ? -1 : 0;
}

/** Divides out every factor (den·x − num) and says how often it was there. */
export function withoutRoot(a: IntegerPolynomial, num: bigint, den = 1n): [IntegerPolynomial, number] {
  let rest = a;
  let times = 0;
  while (rest.length > 1 && scaledValue(rest, num, den) === 0n) {
    rest = exactQuotient(primitivePart(rest), [-num, den])!;
    times++;
  }
  return [rest, times];
}

/** "8*r**3 - 8*r**2 + 6*r - 3", in the language of expressions. */
export function polynomialText(a: IntegerPolynomial, symbol: string): string {
  const parts: string[] = [];
  for (let k = a.length - 1; k >= 0; k--) {
    const c = a[k]!;
    if (c === 0n) continue;
    const size = c < 0n ? -c : c;
    const power = k === 0 ? '' : k === 1 ? symbol : `${symbol}**${k}`;
    const term = power === '' ? String(size) : size === 1n ? power : `${size}*${power}`;
    parts.push(parts.length === 0 ? `${c < 0n ? '-' : ''}${term}` : `${c < 0n ? '-' : '+'} ${term}`);
  }
  return parts.length === 0 ? '0' : parts.join(' ');
}
