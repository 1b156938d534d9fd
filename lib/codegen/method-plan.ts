/** Plans kernels of explicit time methods: a step over n unknowns with the right-hand side as a callback. */
import type { TimeMethodDefinition } from '@/lib/entries/definition';
import { readTimeMethod } from '@/lib/facts/canonical-time-method';
import { constant, variable, mul } from '@/lib/numerics/polynomial';
import { fromPolynomial } from '@/lib/numerics/rational-function';
import { add as addRational, div, isZero, neg, ONE, rational, ZERO, type Rational } from '@/lib/numerics/rational';
import type { Coefficient } from './coefficient';
import {
  named,
  negation,
  number,
  product,
  read,
  signedSum,
  sum,
  type Assignment,
  type Node,
  type SignedNode,
} from './expression-tree';
import { none, type Planned } from './kernel-plan';
import { arrangeStages, isExplicit, type Tableau } from './stages-plan';

/** One evaluation of the right-hand side, and the sums that its slope joins. */
export interface MethodStage {
  /** Abscissa: the slope is taken at t + c dt. */
  readonly c: Rational;
  readonly source: string;
  /** Array that takes the slope. */
  readonly slope: string;
  readonly assignments: readonly Assignment[];
}

export interface RungeKuttaPlan {
  readonly shape: 'runge-kutta';
  readonly stages: readonly MethodStage[];
  /** Work arrays, the slope k included; u is advanced in place. */
  readonly work: readonly string[];
  readonly coefficients: readonly Coefficient[];
}

export interface MultistepPlan {
  readonly shape: 'multistep';
  /** k of a k-step method. */
  readonly steps: number;
  /** Kept levels of u: the oldest is overwritten. */
  readonly levels: number;
  /** Kept slopes: the oldest is overwritten by the newest. */
  readonly slopes: number;
  /** w at i over reads of u, u1, …, w and f, f1, … */
  readonly assignment: Assignment;
  /** Arrays of the sweep with their age; w is the oldest level. */
  readonly levelNames: readonly string[];
  readonly slopeNames: readonly string[];
  readonly coefficients: readonly Coefficient[];
  /** One start-up step; its first slope is the kept one. */
  readonly start: RungeKuttaPlan | null;
  readonly startOrder: number;
}

export type MethodPlan = RungeKuttaPlan | MultistepPlan;

const timesStep = (name: string, factor: Rational): Coefficient => ({
  name,
  value: fromPolynomial(mul(variable(1, 0), constant(1, factor)), 1),
});
const absolute = (a: Rational) => (a.num < 0n ? neg(a) : a);
const isOne = (a: Rational) => a.num === 1n && a.den === 1n;

/**
 * @param firstSlope array of the slope of the first stage, where that is kept
 * @param level      where the new level goes: "u" in place, or another array
 * @param letter     letter of the weights
 */
function rungeKuttaPlan(tableau: Tableau, firstSlope: string, level: string, letter: string): RungeKuttaPlan | null {
  const arranged = arrangeStages(tableau, true);
  if (!arranged) return null;
  const coefficients = new Map<string, Coefficient>();
  const last = arranged.stages.length - 1;
  const stages = arranged.stages.map(({ index, source, sums }, order): MethodStage => {
    const slope = order === 0 ? firstSlope : 'k';
    const assignments = sums.map(({ target, base, row, factor }): Assignment => {
      const size = absolute(factor);
      const name = isOne(size) ? 'dt' : row === tableau.b.length ? `${letter}${index + 1}` : `a${row + 1}_${index + 1}`;
      if (!isOne(size)) coefficients.set(name, timesStep(name, size));
      const term = product(named(name), read(slope, 0));
      const node: Node =
        factor.num < 0n ? { kind: 'difference', left: read(base, 0), right: term } : sum(read(base, 0), term);
      return { kind: 'store', array: order === last && target === 'u' ? level : target, node };
    });
    return { c: tableau.A[index]!.reduce((total, a) => addRational(total, a), ZERO), source, slope, assignments };
  });
  const needsSlope = stages.some((s) => s.slope === 'k');
  return {
    shape: 'runge-kutta',
    stages,
    work: [...arranged.work, ...(needsSlope ? ['k'] : [])],
    coefficients: [...coefficients.values()],
  };
}

const fraction = (p: number, q = 1) => rational(p, q);
const MIDPOINT: Tableau = {
  A: [
    [ZERO, ZERO],
    [fraction(1, 2), ZERO],
  ],
  b: [ZERO, ONE],
};
const CLASSICAL: Tableau = {
  A: [
    [ZERO, ZERO, ZERO, ZERO],
    [fraction(1, 2), ZERO, ZERO, ZERO],
    [ZERO, fraction(1, 2), ZERO, ZERO],
    [ZERO, ZERO, ONE, ZERO],
  ],
  b: [fraction(1, 6), fraction(1, 3), fraction(1, 3), fraction(1, 6)],
};

function multistepPlan(alpha: readonly Rational[], beta: readonly Rational[], order: number): Planned<MultistepPlan> {
  const k = alpha.length - 1;
  const newest = alpha[k]!;
  if (!isZero(beta[k]!)) return none('The multistep method is implicit; kernels are printed for explicit methods.');
  if (order > 5) return none('A start-up of order 5 or higher for general right-hand sides is not printed yet.');
  const aged = (list: readonly Rational[], age: number) => div(list[k - 1 - age]!, newest);
  const ages = Array.from({ length: k }, (_, age) => age);
  const oldest = (list: readonly Rational[]) => Math.max(-1, ...ages.filter((age) => !isZero(list[k - 1 - age]!)));
  const levels = oldest(alpha) + 1;
  const slopes = oldest(beta) + 1;
  if (levels < 1 || slopes < 1) return none('The method uses no earlier level or no slope.');
  const levelName = (age: number) => (levels > 1 && age === levels - 1 ? 'w' : age === 0 ? 'u' : `u${age}`);
  const slopeName = (age: number) => (age === 0 ? 'f' : `f${age}`);
  const terms: SignedNode[] = [];
  const coefficients: Coefficient[] = [];
  for (const age of ages) {
    const factor = neg(aged(alpha, age));
    if (isZero(factor)) continue;
    const size = absolute(factor);
    const element = read(levelName(age), 0);
    terms.push({ negative: factor.num < 0n, node: isOne(size) ? element : product(number(size), element) });
  }
  for (const age of ages) {
    const factor = aged(beta, age);
    if (isZero(factor)) continue;
    const size = absolute(factor);
    if (!isOne(size)) coefficients.push(timesStep(`b${age}`, size));
    terms.push({
      negative: factor.num < 0n,
      node: product(named(isOne(size) ? 'dt' : `b${age}`), read(slopeName(age), 0)),
    });
  }
  const positive = terms.findIndex((t) => !t.negative);
  if (positive > 0) terms.unshift(...terms.splice(positive, 1));
  const target = levels > 1 ? 'w' : 'u';
  const node = terms[0]!.negative && terms.length === 1 ? negation(terms[0]!.node) : signedSum(terms);
  return {
    kind: 'plan',
    plan: {
      shape: 'multistep',
      steps: k,
      levels,
      slopes,
      assignment: { kind: 'store', array: target, node },
      levelNames: Array.from({ length: levels }, (_, age) => levelName(age)),
      slopeNames: Array.from({ length: slopes }, (_, age) => slopeName(age)),
      coefficients,
      start: k > 1 ? rungeKuttaPlan(order <= 2 ? MIDPOINT : CLASSICAL, 'f', levels > 1 ? 'v' : 'u', 's') : null,
      startOrder: order <= 2 ? 2 : 4,
    },
  };
}

/** @param order order of the method, which the start-up must keep */
export function planMethod(definition: TimeMethodDefinition, order: number): Planned<MethodPlan> {
  const method = readTimeMethod(definition.time, '/time', []);
  if (!method) return none('The time method cannot be read.');
  if (method.kind === 'imex-multistep')
    return none('An implicit-explicit method needs a solve; kernels are printed for explicit methods.');
  if (method.kind === 'multistep') return multistepPlan(method.alpha, method.beta, order);
  if (!isExplicit(method)) return none('The Runge-Kutta method is implicit; kernels are printed for explicit methods.');
  const plan = rungeKuttaPlan(method, 'k', 'u', 'b');
  return plan ? { kind: 'plan', plan } : none('The method has no weights.');
}
