/** How long an analysis may work, how it is cancelled, and how it tells its progress. */

export interface Budget {
  /** Milliseconds left; Infinity without a limit. */
  remainingMs(): number;
  /** True once time is over or the analysis was cancelled. */
  isSpent(): boolean;
  /** True where the caller, not the clock, ended it. */
  isCancelled(): boolean;
  /** To be called inside long loops. @throws {BudgetSpent} once the budget is spent */
  check(): void;
  /** Tells the listener how far the work is. @param fraction 0 … 1 */
  progress(fraction: number, stage: string): void;
}

/** Thrown by `check` and caught by the analysis, which then answers with what it has. */
export class BudgetSpent extends Error {
  constructor(readonly cancelled: boolean) {
    super(cancelled ? 'the analysis was cancelled' : 'the time for the analysis is over');
    this.name = 'BudgetSpent';
  }
}

export interface BudgetOptions {
  /** Milliseconds from now. */
  readonly timeLimitMs?: number;
  readonly signal?: AbortSignal;
  readonly onProgress?: (fraction: number, stage: string) => void;
}

/** The clock is read at every 16th check only; the signal at each. */
export function createBudget(options: BudgetOptions = {}): Budget {
  const { timeLimitMs = Infinity, signal, onProgress } = options;
  const deadline = performance.now() + timeLimitMs;
  let checks = 0;
  const isCancelled = () => signal?.aborted === true;
  const isSpent = () => isCancelled() || performance.now() > deadline;
  return {
    remainingMs: () => (isCancelled() ? 0 : Math.max(0, deadline - performance.now())),
    isSpent,
    isCancelled,
    check() {
      if (isCancelled() || ((checks++ & 15) === 0 && performance.now() > deadline))
        throw new BudgetSpent(isCancelled());
    },
    progress: (fraction, stage) => onProgress?.(fraction, stage),
  };
}
