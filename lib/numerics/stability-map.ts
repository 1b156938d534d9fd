/**
 * Largest modulus over a plane, as flat arrays for drawing: wavenumber against one parameter, or two parameters
 * against each other. Doubles throughout; the loops hold no objects, and up to two roots need no iteration.
 */
import { coefficientsAt, type NumericScheme } from './numeric-scheme';
import { complexArray, polynomialRoots, type ComplexArray } from './roots';
import { largestModulus } from './amplification';
import { waveGrid } from './wave-grid';

export interface StabilityMap {
  /** Largest |z| at value v and wave w at v * thetas.length + w. */
  readonly modulus: Float64Array;
  readonly thetas: Float64Array;
  readonly values: Float64Array;
}

/** Terms of each level gathered by offset magnitude: cos and sin parts are then single sums over distinct offsets. */
interface Folded {
  readonly distinct: readonly number[];
  /** Index of term j's magnitude among `distinct`, and the sign of its offset. */
  readonly index: Int32Array;
  readonly sign: Int8Array;
}

function folded(scheme: NumericScheme, direction: readonly number[]): Folded {
  const along = scheme.terms.map((t) => t.offset.reduce((sum, o, d) => sum + o * direction[d]!, 0));
  const distinct = [...new Set(along.map(Math.abs))].sort((a, b) => a - b);
  return {
    distinct,
    index: Int32Array.from(along, (x) => distinct.indexOf(Math.abs(x))),
    sign: Int8Array.from(along, (x) => Math.sign(x)),
  };
}

/** Larger modulus of the roots of a z² + b z + c. */
function quadraticModulus(ar: number, ai: number, br: number, bi: number, cr: number, ci: number): number {
  const hr = br / 2;
  const hi = bi / 2;
  const dr = hr * hr - hi * hi - (ar * cr - ai * ci);
  const di = 2 * hr * hi - (ar * ci + ai * cr);
  const size = Math.sqrt(dr * dr + di * di);
  let sr = Math.sqrt((size + Math.abs(dr)) / 2);
  let si = sr === 0 ? 0 : di / (2 * sr);
  if (dr < 0) {
    const t = sr;
    sr = Math.abs(si);
    si = di < 0 ? -t : t;
  }
  // The root with the larger modulus is the one whose terms add.
  const along = hr * sr + hi * si >= 0 ? 1 : -1;
  const qr = hr + along * sr;
  const qi = hi + along * si;
  return Math.sqrt((qr * qr + qi * qi) / (ar * ar + ai * ai));
}

/**
 * @param values     of the parameter `varied`; the others stay at `parameters`
 * @param thetaCount points of theta from 0 to pi, ends included
 * @param direction  theta = t · direction; [1] in one dimension
 */
export function stabilityMap(
  scheme: NumericScheme,
  values: Float64Array,
  thetaCount: number,
  {
    parameters = [0],
    varied = 0,
    direction = [1],
  }: { parameters?: readonly number[]; varied?: number; direction?: readonly number[] } = {},
): StabilityMap {
  const thetas = Float64Array.from({ length: thetaCount }, (_, w) => (w * Math.PI) / (thetaCount - 1));
  const { distinct, index, sign } = folded(scheme, direction);
  const many = distinct.length;
  const cosines = new Float64Array(many * thetaCount);
  const sines = new Float64Array(many * thetaCount);
  distinct.forEach((offset, k) => {
    for (let w = 0; w < thetaCount; w++) {
      cosines[k * thetaCount + w] = Math.cos(offset * thetas[w]!);
      sines[k * thetaCount + w] = Math.sin(offset * thetas[w]!);
    }
  });
  const levels = scheme.degree + 1;
  const modulus = new Float64Array(values.length * thetaCount);
  const at = [...parameters];
  // Even and odd parts per level and magnitude: value = Σ even cos + i odd sin.
  const evenRe = new Float64Array(levels * many);
  const evenIm = new Float64Array(levels * many);
  const oddRe = new Float64Array(levels * many);
  const oddIm = new Float64Array(levels * many);
  const re = new Float64Array(levels * thetaCount);
  const im = new Float64Array(levels * thetaCount);
  const polynomial = complexArray(levels);
  for (let v = 0; v < values.length; v++) {
    at[varied] = values[v]!;
    const coefficients = coefficientsAt(scheme, at);
    for (const part of [evenRe, evenIm, oddRe, oddIm]) part.fill(0);
    scheme.terms.forEach((term, j) => {
      const slot = term.z * many + index[j]!;
      evenRe[slot]! += coefficients.re[j]!;
      evenIm[slot]! += coefficients.im[j]!;
      oddRe[slot]! += sign[j]! * coefficients.re[j]!;
      oddIm[slot]! += sign[j]! * coefficients.im[j]!;
    });
    re.fill(0);
    im.fill(0);
    for (let level = 0; level < levels; level++)
      for (let k = 0; k < many; k++) {
        const slot = level * many + k;
        const er = evenRe[slot]!;
        const ei = evenIm[slot]!;
        const or = oddRe[slot]!;
        const oi = oddIm[slot]!;
        const row = level * thetaCount;
        const table = k * thetaCount;
        if (er !== 0 || oi !== 0)
          for (let w = 0; w < thetaCount; w++) re[row + w]! += er * cosines[table + w]! - oi * sines[table + w]!;
        if (ei !== 0 || or !== 0)
          for (let w = 0; w < thetaCount; w++) im[row + w]! += ei * cosines[table + w]! + or * sines[table + w]!;
      }
    const out = v * thetaCount;
    if (levels === 2) linearRow(modulus, out, re, im, thetaCount);
    else if (levels === 3) quadraticRow(modulus, out, re, im, thetaCount);
    else iteratedRow(modulus, out, re, im, thetaCount, polynomial);
  }
  return { modulus, thetas, values };
}

function linearRow(modulus: Float64Array, out: number, re: Float64Array, im: Float64Array, n: number): void {
  for (let w = 0; w < n; w++) {
    const lead = re[n + w]! * re[n + w]! + im[n + w]! * im[n + w]!;
    modulus[out + w] = Math.sqrt((re[w]! * re[w]! + im[w]! * im[w]!) / lead);
  }
}

function quadraticRow(modulus: Float64Array, out: number, re: Float64Array, im: Float64Array, n: number): void {
  for (let w = 0; w < n; w++)
    modulus[out + w] = quadraticModulus(re[2 * n + w]!, im[2 * n + w]!, re[n + w]!, im[n + w]!, re[w]!, im[w]!);
}

function iteratedRow(
  modulus: Float64Array,
  out: number,
  re: Float64Array,
  im: Float64Array,
  n: number,
  polynomial: ComplexArray,
): void {
  let warm: ComplexArray | undefined;
  for (let w = 0; w < n; w++) {
    for (let level = 0; level < polynomial.re.length; level++) {
      polynomial.re[level] = re[level * n + w]!;
      polynomial.im[level] = im[level * n + w]!;
    }
    // Roots change little along theta, so each wave starts from its neighbour's.
    warm = polynomialRoots(polynomial, warm);
    modulus[out + w] = largestModulus(warm);
  }
}

/**
 * Largest modulus over all waves on a plane of two parameters.
 * @returns value at first[i], second[j] at j * first.length + i
 */
export function stabilityPlane(
  scheme: NumericScheme,
  first: Float64Array,
  second: Float64Array,
  pointsPerPi = { 1: 64, 2: 16, 3: 6 }[scheme.dims],
): Float64Array {
  const grid = waveGrid(scheme, pointsPerPi);
  const polynomial = complexArray(scheme.degree + 1);
  const out = new Float64Array(first.length * second.length);
  for (let j = 0; j < second.length; j++)
    for (let i = 0; i < first.length; i++) {
      const coefficients = coefficientsAt(scheme, [first[i]!, second[j]!]);
      let worst = 0;
      let warm: ComplexArray | undefined;
      for (let index = 0; index < grid.count; index++) {
        grid.polynomial(index, coefficients, polynomial);
        warm = polynomialRoots(polynomial, warm);
        worst = Math.max(worst, largestModulus(warm));
      }
      out[j * first.length + i] = worst;
    }
  return out;
}
