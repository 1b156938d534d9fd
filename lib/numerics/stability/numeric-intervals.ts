/**
 * Stable intervals of one parameter by search in double precision: any number of levels, dimensions and roots.
 *
 * A coarse scan over parameter values finds the stretches without growth; each end is then driven inwards from the
 * unstable side, wave by wave, until no wave of the grid and none between its points (climbing on |z| and on the
 * closeness of unit roots) is unstable before it, and series settle the bands next to theta = 0 and pi.
 */
import type { ScalarScheme } from '../canonical-scheme';
import { coefficientsAt, compileScheme, type NumericScheme } from '../numeric-scheme';
import type { ComplexArray } from '../roots';
import { excessOf, sizeOf, unitRootSeparation } from '../amplification';
import { climb, gridMaxima, neighbours, type WaveGrid } from '../wave-grid';
import { lowCoefficient, type LowWave } from './low-wavenumber';
import { SearchStopped, WaveProbe } from './wave-probe';

export interface NumericEnd {
  readonly value: number;
  /** The wave that decides; null for the trivial end 0. */
  readonly theta: readonly number[] | null;
  /** Set where the decision fell in a band next to a corner wave. */
  readonly low: LowWave | null;
}
export interface NumericInterval {
  /** null: stable to the end of the line. */
  readonly lo: NumericEnd | null;
  readonly hi: NumericEnd | null;
}
export type NumericSearch = { kind: 'found'; intervals: NumericInterval[]; isolated: number[] } | { kind: 'stopped' };

const SMALLEST = 0.004;
const LARGEST = 60;
const RATIO = 1.2;
const FAR = [1e3, 1e5];

/** Values at which exact shifts and other isolated stable points are looked for. */
const ISOLATED_CANDIDATES = [1, 2, 3, 4, 1 / 2, 1 / 3, 2 / 3, 1 / 4, 3 / 2, 3 / 4];

/** The unstable side of the boundary at one wave, between a stable and an unstable value, to the last bits. */
function boundaryAt(isUnstable: (parameter: number) => boolean, stable: number, unstable: number): number {
  let [inside, outside] = [stable, unstable];
  for (let k = 0; k < 70; k++) {
    const middle = (inside + outside) / 2;
    if (middle === inside || middle === outside) break;
    if (isUnstable(middle)) outside = middle;
    else inside = middle;
  }
  return outside;
}

/** Drives an end from `unstable` towards `stable` until no wave is unstable before it. */
function settleEnd(probe: WaveProbe, stable: number, unstable: number): NumericEnd {
  let best: NumericEnd = { value: unstable, theta: null, low: null };
  const inwards = Math.sign(stable - unstable);
  const before = (value: number, relative: number) => value + inwards * relative * Math.max(Math.abs(value), 1e-3);
  const tryWave = (theta: readonly number[], relative: number): boolean => {
    if (!probe.isUnstableAt(before(best.value, relative), theta)) return false;
    const value = boundaryAt((p) => probe.isUnstableAt(p, theta), stable, best.value);
    if (value === best.value && best.theta) return false;
    best = { value, theta, low: null };
    return true;
  };
  const polish = () => {
    if (!best.theta) return;
    for (let h = probe.scan.step / 2; h > 1e-9; h /= 2)
      for (let rounds = 0; rounds < 12; rounds++) {
        probe.check();
        if (!neighbours(best.theta!, h).some((theta) => tryWave(theta, 1e-15))) break;
      }
  };
  const sweep = (grid: WaveGrid) => {
    for (let from = 0; from < grid.count;) {
      const found = probe.unstableWave(before(best.value, 1e-12), grid, from);
      if (!found) break;
      tryWave(found.theta, 0);
      from = found.index + 1;
    }
  };
  sweep(probe.scan);
  polish();
  sweep(probe.fineGrid);
  polish();
  const low = settleLow(probe, stable, best.value);
  if (low && inwards * (low.value - best.value) > 1e-9 * Math.max(Math.abs(best.value), 1e-3)) best = low;
  else if (low && !best.theta) best = low;
  for (let rounds = 0; rounds < 3; rounds++) {
    const found = climbForUnstable(probe, before(best.value, 1e-7));
    if (!found || !tryWave(found, 1e-7)) break;
    polish();
  }
  // No wave found outside: the end stands where the scan put it.
  return best.theta ? best : { ...best, theta: new Array<number>(probe.scheme.dims).fill(0) };
}

/** A wave between the grid points that is unstable at this value: by climbing on |z| and on closeness of unit roots. */
function climbForUnstable(probe: WaveProbe, parameter: number): number[] | null {
  const coefficients = coefficientsAt(probe.scheme, [parameter]);
  const size = sizeOf(coefficients);
  const excess = (polynomial: ComplexArray, roots: ComplexArray) => excessOf(polynomial, roots, size);
  const closeness = (_: ComplexArray, roots: ComplexArray) => -unitRootSeparation(roots);
  const measures = probe.scheme.degree > 1 ? [excess, closeness] : [excess];
  for (const measure of measures)
    for (const start of gridMaxima(probe.scheme, coefficients, probe.scan, measure, 5)) {
      probe.check();
      if (start.value === -Infinity) continue;
      const top = climb(probe.scheme, coefficients, measure, start.theta, probe.scan.step, 1e-6);
      if (probe.excess(coefficients, size, top.theta) > 0) return top.theta;
    }
  return null;
}

/** The end set by the bands next to corner waves, minimised over the direction of the ray. */
function settleLow(probe: WaveProbe, stable: number, unstable: number): NumericEnd | null {
  const { scheme } = probe;
  const first = probe.lowGrowth(unstable + (stable - unstable) * 1e-12);
  if (!first) return null;
  let wave = first;
  const boundary = (w: LowWave, from: number) => boundaryAt((p) => lowCoefficient(scheme, p, w) > 0, stable, from);
  let value = boundary(wave, unstable);
  for (let rounds = 0; rounds < 20; rounds++) {
    const nearer = probe.lowGrowth(value + (stable - value) * 1e-9);
    if (!nearer) break;
    const next = boundary(nearer, value);
    if (Math.abs(next - value) < 1e-13) break;
    [wave, value] = [nearer, next];
  }
  for (let h = 0.25; h > 1e-9 && scheme.dims > 1; h /= 2)
    for (const direction of neighbours(wave.direction, h)) {
      const turned = { ...wave, direction };
      if (!(lowCoefficient(scheme, value + (stable - value) * 1e-15, turned) > 0)) continue;
      const next = boundary(turned, value);
      if (Math.abs(next - stable) < Math.abs(value - stable)) [wave, value] = [turned, next];
    }
  return { value, theta: wave.base, low: wave };
}

/**
 * Verdicts at ascending values. Doubts come in runs; of each run the ends and the middle are settled exactly, and all
 * of it only where one of them is unstable.
 */
function stableAmong(probe: WaveProbe, values: readonly number[]): boolean[] {
  const first = values.map((p) => probe.survey(p));
  const out = first.map((v) => v !== 'unstable');
  for (let from = 0; from < first.length; from++) {
    if (first[from] !== 'doubt') continue;
    let to = from;
    while (first[to + 1] === 'doubt') to++;
    const settled = (k: number) => probe.lowGrowth(values[k]!) === null;
    if (![from, (from + to) >> 1, to].every(settled)) for (let k = from; k <= to; k++) out[k] = settled(k);
    from = to;
  }
  return out;
}

function scanSide(probe: WaveProbe, side: 1 | -1, intervals: NumericInterval[]): boolean {
  const ladder: number[] = [];
  // Short binary fractions keep the exact series of low waves cheap.
  for (let p = SMALLEST; p < LARGEST; p *= RATIO) ladder.push((side * Math.round(p * 1024)) / 1024);
  const values = [...ladder, ...FAR.map((p) => side * p)];
  const stable = stableAmong(probe, values);
  let start: NumericEnd | null = { value: 0, theta: null, low: null };
  let open = stable[0]!;
  const ends: [NumericEnd | null, NumericEnd | null][] = [];
  for (let k = 1; k < values.length; k++) {
    if (stable[k] === stable[k - 1]) continue;
    if (stable[k]) {
      start = settleEnd(probe, values[k]!, values[k - 1]!);
      open = true;
    } else {
      ends.push([start, settleEnd(probe, values[k - 1]!, values[k]!)]);
      open = false;
    }
  }
  if (open) ends.push([start, null]);
  for (const [near, far] of ends) intervals.push(side > 0 ? { lo: near, hi: far } : { lo: far, hi: near });
  return stable[0]!;
}

/** Whether changing the parameter's sign is the same as mirroring space: its stable set is then symmetric. */
function isOdd(scheme: NumericScheme): boolean {
  const keyOf = (z: number, offset: readonly number[]) => `${z}:${offset.map((o) => o + 0).join()}`;
  const byKey = new Map(scheme.terms.map((t) => [keyOf(t.z, t.offset), t]));
  return scheme.terms.every((t) => {
    const image = byKey.get(
      keyOf(
        t.z,
        t.offset.map((o) => (o === 0 ? 0 : -o)),
      ),
    );
    if (!image || image.monomials.length !== t.monomials.length) return false;
    return t.monomials.every((m, k) => {
      const other = image.monomials[k]!;
      const sign = m.powers[0]! % 2 === 0 ? 1 : -1;
      return other.powers[0] === m.powers[0] && other.re === sign * m.re && other.im === sign * m.im;
    });
  });
}

const negated = (end: NumericEnd | null): NumericEnd | null =>
  end && { value: end.value === 0 ? 0 : -end.value, theta: end.theta && end.theta.map((x) => -x), low: end.low };

/**
 * @param scheme   with exactly one parameter
 * @param scalar   the exact scheme it was compiled from (of a system: its characteristic polynomial)
 * @param sides    which signs of the parameter are asked for
 * @param isOver   asked often; true stops the search
 */
export function numericIntervals(
  scheme: NumericScheme,
  scalar: ScalarScheme,
  sides: readonly (1 | -1)[],
  isOver: () => boolean,
): NumericSearch {
  const probe = new WaveProbe(scheme, scalar, isOver);
  try {
    let intervals: NumericInterval[] = [];
    const mirrored = sides.length === 2 && isOdd(scheme);
    const reachesZero = (mirrored ? [1 as const] : sides).map((side) => scanSide(probe, side, intervals));
    if (mirrored) {
      intervals.push(...intervals.map(({ lo, hi }) => ({ lo: negated(hi), hi: negated(lo) })));
      reachesZero.push(...reachesZero);
    }
    if (sides.length === 2 && reachesZero.every(Boolean)) {
      const below = intervals.find((i) => i.hi !== null && i.hi.value === 0)!;
      const above = intervals.find((i) => i.lo !== null && i.lo.value === 0)!;
      intervals = [...intervals.filter((i) => i !== below && i !== above), { lo: below.lo, hi: above.hi }];
    }
    const at = (end: NumericEnd | null, otherwise: number) => (end ? end.value : otherwise);
    intervals.sort((a, b) => at(a.lo, -Infinity) - at(b.lo, -Infinity));
    const isInside = (p: number) =>
      intervals.some((i) => p >= at(i.lo, -Infinity) - 1e-9 && p <= at(i.hi, Infinity) + 1e-9);
    const isolated = sides
      .flatMap((side) => ISOLATED_CANDIDATES.map((p) => side * p))
      .filter((p) => !isInside(p) && probe.isStable(p) && probe.unstableWave(p, probe.fineGrid) === null)
      .sort((a, b) => a - b);
    return { kind: 'found', intervals, isolated };
  } catch (error) {
    if (error instanceof SearchStopped) return { kind: 'stopped' };
    throw error;
  }
}

/** Whether no wave grows at given parameter values, by the grid and the series next to corner waves. */
export function stabilityTest(scalar: ScalarScheme): (values: readonly number[]) => boolean {
  const numeric = compileScheme(scalar);
  return (values) =>
    new WaveProbe(
      numeric,
      scalar,
      () => false,
      () => values,
    ).isStable(1);
}
