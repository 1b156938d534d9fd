/**
 * The residual of a scheme on the exact wave, sorted by powers of dt and dx.
 *
 * Along a generic ray in wavenumber and parameter space a number such as lambda = c dt/dx is T/D and r is T/D²,
 * while dt times the symbol of the equation is σ₁T: R = Σ c T^a D^-b e^(level σ₁ T) e^(offset D) is a double series,
 * of which single coefficients are computed exactly and on demand.
 */
import type { ScalarScheme } from './canonical-scheme';
import { CONVENTIONS } from './equation';
import { equationNumbers, equationTerms } from './equation-terms';
import { addG, inverseG, isZeroG, mulG, negG, ONE_G, scaleG, ZERO_G, type Gaussian } from './gaussian';
import type { Polynomial } from './polynomial';
import { add, isZero, mul, ONE, power, rational, toNumber, ZERO, type Rational } from './rational';

/** Rays on which waves of several dimensions have a rational length: 3² + 4² = 5², 2² + 3² + 6² = 7². */
const WAVE_RAYS = {
  1: { ray: [1], length: 1 },
  2: { ray: [3, 4], length: 5 },
  3: { ray: [2, 3, 6], length: 7 },
} as const;
const OTHER_RAYS = { 1: [1], 2: [2, 3], 3: [2, 3, 5] } as const;
/** Sizes of the parameters, unrelated to each other so that nothing cancels by chance. */
const SIZES = [rational(1), rational(13, 7), rational(29, 11), rational(31, 17)];

/** The power of 1/dx in a number: lambda 1, r and sigma 2, mu 3, q 4. */
export function spaceWeight(name: string): number {
  const stem = name.replace(/_[xyz]$/, '');
  return stem === 'lambda' ? 1 : stem === 'mu' ? 3 : stem === 'q' ? 4 : 2;
}

export interface GradedResidual {
  /** Multiplicity of the root z = 1 of the constant wave; 1 or 2 for consistent schemes by the order in time. */
  readonly multiplicity: number;
  /** Coefficient of dt^i dx^m in the truncation error R/(N dt^multiplicity). */
  coefficient(i: number, m: number): Gaussian;
  /** Sum of the sizes of what a coefficient is made of: what rounding of the scheme's numbers is measured against. */
  magnitude(i: number, m: number): number;
  /** Largest power of 1/dx in a coefficient: powers of dx below its negative do not occur. */
  readonly deepest: number;
  /** Fewest derivatives that a term dt^i dx^m can carry. */
  fewestDerivatives(i: number, m: number): number;
}

interface Part {
  /** Powers of T and of 1/D. */
  readonly a: number;
  readonly b: number;
  readonly level: Rational;
  /** Σ c·(offset·ray)^n/n! by n, computed when first needed. */
  readonly points: { readonly value: Gaussian; readonly along: Rational }[];
  readonly moments: Gaussian[];
  readonly sizes: { readonly value: number; readonly along: number }[];
}

/** True where every number of the equation is a homogeneous linear form in parameters of its own weight. */
export function isGraded(scheme: ScalarScheme): boolean {
  for (const [name, value] of equationNumbers(scheme))
    for (const m of value) {
      const degree = m.powers.reduce((s, p) => s + p, 0);
      const index = m.powers.findIndex((p) => p === 1);
      if (degree !== 1 || spaceWeight(scheme.parameters[index]!) !== spaceWeight(name)) return false;
    }
  return true;
}

function valueAtSizes(a: Polynomial): Gaussian {
  return a.reduce<Gaussian>((sum, m) => {
    const size = m.powers.reduce((product, p, k) => mul(product, power(SIZES[k] ?? ONE, p)), ONE);
    return addG(sum, scaleG(m, size));
  }, ZERO_G);
}

function rayExponent(scheme: ScalarScheme): { ray: readonly number[]; exponent: Gaussian } {
  const numbers = equationNumbers(scheme);
  if (scheme.timeOrder === 2) {
    const { ray, length } = WAVE_RAYS[scheme.dims];
    return { ray, exponent: scaleG(valueAtSizes(numbers.get('lambda')!), rational(-length)) };
  }
  const ray = OTHER_RAYS[scheme.dims];
  const exponent = equationTerms(scheme.equation).reduce<Gaussian>((sum, term) => {
    const along = term.powers.reduce((product, p, k) => product * ray[k]! ** p, 1);
    return addG(sum, scaleG(mulG(valueAtSizes(numbers.get(term.parameter)!), term), rational(along)));
  }, ZERO_G);
  return { ray, exponent };
}

/** Σ level^k coefficient / k! for the least k at which it is not identically zero; null beyond k = 4. */
export function normalisation(scheme: ScalarScheme, sum: (weights: (level: Rational) => Rational) => Polynomial) {
  let factorial = 1n;
  for (let k = 0; k <= 4; k++) {
    if (k > 0) factorial *= BigInt(k);
    const value = sum((level) => mul(power(level, k), rational(1n, factorial)));
    if (value.length > 0) return { multiplicity: k, value };
  }
  return null;
}

function partsOf(scheme: ScalarScheme, ray: readonly number[]): Part[] {
  const weights = scheme.parameters.map(spaceWeight);
  const parts = new Map<string, Part>();
  for (const { level, offset, coefficient } of scheme.terms) {
    const along = offset.reduce((sum, o, k) => add(sum, mul(o, rational(ray[k]!))), ZERO);
    for (const m of coefficient) {
      const a = m.powers.reduce((s, p) => s + p, 0);
      const b = m.powers.reduce((s, p, k) => s + p * weights[k]!, 0);
      const key = `${level.num}/${level.den},${a},${b}`;
      const part = parts.get(key) ?? { a, b, level, points: [], moments: [], sizes: [] };
      const value = valueAtSizes([m]);
      part.points.push({ value, along });
      part.sizes.push({ value: Math.hypot(toNumber(value.re), toNumber(value.im)), along: Math.abs(toNumber(along)) });
      parts.set(key, part);
    }
  }
  return [...parts.values()];
}

function factorialOf(n: number): number {
  let product = 1;
  for (let k = 2; k <= n; k++) product *= k;
  return product;
}

function momentOf(part: Part, n: number): Gaussian {
  for (let k = part.moments.length; k <= n; k++) {
    if (k > 0)
      part.points.forEach(
        (p, j) => (part.points[j] = { value: scaleG(p.value, mul(p.along, rational(1, k))), along: p.along }),
      );
    part.moments.push(part.points.reduce<Gaussian>((sum, p) => addG(sum, p.value), ZERO_G));
  }
  return part.moments[n]!;
}

/**
 * @param normal the normalisation N as found by `normalisation`
 * @returns null where N vanishes with the parameters, so that powers of dt and dx cannot be told apart
 */
export function gradedResidual(
  scheme: ScalarScheme,
  normal: { multiplicity: number; value: Polynomial },
): GradedResidual | null {
  const { ray, exponent } = rayExponent(scheme);
  const parts = partsOf(scheme, ray);
  const weights = scheme.parameters.map(spaceWeight);
  const constantTerm = normal.value.find((m) => m.powers.every((p) => p === 0));
  if (!constantTerm) return null;
  const inverse = inverseG(constantTerm);
  const others = normal.value
    .filter((m) => m !== constantTerm)
    .map((m) => ({
      a: m.powers.reduce((s, p) => s + p, 0),
      b: m.powers.reduce((s, p, k) => s + p * weights[k]!, 0),
      value: valueAtSizes([m]),
    }));
  const exponentials = new Map<Part, Gaussian[]>();
  const exponential = (part: Part, j: number): Gaussian => {
    const list = exponentials.get(part) ?? [ONE_G];
    exponentials.set(part, list);
    for (let k = list.length; k <= j; k++)
      list.push(scaleG(mulG(list[k - 1]!, exponent), mul(part.level, rational(1, k))));
    return list[j]!;
  };
  const cache = new Map<string, Gaussian>();
  const quotient = (a: number, m: number): Gaussian => {
    if (a < 0) return ZERO_G;
    const key = `${a},${m}`;
    const known = cache.get(key);
    if (known) return known;
    let sum = ZERO_G;
    for (const part of parts) {
      if (part.a > a || m + part.b < 0 || (isZero(part.level) && part.a < a)) continue;
      const moment = momentOf(part, m + part.b);
      if (!isZeroG(moment)) sum = addG(sum, mulG(exponential(part, a - part.a), moment));
    }
    for (const other of others) sum = addG(sum, negG(mulG(other.value, quotient(a - other.a, m + other.b))));
    const value = mulG(sum, inverse);
    cache.set(key, value);
    return value;
  };
  const size = (a: Gaussian) => Math.hypot(toNumber(a.re), toNumber(a.im));
  const magnitude = (a: number, m: number): number =>
    parts.reduce((sum, part) => {
      if (part.a > a || m + part.b < 0) return sum;
      const n = m + part.b;
      const moment = part.sizes.reduce((total, p) => total + (p.value * p.along ** n) / factorialOf(n), 0);
      return sum + size(exponential(part, a - part.a)) * moment;
    }, 0) * size(inverse);
  const fewestPerStep = Math.min(...CONVENTIONS[scheme.equation].operators) / scheme.timeOrder;
  return {
    multiplicity: normal.multiplicity,
    deepest: Math.max(0, ...parts.map((p) => p.b)),
    coefficient: (i, m) => quotient(i + normal.multiplicity, m),
    magnitude: (i, m) => magnitude(i + normal.multiplicity, m),
    fewestDerivatives(i, m) {
      const a = i + normal.multiplicity;
      return Math.min(
        ...parts
          .filter((p) => p.a <= a && m + p.b >= 0 && !(isZero(p.level) && p.a < a))
          .map((p) => m + p.b + fewestPerStep * (a - p.a)),
      );
    },
  };
}
