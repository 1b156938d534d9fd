/** Amplification factors of a compiled scheme at one wave, and how far they stand outside the unit circle. */
import { polynomialAt, type NumericScheme } from './numeric-scheme';
import { complexArray, polynomialRoots, rootTolerance, type ComplexArray } from './roots';

/** All roots at one wave, the stationary ones (z = 1) last; their number is roots per wave. */
export function amplificationFactors(
  scheme: NumericScheme,
  parameters: readonly number[],
  theta: readonly number[],
): ComplexArray {
  const roots = polynomialRoots(polynomialAt(scheme, parameters, theta));
  if (scheme.stationaryRoots === 0) return roots;
  const out = complexArray(roots.re.length + scheme.stationaryRoots);
  out.re.set(roots.re);
  out.im.set(roots.im);
  out.re.fill(1, roots.re.length);
  return out;
}

/** Sum of the moduli of all term coefficients: what the rounding of the polynomial is measured by. */
export function sizeOf(coefficients: ComplexArray): number {
  let sum = 0;
  for (let j = 0; j < coefficients.re.length; j++) sum += Math.hypot(coefficients.re[j]!, coefficients.im[j]!);
  return sum;
}

/** Largest |z| − 1 − (bound on its rounding error) over the roots; positive only where a root is outside for certain. */
export function excessOf(
  polynomial: ComplexArray,
  roots: ComplexArray = polynomialRoots(polynomial),
  size = 0,
): number {
  let worst = -Infinity;
  for (let k = 0; k < roots.re.length; k++) {
    const modulus = Math.hypot(roots.re[k]!, roots.im[k]!);
    if (modulus <= worst + 1) continue;
    if (!Number.isFinite(modulus)) return Infinity;
    worst = Math.max(
      worst,
      modulus - 1 - (modulus > 0.9 ? rootTolerance(polynomial, roots.re[k]!, roots.im[k]!, size) : 0),
    );
  }
  return worst;
}

/** The same for a polynomial of degree 1, without solving: the inner loop of all two-level searches. */
export function linearExcess({ re, im }: ComplexArray, size: number): number {
  const lead = Math.hypot(re[1]!, im[1]!);
  const rest = Math.hypot(re[0]!, im[0]!);
  if (lead === 0) return rest === 0 ? -1 : Infinity;
  return rest / lead - 1 - (8 * 2 ** -52 * Math.max(lead + rest, size)) / lead;
}

/** True where both roots of a quadratic are inside the circle beyond doubt (Schur-Cohn); false says nothing. */
export function isClearlyInside({ re, im }: ComplexArray): boolean {
  const lead2 = re[2]! * re[2]! + im[2]! * im[2]!;
  const gap = lead2 - (re[0]! * re[0]! + im[0]! * im[0]!);
  if (gap <= 1e-9 * lead2) return false;
  const cross2 =
    (re[2]! * re[1]! + im[2]! * im[1]! - (re[0]! * re[1]! + im[0]! * im[1]!)) ** 2 +
    (re[2]! * im[1]! - im[2]! * re[1]! - (im[0]! * re[1]! - re[0]! * im[1]!)) ** 2;
  return cross2 < gap * gap * (1 - 1e-9);
}

export function largestModulus(roots: ComplexArray): number {
  let worst = 0;
  for (let k = 0; k < roots.re.length; k++) worst = Math.max(worst, Math.hypot(roots.re[k]!, roots.im[k]!));
  return worst;
}

/** Smallest distance between two roots that both stand within `near` of the unit circle; Infinity where no two do. */
export function unitRootSeparation(roots: ComplexArray, near = 1e-3): number {
  let least = Infinity;
  for (let k = 1; k < roots.re.length; k++)
    for (let j = 0; j < k; j++) {
      const close =
        Math.abs(Math.hypot(roots.re[k]!, roots.im[k]!) - 1) < near &&
        Math.abs(Math.hypot(roots.re[j]!, roots.im[j]!) - 1) < near;
      if (close) least = Math.min(least, Math.hypot(roots.re[k]! - roots.re[j]!, roots.im[k]! - roots.im[j]!));
    }
  return least;
}
