/** Power series in one variable over Q(i), truncated, and the root of a polynomial as such a series. */
import { add, div, isZero, mul, neg, rational, sub, ZERO, ONE, type Rational } from './rational';

export interface Gaussian {
  readonly re: Rational;
  readonly im: Rational;
}
/** Coefficients of t^0, t^1, …; all series of one computation have the same length. */
export type ExactSeries = readonly Gaussian[];

export const gaussian = (re: Rational, im: Rational = ZERO): Gaussian => ({ re, im });
const NOTHING = gaussian(ZERO);
export const isNothing = (a: Gaussian) => isZero(a.re) && isZero(a.im);
export const addG = (a: Gaussian, b: Gaussian): Gaussian => ({ re: add(a.re, b.re), im: add(a.im, b.im) });
export const subG = (a: Gaussian, b: Gaussian): Gaussian => ({ re: sub(a.re, b.re), im: sub(a.im, b.im) });
export const mulG = (a: Gaussian, b: Gaussian): Gaussian => {
  if (isZero(a.im) && isZero(b.im)) return { re: mul(a.re, b.re), im: ZERO };
  return { re: sub(mul(a.re, b.re), mul(a.im, b.im)), im: add(mul(a.re, b.im), mul(a.im, b.re)) };
};
export const divG = (a: Gaussian, b: Gaussian): Gaussian => {
  const norm = add(mul(b.re, b.re), mul(b.im, b.im));
  const top = mulG(a, { re: b.re, im: neg(b.im) });
  return { re: div(top.re, norm), im: div(top.im, norm) };
};

export const constantSeries = (value: Gaussian, length: number): ExactSeries =>
  Array.from({ length }, (_, k) => (k === 0 ? value : NOTHING));
export const addSeries = (a: ExactSeries, b: ExactSeries): ExactSeries => a.map((x, k) => addG(x, b[k]!));

export function mulSeries(a: ExactSeries, b: ExactSeries): ExactSeries {
  const out = a.map(() => NOTHING);
  for (let i = 0; i < a.length; i++) {
    if (isNothing(a[i]!)) continue;
    for (let j = 0; i + j < a.length; j++) if (!isNothing(b[j]!)) out[i + j] = addG(out[i + j]!, mulG(a[i]!, b[j]!));
  }
  return out;
}

/** e^(i offset t). */
export function waveSeries(offset: Rational, length: number): ExactSeries {
  const out: Gaussian[] = [];
  let size: Rational = ONE;
  for (let k = 0; k < length; k++) {
    const value = k % 4 < 2 ? size : neg(size);
    out.push(k % 2 === 0 ? gaussian(value) : gaussian(ZERO, value));
    size = div(mul(size, offset), rational(k + 1));
  }
  return out;
}

/**
 * The root w(t) of Σ b_k(t) w^k with w(0) = start.
 * @param coefficients ascending in w
 * @returns null unless `start` is a simple root at t = 0
 */
export function rootSeries(coefficients: readonly ExactSeries[], start: Gaussian): ExactSeries | null {
  const length = coefficients[0]!.length;
  const at = (k: number) => coefficients[k]![0]!;
  let value = NOTHING;
  let slope = NOTHING;
  for (let k = coefficients.length - 1; k >= 0; k--) {
    slope = addG(mulG(slope, start), value);
    value = addG(mulG(value, start), at(k));
  }
  if (!isNothing(value) || isNothing(slope)) return null;
  const w: Gaussian[] = [...constantSeries(start, length)];
  // The coefficient of t^n enters P(w(t), t) at that order only as slope · w_n, so each order is one division.
  for (let n = 1; n < length; n++) {
    let residual = constantSeries(NOTHING, n + 1);
    const known = w.slice(0, n + 1);
    for (let k = coefficients.length - 1; k >= 0; k--)
      residual = addSeries(mulSeries(residual, known), coefficients[k]!.slice(0, n + 1));
    w[n] = divG(subG(NOTHING, residual[n]!), slope);
  }
  return w;
}

/** w · conjugate(w) for real t: real coefficients. */
export const squaredModulus = (w: ExactSeries): Rational[] =>
  mulSeries(
    w,
    w.map((c) => ({ re: c.re, im: neg(c.im) })),
  ).map((c) => c.re);
