/**
 * What happens at one special value of the parameter itself: waves with a multiple root on the unit circle, and
 * waves for which the newest level cannot be solved for. The candidate waves come from the exact curve at a
 * rational value within 2^−160 of the special one. Roots that doubles cannot part (a double root splits by about
 * 1e-8) are looked at exactly or with many digits.
 */
import type { AlgebraicNumber } from '../algebraic-number';
import { atInner } from '../bivariate-polynomial';
import { derivative, type IntegerPolynomial, squareFreePart } from '../integer-polynomial';
import { complexArray, polynomialRoots } from '../roots';
import { rational, type Rational, toNumber } from '../rational';
import { isolateRealRoots, halved } from '../real-roots';
import type { CurveComponents } from './critical-values';
import { type ExactPlace, exactMultiplicity, isMultipleUnitRoot } from './unit-root-multiplicity';
import { sampled, type WavePolynomial } from './wave-polynomial';

/** Distance at which computed roots may be one, and may be on the circle. */
const CLUSTER = 2e-5;

export interface LimitBehaviour {
  /** Waves, radians, with a multiple root on the unit circle; the double root z = 1 at θ = 0 that u_tt = … owns is left out. */
  readonly multiple: readonly number[];
  /** Waves for which the coefficient of the newest level vanishes. */
  readonly unsolvable: readonly number[];
  /** Largest modulus over the candidate waves. */
  readonly modulus: number;
}

interface Candidate {
  readonly theta: number;
  readonly place: ExactPlace;
}

function candidateWaves(curve: CurveComponents, at: AlgebraicNumber, both: boolean, check: () => void): Candidate[] {
  at.refine(160);
  const { num, den } = at.lo;
  const polynomials: IntegerPolynomial[] = [...curve.waves];
  for (const component of curve.mixed) {
    const f = atInner(component, num, den);
    // Touching waves first as zeros of the derivative: beside the special value they move by 2^−160, those of f by its root.
    if (f.length > 2) polynomials.push(derivative(f));
    if (f.length > 1) polynomials.push(f);
  }
  const places: Rational[] = [];
  for (const polynomial of polynomials) {
    check();
    const f = squareFreePart(polynomial);
    for (let root of isolateRealRoots(f, curve.variable === 'cosine' ? [-1n, 1n] : undefined, check)) {
      while (root.lo < root.hi && (root.hi - root.lo) << 150n > root.den) root = halved(f, root);
      places.push(rational(root.lo, root.den));
    }
  }
  const found = places.flatMap((x): Candidate[] => {
    const value = toNumber(x);
    if (curve.variable === 'tangent') return [{ theta: 2 * Math.atan(value), place: { tangent: x } }];
    const theta = Math.acos(Math.max(-1, Math.min(1, value)));
    const sides = both ? ([1, -1] as const) : ([1] as const);
    return sides.map((side) => ({ theta: side * theta, place: { cosine: x, side } }));
  });
  const ends: Candidate[] = [
    { theta: 0, place: { cosine: rational(1n), side: 1 } },
    { theta: Math.PI, place: { cosine: rational(-1n), side: 1 } },
  ];
  return [...ends, ...found].filter(
    ({ theta }, k, all) => all.findIndex((other) => Math.abs(other.theta - theta) < 1e-9) === k,
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
  for (const { theta, place } of candidateWaves(curve, at, !wave.real, check)) {
    const levels = levelsAt(theta);
    const scale = Math.max(...levels.map(([re, im]) => Math.hypot(re, im)));
    const [re, im] = levels.at(-1)!;
    if (Math.hypot(re, im) <= 1e-10 * Math.max(scale, newestScale(wave, parameter))) {
      unsolvable.push(theta);
      continue;
    }
    const roots = rootsOf(levels);
    modulus = Math.max(modulus, ...roots.map(([a, b]) => Math.hypot(a, b)));
    const clusters = clustersOnCircle(roots);
    if (clusters.length === 0) continue;
    const owned = wave.timeOrder === 2 && Math.abs(theta) < 1e-9 && clusters.every(isDoubleRootAtOne);
    if (owned) continue;
    const exactly = at.exact ? exactMultiplicity(wave, at.exact, theta) : null;
    const isMultiple =
      exactly === null
        ? clusters.some(({ at: near, count }) => isMultipleUnitRoot(wave, at.lo, place, near, count))
        : exactly === 'multiple';
    if (isMultiple) multiple.push(theta);
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

interface Cluster {
  readonly at: readonly [number, number];
  readonly count: number;
}

const isDoubleRootAtOne = ({ at: [re, im], count }: Cluster) => count === 2 && Math.hypot(re - 1, im) < CLUSTER;

/** Groups of two roots and more on the circle that stand too close to be told apart in doubles, at their means. */
function clustersOnCircle(roots: readonly (readonly [number, number])[]): Cluster[] {
  const clusters: Cluster[] = [];
  for (const [re, im] of roots) {
    if (Math.abs(Math.hypot(re, im) - 1) > CLUSTER) continue;
    const near = roots.filter(([a, b]) => Math.hypot(a - re, b - im) < CLUSTER);
    const mean = [0, 1].map((part) => near.reduce((sum, root) => sum + root[part as 0 | 1], 0) / near.length);
    const at: [number, number] = [mean[0]!, mean[1]!];
    const isKnown = clusters.some(({ at: [a, b] }) => Math.hypot(a - at[0], b - at[1]) < CLUSTER);
    if (near.length > 1 && !isKnown) clusters.push({ at, count: near.length });
  }
  return clusters;
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
