/**
 * What happens at one special value of the parameter itself: waves with a multiple root on the unit circle, and
 * waves for which the newest level cannot be solved for. The candidate waves come from the exact curve at a
 * rational value within 2^−160 of the special one; the roots there are looked at in double precision, where
 * a double root splits by about 1e-8.
 */
import type { AlgebraicNumber } from '../algebraic-number';
import { atInner } from '../bivariate-polynomial';
import { derivative, type IntegerPolynomial, squareFreePart } from '../integer-polynomial';
import { complexArray, polynomialRoots } from '../roots';
import { isolateRealRoots, halved } from '../real-roots';
import type { CurveComponents } from './critical-values';
import { sampled, type WavePolynomial } from './wave-polynomial';

/** Distance at which computed roots count as one, and as being on the circle. */
const CLUSTER = 2e-5;

export interface LimitBehaviour {
  /** Waves, radians, with a multiple root on the unit circle; the double root z = 1 at θ = 0 that u_tt = … owns is left out. */
  readonly multiple: readonly number[];
  /** Waves for which the coefficient of the newest level vanishes. */
  readonly unsolvable: readonly number[];
  /** Largest modulus over the candidate waves. */
  readonly modulus: number;
}

function candidateWaves(curve: CurveComponents, at: AlgebraicNumber, both: boolean, check: () => void): number[] {
  at.refine(160);
  const { num, den } = at.lo;
  const polynomials: IntegerPolynomial[] = [...curve.waves];
  for (const component of curve.mixed) {
    const f = atInner(component, num, den);
    if (f.length > 1) polynomials.push(f);
    if (f.length > 2) polynomials.push(derivative(f));
  }
  const places: number[] = [];
  for (const polynomial of polynomials) {
    check();
    const f = squareFreePart(polynomial);
    for (let root of isolateRealRoots(f, curve.variable === 'cosine' ? [-1n, 1n] : undefined, check)) {
      while (root.lo < root.hi && (root.hi - root.lo) << 60n > root.den) root = halved(f, root);
      places.push(Number((root.lo << 80n) / root.den) / 2 ** 80);
    }
  }
  const thetas =
    curve.variable === 'tangent'
      ? places.map((x) => 2 * Math.atan(x))
      : places
          .map((c) => Math.acos(Math.max(-1, Math.min(1, c))))
          .flatMap((theta) => (both ? [theta, -theta] : [theta]));
  return [0, Math.PI, ...thetas].filter(
    (theta, k, all) => all.findIndex((other) => Math.abs(other - theta) < 1e-9) === k,
  );
}

export function behaviourAt(
  wave: WavePolynomial,
  curve: CurveComponents,
  at: AlgebraicNumber,
  check: () => void = () => undefined,
): LimitBehaviour {
  const multiple: number[] = [];
  const unsolvable: number[] = [];
  let modulus = 0;
  const parameter = at.toNumber();
  const levelsAt = sampled(wave)(parameter);
  for (const theta of candidateWaves(curve, at, !wave.real, check)) {
    const levels = levelsAt(theta);
    const scale = Math.max(...levels.map(([re, im]) => Math.hypot(re, im)));
    const [re, im] = levels.at(-1)!;
    if (Math.hypot(re, im) <= 1e-10 * Math.max(scale, newestScale(wave, parameter))) {
      unsolvable.push(theta);
      continue;
    }
    const roots = rootsOf(levels);
    modulus = Math.max(modulus, ...roots.map(([a, b]) => Math.hypot(a, b)));
    const repeats = multiplicityOnCircle(roots);
    const owned = wave.timeOrder === 2 && Math.abs(theta) < 1e-9 && repeats.atOne === 2 && repeats.most === 2;
    if (repeats.most >= 2 && !owned) multiple.push(theta);
  }
  return { multiple, unsolvable, modulus };
}

/** Size of the newest level's coefficients without cancellation: what "vanishes" is measured against. */
function newestScale(wave: WavePolynomial, parameter: number): number {
  let total = 0;
  for (const terms of wave.levels) {
    let sum = 0;
    for (const { re, im, power } of terms) sum += Math.hypot(Number(re), Number(im)) * Math.abs(parameter) ** power;
    total = sum;
  }
  return total;
}

export function rootsOf(levels: readonly (readonly [number, number])[]): [number, number][] {
  const coefficients = complexArray(levels.length);
  levels.forEach(([re, im], k) => {
    coefficients.re[k] = re;
    coefficients.im[k] = im;
  });
  const roots = polynomialRoots(coefficients);
  return Array.from(roots.re, (re, k): [number, number] => [re, roots.im[k]!]);
}

function multiplicityOnCircle(roots: readonly (readonly [number, number])[]): { most: number; atOne: number } {
  let most = 0;
  let atOne = 0;
  for (const [re, im] of roots) {
    if (Math.abs(Math.hypot(re, im) - 1) > CLUSTER) continue;
    const count = roots.filter(([a, b]) => Math.hypot(a - re, b - im) < CLUSTER).length;
    most = Math.max(most, count);
    if (Math.hypot(re - 1, im) < CLUSTER) atOne = count;
  }
  return { most, atOne };
}

/** The wave with the largest root at a value, by sampling and golden-section refinement: told to readers, decides nothing. */
export function worstWave(wave: WavePolynomial, parameter: number): { theta: number; modulus: number } {
  const levelsAt = sampled(wave)(parameter);
  const modulusAt = (theta: number) => Math.max(...rootsOf(levelsAt(theta)).map(([re, im]) => Math.hypot(re, im)));
  const count = 96 * Math.max(1, Math.ceil(Math.log2(wave.span + 1)));
  const from = wave.real ? 0 : -Math.PI;
  const step = (Math.PI - from) / count;
  let best = { theta: 0, modulus: -Infinity };
  for (let k = 0; k <= count; k++) {
    const theta = from + k * step;
    const modulus = modulusAt(theta);
    if (modulus > best.modulus * (1 + 1e-14)) best = { theta, modulus };
  }
  if (!Number.isFinite(best.modulus)) return best;
  let [lo, hi] = [Math.max(from, best.theta - step), Math.min(Math.PI, best.theta + step)];
  const ratio = (Math.sqrt(5) - 1) / 2;
  for (let round = 0; round < 40; round++) {
    const [left, right] = [hi - ratio * (hi - lo), lo + ratio * (hi - lo)];
    if (modulusAt(left) > modulusAt(right)) hi = right;
    else lo = left;
  }
  const theta = (lo + hi) / 2;
  const modulus = modulusAt(theta);
  // A wave of the grid (π, π/2) stands where refinement gains nothing but rounding.
  const found = modulus > best.modulus * (1 + 1e-12) ? { theta, modulus } : best;
  return Math.abs(found.theta + Math.PI) < 1e-12 ? { ...found, theta: Math.PI } : found;
}
