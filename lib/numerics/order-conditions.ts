/** Orders of Runge-Kutta and multistep methods, exact, and to the rounding of printed decimals. */
import { abs, add, compare, div, isZero, mul, neg, ONE, power, rational, sub, ZERO, type Rational } from './rational';
import { stabilityFunction } from './stability-function';

type Vector = readonly Rational[];
type Matrix = readonly Vector[];

const dot = (a: Vector, b: Vector) => a.reduce((sum, x, k) => add(sum, mul(x, b[k]!)), ZERO);
const apply = (A: Matrix, x: Vector) => A.map((row) => dot(row, x));
const times = (a: Vector, b: Vector) => a.map((x, k) => mul(x, b[k]!));

/** Elementary weights of the rooted trees of each order up to 4, with 1/γ (Hairer, Nørsett & Wanner, II.2). */
function conditions(A: Matrix, b: Vector): { order: number; weight: Rational; due: Rational }[] {
  const one = b.map(() => ONE);
  const c = apply(A, one);
  const Ac = apply(A, c);
  const c2 = times(c, c);
  const list: [number, Rational, number][] = [
    [1, dot(b, one), 1],
    [2, dot(b, c), 2],
    [3, dot(b, c2), 3],
    [3, dot(b, Ac), 6],
    [4, dot(b, times(c2, c)), 4],
    [4, dot(b, times(c, Ac)), 8],
    [4, dot(b, apply(A, c2)), 12],
    [4, dot(b, apply(A, Ac)), 24],
  ];
  return list.map(([order, weight, gamma]) => ({ order, weight, due: rational(1, gamma) }));
}

const highestMet = (failures: readonly number[], limit: number) =>
  Math.min(limit, ...failures.map((order) => order - 1));

/** Order on nonlinear problems, counted up to 4. */
export function nonlinearOrder(A: Matrix, b: Vector): number {
  return highestMet(
    conditions(A, b)
      .filter((t) => compare(t.weight, t.due) !== 0)
      .map((t) => t.order),
    4,
  );
}

/** The same where each decimal may be off by one unit in its last digit: a condition holds within what that can change. */
export function nominalOrder(A: Matrix, b: Vector, ulp: Rational): number {
  const widened = (x: Rational) => (x.den === 1n ? abs(x) : add(abs(x), ulp));
  const [plain, wide] = [
    conditions(
      A.map((row) => row.map(abs)),
      b.map(abs),
    ),
    conditions(
      A.map((row) => row.map(widened)),
      b.map(widened),
    ),
  ];
  const failures = conditions(A, b).filter(
    (t, k) => compare(abs(sub(t.weight, t.due)), sub(wide[k]!.weight, plain[k]!.weight)) > 0,
  );
  return highestMet(
    failures.map((t) => t.order),
    4,
  );
}

/** Moments bᵀAᵏ⁻¹1 for k = 1 … s: the coefficients of R(z) of an explicit method. */
function moments(A: Matrix, b: Vector): Rational[] {
  let vector: Vector = b.map(() => ONE);
  return b.map(() => {
    const moment = dot(b, vector);
    vector = apply(A, vector);
    return moment;
  });
}

/**
 * R(z) of an explicit method as its author meant it: every coefficient that is 1/k! within the rounding of the printed
 * decimals is taken as 1/k!, the others as printed.
 */
export function nominalStabilityFunction(
  A: Matrix,
  b: Vector,
  ulp: Rational,
): { numerator: Rational[]; denominator: Rational[] } {
  const widened = (x: Rational) => (x.den === 1n ? abs(x) : add(abs(x), ulp));
  const plain = moments(
    A.map((row) => row.map(abs)),
    b.map(abs),
  );
  const wide = moments(
    A.map((row) => row.map(widened)),
    b.map(widened),
  );
  let due = ONE;
  const numerator = moments(A, b).map((value, k) => {
    due = div(due, rational(k + 1));
    return compare(abs(sub(value, due)), sub(wide[k]!, plain[k]!)) <= 0 ? due : value;
  });
  return { numerator: [ONE, ...numerator], denominator: [ONE] };
}

/** Order on linear problems: agreement of R(z) with e^z. */
export function linearOrder(A: Matrix, b: Vector): number {
  const { numerator, denominator } = stabilityFunction(A, b);
  const series: Rational[] = [];
  let factorial = ONE;
  for (let k = 0; k <= 2 * b.length + 1; k++) {
    if (k > 0) factorial = mul(factorial, rational(k));
    let value = numerator[k] ?? ZERO;
    for (let j = 1; j <= k; j++) value = sub(value, mul(denominator[j] ?? ZERO, series[k - j]!));
    series.push(value);
    if (compare(mul(value, factorial), ONE) !== 0) return k - 1;
  }
  return 2 * b.length + 1;
}

/** Σ alpha_j j^k/k! − Σ beta_j j^(k−1)/(k−1)! must vanish for k = 0 … p. Any shift of the levels gives the same p. */
export function multistepOrder(alpha: Vector, beta: Vector, ulp: Rational = ZERO): number {
  let factorial = ONE;
  const limit = 2 * alpha.length + 2;
  for (let k = 0; k <= limit; k++) {
    const before = factorial;
    if (k > 0) factorial = mul(factorial, rational(k));
    let residual = ZERO;
    let rounding = ZERO;
    alpha.forEach((a, j) => {
      const left = div(k === 0 ? ONE : power(rational(j), k), factorial);
      const right = k === 0 ? ZERO : div(k === 1 ? ONE : power(rational(j), k - 1), before);
      residual = add(residual, sub(mul(a, left), mul(beta[j]!, right)));
      const loose = (x: Rational) => (x.den === 1n ? ZERO : ulp);
      rounding = add(rounding, add(mul(loose(a), left), mul(loose(beta[j]!), right)));
    });
    if (compare(abs(residual), rounding) > 0) return k - 1;
  }
  return limit;
}

/** Whether the tableau can be stepped with two registers, u and one running increment (Williamson 1980, form 2N). */
export function hasTwoRegisterForm(A: Matrix, b: Vector): boolean {
  const s = b.length;
  const row = (j: number): Vector => (j < s ? A[j]! : b);
  if (A.some((r, i) => r.some((x, j) => j >= i && !isZero(x)))) return false;
  const B = Array.from({ length: s }, (_, j) => row(j + 1)[j]!);
  const C: Rational[] = [ZERO];
  for (let j = 1; j < s; j++) {
    const change = sub(row(j + 1)[j - 1]!, row(j)[j - 1]!);
    if (isZero(B[j]!)) return false;
    C.push(div(change, B[j]!));
  }
  for (let j = 1; j <= s; j++) {
    for (let i = 0; i < j; i++) {
      let sum = ZERO;
      let product = ONE;
      for (let k = i; k < j; k++) {
        if (k > i) product = mul(product, C[k]!);
        sum = add(sum, mul(B[k]!, product));
      }
      if (!isZero(add(sum, neg(row(j)[i]!)))) return false;
    }
  }
  return true;
}
