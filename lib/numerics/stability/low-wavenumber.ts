/**
 * Stability of waves next to theta = 0 and pi, decided by series rather than samples.
 *
 * Where the first violated condition is a coefficient of ln|z| in powers of the distance t from such a wave, growth is
 * confined to a band that shrinks to nothing at the bound, and no sampling finds the bound (two-dimensional
 * Lax-Wendroff, RK2 with third-order upwind). So ln|z| of every root that stands on the unit circle there is
 * expanded along rays and its first nonzero coefficient must be negative.
 */
import type { ScalarScheme } from '../canonical-scheme';
import { cornerGrowth } from '../damping-order';
import { rational, type Rational } from '../rational';
import { coefficientsAt, cosSin, polynomialFrom, type NumericScheme } from '../numeric-scheme';
import { complexArray, polynomialRoots, type ComplexArray } from '../roots';

const LENGTH = 13;
const UNIT = 1e-6;
const SIMPLE = 1e-3;

export interface LowWave {
  /** The wave expanded about: 0 or pi per dimension. */
  readonly base: readonly number[];
  readonly direction: readonly number[];
  /** Which root, by its value at the base. */
  readonly root: readonly [number, number];
  /** Power of t of the first nonzero coefficient of ln|z|, and that coefficient. */
  readonly order: number;
  readonly coefficient: number;
  /** Whether the coefficient stands well above rounding. */
  readonly isCertain: boolean;
}

type Series = ComplexArray;

function multiply(a: Series, b: Series): Series {
  const out = complexArray(LENGTH);
  for (let i = 0; i < LENGTH; i++) {
    const re = a.re[i]!;
    const im = a.im[i]!;
    if (re === 0 && im === 0) continue;
    for (let j = 0; i + j < LENGTH; j++) {
      out.re[i + j]! += re * b.re[j]! - im * b.im[j]!;
      out.im[i + j]! += re * b.im[j]! + im * b.re[j]!;
    }
  }
  return out;
}

function polynomialSeries(
  scheme: NumericScheme,
  coefficients: ComplexArray,
  base: readonly number[],
  direction: readonly number[],
): Series[] {
  const out = Array.from({ length: scheme.degree + 1 }, () => complexArray(LENGTH));
  scheme.terms.forEach((term, j) => {
    let angle = 0;
    let along = 0;
    for (let d = 0; d < scheme.dims; d++) {
      angle += term.offset[d]! * base[d]!;
      along += term.offset[d]! * direction[d]!;
    }
    const [c, s] = cosSin(angle);
    let re = coefficients.re[j]! * c - coefficients.im[j]! * s;
    let im = coefficients.re[j]! * s + coefficients.im[j]! * c;
    const target = out[term.z]!;
    for (let k = 0; k < LENGTH; k++) {
      target.re[k]! += re;
      target.im[k]! += im;
      [re, im] = [(-im * along) / (k + 1), (re * along) / (k + 1)];
    }
  });
  return out;
}

/** The simple root w(t) with w(0) = start of Σ b_k(t) w^k; null where the slope vanishes. */
function rootSeries(coefficients: readonly Series[], start: readonly [number, number]): Series | null {
  const degree = coefficients.length - 1;
  let [slopeRe, slopeIm, pr, pi] = [0, 0, 1, 0];
  for (let k = 1; k <= degree; k++) {
    const c = coefficients[k]!;
    slopeRe += k * (c.re[0]! * pr - c.im[0]! * pi);
    slopeIm += k * (c.re[0]! * pi + c.im[0]! * pr);
    [pr, pi] = [pr * start[0] - pi * start[1], pr * start[1] + pi * start[0]];
  }
  const slope2 = slopeRe * slopeRe + slopeIm * slopeIm;
  if (slope2 < SIMPLE * SIMPLE * 1e-4) return null;
  const w = complexArray(LENGTH);
  w.re[0] = start[0];
  w.im[0] = start[1];
  for (let pass = 0; pass < LENGTH; pass++) {
    let value: Series = { re: coefficients[degree]!.re.slice(), im: coefficients[degree]!.im.slice() };
    for (let k = degree - 1; k >= 0; k--) {
      value = multiply(value, w);
      for (let n = 0; n < LENGTH; n++) {
        value.re[n]! += coefficients[k]!.re[n]!;
        value.im[n]! += coefficients[k]!.im[n]!;
      }
    }
    for (let n = 0; n < LENGTH; n++) {
      w.re[n]! -= (value.re[n]! * slopeRe + value.im[n]! * slopeIm) / slope2;
      w.im[n]! -= (value.im[n]! * slopeRe - value.re[n]! * slopeIm) / slope2;
    }
  }
  return w;
}

/** Rounding of the n-th coefficient of ln|z|, in units of its majorant; what lies below counts as 0. */
const NEGLIGIBLE = 1e-13;
/** … and what lies above cannot be rounding. */
const CERTAIN = 1e-8;

/**
 * Coefficients of ln|z(t)|, the constant term being 0 on the unit circle, each with a majorant: the same
 * recursion over absolute values, by which rounding errors are measured.
 */
function logarithmOfModulus(z: Series): { value: Float64Array; majorant: Float64Array } {
  // |z|² = Σ m_n t^n; ln|z|² by the recursion n l_n = n m_n − Σ k l_k m_(n−k), with m_0 = 1.
  const m = new Float64Array(LENGTH);
  const size = new Float64Array(LENGTH);
  for (let i = 0; i < LENGTH; i++)
    for (let j = 0; i + j < LENGTH; j++) {
      m[i + j]! += z.re[i]! * z.re[j]! + z.im[i]! * z.im[j]!;
      size[i + j]! += Math.hypot(z.re[i]!, z.im[i]!) * Math.hypot(z.re[j]!, z.im[j]!);
    }
  const value = new Float64Array(LENGTH);
  const majorant = new Float64Array(LENGTH);
  for (let n = 1; n < LENGTH; n++) {
    let sum = n * m[n]!;
    let bound = n * size[n]!;
    for (let k = 1; k < n; k++) {
      sum -= k * value[k]! * m[n - k]!;
      bound += k * (Math.abs(value[k]!) * size[n - k]! + majorant[k]! * Math.abs(m[n - k]!));
    }
    value[n] = sum / (n * m[0]!);
    majorant[n] = bound / (n * m[0]!);
  }
  return { value: value.map((x) => x / 2), majorant };
}

/** With z = z0 + t w at a double root z0: the polynomial in w over t², where the series allow it. */
function blownUp(coefficients: readonly Series[], z0: readonly [number, number]): Series[] | null {
  const degree = coefficients.length - 1;
  const shifted = coefficients.map((c) => ({ re: c.re.slice(), im: c.im.slice() }));
  // Repeated synthetic division gives the Taylor coefficients in z − z0.
  for (let j = 0; j < degree; j++)
    for (let k = degree - 1; k >= j; k--)
      for (let n = 0; n < LENGTH; n++) {
        const above = shifted[k + 1]!;
        shifted[k]!.re[n]! += z0[0] * above.re[n]! - z0[1] * above.im[n]!;
        shifted[k]!.im[n]! += z0[0] * above.im[n]! + z0[1] * above.re[n]!;
      }
  const small = 1e-9;
  const at = (j: number, n: number) => Math.hypot(shifted[j]!.re[n]!, shifted[j]!.im[n]!);
  if (at(0, 0) > small || at(0, 1) > small || (degree >= 1 && at(1, 0) > small)) return null;
  return shifted.map((c, j) => {
    const out = complexArray(LENGTH);
    for (let n = 0; n < LENGTH; n++) {
      const from = n + 2 - j;
      if (from < 0 || from >= LENGTH) continue;
      out.re[n] = c.re[from]!;
      out.im[n] = c.im[from]!;
    }
    return out;
  });
}

function branchSeries(series: readonly Series[], root: readonly [number, number], isDouble: boolean): Series[] {
  if (!isDouble) {
    const z = rootSeries(series, root);
    return z ? [z] : [];
  }
  const inner = blownUp(series, root);
  if (!inner) return [];
  const starts = polynomialRoots({
    re: Float64Array.from(inner, (c) => c.re[0]!),
    im: Float64Array.from(inner, (c) => c.im[0]!),
  });
  const out: Series[] = [];
  for (let k = 0; k < starts.re.length; k++) {
    if (!Number.isFinite(starts.re[k]!)) continue;
    const w = rootSeries(inner, [starts.re[k]!, starts.im[k]!]);
    if (!w) continue;
    const z = complexArray(LENGTH);
    z.re[0] = root[0];
    z.im[0] = root[1];
    for (let n = 1; n < LENGTH; n++) {
      z.re[n] = w.re[n - 1]!;
      z.im[n] = w.im[n - 1]!;
    }
    // The two highest coefficients of w were cut off with the division by t².
    z.re[LENGTH - 1] = 0;
    z.im[LENGTH - 1] = 0;
    out.push(z);
  }
  return out;
}

export function lowWaveBases(dims: number): number[][] {
  return Array.from({ length: 2 ** dims }, (_, bits) =>
    Array.from({ length: dims }, (_, d) => ((bits >> d) & 1 ? Math.PI : 0)),
  );
}

/** Rays that see both the axes and the diagonals; mirrored ones follow by symmetry of ln|z| in t. */
export const RAYS: Readonly<Record<1 | 2 | 3, readonly (readonly number[])[]>> = {
  1: [[1]],
  2: [
    [1, 1],
    [1, -1],
    [1, 0],
    [0, 1],
    [2, 1],
    [1, 2],
    [2, -1],
    [1, -2],
  ],
  3: [
    [1, 1, 1],
    [1, 1, -1],
    [1, -1, 1],
    [-1, 1, 1],
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
    [1, 1, 0],
    [1, 0, 1],
    [0, 1, 1],
  ],
};

/** Unit roots at a base with their multiplicity (1 or 2; roots of higher multiplicity are left to the samples). */
function unitRootsAt(scheme: NumericScheme, coefficients: ComplexArray, base: readonly number[]) {
  const roots = polynomialRoots(polynomialFrom(scheme, coefficients, base));
  const found: { root: [number, number]; count: number }[] = [];
  for (let k = 0; k < roots.re.length; k++) {
    const [re, im] = [roots.re[k]!, roots.im[k]!];
    if (!(Math.abs(Math.hypot(re, im) - 1) < UNIT)) continue;
    const same = found.find((f) => Math.hypot(f.root[0] / f.count - re, f.root[1] / f.count - im) < 1e-5);
    if (same) {
      same.root = [same.root[0] + re, same.root[1] + im];
      same.count++;
    } else found.push({ root: [re, im], count: 1 });
  }
  return found.map((f) => ({ root: [f.root[0] / f.count, f.root[1] / f.count] as [number, number], count: f.count }));
}

/**
 * First nonzero coefficients of ln|z| of all branches about one base along one ray.
 */
export function lowWavesAlong(
  scheme: NumericScheme,
  coefficients: ComplexArray,
  base: readonly number[],
  direction: readonly number[],
): LowWave[] {
  const out: LowWave[] = [];
  const unit = unitRootsAt(scheme, coefficients, base).filter((u) => u.count <= 2);
  if (unit.length === 0) return out;
  const series = polynomialSeries(scheme, coefficients, base, direction);
  for (const { root, count } of unit)
    for (const z of branchSeries(series, root, count === 2)) {
      const ln = logarithmOfModulus(z);
      const first = (share: number) => ln.value.findIndex((c, n) => n > 0 && Math.abs(c) > share * ln.majorant[n]!);
      const order = first(NEGLIGIBLE);
      if (order < 0) continue;
      out.push({ base, direction, root, order, coefficient: ln.value[order]!, isCertain: first(CERTAIN) === order });
    }
  return out;
}

/** The coefficient of t^order of ln|z| of the branch nearest to a known one. */
export function lowCoefficient(
  scheme: NumericScheme,
  parameter: number,
  wave: Pick<LowWave, 'base' | 'direction' | 'root' | 'order'>,
): number {
  const coefficients = coefficientsAt(scheme, [parameter]);
  const unit = unitRootsAt(scheme, coefficients, wave.base).filter((u) => u.count <= 2);
  const series = polynomialSeries(scheme, coefficients, wave.base, wave.direction);
  let worst = -Infinity;
  for (const { root, count } of unit) {
    if (Math.hypot(root[0] - wave.root[0], root[1] - wave.root[1]) > 0.1) continue;
    for (const z of branchSeries(series, root, count === 2))
      worst = Math.max(worst, logarithmOfModulus(z).value[wave.order]!);
  }
  return worst;
}

/** The double as the rational number it is. */
export function rationalOf(value: number): Rational {
  let den = 1n;
  let scaled = value;
  while (!Number.isInteger(scaled)) {
    scaled *= 2;
    den *= 2n;
  }
  return rational(BigInt(scaled), den);
}

const UNITS: readonly (readonly [number, number, bigint, bigint])[] = [
  [1, 0, 1n, 0n],
  [-1, 0, -1n, 0n],
  [0, 1, 0n, 1n],
  [0, -1, 0n, -1n],
];

/** What the series say of the bands next to corner waves; "doubt" only where exact series were not asked for. */
export type LowVerdict = { kind: 'growing'; wave: LowWave } | { kind: 'none' } | { kind: 'doubt' };

/**
 * Bands next to theta = 0 and pi, to order 12 in t.
 * @param scalar the exact form of `scheme`: growth in the double series, and a first coefficient near rounding (weakly
 *   damped schemes at small values), count only if the exact series say so; null leaves them in doubt
 * @param values in the order of the scheme's parameters
 */
export function lowWaveGrowth(
  scheme: NumericScheme,
  scalar: ScalarScheme | null,
  values: readonly number[],
): LowVerdict {
  const coefficients = coefficientsAt(scheme, values);
  const exactValues = scalar && values.map(rationalOf);
  for (const base of lowWaveBases(scheme.dims))
    for (const direction of RAYS[scheme.dims])
      for (const wave of lowWavesAlong(scheme, coefficients, base, direction)) {
        if (wave.isCertain && wave.coefficient < 0) continue;
        const unit = UNITS.find(([re, im]) => Math.hypot(re - wave.root[0], im - wave.root[1]) < 1e-9);
        if (!unit) continue;
        if (!scalar || !exactValues) return { kind: 'doubt' };
        const exact = cornerGrowth(scalar, exactValues, {
          shifted: base.map((x) => x !== 0),
          direction: direction.map((x) => rational(x)),
          root: { re: rational(unit[2]), im: rational(unit[3]) },
        });
        if (exact && exact.sign > 0) return { kind: 'growing', wave: { ...wave, order: exact.order } };
      }
  return { kind: 'none' };
}
