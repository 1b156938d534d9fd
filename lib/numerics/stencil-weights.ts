/** Exact weights of finite-difference formulas: explicit ones by Lagrange's formula, the others by moment conditions. */
import { LinearSystem } from './linear-system';
import { equals, gcd, isZero, mul, neg, ONE, rational, ZERO, type Rational } from './rational';

/** One monomial c ∂^powers of the operator that a stencil approximates. */
export interface OperatorTerm {
  readonly powers: readonly number[];
  readonly coefficient: Rational;
}

export interface StencilRow {
  readonly offsets: readonly (readonly Rational[])[];
  /** null: to be derived. */
  readonly weights: readonly Rational[] | null;
}

/** Σ lhs.weights[j] (L u)(offset j) = h^−m Σ weights[j] u(offset j), where L is homogeneous of degree m. */
export interface StencilQuestion extends StencilRow {
  readonly dims: 1 | 2 | 3;
  /** Homogeneous: all terms have the same total degree, 0 for interpolation. */
  readonly operator: readonly OperatorTerm[];
  readonly lhs: StencilRow | null;
}

export type WeightsOutcome =
  | { readonly kind: 'weights'; readonly weights: readonly Rational[]; readonly lhsWeights: readonly Rational[] | null }
  | { readonly kind: 'too-few-points'; readonly message: string }
  | { readonly kind: 'undetermined'; readonly message: string };

/** Scales rational nodes to integers: node = integer / scale. */
function scaled(nodes: readonly Rational[]): { integers: bigint[]; scale: bigint } {
  let scale = 1n;
  for (const { den } of nodes) scale = (scale / gcd(scale, den)) * den;
  return { integers: nodes.map(({ num, den }) => num * (scale / den)), scale };
}

/**
 * Weights of the finite-difference formula for one derivative on given nodes.
 * @param nodes       n distinct offsets from the evaluation point, in grid spacings
 * @param derivative  m, with 0 ≤ m < n
 * @returns n weights w with f⁽ᵐ⁾(0) ≈ h⁻ᵐ Σ w[j] f(nodes[j]·h); exact
 * @throws {RangeError} if two nodes coincide, or m is outside 0 … n − 1
 *
 * w[j] is the m-th derivative at 0 of the Lagrange polynomial of node j; with Π(x) = Π (x − x_k) its numerator is the
 * synthetic quotient Π(x)/(x − x_j), so that all weights cost O(n²) products of integers.
 */
export function stencilWeights(nodes: readonly Rational[], derivative: number): Rational[] {
  const n = nodes.length;
  if (!Number.isInteger(derivative) || derivative < 0 || derivative >= n)
    throw new RangeError(`stencilWeights: derivative ${derivative} needs at least ${derivative + 1} nodes, not ${n}`);
  const { integers, scale } = scaled(nodes);
  let product: bigint[] = [1n];
  for (const x of integers) {
    const next = new Array<bigint>(product.length + 1);
    next[product.length] = product[product.length - 1]!;
    for (let k = product.length - 1; k > 0; k--) next[k] = product[k - 1]! - x * product[k]!;
    next[0] = -x * product[0]!;
    product = next;
  }
  let factor = scale ** BigInt(derivative);
  for (let k = 2; k <= derivative; k++) factor *= BigInt(k);
  return integers.map((x, j) => {
    let quotient = 1n;
    for (let k = n - 1; k > derivative; k--) quotient = product[k]! + x * quotient;
    let denominator = 1n;
    for (let k = 0; k < n; k++) if (k !== j) denominator *= x - integers[k]!;
    if (denominator === 0n) throw new RangeError('stencilWeights: two nodes coincide');
    return rational(quotient * factor, denominator);
  });
}

/** All multi-indices of one total degree, in lexicographic order from the first dimension on. */
export function multiIndices(dims: number, degree: number): number[][] {
  if (dims === 1) return [[degree]];
  const list: number[][] = [];
  for (let first = degree; first >= 0; first--)
    for (const rest of multiIndices(dims - 1, degree - first)) list.push([first, ...rest]);
  return list;
}

const factorials: bigint[] = [1n];
export function factorial(k: number): bigint {
  for (let j = factorials.length; j <= k; j++) factorials.push(factorials[j - 1]! * BigInt(j));
  return factorials[k]!;
}

/** offset^powers / powers!, with 0⁰ = 1. */
export function taylorFactor(offset: readonly Rational[], powers: readonly number[]): Rational {
  let num = 1n;
  let den = 1n;
  powers.forEach((p, k) => {
    num *= offset[k]!.num ** BigInt(p);
    den *= offset[k]!.den ** BigInt(p) * factorial(p);
  });
  return rational(num, den);
}

/** What the operator, seen from a left-hand offset, contributes to the moment of ∂^powers. */
export function operatorMoment(
  operator: readonly OperatorTerm[],
  offset: readonly Rational[],
  powers: readonly number[],
): Rational {
  let sum = ZERO;
  for (const term of operator) {
    const rest = powers.map((p, k) => p - term.powers[k]!);
    if (rest.some((p) => p < 0)) continue;
    const value = mul(term.coefficient, taylorFactor(offset, rest));
    sum = isZero(sum) ? value : rational(sum.num * value.den + value.num * sum.den, sum.den * value.den);
  }
  return sum;
}

const degreeOf = (operator: readonly OperatorTerm[]) => operator[0]!.powers.reduce((s, p) => s + p, 0);

/**
 * The weights that a stencil leaves open, chosen for the highest order: moment conditions are taken by rising degree
 * until one cannot be met. A derived left-hand side is normalised to 1 at offset 0, or to sum 1 where 0 is absent.
 */
export function resolveWeights(question: StencilQuestion): WeightsOutcome {
  const { dims, operator, offsets, weights, lhs } = question;
  const degree = degreeOf(operator);
  if (weights && (!lhs || lhs.weights)) return { kind: 'weights', weights, lhsWeights: lhs?.weights ?? null };
  const single = operator[0]!;
  if (dims === 1 && !lhs && equals(single.coefficient, ONE)) {
    if (degree >= offsets.length)
      return {
        kind: 'too-few-points',
        message: `${offsets.length} point${offsets.length === 1 ? '' : 's'} cannot approximate derivative ${degree}; at least ${degree + 1} are needed`,
      };
    return {
      kind: 'weights',
      weights: stencilWeights(
        offsets.map((x) => x[0]!),
        degree,
      ),
      lhsWeights: null,
    };
  }
  const left: StencilRow = lhs ?? { offsets: [new Array<Rational>(dims).fill(ZERO)], weights: [ONE] };
  const openRight = weights ? 0 : offsets.length;
  const openLeft = left.weights ? 0 : left.offsets.length;
  const system = new LinearSystem(openRight + openLeft);
  if (openLeft > 0) {
    const centre = left.offsets.findIndex((y) => y.every(isZero));
    system.take(
      Array.from({ length: system.unknowns }, (_, k) =>
        k >= openRight && (centre < 0 || k === openRight + centre) ? ONE : ZERO,
      ),
      ONE,
    );
  }
  for (let shell = 0; shell <= degree + 2 * system.unknowns + 2 && system.rank < system.unknowns; shell++) {
    const trial = system.copy();
    const accepted = multiIndices(dims, shell).every((powers) => {
      const { values, right } = momentEquation(question, left, powers, openRight, openLeft);
      return trial.take(values, right) !== 'inconsistent';
    });
    if (!accepted) {
      if (shell <= degree)
        return {
          kind: 'too-few-points',
          message: `these ${offsets.length} points cannot approximate the operator: the conditions of degree ${shell} contradict each other`,
        };
      break;
    }
    for (const powers of multiIndices(dims, shell)) {
      const { values, right } = momentEquation(question, left, powers, openRight, openLeft);
      system.take(values, right);
    }
  }
  const solution = system.solution();
  if (!solution)
    return {
      kind: 'undetermined',
      message: `the moment conditions leave ${system.unknowns - system.rank} of ${system.unknowns} weights free on these offsets; give the weights`,
    };
  return {
    kind: 'weights',
    weights: weights ?? solution.slice(0, openRight),
    lhsWeights: lhs ? (lhs.weights ?? solution.slice(openRight)) : null,
  };
}

/** Σ w_j x_j^a/a! − Σ a_j (L x^a/a!)(y_j) = 0, with the given weights moved to the right. */
function momentEquation(
  question: StencilQuestion,
  left: StencilRow,
  powers: readonly number[],
  openRight: number,
  openLeft: number,
) {
  const values: Rational[] = [];
  let right = ZERO;
  const subtract = (value: Rational) =>
    (right = rational(right.num * value.den - value.num * right.den, right.den * value.den));
  question.offsets.forEach((x, j) => {
    const moment = taylorFactor(x, powers);
    if (openRight > 0) values.push(moment);
    else subtract(mul(question.weights![j]!, moment));
  });
  left.offsets.forEach((y, j) => {
    const moment = operatorMoment(question.operator, y, powers);
    if (openLeft > 0) values.push(neg(moment));
    else subtract(neg(mul(left.weights![j]!, moment)));
  });
  return { values, right };
}
