/** How the principal root's modulus leaves 1 at small theta: the exponent of −ln|z|, exactly, at a rational parameter. */
import type { ScalarScheme } from './canonical-scheme';
import { equationNumbers } from './equation-terms';
import {
  addSeries,
  constantSeries,
  gaussian,
  isNothing,
  mulG,
  mulSeries,
  rootSeries,
  squaredModulus,
  waveSeries,
  type ExactSeries,
  type Gaussian,
} from './exact-series';
import type { Polynomial } from './polynomial';
import { add, isZero, mul, neg, ONE, power, rational, sign, sub, toNumber, ZERO, type Rational } from './rational';

/** Directions in general position whose length is rational, so that wave roots stay in Q(i). */
const DIRECTIONS: Readonly<Record<1 | 2 | 3, readonly bigint[]>> = { 1: [1n], 2: [3n, 4n], 3: [1n, 2n, 2n] };
const LENGTHS: Readonly<Record<1 | 2 | 3, Rational>> = { 1: ONE, 2: rational(5n), 3: rational(3n) };
/** Beyond this exponent the modulus counts as 1; classical RK4 on Schrodinger's equation needs 12. */
const EXPONENT_MAX = 18;

function valueAt(polynomial: Polynomial, values: readonly Rational[]): Gaussian {
  let re: Rational = ZERO;
  let im: Rational = ZERO;
  for (const m of polynomial) {
    let product: Rational = ONE;
    m.powers.forEach((e, k) => {
      if (e > 0) product = mul(product, power(values[k]!, e));
    });
    re = add(re, mul(m.re, product));
    im = add(im, mul(m.im, product));
  }
  return { re, im };
}

/**
 * Coefficients of z^0 …, each a series in t with theta = base + t · direction.
 * @param shifted dimensions in which the base is pi; their offsets must be integers
 */
function polynomialSeries(
  scheme: ScalarScheme,
  values: readonly Rational[],
  length: number,
  direction: readonly Rational[],
  shifted: readonly boolean[] = [],
): ExactSeries[] {
  const levels = scheme.terms.map((t) => toNumber(t.level));
  const oldest = Math.min(...levels);
  const out: ExactSeries[] = Array.from({ length: Math.max(...levels) - oldest + 1 }, () =>
    constantSeries(gaussian(ZERO), length),
  );
  scheme.terms.forEach((t, j) => {
    const along = t.offset.reduce<Rational>((sum, o, d) => add(sum, mul(o, direction[d]!)), ZERO);
    const value = valueAt(t.coefficient, values);
    const turns = t.offset.reduce((sum, o, d) => (shifted[d] ? sum + o.num : sum), 0n);
    const coefficient = turns % 2n === 0n ? value : { re: neg(value.re), im: neg(value.im) };
    const k = levels[j]! - oldest;
    out[k] = addSeries(
      out[k]!,
      waveSeries(along, length).map((c) => mulG(c, coefficient)),
    );
  });
  return out;
}

/** Polynomial in w for z = 1 + t w, divided by t²: the way into the double root of u_tt equations. */
function blownUp(coefficients: readonly ExactSeries[]): ExactSeries[] | null {
  const length = coefficients[0]!.length;
  const out: ExactSeries[] = [];
  for (let j = 0; j < coefficients.length; j++) {
    let sum = constantSeries(gaussian(ZERO), length);
    for (let k = j; k < coefficients.length; k++) {
      let binomial = 1;
      for (let m = 0; m < j; m++) binomial = (binomial * (k - m)) / (m + 1);
      sum = addSeries(
        sum,
        coefficients[k]!.map((c) => mulG(c, gaussian(rational(binomial)))),
      );
    }
    const lowered = 2 - j;
    if (lowered > 0 && sum.slice(0, lowered).some((c) => !isNothing(c))) return null;
    out.push(Array.from({ length: length - 2 }, (_, n) => (n + lowered >= 0 ? sum[n + lowered]! : gaussian(ZERO))));
  }
  return out;
}

function principalSeries(scheme: ScalarScheme, values: readonly Rational[], length: number): ExactSeries | null {
  const direction = DIRECTIONS[scheme.dims].map((d) => rational(d));
  if (scheme.timeOrder === 1) return rootSeries(polynomialSeries(scheme, values, length, direction), gaussian(ONE));
  const inner = blownUp(polynomialSeries(scheme, values, length + 2, direction));
  if (!inner) return null;
  const [number] = [...equationNumbers(scheme).values()];
  const speed = valueAt(number!, values).re;
  const w = rootSeries(inner, gaussian(ZERO, neg(mul(speed, LENGTHS[scheme.dims]))));
  if (!w) return null;
  const t = constantSeries(gaussian(ZERO), length).map((c, k) => (k === 1 ? gaussian(ONE) : c));
  return addSeries(constantSeries(gaussian(ONE), length), mulSeries(t, w.slice(0, length)));
}

/**
 * @param values rational parameter values in the order of `scheme.parameters`
 * @returns the exponent 2s of −ln|z| ~ theta^(2s), negative where the root grows, null where |z| = 1 to order 18 or
 *   the principal root is not simple at theta = 0. In several dimensions along a direction in general position.
 */
export function principalDampingOrder(scheme: ScalarScheme, values: readonly Rational[]): number | null {
  for (const length of [5, 9, EXPONENT_MAX + 1]) {
    const series = principalSeries(scheme, values, length);
    if (!series) return null;
    const modulus = squaredModulus(series);
    const first = modulus.findIndex((c, k) => !isZero(k === 0 ? sub(c, ONE) : c));
    if (first > 0) return -sign(modulus[first]!) * first;
  }
  return null;
}

export interface CornerWave {
  /** True where the wave expanded about has theta = pi in that dimension, else 0. */
  readonly shifted: readonly boolean[];
  readonly direction: readonly Rational[];
  /** A root there: 1, −1, i or −i. */
  readonly root: Gaussian;
}

/**
 * How ln|z| of a simple unit root leaves 0 along a ray from a corner wave, exactly.
 * @returns the power of the first nonzero coefficient and its sign; null where there is none up to power 12, where
 *   `root` is no simple root, or an offset in a shifted dimension is not an integer
 */
export function cornerGrowth(
  scheme: ScalarScheme,
  values: readonly Rational[],
  corner: CornerWave,
): { order: number; sign: -1 | 0 | 1 } | null {
  if (scheme.terms.some((t) => t.offset.some((o, d) => corner.shifted[d] && o.den !== 1n))) return null;
  for (const length of [5, 13]) {
    const series = rootSeries(polynomialSeries(scheme, values, length, corner.direction, corner.shifted), corner.root);
    if (!series) return null;
    const modulus = squaredModulus(series);
    const order = modulus.findIndex((c, k) => k > 0 && !isZero(c));
    if (order > 0) return { order, sign: sign(modulus[order]!) };
  }
  return null;
}
