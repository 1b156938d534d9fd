/**
 * Where the roots of one polynomial over the Gaussian integers lie, by the reduction of Schur and Cohn with
 * Miller's criterion for the conservative branch.
 *
 * @see J. J. H. Miller, On the location of zeros of certain classes of polynomials with applications to numerical
 *      analysis, J. Inst. Maths Applics 8 (1971) 397–406
 */
import { gcd } from '../rational';
import type { GaussianInteger } from './wave-polynomial';

export type RootPosition =
  /** All roots strictly inside the unit circle. */
  | 'inside'
  /** All in the closed disc, those on the circle simple. */
  | 'simple on circle'
  /** All in the closed disc, some multiple on the circle. */
  | 'multiple on circle'
  /** Some strictly outside. */
  | 'outside'
  /** The newest coefficient is 0: the step is not solvable. */
  | 'degenerate';

type Polynomial = readonly GaussianInteger[];

const isZero = (a: GaussianInteger) => a.re === 0n && a.im === 0n;
const norm = (a: GaussianInteger) => a.re * a.re + a.im * a.im;

/** Σ coefficients[k] z^k */
export function rootPosition(coefficients: Polynomial): RootPosition {
  const head = coefficients.at(-1);
  if (!head || isZero(head)) return 'degenerate';
  return position(withoutZeroRoots(coefficients));
}

function position(a: Polynomial): RootPosition {
  const m = a.length - 1;
  if (m === 0) return 'inside';
  const [newest, oldest] = [a[m]!, a[0]!];
  const difference = norm(newest) - norm(oldest);
  if (difference < 0n) return 'outside';
  // (conj(a_m) P − a_0 P*) / z, with P*'s coefficients conj(a_(m−k)).
  const reduced: GaussianInteger[] = [];
  for (let k = 1; k <= m; k++) {
    const [same, mirror] = [a[k]!, a[m - k]!];
    reduced.push({
      re: newest.re * same.re + newest.im * same.im - (oldest.re * mirror.re + oldest.im * mirror.im),
      im: newest.re * same.im - newest.im * same.re - (oldest.im * mirror.re - oldest.re * mirror.im),
    });
  }
  if (reduced.every(isZero)) {
    const slope = a.slice(1).map((c, k) => ({ re: c.re * BigInt(k + 1), im: c.im * BigInt(k + 1) }));
    const inner = position(withoutZeroRoots(slope));
    return inner === 'outside' ? 'outside' : inner === 'inside' ? 'simple on circle' : 'multiple on circle';
  }
  return difference === 0n ? 'outside' : position(withoutZeroRoots(reduced));
}

/** Roots at 0 say nothing; without them, and without common integer factors, the numbers stay short. */
function withoutZeroRoots(a: Polynomial): Polynomial {
  let from = 0;
  while (from < a.length - 1 && isZero(a[from]!)) from++;
  let common = 0n;
  for (let k = from; k < a.length && common !== 1n; k++) common = gcd(gcd(common, a[k]!.re), a[k]!.im);
  const rest = from === 0 ? a : a.slice(from);
  return common <= 1n ? rest : rest.map(({ re, im }) => ({ re: re / common, im: im / common }));
}
