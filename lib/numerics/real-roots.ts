/**
 * Isolation of the real roots of integer polynomials by Descartes' rule of signs with bisection
 * (Collins & Akritas 1976, in the form of Rouillier & Zimmermann, J. Comput. Appl. Math. 162 (2004) 33–50).
 */
import {
  exactQuotient,
  type IntegerPolynomial,
  primitivePart,
  scaledValue,
  signAt,
  squareFreePart,
  trimmed,
} from './integer-polynomial';

/** One real root between lo/den and hi/den, den > 0; lo = hi where the root is that rational itself. */
export interface RootBracket {
  readonly lo: bigint;
  readonly hi: bigint;
  readonly den: bigint;
}

/** Written over with its Taylor shift a(x + 1). */
function shiftByOne(a: bigint[]): bigint[] {
  for (let k = 0; k < a.length - 1; k++) for (let j = a.length - 2; j >= k; j--) a[j]! += a[j + 1]!;
  return a;
}

/** Sign variations of (1 + x)^n a(1 / (1 + x)): an upper bound of the roots in (0, 1), exact where 0 or 1. */
function descartesBound(a: IntegerPolynomial): number {
  const shifted = [...a].reverse();
  let variations = 0;
  // The shift yields its constant coefficients one by one: two variations are enough to stop.
  let previous = 0;
  for (let k = 0; k < shifted.length; k++) {
    for (let j = shifted.length - 2; j >= k; j--) shifted[j]! += shifted[j + 1]!;
    const c = shifted[k]!;
    const sign = c > 0n ? 1 : c < 0n ? -1 : 0;
    if (sign !== 0) {
      if (previous !== 0 && sign !== previous && ++variations === 2) return 2;
      previous = sign;
    }
  }
  return variations;
}

/** Roots of a square-free polynomial in the open interval (0, 1), as brackets with denominators 2^k, ascending. */
function rootsInUnitInterval(a: IntegerPolynomial, check: () => void): RootBracket[] {
  const found: RootBracket[] = [];
  const visit = (q: IntegerPolynomial, index: bigint, level: bigint): void => {
    check();
    if (q.length <= 1) return;
    const bound = descartesBound(q);
    if (bound === 0) return;
    if (bound === 1) {
      found.push({ lo: index, hi: index + 1n, den: 1n << level });
      return;
    }
    const n = q.length - 1;
    const left = q.map((c, k) => c << BigInt(n - k));
    let right: IntegerPolynomial = shiftByOne([...left]);
    visit(left, 2n * index, level + 1n);
    if (right[0] === 0n) {
      found.push({ lo: 2n * index + 1n, hi: 2n * index + 1n, den: 1n << (level + 1n) });
      right = right.slice(1);
    }
    visit(right, 2n * index + 1n, level + 1n);
  };
  let inner = a;
  while (inner.length > 0 && inner[0] === 0n) inner = inner.slice(1);
  if (inner.length > 1 && scaledValue(inner, 1n, 1n) === 0n) inner = exactQuotient(inner, [-1n, 1n])!;
  visit(inner, 0n, 0n);
  return found;
}

/** a(lo + (hi − lo) t) for integers lo < hi: the interval carried to (0, 1). */
function carriedToUnit(a: IntegerPolynomial, lo: bigint, hi: bigint): IntegerPolynomial {
  const coefficients = [...a];
  if (lo !== 0n)
    for (let k = 0; k < coefficients.length - 1; k++)
      for (let j = coefficients.length - 2; j >= k; j--) coefficients[j]! += lo * coefficients[j + 1]!;
  let scale = 1n;
  return coefficients.map((c) => {
    const scaled = c * scale;
    scale *= hi - lo;
    return scaled;
  });
}

/** Exponent k with all real roots in (−2^k, 2^k) (Lagrange–Fujiwara). */
function rootBoundExponent(a: IntegerPolynomial): bigint {
  const bits = (c: bigint) => (c < 0n ? -c : c).toString(2).length;
  const head = bits(a[a.length - 1]!) - 1;
  let exponent = 0;
  for (let k = 0; k < a.length - 1; k++)
    if (a[k] !== 0n) exponent = Math.max(exponent, Math.ceil((bits(a[k]!) - head) / (a.length - 1 - k)));
  return BigInt(exponent + 1);
}

/**
 * The distinct real roots in the closed interval [lo, hi] (integers), or on the whole line where it is left out:
 * disjoint brackets, ascending. A bracket with lo < hi holds its root strictly inside.
 * @param check called between steps; may throw to stop
 */
export function isolateRealRoots(
  a: IntegerPolynomial,
  interval?: readonly [bigint, bigint],
  check: () => void = () => undefined,
): RootBracket[] {
  if (a.length <= 1) return [];
  const f = squareFreePart(a, check);
  const within = (lo: bigint, hi: bigint): RootBracket[] =>
    rootsInUnitInterval(primitivePart(carriedToUnit(f, lo, hi)), check).map((root) => ({
      lo: lo * root.den + (hi - lo) * root.lo,
      hi: lo * root.den + (hi - lo) * root.hi,
      den: root.den,
    }));
  const point = (at: bigint): RootBracket[] => (scaledValue(f, at, 1n) === 0n ? [{ lo: at, hi: at, den: 1n }] : []);
  if (interval) return [...point(interval[0]), ...within(...interval), ...point(interval[1])];
  const bound = 1n << rootBoundExponent(f);
  return [...within(-bound, 0n), ...point(0n), ...within(0n, bound)];
}

/** The same root in a bracket at most half as wide, whose ends are not roots. */
export function halved(a: IntegerPolynomial, root: RootBracket): RootBracket {
  if (root.lo === root.hi) return root;
  const middle = root.lo + root.hi;
  const den = 2n * root.den;
  const sign = signAt(a, middle, den);
  if (sign === 0) return { lo: middle, hi: middle, den };
  // The sign just right of lo: where lo is itself another root, the derivative there decides; hi is then free.
  return signJustInside(a, root) === sign
    ? { lo: middle, hi: 2n * root.hi, den }
    : { lo: 2n * root.lo, hi: middle, den };
}

function signJustInside(a: IntegerPolynomial, root: RootBracket): number {
  let f: IntegerPolynomial = a;
  for (;;) {
    const sign = signAt(f, root.lo, root.den);
    if (sign !== 0) return sign;
    f = trimmed(f.slice(1).map((c, k) => c * BigInt(k + 1)));
  }
}
