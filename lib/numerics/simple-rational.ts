/** Rational numbers of small height inside intervals: short numbers keep exact arithmetic fast. */
import { compare, type Rational, rational } from './rational';

/** The rational with the smallest denominator in the open interval (lo, hi), lo < hi (Stern–Brocot). */
export function simplestBetween(lo: Rational, hi: Rational): Rational {
  if (lo.num < 0n && hi.num > 0n) return rational(0n);
  if (hi.num <= 0n) {
    const mirrored = simplestBetween({ num: -hi.num, den: hi.den }, { num: -lo.num, den: lo.den });
    return { num: -mirrored.num, den: mirrored.den };
  }
  const whole = lo.num / lo.den;
  const next = rational(whole + 1n);
  if (compare(next, hi) < 0) return next;
  // Here whole ≤ lo < hi ≤ whole + 1; with 1/(x − whole) the same question one digit further.
  const low = rational(lo.num - whole * lo.den, lo.den);
  const high = rational(hi.num - whole * hi.den, hi.den);
  const inverseLow = rational(high.den, high.num);
  const inner =
    low.num === 0n
      ? rational(inverseLow.num / inverseLow.den + 1n)
      : simplestBetween(inverseLow, rational(low.den, low.num));
  return rational(whole * inner.num + inner.den, inner.num);
}

/** Floor of the square root of a nonnegative integer. */
export function integerSquareRoot(a: bigint): bigint {
  if (a < 2n) return a;
  let x = 1n << BigInt((a.toString(2).length + 1) >> 1);
  for (;;) {
    const next = (x + a / x) >> 1n;
    if (next >= x) return x;
    x = next;
  }
}
