/** What a run with one scheme would take, at the best admissible step. */
import { CONVENTIONS } from '@/lib/numerics/equation';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import type { SchemeFacts } from '@/lib/facts/facts';
import { pointsPerWave } from './points-per-wave';
import { decays } from './run-error';
import type { Requirement } from './requirement';

/** Where a scheme has no bound, speeds are parts of this value: one cell a step. */
export const UNBOUNDED_REFERENCE = 1;
/** Parts of the fastest admissible parameter that are tried: a shorter step may allow a coarser grid. */
const PARTS = [1, 0.85, 0.7, 0.5, 0.35, 0.25, 0.15, 0.1, 0.06, 0.03];

export interface RunCost {
  readonly pointsPerWave: number;
  /** Parameter of the fastest speed. */
  readonly parameter: number;
  /** Steps for one wavelength of travel, or one e-folding. */
  readonly stepsPerWave: number;
  /** Points × steps × bytes to carry one wavelength (to the power of the dimensions) through one wavelength of travel. */
  readonly bytes: number;
  readonly operations: number;
  /** Array elements kept a cubed (squared) wavelength. */
  readonly memory: number;
}

/** Largest stable parameter with the sign asked; null where nothing is stable, Infinity where there is no end. */
export function largestAdmissible({ stability }: SchemeFacts): number | null {
  if (stability.verdict === 'unconditionally stable') return Infinity;
  const reach = stability.intervals
    .filter(({ lo }) => lo === null || Number(lo) <= 1e-12)
    .map(({ hi }) => (hi === null ? Infinity : Number(hi)));
  const largest = Math.max(0, ...reach);
  return largest > 0 ? largest : null;
}

/** Whether the bound is the same for both signs of the speed. */
export function holdsBothSigns({ stability }: SchemeFacts): boolean {
  if (stability.verdict === 'unconditionally stable') return true;
  return stability.intervals.some(({ lo, hi }) => (lo === null || Number(lo) < 0) && (hi === null || Number(hi) > 0));
}

export const MEASURES = {
  bytes: (cost: RunCost) => cost.bytes,
  memory: (cost: RunCost) => cost.memory,
  steps: (cost: RunCost) => cost.stepsPerWave,
} as const satisfies Record<Requirement['rank'], (cost: RunCost) => number>;

function costAt(scheme: NumericScheme, facts: SchemeFacts, points: number, parameter: number): RunCost {
  const { dims, spaceOrder, timeOrder } = CONVENTIONS[scheme.equation];
  // dt = parameter · dx^(s/timeOrder): one wavelength of travel takes N / parameter steps, one e-folding N² / (4π² r).
  const power = spaceOrder / timeOrder;
  const stepsPerWave = decays(scheme.equation)
    ? points ** power / (parameter * (2 * Math.PI) ** power)
    : points / parameter;
  const cells = points ** dims;
  return {
    pointsPerWave: points,
    parameter,
    stepsPerWave,
    bytes: cells * stepsPerWave * facts.cost.bytesDouble,
    operations: cells * stepsPerWave * facts.cost.operations,
    memory: cells * facts.storage.arraysInPlace,
  };
}

/**
 * The cheapest run that keeps the error asked, over the admissible parameters.
 * @returns null where the scheme is stable nowhere or no grid up to the limit reaches the tolerance
 */
export function cheapestRun(
  scheme: NumericScheme,
  facts: SchemeFacts,
  asked: Pick<Requirement, 'errorPercent' | 'duration' | 'slowest' | 'fastest' | 'rank'>,
): RunCost | null {
  const bound = largestAdmissible(facts);
  if (bound === null) return null;
  const reference = Number.isFinite(bound) ? bound : UNBOUNDED_REFERENCE;
  const ratio = asked.slowest / asked.fastest;
  let best: RunCost | null = null;
  for (const part of PARTS) {
    const parameter = reference * asked.fastest * part;
    const points = pointsPerWave(scheme, parameter * ratio, parameter, asked.errorPercent / 100, asked.duration);
    if (points === null) continue;
    const cost = costAt(scheme, facts, points, parameter);
    if (!best || MEASURES[asked.rank](cost) < MEASURES[asked.rank](best)) best = cost;
  }
  return best;
}
