/**
 * The principal root: the one that tends to the exact factor e^sigma as theta → 0, continued along a ray of
 * waves. Continuation predicts linearly and halves its step until the prediction tells the roots apart, since
 * the nearest value alone follows the wrong root where two of them cross (leapfrog at theta = pi/2).
 */
import { equationNumbersAt, exactExponent } from './exact-wave';
import { coefficientsAt, polynomialFrom, type NumericScheme } from './numeric-scheme';
import { polynomialRoots, type ComplexArray } from './roots';
import { CONVENTIONS } from './equation';

export interface TrackedRoot {
  /** Position along the ray. */
  readonly t: number;
  readonly re: number;
  readonly im: number;
  /** Argument, continuous from 0 at t = 0, radians. */
  readonly argument: number;
  /** All roots there. */
  readonly roots: ComplexArray;
  /** Index of the principal root among them; −1 where it has collided with another and cannot be told. */
  readonly index: number;
}

const STEP_MAX = 0.04;
const STEP_MIN = 2e-6;
const TILT = 1e-8;

function nearestTwo(roots: ComplexArray, re: number, im: number) {
  let index = -1;
  let first = Infinity;
  let second = Infinity;
  for (let k = 0; k < roots.re.length; k++) {
    const distance = Math.hypot(roots.re[k]! - re, roots.im[k]! - im);
    if (distance < first) {
      second = first;
      first = distance;
      index = k;
    } else if (distance < second) second = distance;
  }
  return { index, first, second };
}

const isDecaying = (scheme: NumericScheme) =>
  scheme.real &&
  scheme.mirrored.every(Boolean) &&
  CONVENTIONS[scheme.equation].operators.every((m) => m % 2 === 0) &&
  scheme.timeOrder === 1;

/** Follows the root through ascending positions; null where a collision leaves it undecided without a tilt. */
function follow(
  scheme: NumericScheme,
  parameters: readonly number[],
  direction: readonly number[],
  positions: readonly number[],
  tilt: number,
): TrackedRoot[] | null {
  const coefficients = coefficientsAt(scheme, parameters, tilt);
  const rootsAt = (t: number) =>
    polynomialRoots(
      polynomialFrom(
        scheme,
        coefficients,
        direction.map((d) => d * t),
      ),
    );
  const value = equationNumbersAt(scheme, parameters);
  const reach = Math.max(...direction.map(Math.abs)) || 1;
  // Small enough that sigma is below 1e-3, so that e^sigma singles out the root even near a computational one.
  let t = 1e-3 / reach;
  for (let k = 0; k < 40; k++) {
    const [a, b] = exactExponent(
      scheme.equation,
      value,
      direction.map((d) => d * t),
    );
    if (Math.hypot(a, b) < 1e-3) break;
    t /= 2;
  }
  if (positions.length > 0) t = Math.min(t, positions[0]! / 2 || t);
  const [sr, si] = exactExponent(
    scheme.equation,
    value,
    direction.map((d) => d * t),
  );
  let roots = rootsAt(t);
  const start = nearestTwo(roots, Math.exp(sr) * Math.cos(si), Math.exp(sr) * Math.sin(si));
  if (start.index < 0) return null;
  let [re, im] = [roots.re[start.index]!, roots.im[start.index]!];
  let argument = Math.atan2(im, re);
  let [velocityRe, velocityIm] = [(re - 1) / t, im / t];
  let collided = false;
  const decaying = isDecaying(scheme);
  const out: TrackedRoot[] = [];
  let step = Math.min(STEP_MAX / reach, t);
  for (const position of positions) {
    if (position <= t) {
      // Before the start the roots are those of theta = 0 for all that can be told.
      const at = rootsAt(position);
      const own = nearestTwo(at, 1, 0).index;
      out.push({
        t: position,
        re: at.re[own]!,
        im: at.im[own]!,
        argument: Math.atan2(at.im[own]!, at.re[own]!),
        roots: at,
        index: own,
      });
      continue;
    }
    while (t < position) {
      let advance = Math.min(step, position - t);
      for (;;) {
        const next = rootsAt(t + advance);
        const guess = nearestTwo(next, re + advance * velocityRe, im + advance * velocityIm);
        const coincide = guess.second - guess.first < 1e-7 && guess.second < 1e-6;
        const near = guess.first < 0.25 * guess.second || coincide || next.re.length === 1;
        const turned = Math.hypot(next.re[guess.index]! - re, next.im[guess.index]! - im);
        if ((near && turned < 0.25) || advance <= STEP_MIN / reach) {
          if (!near && tilt === 0) {
            if (!decaying) return null;
            collided = true;
          }
          const [nr, ni] = [next.re[guess.index]!, next.im[guess.index]!];
          velocityRe = (nr - re) / advance;
          velocityIm = (ni - im) / advance;
          argument += Math.atan2(ni * re - nr * im, nr * re + ni * im);
          [re, im, roots] = [nr, ni, next];
          t = position - t <= advance ? position : t + advance;
          step = Math.min(STEP_MAX / reach, advance * 2);
          break;
        }
        advance /= 2;
      }
      if (decaying && Math.abs(im) > 1e-5 * Math.hypot(re, im) && Math.hypot(re, im) > 1e-9) collided = true;
    }
    const own = nearestTwo(roots, re, im).index;
    out.push({ t: position, re, im, argument, roots, index: collided ? -1 : own });
  }
  return out;
}

/**
 * @param direction  theta = t · direction, radians; one component per dimension
 * @param positions  ascending t ≥ 0
 * @returns one record per position. Where the roots of a decaying equation have collided on the way, `index` is −1;
 *   elsewhere the root is continued round the collision.
 */
export function trackPrincipalRoot(
  scheme: NumericScheme,
  parameters: readonly number[],
  direction: readonly number[],
  positions: readonly number[],
): TrackedRoot[] {
  const straight = follow(scheme, parameters, direction, positions, 0);
  if (straight) return straight;
  const around = follow(scheme, parameters, direction, positions, TILT) ?? [];
  const coefficients = coefficientsAt(scheme, parameters);
  return around.map((point) => {
    const roots = polynomialRoots(
      polynomialFrom(
        scheme,
        coefficients,
        direction.map((d) => d * point.t),
      ),
    );
    const { index } = nearestTwo(roots, point.re, point.im);
    const [re, im] = [roots.re[index]!, roots.im[index]!];
    const turned = Math.atan2(im * point.re - re * point.im, re * point.re + im * point.im);
    return { ...point, roots, index, re, im, argument: point.argument + turned };
  });
}
