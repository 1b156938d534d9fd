/** How far a one-parameter set of exactly decidable values stays stable from 0 on: bracketed by rationals, then recognised. */
import { decimalText } from './algebraic-number';
import { compare, formatRational, mul, rational, type Rational } from './rational';
import { simplestBetween } from './simple-rational';

export interface AxisLimit {
  /** Decimal text with 20 digits; null where there is no end. */
  value: string | null;
  /** Closed form such as "2*sqrt(2)", "6/11"; null where none is recognised or there is no end. */
  exact: string | null;
}

const BITS = 80n;

/** Values tried in turn, fine where limits of common methods lie. */
function probes(): Rational[] {
  const list = [rational(1, 1024), rational(1, 64)];
  for (let k = 1; k <= 256; k++) list.push(rational(k, 16));
  for (let k = 20; k <= 200; k += 4) list.push(rational(k));
  return [...list, rational(1000), rational(1_000_003)];
}
const PROBES = probes();

function splitSquare(n: bigint): { square: bigint; free: bigint } {
  let [square, free] = [1n, n];
  for (let d = 2n; d * d <= free; d++)
    while (free % (d * d) === 0n) {
      free /= d * d;
      square *= d;
    }
  return { square, free };
}

/** A rational, or a rational times a square root, with small numbers, inside the bracket. */
function recognise(lo: Rational, hi: Rational): string | null {
  const small = (a: Rational) => a.den < 5000n && a.num < 1_000_000n;
  const value = simplestBetween(lo, hi);
  if (small(value)) return formatRational(value);
  const squared = simplestBetween(mul(lo, lo), mul(hi, hi));
  if (!small(squared)) return null;
  const { square, free } = splitSquare(squared.num * squared.den);
  const factor = rational(square, squared.den);
  const front = factor.num === 1n ? '' : `${factor.num}*`;
  return `${front}sqrt(${free})${factor.den === 1n ? '' : `/${factor.den}`}`;
}

/**
 * @param isStable whether the method is stable at a positive rational distance from 0; exact
 * @returns the end of the stable stretch that begins at 0: "0" where there is none
 */
export function axisLimit(isStable: (distance: Rational) => boolean): AxisLimit {
  let lo: Rational | null = null;
  let hi: Rational | null = null;
  for (const probe of PROBES) {
    if (!isStable(probe)) {
      hi = probe;
      break;
    }
    lo = probe;
  }
  if (!hi) return { value: null, exact: null };
  if (!lo) return { value: '0', exact: '0' };
  const width = rational(1n, 1n << BITS);
  while (compare(rational(hi.num * lo.den - lo.num * hi.den, hi.den * lo.den), width) > 0) {
    const middle: Rational = rational(lo.num * hi.den + hi.num * lo.den, 2n * lo.den * hi.den);
    if (isStable(middle)) lo = middle;
    else hi = middle;
  }
  // The end itself may be one of the probes: the bracket is widened so that it lies inside.
  const margin = rational(1n, 1n << (BITS - 2n));
  const open = {
    lo: rational(lo.num * margin.den - lo.den, lo.den * margin.den),
    hi: rational(hi.num * margin.den + hi.den, hi.den * margin.den),
  };
  const exact = recognise(open.lo, open.hi);
  const decimal = exact && !exact.includes('sqrt') ? simplestBetween(open.lo, open.hi) : hi;
  return { value: decimalText(decimal.num, decimal.den, 20), exact };
}
