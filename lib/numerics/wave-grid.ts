/** Grids of waves with their phase factors computed once, and the search for the worst wave on and between the points. */
import { coefficientsAt, cosSin, polynomialFrom, type NumericScheme } from './numeric-scheme';
import { complexArray, polynomialRoots, type ComplexArray } from './roots';

export interface WaveGrid {
  readonly count: number;
  /** Spacing of the points in each dimension, radians. */
  readonly step: number;
  readonly theta: (index: number) => number[];
  /** Writes the amplification polynomial at one point into `into`. */
  readonly polynomial: (index: number, coefficients: ComplexArray, into: ComplexArray) => void;
}

/**
 * All waves with theta a multiple of pi/perPi in every dimension; the half where it suffices: a component runs over
 * 0 … pi where the scheme is mirrored in it or (for the first one) real, else over −pi < theta <= pi.
 * @param mirrored null to cover all waves whatever the symmetry
 */
export function waveGrid(scheme: NumericScheme, perPi: number): WaveGrid {
  const halved = scheme.mirrored.map((m, d) => m || (d === 0 && scheme.real));
  const sizes = halved.map((half) => (half ? perPi + 1 : 2 * perPi));
  const firsts = halved.map((half) => (half ? 0 : 1 - perPi));
  const count = sizes.reduce((a, b) => a * b, 1);
  // Half-integer offsets have period 4 pi, hence multiples of a quarter step in the table.
  const period = 4 * perPi;
  const cosines = new Float64Array(period);
  const sines = new Float64Array(period);
  for (let k = 0; k < period; k++) [cosines[k], sines[k]] = cosSin((k * Math.PI) / (2 * perPi)) as [number, number];
  const twice = scheme.terms.map((t) => t.offset.map((o) => Math.round(2 * o)));
  const indices = new Int32Array(scheme.dims);
  const split = (index: number) => {
    for (let d = scheme.dims - 1; d >= 0; d--) {
      indices[d] = (index % sizes[d]!) + firsts[d]!;
      index = Math.floor(index / sizes[d]!);
    }
  };
  return {
    count,
    step: Math.PI / perPi,
    theta: (index) => {
      split(index);
      return Array.from(indices, (k) => (k * Math.PI) / perPi);
    },
    polynomial: (index, coefficients, into) => {
      split(index);
      into.re.fill(0);
      into.im.fill(0);
      for (let j = 0; j < scheme.terms.length; j++) {
        let turn = 0;
        for (let d = 0; d < scheme.dims; d++) turn += twice[j]![d]! * indices[d]!;
        turn = ((turn % period) + period) % period;
        const z = scheme.terms[j]!.z;
        const re = coefficients.re[j]!;
        const im = coefficients.im[j]!;
        into.re[z]! += re * cosines[turn]! - im * sines[turn]!;
        into.im[z]! += re * sines[turn]! + im * cosines[turn]!;
      }
    },
  };
}

export type WaveMeasure = (polynomial: ComplexArray, roots: ComplexArray) => number;

/** Moves from wave to wave while the measure grows, halving the step, until the step is below `tolerance`. */
export function climb(
  scheme: NumericScheme,
  coefficients: ComplexArray,
  measure: WaveMeasure,
  start: readonly number[],
  step: number,
  tolerance = 1e-8,
): { theta: number[]; value: number } {
  const at = (theta: readonly number[]) => {
    const polynomial = polynomialFrom(scheme, coefficients, theta);
    return measure(polynomial, polynomialRoots(polynomial));
  };
  let theta = [...start];
  let value = at(theta);
  for (let h = step / 2; h > tolerance; h /= 2) {
    for (let rounds = 0; rounds < 8; rounds++) {
      let best: { theta: number[]; value: number } | null = null;
      for (const move of neighbours(theta, h)) {
        const v = at(move);
        if (v > (best?.value ?? value)) best = { theta: move, value: v };
      }
      if (!best) break;
      ({ theta, value } = best);
    }
  }
  return { theta, value };
}

/** Points one step away along every axis and, in several dimensions, every diagonal of two axes. */
export function neighbours(theta: readonly number[], h: number): number[][] {
  const out: number[][] = [];
  const moved = (changes: readonly (readonly [number, number])[]) => {
    const next = [...theta];
    for (const [d, by] of changes) next[d]! += by;
    out.push(next);
  };
  for (let d = 0; d < theta.length; d++) {
    moved([[d, h]]);
    moved([[d, -h]]);
    for (let e = 0; e < d; e++)
      for (const s of [h, -h]) {
        moved([
          [d, s],
          [e, s],
        ]);
        moved([
          [d, s],
          [e, -s],
        ]);
      }
  }
  return out;
}

/** Waves at which `measure` is largest over the grid: the best few local maxima, best first. */
export function gridMaxima(
  scheme: NumericScheme,
  coefficients: ComplexArray,
  grid: WaveGrid,
  measure: WaveMeasure,
  keep: number,
): { theta: number[]; value: number }[] {
  const polynomial = complexArray(scheme.degree + 1);
  const found: { index: number; value: number }[] = [];
  let warm: ComplexArray | undefined;
  for (let index = 0; index < grid.count; index++) {
    grid.polynomial(index, coefficients, polynomial);
    warm = polynomialRoots(polynomial, warm);
    const value = measure(polynomial, warm);
    if (found.length === keep && value <= found[keep - 1]!.value) continue;
    const theta = grid.theta(index);
    // Neighbours of a better point climb to the same maximum.
    const rival = found.find((f) => grid.theta(f.index).every((x, d) => Math.abs(x - theta[d]!) < 1.5 * grid.step));
    if (rival) {
      if (value <= rival.value) continue;
      Object.assign(rival, { index, value });
    } else {
      if (found.length === keep) found.pop();
      found.push({ index, value });
    }
    found.sort((a, b) => b.value - a.value);
  }
  return found.map((f) => ({ theta: grid.theta(f.index), value: f.value }));
}

const largest: WaveMeasure = (_, roots) => {
  let worst = 0;
  for (let k = 0; k < roots.re.length; k++) worst = Math.max(worst, Math.hypot(roots.re[k]!, roots.im[k]!));
  return worst;
};

/** Points per pi that resolve the symbol of wide stencils in each number of dimensions. */
export const POINTS_PER_PI: Readonly<Record<1 | 2 | 3, number>> = { 1: 360, 2: 36, 3: 12 };

/**
 * The largest modulus over all waves, refined between the grid points.
 * @param parameters values in the order of `scheme.parameters`
 */
export function spectralRadius(
  scheme: NumericScheme,
  parameters: readonly number[],
  perPi = POINTS_PER_PI[scheme.dims],
): { modulus: number; theta: number[] } {
  const coefficients = coefficientsAt(scheme, parameters);
  const grid = waveGrid(scheme, perPi);
  const starts = gridMaxima(scheme, coefficients, grid, largest, 4);
  let best = { theta: new Array<number>(scheme.dims).fill(0), value: 0 };
  for (const start of starts) {
    const top = climb(scheme, coefficients, largest, start.theta, grid.step);
    if (top.value > best.value) best = top;
  }
  return { modulus: best.value, theta: best.theta };
}
