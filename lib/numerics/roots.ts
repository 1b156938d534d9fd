/**
 * Roots of complex polynomials of the small degrees that amplification factors have (1 … 16), with a bound
 * on their rounding error, so that "on the unit circle" can be told from "outside" near double roots too.
 */

/** Coefficients or values as separate real and imaginary parts; coefficients are ascending in z. */
export interface ComplexArray {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export const complexArray = (length: number): ComplexArray => ({
  re: new Float64Array(length),
  im: new Float64Array(length),
});

const EPSILON = 2 ** -52;
const ITERATIONS_MAX = 80;

/** Square root with nonnegative real part, as [re, im]. */
export function complexSqrt(re: number, im: number): [number, number] {
  const modulus = Math.hypot(re, im);
  if (modulus === 0) return [0, 0];
  const half = Math.sqrt((modulus + Math.abs(re)) / 2);
  const other = im / (2 * half);
  if (re >= 0) return [half, other];
  return im >= 0 ? [Math.abs(other), half] : [Math.abs(other), -half];
}

function quadraticRoots(c: ComplexArray, out: ComplexArray): void {
  const [ar, ai] = [c.re[2]!, c.im[2]!];
  const [br, bi] = [c.re[1]! / 2, c.im[1]! / 2];
  const [cr, ci] = [c.re[0]!, c.im[0]!];
  const [sr, si] = complexSqrt(br * br - bi * bi - (ar * cr - ai * ci), 2 * br * bi - (ar * ci + ai * cr));
  // Adding where no cancellation occurs keeps the smaller root accurate.
  const along = br * sr + bi * si >= 0 ? 1 : -1;
  const qr = -(br + along * sr);
  const qi = -(bi + along * si);
  const a2 = ar * ar + ai * ai;
  out.re[0] = (qr * ar + qi * ai) / a2;
  out.im[0] = (qi * ar - qr * ai) / a2;
  const q2 = qr * qr + qi * qi;
  out.re[1] = q2 === 0 ? 0 : (cr * qr + ci * qi) / q2;
  out.im[1] = q2 === 0 ? 0 : (ci * qr - cr * qi) / q2;
}

/** One simultaneous iteration over all roots (Ehrlich-Aberth); returns the largest relative correction. */
function aberthSweep(c: ComplexArray, degree: number, out: ComplexArray): number {
  let worst = 0;
  for (let k = 0; k < degree; k++) {
    const x = out.re[k]!;
    const y = out.im[k]!;
    let pr = c.re[degree]!;
    let pi = c.im[degree]!;
    let dr = 0;
    let di = 0;
    for (let j = degree - 1; j >= 0; j--) {
      const t = dr * x - di * y + pr;
      di = dr * y + di * x + pi;
      dr = t;
      const u = pr * x - pi * y + c.re[j]!;
      pi = pr * y + pi * x + c.im[j]!;
      pr = u;
    }
    if (pr === 0 && pi === 0) continue;
    let sr = 0;
    let si = 0;
    for (let j = 0; j < degree; j++) {
      if (j === k) continue;
      const ex = x - out.re[j]!;
      const ey = y - out.im[j]!;
      const e2 = ex * ex + ey * ey || 1e-300;
      sr += ex / e2;
      si -= ey / e2;
    }
    // Correction p / (p' − p Σ 1/(z − zj)).
    const nr = dr - (pr * sr - pi * si);
    const ni = di - (pr * si + pi * sr);
    const n2 = nr * nr + ni * ni;
    if (n2 === 0) continue;
    const hx = (pr * nr + pi * ni) / n2;
    const hy = (pi * nr - pr * ni) / n2;
    out.re[k] = x - hx;
    out.im[k] = y - hy;
    worst = Math.max(worst, Math.hypot(hx, hy) / Math.max(Math.hypot(x, y), 1e-30));
  }
  return worst;
}

function scatter(c: ComplexArray, degree: number, out: ComplexArray): void {
  // Radius between the moduli of the smallest and largest roots: the geometric mean of all.
  const radius = (Math.hypot(c.re[0]!, c.im[0]!) / Math.hypot(c.re[degree]!, c.im[degree]!)) ** (1 / degree) || 1;
  for (let k = 0; k < degree; k++) {
    const angle = (2 * Math.PI * k) / degree + 0.7;
    out.re[k] = radius * (1 + 0.1 * k) * Math.cos(angle);
    out.im[k] = radius * (1 + 0.1 * k) * Math.sin(angle);
  }
}

/**
 * All roots of Σ c[k] z^k, with multiplicity.
 * Leading coefficients that vanish to rounding give roots at infinity (re = Infinity), trailing ones roots at 0.
 * Relative accuracy is about 1e-15 for simple roots and 1e-8 for double ones.
 * @param warm roots of a neighbouring polynomial of the same degree, to start the iteration from
 */
export function polynomialRoots(c: ComplexArray, warm?: ComplexArray): ComplexArray {
  const full = c.re.length - 1;
  const out = complexArray(Math.max(full, 0));
  let scale = 0;
  for (let k = 0; k <= full; k++) scale = Math.max(scale, Math.abs(c.re[k]!), Math.abs(c.im[k]!));
  let top = full;
  let bottom = 0;
  const negligible = scale * EPSILON * 2;
  while (top > 0 && Math.hypot(c.re[top]!, c.im[top]!) <= negligible) out.re[--top] = Infinity;
  while (bottom < top && Math.hypot(c.re[bottom]!, c.im[bottom]!) <= scale * 1e-300) bottom++;
  const degree = top - bottom;
  if (degree <= 0) return out;
  const core = { re: c.re.subarray(bottom, top + 1), im: c.im.subarray(bottom, top + 1) };
  const found = { re: out.re.subarray(bottom, top), im: out.im.subarray(bottom, top) };
  if (degree === 1) {
    const a2 = core.re[1]! ** 2 + core.im[1]! ** 2;
    found.re[0] = -(core.re[0]! * core.re[1]! + core.im[0]! * core.im[1]!) / a2;
    found.im[0] = -(core.im[0]! * core.re[1]! - core.re[0]! * core.im[1]!) / a2;
    return out;
  }
  if (degree === 2) {
    quadraticRoots(core, found);
    return out;
  }
  const usable = warm && degree === full && warm.re.length === full && warm.re.every(Number.isFinite);
  if (usable) {
    found.re.set(warm.re);
    found.im.set(warm.im);
    // Equal starting points would stay equal for ever.
    for (let k = 1; k < degree; k++)
      for (let j = 0; j < k; j++)
        if (Math.hypot(found.re[k]! - found.re[j]!, found.im[k]! - found.im[j]!) < 1e-9) found.im[k]! += 1e-6 * (k + 1);
  } else scatter(core, degree, found);
  for (let round = 0; round < ITERATIONS_MAX; round++) if (aberthSweep(core, degree, found) < 4 * EPSILON) break;
  return out;
}

/**
 * Bound on the error of a computed root: backward error of the coefficients over |P'|, capped where roots coincide.
 * @param size sum of the moduli of the terms that made the coefficients, where cancellation among them was possible
 */
export function rootTolerance(c: ComplexArray, re: number, im: number, size = 0): number {
  let sum = 0;
  let dr = 0;
  let di = 0;
  let pr = 0;
  let pi = 0;
  let power = 1;
  const modulus = Math.hypot(re, im);
  for (let k = 0; k < c.re.length; k++) {
    sum += Math.hypot(c.re[k]!, c.im[k]!) * power;
    power *= modulus;
  }
  for (let k = c.re.length - 1; k >= 0; k--) {
    const t = dr * re - di * im + pr;
    di = dr * im + di * re + pi;
    dr = t;
    const u = pr * re - pi * im + c.re[k]!;
    pi = pr * im + pi * re + c.im[k]!;
    pr = u;
  }
  const slope = Math.hypot(dr, di);
  const backward = 8 * EPSILON * Math.max(sum, size);
  const scale = sum / Math.max(modulus, 1e-300);
  // At an m-fold root the error is of size (backward)^(1/m); the square root covers the double roots that occur.
  return Math.min(backward / Math.max(slope, 1e-300), 4 * Math.sqrt(backward / Math.max(scale, 1e-300)));
}
