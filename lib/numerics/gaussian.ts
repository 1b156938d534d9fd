/** Exact complex numbers re + im·i with rational parts. */
import { add, isZero, mul, neg, ONE, rational, sub, ZERO, type Rational } from './rational';

export interface Gaussian {
  readonly re: Rational;
  readonly im: Rational;
}

export const ZERO_G: Gaussian = { re: ZERO, im: ZERO };
export const ONE_G: Gaussian = { re: ONE, im: ZERO };
export const isZeroG = (a: Gaussian) => isZero(a.re) && isZero(a.im);
export const addG = (a: Gaussian, b: Gaussian): Gaussian => ({
  re: add(a.re, b.re),
  im: isZero(a.im) ? b.im : isZero(b.im) ? a.im : add(a.im, b.im),
});
export const negG = (a: Gaussian): Gaussian => ({ re: neg(a.re), im: neg(a.im) });
export const scaleG = (a: Gaussian, factor: Rational): Gaussian => ({
  re: mul(a.re, factor),
  im: isZero(a.im) ? ZERO : mul(a.im, factor),
});
export function mulG(a: Gaussian, b: Gaussian): Gaussian {
  if (isZero(a.im)) return scaleG(b, a.re);
  if (isZero(b.im)) return scaleG(a, b.re);
  return { re: sub(mul(a.re, b.re), mul(a.im, b.im)), im: add(mul(a.re, b.im), mul(a.im, b.re)) };
}
/** @throws {RangeError} if a is 0 */
export function inverseG(a: Gaussian): Gaussian {
  const norm = add(mul(a.re, a.re), mul(a.im, a.im));
  const factor = rational(norm.den, norm.num);
  return scaleG({ re: a.re, im: neg(a.im) }, factor);
}
