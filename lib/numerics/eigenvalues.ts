/** Eigenvalues of small complex matrices by the shifted QR iteration on the Hessenberg form. */
import { complexArray, complexSqrt, type ComplexArray } from './roots';

/** Square matrix, row by row: entry (i, j) at i * size + j. */
export interface ComplexMatrix extends ComplexArray {
  readonly size: number;
}

export const complexMatrix = (size: number): ComplexMatrix => ({ size, ...complexArray(size * size) });

export function matrixProduct(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  const n = a.size;
  const out = complexMatrix(n);
  for (let i = 0; i < n; i++)
    for (let k = 0; k < n; k++) {
      const xr = a.re[i * n + k]!;
      const xi = a.im[i * n + k]!;
      if (xr === 0 && xi === 0) continue;
      for (let j = 0; j < n; j++) {
        const yr = b.re[k * n + j]!;
        const yi = b.im[k * n + j]!;
        out.re[i * n + j]! += xr * yr - xi * yi;
        out.im[i * n + j]! += xr * yi + xi * yr;
      }
    }
  return out;
}

/** Largest sum of moduli along a row. */
export function rowNorm(a: ComplexMatrix): number {
  let worst = 0;
  for (let i = 0; i < a.size; i++) {
    let sum = 0;
    for (let j = 0; j < a.size; j++) sum += Math.hypot(a.re[i * a.size + j]!, a.im[i * a.size + j]!);
    worst = Math.max(worst, sum);
  }
  return worst;
}

/**
 * Solves a·x = b for a matrix b, by elimination with row exchanges.
 * @returns null where a is singular to rounding
 */
export function solveMatrix(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix | null {
  const n = a.size;
  const l = { size: n, re: a.re.slice(), im: a.im.slice() };
  const x = { size: n, re: b.re.slice(), im: b.im.slice() };
  const scale = rowNorm(a);
  for (let col = 0; col < n; col++) {
    let pivot = col;
    for (let i = col + 1; i < n; i++)
      if (
        Math.hypot(l.re[i * n + col]!, l.im[i * n + col]!) > Math.hypot(l.re[pivot * n + col]!, l.im[pivot * n + col]!)
      )
        pivot = i;
    if (Math.hypot(l.re[pivot * n + col]!, l.im[pivot * n + col]!) <= 1e-13 * scale) return null;
    for (const m of [l, x])
      for (let j = 0; j < n && pivot !== col; j++) {
        const p = pivot * n + j;
        const c = col * n + j;
        [m.re[p], m.re[c]] = [m.re[c]!, m.re[p]!];
        [m.im[p], m.im[c]] = [m.im[c]!, m.im[p]!];
      }
    const dr = l.re[col * n + col]!;
    const di = l.im[col * n + col]!;
    const d2 = dr * dr + di * di;
    for (let i = 0; i < n; i++) {
      if (i === col) continue;
      const er = l.re[i * n + col]!;
      const ei = l.im[i * n + col]!;
      const fr = (er * dr + ei * di) / d2;
      const fi = (ei * dr - er * di) / d2;
      if (fr === 0 && fi === 0) continue;
      for (const m of [l, x])
        for (let j = 0; j < n; j++) {
          const yr = m.re[col * n + j]!;
          const yi = m.im[col * n + j]!;
          m.re[i * n + j]! -= fr * yr - fi * yi;
          m.im[i * n + j]! -= fr * yi + fi * yr;
        }
    }
  }
  for (let i = 0; i < n; i++) {
    const dr = l.re[i * n + i]!;
    const di = l.im[i * n + i]!;
    const d2 = dr * dr + di * di;
    for (let j = 0; j < n; j++) {
      const yr = x.re[i * n + j]!;
      const yi = x.im[i * n + j]!;
      x.re[i * n + j] = (yr * dr + yi * di) / d2;
      x.im[i * n + j] = (yi * dr - yr * di) / d2;
    }
  }
  return x;
}

/** Replaces rows p and q by the unitary combination that makes entry (q, column) zero; the same on columns after. */
function rotation(xr: number, xi: number, yr: number, yi: number) {
  const norm = Math.hypot(xr, xi, yr, yi);
  return norm === 0 ? null : { cr: xr / norm, ci: xi / norm, sr: yr / norm, si: yi / norm };
}
type Rotation = NonNullable<ReturnType<typeof rotation>>;

function rotateRows(h: ComplexMatrix, p: number, q: number, r: Rotation): void {
  const n = h.size;
  for (let j = 0; j < n; j++) {
    const [ar, ai, br, bi] = [h.re[p * n + j]!, h.im[p * n + j]!, h.re[q * n + j]!, h.im[q * n + j]!];
    h.re[p * n + j] = r.cr * ar + r.ci * ai + r.sr * br + r.si * bi;
    h.im[p * n + j] = r.cr * ai - r.ci * ar + r.sr * bi - r.si * br;
    h.re[q * n + j] = r.cr * br - r.ci * bi - (r.sr * ar - r.si * ai);
    h.im[q * n + j] = r.cr * bi + r.ci * br - (r.sr * ai + r.si * ar);
  }
}

function rotateColumns(h: ComplexMatrix, p: number, q: number, r: Rotation): void {
  const n = h.size;
  for (let i = 0; i < n; i++) {
    const [ar, ai, br, bi] = [h.re[i * n + p]!, h.im[i * n + p]!, h.re[i * n + q]!, h.im[i * n + q]!];
    h.re[i * n + p] = ar * r.cr - ai * r.ci + (br * r.sr - bi * r.si);
    h.im[i * n + p] = ar * r.ci + ai * r.cr + (br * r.si + bi * r.sr);
    h.re[i * n + q] = br * r.cr + bi * r.ci - (ar * r.sr + ai * r.si);
    h.im[i * n + q] = bi * r.cr - br * r.ci - (ai * r.sr - ar * r.si);
  }
}

function toHessenberg(a: ComplexMatrix): ComplexMatrix {
  const n = a.size;
  const h = { size: n, re: a.re.slice(), im: a.im.slice() };
  for (let col = 0; col < n - 2; col++)
    for (let row = n - 1; row > col + 1; row--) {
      if (h.re[row * n + col] === 0 && h.im[row * n + col] === 0) continue;
      const upper = (row - 1) * n + col;
      const r = rotation(h.re[upper]!, h.im[upper]!, h.re[row * n + col]!, h.im[row * n + col]!);
      if (!r) continue;
      rotateRows(h, row - 1, row, r);
      rotateColumns(h, row - 1, row, r);
    }
  return h;
}

/** The eigenvalue of the trailing 2 × 2 block that is nearer to its last entry. */
function wilkinsonShift(h: ComplexMatrix, last: number): [number, number] {
  const n = h.size;
  const at = (i: number, j: number): [number, number] => [h.re[i * n + j]!, h.im[i * n + j]!];
  const [ar, ai] = at(last - 1, last - 1);
  const [br, bi] = at(last - 1, last);
  const [cr, ci] = at(last, last - 1);
  const [dr, di] = at(last, last);
  const [mr, mi] = [(ar - dr) / 2, (ai - di) / 2];
  const [sr, si] = complexSqrt(mr * mr - mi * mi + br * cr - bi * ci, 2 * mr * mi + br * ci + bi * cr);
  const along = mr * sr + mi * si >= 0 ? -1 : 1;
  return [dr + mr + along * sr, di + mi + along * si];
}

/**
 * All eigenvalues with multiplicity. Semisimple multiple eigenvalues of well-conditioned matrices come out to
 * rounding, where roots of the determinant would split by 1e-8.
 * @throws {RangeError} if the iteration does not settle (never seen on matrices of finite entries)
 */
export function eigenvalues(a: ComplexMatrix): ComplexArray {
  const n = a.size;
  const h = toHessenberg(a);
  const out = complexArray(n);
  let last = n - 1;
  for (let round = 0; last >= 0; round++) {
    if (round > 60 * n) throw new RangeError('eigenvalues: the QR iteration does not settle');
    let start = last;
    while (start > 0) {
      const below = Math.hypot(h.re[start * n + start - 1]!, h.im[start * n + start - 1]!);
      const around =
        Math.hypot(h.re[start * n + start]!, h.im[start * n + start]!) +
        Math.hypot(h.re[(start - 1) * n + start - 1]!, h.im[(start - 1) * n + start - 1]!);
      if (below <= 2 ** -52 * (around || 1)) {
        h.re[start * n + start - 1] = 0;
        h.im[start * n + start - 1] = 0;
        break;
      }
      start--;
    }
    if (start === last) {
      out.re[last] = h.re[last * n + last]!;
      out.im[last] = h.im[last * n + last]!;
      last--;
      continue;
    }
    let [sr, si] = wilkinsonShift(h, last);
    // An exceptional shift now and then breaks cycles.
    if (round % 11 === 10) [sr, si] = [sr + Math.abs(h.re[last * n + last - 1]!), si];
    for (let k = start; k <= last; k++) {
      h.re[k * n + k]! -= sr;
      h.im[k * n + k]! -= si;
    }
    const rotations: (Rotation | null)[] = [];
    for (let k = start; k < last; k++) {
      const r = rotation(h.re[k * n + k]!, h.im[k * n + k]!, h.re[(k + 1) * n + k]!, h.im[(k + 1) * n + k]!);
      rotations.push(r);
      if (r) rotateRows(h, k, k + 1, r);
    }
    rotations.forEach((r, k) => r && rotateColumns(h, start + k, start + k + 1, r));
    for (let k = start; k <= last; k++) {
      h.re[k * n + k]! += sr;
      h.im[k * n + k]! += si;
    }
  }
  return out;
}
