/** Curves of a scheme over the wavenumber, as data: damping, phase and group speed, computational roots apart. */
import { equationNumbersAt, exactExponent } from './exact-wave';
import { coefficientsAt, cosSin, type NumericScheme } from './numeric-scheme';
import { trackPrincipalRoot, type TrackedRoot } from './principal-root';

export interface CurvePoint {
  /** Position along the ray: theta = t · direction. */
  readonly t: number;
  /** |z| of the principal root; null where it cannot be told from a computational one. */
  readonly modulus: number | null;
  /** Numerical over exact phase speed; null where the exact one is 0 or the root vanishes. */
  readonly phaseSpeed: number | null;
  /** Numerical over exact group speed along the ray; null likewise and at double roots. */
  readonly groupSpeed: number | null;
  /** ln|z| over its exact value, for equations that decay. */
  readonly decayRate: number | null;
  /** |z| of every other root, largest first. */
  readonly computational: readonly number[];
  readonly maxModulus: number;
}

/** d(arg z)/dt and d(ln|z|)/dt of a root along the ray, by implicit differentiation; null at double roots. */
function rates(
  scheme: NumericScheme,
  parameters: readonly number[],
  direction: readonly number[],
  root: { t: number; re: number; im: number },
): { argument: number } | null {
  const coefficients = coefficientsAt(scheme, parameters);
  let [zr, zi, tr, ti] = [0, 0, 0, 0];
  const powers: [number, number][] = [[1, 0]];
  for (let k = 1; k <= scheme.degree; k++) {
    const [a, b] = powers[k - 1]!;
    powers.push([a * root.re - b * root.im, a * root.im + b * root.re]);
  }
  scheme.terms.forEach((term, j) => {
    const along = term.offset.reduce((sum, o, d) => sum + o * direction[d]!, 0);
    const [c, s] = cosSin(along * root.t);
    const re = coefficients.re[j]! * c - coefficients.im[j]! * s;
    const im = coefficients.re[j]! * s + coefficients.im[j]! * c;
    const [pr, pi] = powers[term.z]!;
    // dP/dt has the factor i·along, dP/dz the factor k z^(k−1).
    tr -= along * (re * pi + im * pr);
    ti += along * (re * pr - im * pi);
    if (term.z === 0) return;
    const [qr, qi] = powers[term.z - 1]!;
    zr += term.z * (re * qr - im * qi);
    zi += term.z * (re * qi + im * qr);
  });
  const slope = zr * zr + zi * zi;
  const modulus = root.re * root.re + root.im * root.im;
  if (slope < 1e-16 || modulus < 1e-20) return null;
  const dr = -(tr * zr + ti * zi) / slope;
  const di = -(ti * zr - tr * zi) / slope;
  return { argument: (di * root.re - dr * root.im) / modulus };
}

function curvePoint(
  scheme: NumericScheme,
  parameters: readonly number[],
  direction: readonly number[],
  tracked: TrackedRoot,
): CurvePoint {
  const value = equationNumbersAt(scheme, parameters);
  const exponentAt = (t: number) =>
    exactExponent(
      scheme.equation,
      value,
      direction.map((d) => d * t),
    );
  const [decay, turn] = exponentAt(tracked.t);
  const moduli = Array.from(tracked.roots.re, (re, k) => Math.hypot(re, tracked.roots.im[k]!));
  const computational = moduli.filter((_, k) => k !== tracked.index).sort((a, b) => b - a);
  const maxModulus = Math.max(...moduli, scheme.stationaryRoots > 0 ? 1 : 0);
  const vanishes = Math.hypot(tracked.re, tracked.im) < 1e-12;
  if (tracked.index < 0 || vanishes)
    return {
      t: tracked.t,
      modulus: vanishes && tracked.index >= 0 ? 0 : null,
      phaseSpeed: null,
      groupSpeed: null,
      decayRate: null,
      computational,
      maxModulus,
    };
  const modulus = Math.hypot(tracked.re, tracked.im);
  const h = 1e-5;
  const turnRate = (exponentAt(tracked.t + h)[1] - exponentAt(tracked.t - h)[1]) / (2 * h);
  const rate = turnRate !== 0 ? rates(scheme, parameters, direction, tracked) : null;
  return {
    t: tracked.t,
    modulus,
    phaseSpeed: turn !== 0 ? tracked.argument / turn : null,
    groupSpeed: rate ? rate.argument / turnRate : null,
    decayRate: decay !== 0 ? Math.log(modulus) / decay : null,
    computational,
    maxModulus,
  };
}

/**
 * @param parameters values in the order of `scheme.parameters`
 * @param direction  [1] in one dimension; [1, 1] for the diagonal: theta = t · direction
 * @param positions  ascending t in 0 … pi (over the largest component)
 */
export function schemeCurves(
  scheme: NumericScheme,
  parameters: readonly number[],
  direction: readonly number[],
  positions: readonly number[],
): CurvePoint[] {
  return trackPrincipalRoot(scheme, parameters, direction, positions).map((point) =>
    curvePoint(scheme, parameters, direction, point),
  );
}
