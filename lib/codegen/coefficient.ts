/** Coefficients of a kernel: rational functions of the parameters, computed once a call. */
import type { RationalFunction } from '@/lib/numerics/rational-function';
import { scale, type Polynomial } from '@/lib/numerics/polynomial';
import { div, gcd, isZero, neg, ONE, sign, ZERO, type Rational } from '@/lib/numerics/rational';

export interface Coefficient {
  readonly name: string;
  readonly value: RationalFunction;
}

const degree = (powers: readonly number[]) => powers.reduce((total, power) => total + power, 0);

export const isReal = (a: Polynomial) => a.every((m) => isZero(m.im));
export const isConstantPolynomial = (a: Polynomial) => a.every((m) => degree(m.powers) === 0);
export const isConstantFunction = (f: RationalFunction) => isConstantPolynomial(f.num) && isConstantPolynomial(f.den);

/** Value of a constant function. */
export const constantValue = ({ num, den }: RationalFunction): Rational => div(num[0]?.re ?? ZERO, den[0]!.re);

/** Lowest degree first, and a positive monomial in front where there is one. */
function inReadingOrder(a: Polynomial): Polynomial {
  const sorted = [...a].sort((p, q) => degree(p.powers) - degree(q.powers));
  const positive = sorted.findIndex((m) => sign(m.re) > 0);
  return positive > 0 ? [sorted[positive]!, ...sorted.filter((_, k) => k !== positive)] : sorted;
}

/** Sign of the monomial of lowest degree: the sign that a formula pulls in front. */
export function leadingSign(a: Polynomial): -1 | 0 | 1 {
  const first = [...a].sort((p, q) => degree(p.powers) - degree(q.powers))[0];
  return first ? sign(first.re) : 0;
}

function polynomialText(a: Polynomial, symbols: readonly string[], literal: (value: Rational) => string): string {
  if (a.length === 0) return literal({ num: 0n, den: 1n });
  return inReadingOrder(a)
    .map(({ powers, re }, k) => {
      const negative = sign(re) < 0;
      const size = negative ? neg(re) : re;
      const factors = powers.flatMap((power, p) => new Array<string>(power).fill(symbols[p]!));
      if (factors.length === 0 || size.num !== 1n || size.den !== 1n) factors.unshift(literal(size));
      const term = factors.join('*');
      return k === 0 ? (negative ? `-${term}` : term) : negative ? ` - ${term}` : ` + ${term}`;
    })
    .join('');
}

/** The same quotient with integer coefficients in the denominator. */
function withPlainDenominator({ num, den }: RationalFunction): RationalFunction {
  const common = den.reduce((multiple, { re }) => (multiple * re.den) / gcd(multiple, re.den), 1n);
  const factor: Rational = { num: common, den: 1n };
  return { num: scale(num, factor), den: scale(den, factor) };
}

/**
 * A real rational function in infix notation; products run from left to right, so that every language rounds alike.
 * @param symbols code names of the parameters, in the order of the powers
 */
export function coefficientSource(
  value: RationalFunction,
  symbols: readonly string[],
  literal: (value: Rational) => string,
): string {
  if (isConstantPolynomial(value.den)) {
    const factor = div(ONE, value.den[0]!.re);
    return polynomialText(scale(value.num, factor), symbols, literal);
  }
  const { num, den } = withPlainDenominator(value);
  const above = polynomialText(num, symbols, literal);
  const below = polynomialText(den, symbols, literal);
  const inBrackets = (text: string, pattern: RegExp) => (pattern.test(text) ? `(${text})` : text);
  return `${inBrackets(above, / /)}/${inBrackets(below, /[ *]/)}`;
}

/**
 * An exact number as every language writes it: an integer, a short decimal, or a quotient of integers that the
 * compiler rounds. Negative numbers come in brackets.
 * @param suffix kind suffix of Fortran, '' elsewhere
 */
export function literalSource(value: Rational, suffix = ''): string {
  const size = value.num < 0n ? -value.num : value.num;
  const minus = value.num < 0n ? '-' : '';
  const whole = (a: bigint) => `${a}.0${suffix}`;
  let text: string;
  if (value.den === 1n) text = `${minus}${whole(size)}`;
  else if (size < 1_000_000n && [2n, 4n, 8n, 16n].includes(value.den))
    text = `${minus}${Number(size) / Number(value.den)}${suffix}`;
  else return `(${minus}${whole(size)}/${whole(value.den)})`;
  return minus ? `(${text})` : text;
}
