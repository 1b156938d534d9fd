/** Stops an analysis at the end of its time by throwing, so that inner loops need no result codes. */
import type { WorkBudget } from './stability-result';

export class WorkLimitReached extends Error {
  constructor() {
    super('the exact analysis passed its time limit');
    this.name = 'WorkLimitReached';
  }
}

/** A function to call between steps; throws WorkLimitReached once the budget is spent or the work is cancelled. */
export function workMeter(budget: WorkBudget): () => void {
  const end = performance.now() + budget.timeLimitMs;
  return () => {
    if (performance.now() > end || budget.isCancelled?.()) throw new WorkLimitReached();
  };
}
