/**
 * How fast an unstable scheme grows as its parameter tends to 0: max|z| − 1 ~ K p^q.
 *
 * ln|z| of every unit root at p = 0 is expanded as a double series in p and in the distance t of the wave from one
 * where the growth is decided. On the scale t = tau p^a the terms on one edge of the Newton polygon dominate; the
 * exponent is the smallest j + a k over edges whose sum is positive for some tau, K its maximum over tau. At a
 * fixed wave (a = 0) the leading power of p is maximised over all waves directly. Which terms are there at all is
 * decided exactly in one dimension, and the exponent with it; K is a double. Where roots coincide at p = 0
 * the series do not exist, and the exponent is fitted to the growth at 0.08, 0.04, …, 0.0025.
 */
import type { ScalarScheme } from './canonical-scheme';
import { type PatternBase, vanishingPattern } from './growth-pattern';
import type { NumericScheme } from './numeric-scheme';
import { coefficientsAt } from './numeric-scheme';
import { complexArray, polynomialRoots } from './roots';
import { spectralRadius, waveGrid } from './wave-grid';
import { addScaled, doubleSeries, logarithm, multiply, type DoubleSeries } from './double-series';

export interface GrowthAsymptotics {
  /** Rational text: "2", "5/2". */
  q: string;
  /** K of max|z| − 1 ~ K |p|^q; null where only the exponent was found. */
  factor: number | null;
  at: { parameter: number; growthPerStep: number; stepsToTenfold: number | null } | null;
  /** How K was obtained. */
  method: 'numeric';
  /** Relative tolerance of K where the series give it; null where it is read off the growth at the smallest value tried. */
  tolerance: string | null;
  /** 'exact': the terms of the series that decide q are known to be there, and those before them to be absent. */
  exponentMethod: 'exact' | 'numeric';
}

/** The value at which growth per step is shown. */
const SHOWN_AT = 0.4;
const J_MAX = 9;
const K_MAX = 12;
const UNIT = 1e-7;
const NEGLIGIBLE = 1e-9;

/** Of K, from series in double precision refined over tau or over the waves. */
const FACTOR_TOLERANCE = '1e-8';

interface Leading {
  exponent: number;
  factor: number;
  /** False where a term was taken for absent because it is small. */
  isExact: boolean;
}
type Root = { readonly re: number; readonly im: number };

/** k where a root is i^k to rounding; null for other points of the circle. */
function quarterOf({ re, im }: Root): number | null {
  const k = ((Math.round((2 * Math.atan2(im, re)) / Math.PI) % 4) + 4) % 4;
  return Math.hypot(re - [1, 0, -1, 0][k]!, im - [0, 1, 0, -1][k]!) < 1e-9 ? k : null;
}

/** Exactly vanishing terms in one dimension; null elsewhere. */
function patternAt(scalar: ScalarScheme | null, base: PatternBase, root: Root, kMax: number): boolean[] | null {
  const quarter = quarterOf(root);
  if (!scalar || scalar.dims !== 1 || scalar.parameters.length !== 1 || quarter === null) return null;
  return vanishingPattern(scalar, base, quarter, { jMax: J_MAX, kMax });
}

/** Unit roots at p = 0 for one wave; null where one is outside the circle or two coincide on it. */
function unitRootsAtZero(scheme: NumericScheme, theta: readonly number[]): { re: number; im: number }[] | null {
  const polynomial = complexArray(scheme.degree + 1);
  polynomialFromInto(scheme, 0, theta, polynomial);
  const roots = polynomialRoots(polynomial);
  const unit: { re: number; im: number }[] = [];
  for (let k = 0; k < roots.re.length; k++) {
    const modulus = Math.hypot(roots.re[k]!, roots.im[k]!);
    if (!(modulus <= 1 + UNIT)) return null;
    if (modulus < 1 - UNIT) continue;
    const root = { re: roots.re[k]!, im: roots.im[k]! };
    if (unit.some((u) => Math.hypot(u.re - root.re, u.im - root.im) < 1e-5)) return null;
    unit.push(root);
  }
  return unit;
}

function polynomialFromInto(
  scheme: NumericScheme,
  parameter: number,
  theta: readonly number[],
  into: { re: Float64Array; im: Float64Array },
): void {
  const coefficients = coefficientsAt(scheme, [parameter]);
  into.re.fill(0);
  into.im.fill(0);
  scheme.terms.forEach((term, j) => {
    const angle = term.offset.reduce((sum, o, d) => sum + o * theta[d]!, 0);
    const [c, s] = [Math.cos(angle), Math.sin(angle)];
    into.re[term.z]! += coefficients.re[j]! * c - coefficients.im[j]! * s;
    into.im[term.z]! += coefficients.re[j]! * s + coefficients.im[j]! * c;
  });
}

/** ln(z/z0) about p = 0 and theta = base + t · direction for a simple root z0 there. */
function rootLogarithm(
  scheme: NumericScheme,
  base: readonly number[],
  direction: readonly number[],
  root: { re: number; im: number },
  jMax: number,
  kMax: number,
): DoubleSeries | null {
  const coefficients = Array.from({ length: scheme.degree + 1 }, () => doubleSeries(jMax, kMax));
  for (const term of scheme.terms) {
    const target = coefficients[term.z]!;
    const angle = term.offset.reduce((sum, o, d) => sum + o * base[d]!, 0);
    const along = term.offset.reduce((sum, o, d) => sum + o * direction[d]!, 0);
    for (const m of term.monomials) {
      const j = m.powers[0]!;
      if (j > jMax) continue;
      let re = m.re * Math.cos(angle) - m.im * Math.sin(angle);
      let im = m.re * Math.sin(angle) + m.im * Math.cos(angle);
      for (let k = 0; k <= kMax; k++) {
        target.re[j * (kMax + 1) + k]! += re;
        target.im[j * (kMax + 1) + k]! += im;
        [re, im] = [(-im * along) / (k + 1), (re * along) / (k + 1)];
      }
    }
  }
  let slopeRe = 0;
  let slopeIm = 0;
  let [pr, pi] = [1, 0];
  for (let k = 1; k <= scheme.degree; k++) {
    const c = coefficients[k]!;
    slopeRe += k * (c.re[0]! * pr - c.im[0]! * pi);
    slopeIm += k * (c.re[0]! * pi + c.im[0]! * pr);
    [pr, pi] = [pr * root.re - pi * root.im, pr * root.im + pi * root.re];
  }
  const slope2 = slopeRe * slopeRe + slopeIm * slopeIm;
  if (slope2 < 1e-12) return null;
  let z = doubleSeries(jMax, kMax);
  z.re[0] = root.re;
  z.im[0] = root.im;
  // Each pass settles one more total order.
  for (let pass = 0; pass <= jMax + kMax; pass++) {
    let value = coefficients[scheme.degree]!;
    for (let k = scheme.degree - 1; k >= 0; k--) value = addScaled(multiply(value, z), coefficients[k]!, 1, 0);
    z = addScaled(z, value, -slopeRe / slope2, slopeIm / slope2);
  }
  return logarithm(z);
}

/** Largest value of Σ c tau^k over tau > 0 with its sign; tau is searched on a logarithmic scale and refined. */
function largestOverScale(terms: readonly { c: number; k: number }[]): number {
  const f = (log: number) => terms.reduce((sum, { c, k }) => sum + c * Math.exp(k * log), 0);
  let best = -Infinity;
  let at = 0;
  for (let log = -8; log <= 8; log += 0.05) {
    const value = f(log);
    if (value > best) [best, at] = [value, log];
  }
  for (let h = 0.025; h > 1e-9; h /= 2) {
    for (const log of [at - h, at + h]) {
      const value = f(log);
      if (value > best) [best, at] = [value, log];
    }
  }
  return best;
}

/** Smallest exponent with growth among the edges of the Newton polygon of Σ c p^j t^k. */
function polygonGrowth(series: DoubleSeries, side: 1 | -1, absent: readonly boolean[] | null): Leading | null {
  const width = series.kMax + 1;
  const scale = Math.max(...Array.from(series.re, Math.abs));
  const points: { j: number; k: number; c: number }[] = [];
  for (let j = 0; j <= series.jMax; j++)
    for (let k = 0; k <= series.kMax; k++) {
      const c = series.re[j * width + k]! * (side < 0 && j % 2 === 1 ? -1 : 1);
      const isThere = absent ? !absent[j * width + k] : Math.abs(c) > NEGLIGIBLE * Math.min(1, scale);
      if (isThere) points.push({ j, k, c });
    }
  const slopes = new Set<number>();
  for (const x of points)
    for (const y of points) if (x.k !== y.k && (y.j - x.j) / (x.k - y.k) > 0) slopes.add((y.j - x.j) / (x.k - y.k));
  let best: Leading | null = null;
  for (const a of slopes) {
    const exponent = Math.min(...points.map((p) => p.j + a * p.k));
    if (best && exponent >= best.exponent - 1e-9) continue;
    const edge = points.filter((p) => p.j + a * p.k < exponent + 1e-9);
    const factor = largestOverScale(edge);
    if (factor > 1e-12) best = { exponent, factor, isExact: absent !== null };
  }
  return best;
}

/** Leading power of p at fixed waves: the smallest power whose coefficient is positive somewhere. */
function fixedWaveGrowth(scheme: NumericScheme, side: 1 | -1, perPi: number): Leading | null | 'undefined' {
  const grid = waveGrid(scheme, perPi);
  const zero = new Array<number>(scheme.dims).fill(0);
  let best: Leading | null = null;
  let bestTheta = zero;
  const leadingAt = (theta: readonly number[]): Leading | null | 'undefined' => {
    const roots = unitRootsAtZero(scheme, theta);
    if (!roots) return 'undefined';
    let own: Leading | null = null;
    for (const root of roots) {
      const series = rootLogarithm(scheme, theta, zero, root, J_MAX, 0);
      if (!series) return 'undefined';
      for (let j = 1; j <= J_MAX; j++) {
        const c = series.re[j]! * (side < 0 && j % 2 === 1 ? -1 : 1);
        if (Math.abs(c) < NEGLIGIBLE) continue;
        if (c > 0 && (!own || j < own.exponent || (j === own.exponent && c > own.factor)))
          own = { exponent: j, factor: c, isExact: false };
        break;
      }
    }
    return own;
  };
  const isBetter = (a: Leading) =>
    !best || a.exponent < best.exponent || (a.exponent === best.exponent && a.factor > best.factor);
  for (let index = 0; index < grid.count; index++) {
    const theta = grid.theta(index);
    const own = leadingAt(theta);
    if (own === 'undefined') return own;
    if (own && isBetter(own)) [best, bestTheta] = [own, theta];
  }
  if (!best) return null;
  for (let h = grid.step / 2; h > 1e-7; h /= 2)
    for (let d = 0; d < scheme.dims; d++)
      for (const s of [h, -h]) {
        const theta = bestTheta.map((x, k) => (k === d ? x + s : x));
        const own = leadingAt(theta);
        if (own && own !== 'undefined' && isBetter(own)) [best, bestTheta] = [own, theta];
      }
  return best;
}

const RAYS: Readonly<Record<1 | 2 | 3, readonly (readonly number[])[]>> = {
  1: [[1]],
  2: [
    [1, 1],
    [1, 0],
    [0, 1],
    [1, -1],
    [2, 1],
    [1, 2],
  ],
  3: [
    [1, 1, 1],
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
    [1, -1, 1],
    [1, 1, -1],
  ],
};

function corners(dims: number): number[][] {
  return Array.from({ length: 2 ** dims }, (_, bits) =>
    Array.from({ length: dims }, (_, d) => ((bits >> d) & 1 ? Math.PI : 0)),
  );
}

/** Whether no unit root at p = 0 has a term of a lower power than the one that grows, at any wave. */
function isLowestPower(scheme: NumericScheme, scalar: ScalarScheme | null, exponent: number): boolean {
  if (exponent <= 1) return true;
  const roots = unitRootsAtZero(scheme, new Array<number>(scheme.dims).fill(1));
  return (roots ?? []).every((root) => {
    const absent = patternAt(scalar, 'any wave', root, 0);
    return absent !== null && absent.slice(1, exponent).every((isAbsent) => isAbsent);
  });
}

function seriesGrowth(scheme: NumericScheme, scalar: ScalarScheme | null, side: 1 | -1): Leading | null | 'undefined' {
  const perPi = { 1: 48, 2: 12, 3: 6 }[scheme.dims];
  const found = fixedWaveGrowth(scheme, side, perPi);
  if (found === 'undefined') return found;
  const fixed = found && { ...found, isExact: isLowestPower(scheme, scalar, found.exponent) };
  // No scale of waves can grow with a lower power of p than a wave held fixed at power 1.
  if (fixed?.exponent === 1) return fixed;
  let best: Leading | null = fixed;
  for (const base of corners(scheme.dims)) {
    const roots = unitRootsAtZero(scheme, base);
    if (!roots) return 'undefined';
    for (const root of roots)
      for (const direction of RAYS[scheme.dims]) {
        const series = rootLogarithm(scheme, base, direction, root, J_MAX, K_MAX);
        if (!series) return 'undefined';
        const absent = patternAt(scalar, base[0] === 0 ? 'zero' : 'pi', root, K_MAX);
        const local = polygonGrowth(series, side, absent);
        if (
          local &&
          (!best ||
            local.exponent < best.exponent - 1e-9 ||
            (Math.abs(local.exponent - best.exponent) < 1e-9 && local.factor > best.factor))
        )
          best = local;
      }
  }
  return best;
}

function rationalText(value: number): string | null {
  for (let den = 1; den <= 8; den++) {
    const num = Math.round(value * den);
    if (Math.abs(value * den - num) < 1e-6 * den) return den === 1 ? String(num) : `${num}/${den}`;
  }
  return null;
}

const FITTED = { method: 'numeric', tolerance: null, exponentMethod: 'numeric' } as const;

/** Exponent from the growth at halved parameters, for roots that split like a fractional power of p. */
function fittedGrowth(scheme: NumericScheme, side: 1 | -1): GrowthAsymptotics | null {
  const atZero = spectralRadius(scheme, [side * 1e-9]).modulus - 1;
  if (atZero > 1e-3) return { q: '0', factor: atZero, at: null, ...FITTED };
  const growth = [0.08, 0.04, 0.02, 0.01, 0.005, 0.0025].map((p) => spectralRadius(scheme, [side * p]).modulus - 1);
  if (growth.some((g) => g < 1e-11)) return null;
  const slopes = growth.slice(1).map((g, k) => Math.log2(growth[k]! / g));
  const last = slopes[slopes.length - 1]!;
  // The slopes tend to q with an error that halves (or falls by 1/sqrt 2) each time: one extrapolation, then the nearest simple fraction.
  const extrapolated = 2 * last - slopes[slopes.length - 2]!;
  let q: { text: string; value: number } | null = null;
  for (let den = 1; den <= 6 && !q; den++) {
    const num = Math.round(extrapolated * den);
    if (Math.abs(extrapolated - num / den) < 0.02)
      q = { text: den === 1 ? String(num) : `${num}/${den}`, value: num / den };
  }
  if (!q) return null;
  return { q: q.text, factor: growth[growth.length - 1]! / 0.0025 ** q.value, at: null, ...FITTED };
}

/**
 * Growth of a scheme of one parameter that is unstable for all small values on one side.
 * @param side 1 for p > 0, −1 for p < 0
 * @param scalar the exact form of the scheme, by which the exponent can be exact
 * @returns null where no growth is found
 */
export function growthAsymptotics(
  scheme: NumericScheme,
  side: 1 | -1,
  scalar: ScalarScheme | null = null,
): GrowthAsymptotics | null {
  const leading = seriesGrowth(scheme, scalar, side);
  const text = leading && leading !== 'undefined' ? rationalText(leading.exponent) : null;
  const found: GrowthAsymptotics | null =
    leading && leading !== 'undefined' && text
      ? {
          q: text,
          factor: leading.factor,
          at: null,
          method: 'numeric',
          tolerance: FACTOR_TOLERANCE,
          exponentMethod: leading.isExact ? 'exact' : 'numeric',
        }
      : leading === null
        ? null
        : fittedGrowth(scheme, side);
  if (!found) return null;
  const growthPerStep = spectralRadius(scheme, [side * SHOWN_AT]).modulus - 1;
  return {
    ...found,
    at: {
      parameter: side * SHOWN_AT,
      growthPerStep,
      stepsToTenfold: growthPerStep > 0 ? Math.ceil(Math.LN10 / Math.log1p(growthPerStep)) : null,
    },
  };
}
