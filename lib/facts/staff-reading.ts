/** The stability facts as the staff of a sheet shows them. */
import type { StabilityFacts } from './facts';
import type { FactsSummary } from './facts-summary';
import { decimalText, largestStable, raised, symbolText } from './reading-texts';

export interface StaffReading {
  readonly symbol: string;
  /** Stable intervals, null for no end. */
  readonly intervals: readonly { readonly lo: number | null; readonly hi: number | null }[];
  /** Right end of the graduation. */
  readonly span: number;
  /** Words left and right of the bound. */
  readonly below: string;
  readonly beyond: string;
}

/** Twice the bound, rounded up so that the eighths of the graduation read well. */
function spanOf(limit: number | null): number {
  if (limit === null || limit === 0) return 2;
  const steps = [0.1, 0.2, 0.4, 0.5, 0.8, 1, 1.6, 2, 3, 4, 6, 8, 10, 12, 16, 20, 40, 80];
  return steps.find((step) => step >= 1.6 * limit) ?? 2 * limit;
}

/** Growth in a hundred steps, by the modulus of the worst wave. */
function inHundredSteps(modulus: number): string {
  const decades = 100 * Math.log10(modulus);
  const factor = decades < 4 ? decimalText(10 ** decades, 2) : `10${raised(String(Math.floor(decades)))}`;
  return `×${factor} in 100 steps`;
}

export function staffReading(stability: StabilityFacts, summary: FactsSummary): StaffReading {
  const symbol = symbolText(stability.parameter ?? summary.parameter ?? 'lambda');
  const limit = largestStable(summary);
  const { lostAt } = stability;
  const growth = lostAt ? `; at ${decimalText(lostAt.parameter)}, ${inHundredSteps(lostAt.modulus)}` : '';
  return {
    symbol,
    intervals: summary.bounds.map(({ lo, hi }) => ({ lo, hi })),
    span: spanOf(limit),
    below: limit === null ? 'no wave grows at any step' : `no wave grows up to ${decimalText(limit)}`,
    beyond: limit === 0 ? `grows at every ${symbol}${growth}` : `grows${growth}`,
  };
}
