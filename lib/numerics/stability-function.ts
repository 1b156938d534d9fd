/** The stability function of a Runge-Kutta method, R(z) = 1 + z bᵀ(I − zA)⁻¹1 = P(z)/Q(z), exact. */
import { add, div, isZero, mul, neg, ONE, rational, ZERO, type Rational } from './rational';

export interface StabilityFunction {
  /** Ascending powers of z, P(0) = Q(0) = 1, no common factor, last coefficients nonzero. */
  readonly numerator: readonly Rational[];
  readonly denominator: readonly Rational[];
}

type Matrix = readonly (readonly Rational[])[];
const times = (a: Matrix, b: Matrix): Rational[][] =>
  a.map((row) => b[0]!.map((_, j) => row.reduce((sum, x, k) => (isZero(x) ? sum : add(sum, mul(x, b[k]![j]!))), ZERO)));

const trimmed = (a: readonly Rational[]): Rational[] => {
  const copy = [...a];
  while (copy.length > 1 && isZero(copy[copy.length - 1]!)) copy.pop();
  return copy;
};

/** Quotient and remainder of polynomials with ascending coefficients. */
function divide(a: readonly Rational[], b: readonly Rational[]): { quotient: Rational[]; rest: Rational[] } {
  const rest = [...a];
  const quotient = new Array<Rational>(Math.max(1, a.length - b.length + 1)).fill(ZERO);
  for (let k = a.length - b.length; k >= 0; k--) {
    const factor = div(rest[k + b.length - 1]!, b[b.length - 1]!);
    quotient[k] = factor;
    if (!isZero(factor)) b.forEach((c, j) => (rest[k + j] = add(rest[k + j]!, neg(mul(factor, c)))));
  }
  return { quotient, rest: trimmed(rest.slice(0, Math.max(1, b.length - 1))) };
}

const isZeroPolynomial = (a: readonly Rational[]) => a.every(isZero);

/**
 * det(I − zA) by the Faddeev-LeVerrier recursion; the numerator is its product with the moments bᵀAᵏ1, which ends at
 * degree s. Common factors (of reducible tableaux) are removed.
 */
export function stabilityFunction(A: Matrix, b: readonly Rational[]): StabilityFunction {
  const s = b.length;
  const identity: Rational[][] = A.map((_, i) => A.map((__, j) => (i === j ? ONE : ZERO)));
  const denominator: Rational[] = [ONE];
  let m: Rational[][] = identity;
  for (let k = 1; k <= s; k++) {
    const product = times(A, m);
    const trace = product.reduce((sum, row, i) => add(sum, row[i]!), ZERO);
    const c = mul(trace, rational(-1, k));
    denominator.push(c);
    m = product.map((row, i) => row.map((x, j) => (i === j ? add(x, c) : x)));
  }
  const moments: Rational[] = [ONE];
  let vector = A.map(() => ONE);
  for (let k = 0; k < s; k++) {
    moments.push(vector.reduce((sum, x, i) => add(sum, mul(b[i]!, x)), ZERO));
    vector = A.map((row) => row.reduce((sum, x, j) => add(sum, mul(x, vector[j]!)), ZERO));
  }
  const numerator = denominator.map((_, k) =>
    denominator.slice(0, k + 1).reduce((sum, q, j) => add(sum, mul(q, moments[k - j]!)), ZERO),
  );
  let P = trimmed(numerator);
  let Q = trimmed(denominator);
  let [u, v] = [P, Q];
  while (!isZeroPolynomial(v)) [u, v] = [v, u.length < v.length ? u : divide(u, v).rest];
  if (u.length > 1) {
    P = trimmed(divide(P, u).quotient);
    Q = trimmed(divide(Q, u).quotient);
  }
  const unit = div(ONE, Q[0]!);
  return { numerator: P.map((x) => mul(x, unit)), denominator: Q.map((x) => mul(x, unit)) };
}
