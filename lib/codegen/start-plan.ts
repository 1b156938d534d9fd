/**
 * Start-up of multi-level schemes: the missing levels by the truncated Taylor series in time, applied stage by stage
 * with differences that fit the halo. For constant coefficients this is a Runge-Kutta step with as many stages.
 */
import type { SchemeFacts } from '@/lib/facts/facts';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { symbolTerms } from '@/lib/numerics/equation-terms';
import { add, scale, type Polynomial } from '@/lib/numerics/polynomial';
import { fromPolynomial } from '@/lib/numerics/rational-function';
import { isZero, rational } from '@/lib/numerics/rational';
import { stencilWeights } from '@/lib/numerics/stencil-weights';
import { combine } from './combination';
import { componentsOf, type Place } from './expression-tree';
import { parameterName, type StartPlan } from './kernel-plan';

/** Offsets within the scheme's halo where these carry the wanted order; a wider symmetric set where not. */
function offsetsFor(derivative: number, order: number, [left, right]: readonly [number, number]): number[] {
  const range = (a: number, b: number) => Array.from({ length: a + b + 1 }, (_, k) => k - a);
  const symmetric = left === right;
  const points = left + right + 1;
  // An even derivative on symmetric nodes gains one order; an odd one has it already, since its centre weight is 0.
  const reached = points - derivative + (symmetric && derivative % 2 === 0 ? 1 : 0);
  if (reached >= order) return range(left, right);
  const reach = Math.floor((derivative + 1) / 2) + Math.ceil(order / 2) - 1;
  const half = Math.max(reach, left, right);
  return range(half, half);
}

export interface PlannedStart {
  readonly plan: StartPlan;
  readonly halos: readonly (readonly [number, number])[];
}

/** @param reaches halo of the scheme itself, for every dimension */
export function planStart(
  scheme: ScalarScheme,
  facts: SchemeFacts,
  keptLevels: number,
  reaches: readonly (readonly [number, number])[],
): PlannedStart {
  const { order } = facts;
  const inTime = order.pT ?? order.orderAtFixedParameter ?? 2;
  const inSpace = Math.max(2, order.pX ?? order.orderAtFixedParameter ?? 2);
  const byPlace = new Map<string, Place & { readonly coefficient: Polynomial }>();
  const halos = reaches.map(([left, right]): [number, number] => [left, right]);
  for (const { powers, coefficient } of symbolTerms(scheme)) {
    // Every term of every equation is a derivative along one axis.
    const axis = powers.findIndex((power) => power > 0);
    const derivative = powers[axis]!;
    const offsets = offsetsFor(derivative, inSpace, reaches[axis]!);
    const weights = stencilWeights(
      offsets.map((o) => rational(o)),
      derivative,
    );
    offsets.forEach((offset, k) => {
      const weight = weights[k]!;
      if (isZero(weight)) return;
      const along = (at: number) => (at === axis ? offset : 0);
      const place: Place =
        scheme.dims === 1 ? { offset } : { offset: along(0), across: powers.slice(1).map((_, k) => along(k + 1)) };
      const key = componentsOf(place).join(' ');
      const sum = add(byPlace.get(key)?.coefficient ?? [], scale(coefficient, weight));
      byPlace.set(key, { ...place, coefficient: sum });
      const [left, right] = halos[axis]!;
      halos[axis] = [Math.max(left, -offset), Math.max(right, offset)];
    });
  }
  const terms = [...byPlace.values()]
    .filter(({ coefficient }) => coefficient.length > 0)
    .map(({ offset, across, coefficient }) => ({
      array: 'y',
      offset,
      across,
      coefficient: fromPolynomial(coefficient, scheme.parameters.length),
    }));
  const { node, coefficients } = combine(terms, new Map([['y', 's']]), scheme.parameters.map(parameterName));
  const wanted = Math.max(inTime, keptLevels > 2 ? 2 : 1);
  return {
    halos,
    plan: {
      terms: scheme.timeOrder === 1 ? Math.max(2, wanted) : Math.max(1, Math.ceil(wanted / 2)),
      spaceOrder: inSpace,
      operator: node,
      coefficients,
    },
  };
}
