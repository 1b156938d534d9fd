/** A kernel that is only pretended: it carries out driver tasks in doubles from a canonical scheme. */
import type { DriverAnswer, DriverTask } from '@/lib/codegen/driver-protocol';
import { symbolTerms } from '@/lib/numerics/equation-terms';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { evaluate } from '@/lib/numerics/polynomial';
import { rational, toNumber } from '@/lib/numerics/rational';
import { stencilWeights } from '@/lib/numerics/stencil-weights';
import type { Subject } from '@/lib/trials/subject';
import { firstTasks, followUpTasks, type TrialPlan } from '@/lib/trials/trial-plan';

export interface Flaws {
  /** Multiplies the coefficient of the k-th known term. */
  factor?: (term: number) => number;
  /** Terms of the Taylor series in time that the start-up takes; enough by default. */
  startTerms?: number;
  /** Bound that the kernel checks its parameter against. */
  bound?: number;
}

const at = (values: Float64Array, i: number) => values[((i % values.length) + values.length) % values.length]!;

function step(
  scheme: ScalarScheme,
  parameters: readonly number[],
  levels: Float64Array[],
  flaws: Flaws,
): Float64Array[] {
  const pivot = scheme.terms.find((term) => toNumber(term.level) === 1)!;
  const lead = evaluate(pivot.coefficient, parameters)[0];
  const known = scheme.terms.filter((term) => term !== pivot);
  const n = levels[0]!.length;
  const next = new Float64Array(n);
  known.forEach((term, k) => {
    const weight = (-evaluate(term.coefficient, parameters)[0] / lead) * (flaws.factor?.(k) ?? 1);
    const level = levels[toNumber(term.level) - 1 + levels.length]!;
    const offset = toNumber(term.offset[0]!) - toNumber(pivot.offset[0]!);
    for (let i = 0; i < n; i++) next[i]! += weight * at(level, i + offset);
  });
  return [...levels.slice(1), next];
}

/** Missing levels by the Taylor series in time, with differences of order 8 in space. */
function start(scheme: ScalarScheme, parameters: readonly number[], given: Float64Array[], kept: number, flaws: Flaws) {
  const nodes = [-4, -3, -2, -1, 0, 1, 2, 3, 4];
  const operator = (values: Float64Array) => {
    const out = new Float64Array(values.length);
    for (const { powers, coefficient } of symbolTerms(scheme)) {
      const factor = evaluate(coefficient, parameters)[0];
      const weights = stencilWeights(
        nodes.map((node) => rational(node)),
        powers[0]!,
      ).map(toNumber);
      for (let i = 0; i < out.length; i++)
        nodes.forEach((node, k) => (out[i]! += factor * weights[k]! * at(values, i + node)));
    }
    return out;
  };
  const terms = flaws.startTerms ?? 8;
  return Array.from({ length: kept }, (_, s) => {
    const sum = new Float64Array(given[0]!.length);
    let [even, odd] = [given[0]!, given[1]];
    let factor = 1;
    for (let k = 0; k <= terms; k++) {
      // First order in time: u^(k) = L^k u. Second order: even derivatives from u, odd ones from u_t.
      const use = scheme.timeOrder === 1 || k % 2 === 0 ? even : odd!;
      use.forEach((value, i) => (sum[i]! += factor * value));
      if (scheme.timeOrder === 1 || k % 2 === 0) even = operator(even);
      else odd = operator(odd!);
      factor *= s / (k + 1);
    }
    return sum;
  });
}

export function simulate(subject: Subject, task: DriverTask, flaws: Flaws = {}): DriverAnswer {
  if (task.kind === 'pace') return { kind: 'pace', id: task.id, secondsPerPoint: 1e-9, triadBytesPerSecond: 2e10 };
  if (task.kind === 'apply') {
    if (subject.kind !== 'stencil') throw new Error('a scheme is marched, not applied');
    const out = Float64Array.from(task.values, (_, i) =>
      subject.weights.reduce(
        (sum, weight, k) =>
          sum + toNumber(weight) * (flaws.factor?.(k) ?? 1) * at(task.values, i + subject.offsets[k]!),
        0,
      ),
    ).map((value) => value / task.spacing ** subject.derivative);
    return { kind: 'state', id: task.id, status: 0, levels: [out] };
  }
  if (subject.kind !== 'march') throw new Error('a stencil is applied, not marched');
  const outside =
    task.kind === 'run' &&
    subject.checksBound &&
    flaws.bound !== undefined &&
    Math.abs(task.parameters[0]!) > flaws.bound;
  let levels = task.levels;
  if (task.kind === 'start') levels = start(subject.scheme, task.parameters, levels, subject.keptLevels, flaws);
  else for (let k = 0; k < task.steps; k++) levels = step(subject.scheme, task.parameters, levels, flaws);
  return { kind: 'state', id: task.id, status: outside ? 3 : 0, levels: outside ? [] : levels };
}

/** Answers to all tasks of a plan. */
export function simulatePlan(subject: Subject, plan: TrialPlan, flaws: Flaws = {}): Map<string, DriverAnswer> {
  const answers = new Map<string, DriverAnswer>();
  const take = (tasks: DriverTask[]) => tasks.forEach((task) => answers.set(task.id, simulate(subject, task, flaws)));
  take(firstTasks(plan));
  take(followUpTasks(plan, answers));
  return answers;
}
