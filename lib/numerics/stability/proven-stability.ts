/** The best proof that the time allows: exact bounds, else certified brackets. */
import type { ScalarScheme } from '../canonical-scheme';
import { certifiedIntervals } from './certified-stability';
import { exactIntervals } from './exact-stability';
import type { MultipleRoots } from './gap-survey';
import type { StabilityOutcome, WorkBudget } from './stability-result';

/**
 * Stability of a scalar scheme in one dimension with one parameter, any number of levels, real or complex.
 * 'work-limit' and 'unsupported' ask the caller to go on numerically.
 */
export function provenIntervals(
  scheme: ScalarScheme,
  budget: WorkBudget,
  multipleRoots: MultipleRoots = 'growth',
): StabilityOutcome {
  const exact = exactIntervals(scheme, { ...budget, timeLimitMs: budget.timeLimitMs * 0.6 }, multipleRoots);
  if (exact.kind !== 'work-limit' || budget.isCancelled?.()) return exact;
  return certifiedIntervals(scheme, { ...budget, timeLimitMs: budget.timeLimitMs * 0.4 }, multipleRoots);
}
