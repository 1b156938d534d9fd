/**
 * Plans explicit Runge-Kutta stages with fused sums: when a slope is known at a point, it is added at once to every
 * later stage and to the new level, so that no slope is stored.
 */
import type { LinesScheme } from '@/lib/entries/definition';
import { canonicalStencil } from '@/lib/facts/canonical-stencil';
import { readTimeMethod } from '@/lib/facts/canonical-time-method';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { symbolTerms } from '@/lib/numerics/equation-terms';
import { add, scale, type Polynomial } from '@/lib/numerics/polynomial';
import { fromPolynomial } from '@/lib/numerics/rational-function';
import { isZero, toNumber, type Rational } from '@/lib/numerics/rational';
import { combine } from './combination';
import { difference, named, number, product, read, sum, type Assignment, type Node } from './expression-tree';
import { asParameter, none, type Planned, type StagesPlan, type Sweep } from './kernel-plan';

export interface Tableau {
  readonly A: readonly (readonly Rational[])[];
  readonly b: readonly Rational[];
}

/** One stage: where its slope is taken, and the sums that the slope joins. */
export interface Stage {
  /** Index into the tableau, from 0. */
  readonly index: number;
  /** Array of which the slope is taken. */
  readonly source: string;
  readonly sums: readonly {
    readonly target: string;
    readonly base: string;
    /** Row of the tableau that is summed, or its length for the weights b. */
    readonly row: number;
    readonly factor: Rational;
  }[];
}

const POOL = ['y', 'z', 'y3', 'y4', 'y5', 'y6', 'y7', 'y8', 'y9', 'y10', 'y11', 'y12', 'y13', 'y14', 'y15', 'y16'];

/** Stages that the new level depends on. */
function neededStages({ A, b }: Tableau): boolean[] {
  const needed = b.map((weight) => !isZero(weight));
  for (let i = b.length - 1; i >= 0; i--) if (needed[i]) A[i]!.forEach((a, j) => (needed[j] ||= j < i && !isZero(a)));
  return needed;
}

export const isExplicit = ({ A }: Pick<Tableau, 'A'>) => A.every((row, i) => row.every((a, j) => j < i || isZero(a)));

/**
 * Assigns arrays to stages. `u` is the level, `w` the sum for the new level; the last stage writes into `u`.
 * @param overwritesSource true where a stage state may be overwritten by the stage that reads it (slopes kept apart)
 */
export function arrangeStages(tableau: Tableau, overwritesSource: boolean): { stages: Stage[]; work: string[] } | null {
  const { A, b } = tableau;
  const needed = neededStages(tableau);
  const indices = b.map((_, i) => i).filter((i) => needed[i]);
  const last = indices[indices.length - 1];
  if (last === undefined) return null;
  const arrayOf = new Map<number, string>();
  const free = [...POOL];
  const work: string[] = [];
  const take = (name: string) => {
    if (!work.includes(name)) work.push(name);
    return name;
  };
  const stages: Stage[] = [];
  for (const j of indices) {
    const source = arrayOf.get(j) ?? 'u';
    if (source === 'u' && j === last && indices.length > 1 && !overwritesSource) return null;
    if (overwritesSource && source !== 'u') free.unshift(source);
    const rows = [...indices.filter((i) => i > j), b.length];
    const sums = rows.flatMap((row) => {
      const factor = row === b.length ? b[j]! : A[row]![j]!;
      if (isZero(factor)) return [];
      const present = arrayOf.get(row);
      const isLevel = row === b.length;
      const target = isLevel && j === last ? 'u' : (present ?? take(isLevel ? 'w' : free.shift()!));
      arrayOf.set(row, target);
      return [{ target, base: present ?? 'u', row, factor }];
    });
    if (!overwritesSource && source !== 'u') free.unshift(source);
    stages.push({ index: j, source, sums });
  }
  return { stages, work };
}

/** base + factor·slope at a point. */
export function addSlope(base: Node, factor: Rational, slope: Node): Node {
  const size: Rational = { num: factor.num < 0n ? -factor.num : factor.num, den: factor.den };
  const term = size.num === 1n && size.den === 1n ? slope : product(number(size), slope);
  return factor.num < 0n ? difference(base, term) : sum(base, term);
}

/** dt·L as polynomial coefficients by offset. */
function slopeTerms(definition: LinesScheme, scheme: ScalarScheme): Map<number, Polynomial> | null {
  const byOffset = new Map<number, Polynomial>();
  const operators = symbolTerms(scheme);
  for (const [k, written] of definition.space.entries()) {
    const { stencil } = canonicalStencil(written);
    if (!stencil || stencil.lhs) return null;
    stencil.offsets.forEach((offset, j) => {
      const at = toNumber(offset[0]!);
      const own = scale(operators[k]!.coefficient, stencil.weights[j]!);
      byOffset.set(at, add(byOffset.get(at) ?? [], own));
    });
  }
  return byOffset;
}

export function planStages(definition: LinesScheme, scheme: ScalarScheme): Planned<StagesPlan> {
  if (scheme.dims > 1)
    return none(
      `Runge-Kutta stages in ${scheme.dims} dimensions are not printed yet; explicit tables are, and multistep lines.`,
    );
  const tableau = readTimeMethod(definition.time, '/time', []);
  if (tableau?.kind !== 'runge-kutta' || !isExplicit(tableau))
    return none('The Runge-Kutta method is implicit; kernels are printed for explicit methods.');
  const slope = slopeTerms(definition, scheme);
  if (!slope) return none('A compact stencil needs a linear solve; kernels are printed for explicit stencils.');
  const arranged = arrangeStages(tableau, false);
  if (!arranged) return none('The last stage reads the old level itself; such a tableau is not printed.');

  const parameters = scheme.parameters.map(asParameter);
  const symbols = parameters.map((p) => p.name);
  const present = [...slope].filter(([, coefficient]) => coefficient.length > 0);
  if (present.some(([, coefficient]) => coefficient.some((m) => !isZero(m.im))))
    return none('The coefficients are complex; kernels are printed for real unknowns.');
  const reach: [number, number] = [
    Math.max(0, ...present.map(([offset]) => -offset)),
    Math.max(0, ...present.map(([offset]) => offset)),
  ];
  const combinationOver = (array: string) =>
    combine(
      present.map(([offset, coefficient]) => ({
        array,
        offset,
        coefficient: fromPolynomial(coefficient, symbols.length),
      })),
      new Map([[array, 'a']]),
      symbols,
    );
  const sweeps = arranged.stages.map(({ source, sums }): Sweep => {
    const assignments: Assignment[] = [{ kind: 'value', name: 'k', node: combinationOver(source).node }];
    for (const { target, base, factor } of sums)
      assignments.push({ kind: 'store', array: target, node: addSlope(read(base, 0), factor, named('k')) });
    return { source, assignments };
  });
  return {
    kind: 'plan',
    plan: {
      shape: 'stages',
      parameters,
      halo: reach,
      coefficients: combinationOver('u').coefficients,
      divisor: null,
      timeOrder: scheme.timeOrder,
      work: arranged.work,
      sweeps,
    },
  };
}
