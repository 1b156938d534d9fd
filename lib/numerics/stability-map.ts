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
  // A real discriminant, as central differences have it, needs one root only.
  if (di === 0) {
    const root = Math.sqrt(dr < 0 ? -dr : dr);
    const qr = Math.abs(hr) + (dr < 0 ? 0 : root);
    const qi = Math.abs(hi) + (dr < 0 ? root : 0);
    return Math.sqrt((qr * qr + qi * qi) / (ar * ar + ai * ai));
  }
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
  const parts = Array.from(values, (value) =>
    foldedParts(scheme, { distinct, index, sign }, parameters, varied, value),
  );
  const re = new Float64Array(levels * BLOCK);
  const im = new Float64Array(levels * BLOCK);
  const polynomial = complexArray(levels);
  // Block by block of waves, so that tables and rows stay in the first cache while the values go by.
  for (let from = 0; from < thetaCount; from += BLOCK) {
    const n = Math.min(BLOCK, thetaCount - from);
    for (let v = 0; v < values.length; v++) {
      fillRows(parts[v]!, levels, many, cosines, sines, thetaCount, from, n, re, im);
      const out = v * thetaCount + from;
      if (levels === 2) linearRow(modulus, out, re, im, n);
      else if (levels === 3) quadraticRow(modulus, out, re, im, n);
      else iteratedRow(modulus, out, re, im, n, polynomial);
    }
  }
  return { modulus, thetas, values };
}

const BLOCK = 256;

/** Four numbers per level and magnitude: value = Σ (even cos) + i (odd sin), each with real and imaginary part. */
function foldedParts(
  scheme: NumericScheme,
  { distinct, index, sign }: Folded,
  parameters: readonly number[],
  varied: number,
  value: number,
): Float64Array {
  const at = [...parameters];
  at[varied] = value;
  const coefficients = coefficientsAt(scheme, at);
  const out = new Float64Array((scheme.degree + 1) * distinct.length * 4);
  scheme.terms.forEach((term, j) => {
    const slot = 4 * (term.z * distinct.length + index[j]!);
    out[slot]! += coefficients.re[j]!;
    out[slot + 1]! += coefficients.im[j]!;
    out[slot + 2]! += sign[j]! * coefficients.re[j]!;
    out[slot + 3]! += sign[j]! * coefficients.im[j]!;
  });
  return out;
}

function fillRows(
  parts: Float64Array,
  levels: number,
  many: number,
  cosines: Float64Array,
  sines: Float64Array,
  stride: number,
  from: number,
  n: number,
  re: Float64Array,
  im: Float64Array,
): void {
  re.fill(0);
  im.fill(0);
  for (let level = 0; level < levels; level++)
    for (let k = 0; k < many; k++) {
      const slot = 4 * (level * many + k);
      const [evenRe, evenIm, oddRe, oddIm] = [parts[slot]!, parts[slot + 1]!, parts[slot + 2]!, parts[slot + 3]!];
      const row = level * BLOCK;
      const table = k * stride + from;
      if (evenRe !== 0) for (let w = 0; w < n; w++) re[row + w]! += evenRe * cosines[table + w]!;
      if (oddIm !== 0) for (let w = 0; w < n; w++) re[row + w]! -= oddIm * sines[table + w]!;
      if (evenIm !== 0) for (let w = 0; w < n; w++) im[row + w]! += evenIm * cosines[table + w]!;
      if (oddRe !== 0) for (let w = 0; w < n; w++) im[row + w]! += oddRe * sines[table + w]!;
    }
}

function linearRow(modulus: Float64Array, out: number, re: Float64Array, im: Float64Array, n: number): void {
  for (let w = 0; w < n; w++) {
    const lead = re[BLOCK + w]! * re[BLOCK + w]! + im[BLOCK + w]! * im[BLOCK + w]!;
    modulus[out + w] = Math.sqrt((re[w]! * re[w]! + im[w]! * im[w]!) / lead);
  }
}

function quadraticRow(modulus: Float64Array, out: number, re: Float64Array, im: Float64Array, n: number): void {
  for (let w = 0; w < n; w++)
    modulus[out + w] = quadraticModulus(
      re[2 * BLOCK + w]!,
      im[2 * BLOCK + w]!,
      re[BLOCK + w]!,
      im[BLOCK + w]!,
      re[w]!,
      im[w]!,
    );
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
      polynomial.re[level] = re[level * BLOCK + w]!;
      polynomial.im[level] = im[level * BLOCK + w]!;
    }
    // Roots change little along theta, so each wave starts from its neighbour's.
    warm = polynomialRoots(polynomial, warm);
    modulus[out + w] = largestModulus(warm);
  }
}

/** Largest modulus at one wave: without iteration up to two roots. */
function modulusOf({ re, im }: ComplexArray, warm: ComplexArray | undefined): [number, ComplexArray | undefined] {
  if (re.length === 2) return [Math.hypot(re[0]!, im[0]!) / Math.hypot(re[1]!, im[1]!), undefined];
  if (re.length === 3) return [quadraticModulus(re[2]!, im[2]!, re[1]!, im[1]!, re[0]!, im[0]!), undefined];
  const roots = polynomialRoots({ re, im }, warm);
  return [largestModulus(roots), roots];
}

/** Moduli beyond this are not told apart: the search for the worst wave of a cell ends there. */
const CLEARLY_UNSTABLE = 1.5;

/**
 * Largest modulus over all waves of a grid on a plane of two parameters; where it passes 1.5, some modulus beyond.
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
      // From the short waves down: most unstable cells are told by them.
      for (let index = grid.count - 1; index >= 0 && !(worst > CLEARLY_UNSTABLE); index--) {
        grid.polynomial(index, coefficients, polynomial);
        let modulus: number;
        [modulus, warm] = modulusOf(polynomial, warm);
        worst = Math.max(worst, Number.isNaN(modulus) ? Infinity : modulus);
      }
      out[j * first.length + i] = worst;
    }
  return out;
}
