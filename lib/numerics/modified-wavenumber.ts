/** How a one-dimensional difference sees a wave: samples, maximum of Re kappa, and how far it stays within a tolerance. */
import { isZero, rational, toNumber, type Rational } from './rational';
import { StencilSymbol, type Row } from './stencil-symbol';

export interface ModifiedWavenumberResult {
  samples: { theta: string; re: number; im: number }[];
  maxRe: { value: number; theta: number } | null;
  minAbsLhsSymbol: number | null;
  resolvedBandwidthComplex: Record<string, number> | null;
  resolvedBandwidthReal: Record<string, number> | null;
  reentersComplex?: Record<string, boolean>;
  reentersReal?: Record<string, boolean>;
  lattice: 'integer' | 'half-integer' | 'nonuniform';
}

export interface WavenumberQuestion {
  readonly right: Row;
  readonly left: Row | null;
  readonly derivative: number;
  readonly consistent: boolean;
  /** Row residuals divided by the left-hand sum, of the orders derivative, derivative + 1, …; exact. */
  readonly residuals: readonly Rational[];
}

const SAMPLES: readonly [string, Rational][] = [
  ['1/4*pi', rational(1, 4)],
  ['1/2*pi', rational(1, 2)],
  ['3/4*pi', rational(3, 4)],
  ['pi', rational(1)],
];
const TOLERANCES = ['0.01', '0.001'] as const;
const GRID = 512;

function latticeOf(rows: readonly (Row | null)[]): ModifiedWavenumberResult['lattice'] {
  const offsets = rows.flatMap((row) => row?.offsets.filter((_, k) => !isZero(row.weights[k]!)) ?? []);
  if (offsets.every((x) => x.den === 1n)) return 'integer';
  return offsets.every((x) => 2n % x.den === 0n) ? 'half-integer' : 'nonuniform';
}

/** A zero of an increasing-or-decreasing function between two signs, to the last digit. */
function bisect(f: (t: number) => number, lo: number, hi: number): number {
  const below = f(lo) <= 0;
  for (let k = 0; k < 100; k++) {
    const middle = (lo + hi) / 2;
    if (middle <= lo || middle >= hi) break;
    if (f(middle) <= 0 === below) lo = middle;
    else hi = middle;
  }
  return (lo + hi) / 2;
}

/** Golden-section search for the extremum that a bracket holds. */
function refine(f: (t: number) => number, lo: number, hi: number): number {
  for (let k = 0; k < 60; k++) {
    const [a, b] = [lo + (hi - lo) * 0.382, lo + (hi - lo) * 0.618];
    if (f(a) < f(b)) hi = b;
    else lo = a;
  }
  return (lo + hi) / 2;
}

function minimum(f: (t: number) => number): number {
  const values = Array.from({ length: GRID + 1 }, (_, k) => f((Math.PI * k) / GRID));
  const index = values.indexOf(Math.min(...values));
  const theta = refine(f, (Math.PI * Math.max(0, index - 1)) / GRID, (Math.PI * Math.min(GRID, index + 1)) / GRID);
  return Math.min(f(theta), values[index]!);
}

/** Largest Re kappa on 0 … pi: end values, and the zeros of the slope found between grid points. */
function largestReal(symbol: StencilSymbol): { value: number; theta: number } {
  const candidates = [0, Math.PI];
  let before = symbol.slope(0);
  for (let k = 1; k <= GRID; k++) {
    const theta = (Math.PI * k) / GRID;
    const slope = symbol.slope(theta);
    if (before > 0 && slope <= 0) candidates.push(bisect((t) => -symbol.slope(t), theta - Math.PI / GRID, theta));
    before = slope;
  }
  const best = candidates
    .map((theta) => ({ value: theta === Math.PI ? symbol.kappaAt(rational(1))[0] : symbol.kappa(theta)[0], theta }))
    .reduce((a, b) => (b.value > a.value * (1 + 1e-15) + 1e-300 ? b : a));
  // A slope that vanishes at pi by symmetry sends the bisection to its neighbourhood: pi itself is meant.
  return Math.PI - best.theta < 1e-7 ? { value: symbol.kappaAt(rational(1))[0], theta: Math.PI } : best;
}

/** kappa/theta^m − 1; by its series where direct evaluation would cancel. */
function relativeError(symbol: StencilSymbol, question: WavenumberQuestion): (theta: number) => [number, number] {
  const { derivative: m, residuals, right, left } = question;
  const series = residuals.map(toNumber);
  const reach = Math.max(...[...right.offsets, ...(left?.offsets ?? [])].map((x) => Math.abs(toNumber(x))), 0.5);
  const sumOfLeft = symbol.lhs(0)[0];
  return (theta) => {
    if (theta * reach > 1.5) {
      const [re, im] = symbol.kappa(theta);
      return [re / theta ** m - 1, im / theta ** m];
    }
    let re = 0;
    let im = 0;
    let power = 1;
    for (let k = 0; k < series.length; k++) {
      const value = series[k]! * power;
      if (k % 4 === 0) re += value;
      else if (k % 4 === 1) im += value;
      else if (k % 4 === 2) re -= value;
      else im -= value;
      power *= theta;
    }
    const [a, b] = symbol.lhs(theta);
    const n = (a * a + b * b) / sumOfLeft;
    return [(re * a + im * b) / n, (im * a - re * b) / n];
  };
}

/** Angles at which the error is looked at: fine near 0, where a first-order formula already fails. */
function searchAngles(): number[] {
  const angles: number[] = [];
  for (let t = 1e-6; t < Math.PI / GRID; t *= 1.05) angles.push(t);
  for (let k = 1; k <= GRID; k++) angles.push((Math.PI * k) / GRID);
  return angles;
}

/** Whether a function falls to eps or below after the given index, also between two grid points. */
function fallsBelow(
  error: (theta: number) => number,
  eps: number,
  angles: readonly number[],
  values: readonly number[],
  from: number,
) {
  for (let k = from; k < values.length; k++) {
    if (values[k]! <= eps) return true;
    const [before, after] = [values[k - 1], values[k + 1]];
    if (before === undefined || after === undefined || values[k]! > before || values[k]! > after) continue;
    // Between neighbours the function cannot fall further than it rose on either side.
    if (values[k]! - Math.max(before, after) + values[k]! > eps) continue;
    if (error(refine(error, angles[k - 1]!, angles[k + 1]!)) <= eps) return true;
  }
  return false;
}

function bandwidth(
  error: (theta: number) => number,
  eps: number,
  angles: readonly number[],
  values: readonly number[],
) {
  const excess = (t: number) => error(t) - eps;
  for (let k = 0; k < angles.length; k++) {
    if (values[k]! > eps) {
      const theta = bisect(excess, k === 0 ? 1e-12 : angles[k - 1]!, angles[k]!);
      return { theta, reenters: fallsBelow(error, eps, angles, values, k + 1) };
    }
    // A maximum between grid points may pass eps where both neighbours do not.
    const [a, b] = [values[k - 2], values[k - 1]];
    if (a === undefined || b === undefined || b <= a || b < values[k]! || b < 0.98 * eps) continue;
    const top = refine((t) => -error(t), angles[k - 2]!, angles[k]!);
    if (error(top) > eps) return { theta: bisect(excess, angles[k - 2]!, top), reenters: true };
  }
  return { theta: Math.PI, reenters: false };
}

export function modifiedWavenumber(question: WavenumberQuestion): ModifiedWavenumberResult {
  const { right, left, derivative } = question;
  const symbol = new StencilSymbol(right, left, derivative);
  const lattice = latticeOf([right, left]);
  const samples = SAMPLES.map(([theta, turns]) => {
    const [re, im] = symbol.kappaAt(turns);
    return { theta, re, im };
  }).filter(({ re, im }) => Number.isFinite(re) && Number.isFinite(im));
  const least = left ? minimum((t) => Math.hypot(...symbol.lhs(t))) : null;
  const result: ModifiedWavenumberResult = {
    samples,
    maxRe: null,
    minAbsLhsSymbol: least !== null && least < 1e-12 ? 0 : least,
    resolvedBandwidthComplex: null,
    resolvedBandwidthReal: null,
    lattice,
  };
  const isSingular = least !== null && least < 1e-9;
  if (lattice === 'nonuniform' || isSingular) return result;
  result.maxRe = largestReal(symbol);
  if (!question.consistent) return result;
  const error = relativeError(symbol, question);
  const angles = searchAngles();
  const at = angles.map(error);
  const kinds = [
    ['Complex', (e: readonly [number, number]) => Math.hypot(e[0], e[1])],
    ['Real', (e: readonly [number, number]) => Math.abs(e[0])],
  ] as const;
  for (const [kind, size] of kinds) {
    const values = at.map(size);
    const found = TOLERANCES.map(
      (eps) => [eps, bandwidth((t) => size(error(t)), Number(eps), angles, values)] as const,
    );
    result[`resolvedBandwidth${kind}`] = Object.fromEntries(found.map(([eps, { theta }]) => [eps, theta]));
    const again = found.filter(([, { reenters }]) => reenters);
    if (again.length > 0) result[`reenters${kind}`] = Object.fromEntries(again.map(([eps]) => [eps, true]));
  }
  return result;
}
