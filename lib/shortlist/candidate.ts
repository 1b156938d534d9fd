/** What a run with one scheme would take, at the best admissible step. */
import { CONVENTIONS } from '@/lib/numerics/equation';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import type { SchemeFacts } from '@/lib/facts/facts';
import { fewestPoints, worstError } from './points-per-wave';
import { decays } from './run-error';
import type { Requirement } from './requirement';

/** Where a scheme has no bound, speeds are parts of this value: one cell a step. */
export const UNBOUNDED_REFERENCE = 1;
/** Parts of the fastest admissible parameter that are tried: a shorter step may allow a coarser grid. */
const PARTS = Array.from({ length: 26 }, (_, k) => 0.84 ** k);
const CURVE_SAMPLES = 49;
const CURVE_START = 8;
/** Where there is no bound, steps beyond one cell are tried too. */
const LONG_PARTS = [256, 64, 16, 8, 4, 2, ...PARTS];
/** A bound that is not itself stable (a double root stands there) is kept this far away from. */
const SHORT_OF_BOUND = 0.999;

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

/** Largest stable parameter with a positive speed; null where no step is stable, Infinity where there is no end. */
export function largestAdmissible({ stability }: Pick<SchemeFacts, 'stability'>): number | null {
  if (stability.verdict === 'unconditionally stable') return Infinity;
  const reach = stability.intervals
    .filter(({ lo, hi }) => (lo === null || Number(lo) <= 1e-12) && (hi === null || Number(hi) > 0))
    .map(({ hi, hiIncluded }) => {
      if (hi === null) return Infinity;
      return hiIncluded === false ? Number(hi) * SHORT_OF_BOUND : Number(hi);
    });
  return reach.length > 0 ? Math.max(...reach) : null;
}

/** The bound as a field names it: "up to 0.5", "below 1", "no bound". */
export function boundWords({ stability }: Pick<SchemeFacts, 'stability'>): string {
  const bound = largestAdmissible({ stability });
  if (bound === null) return 'no stable step';
  if (!Number.isFinite(bound)) return 'no bound';
  const end = stability.intervals.find(({ hi }) => hi !== null && Number(hi) >= bound);
  const value = Number(Number(end?.hi ?? bound).toPrecision(4));
  return end?.hiIncluded === false ? `below ${value}` : `up to ${value}`;
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

/** Parameter values worth trying for the fastest speed, longest step first. */
export function parametersToTry(bound: number, fastest: number): number[] {
  const isBounded = Number.isFinite(bound);
  const reference = (isBounded ? bound : UNBOUNDED_REFERENCE) * fastest;
  return (isBounded ? PARTS : LONG_PARTS).map((part) => reference * part);
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
  const ratio = asked.slowest / asked.fastest;
  const measure = MEASURES[asked.rank];
  const tolerance = asked.errorPercent / 100;
  let best: RunCost | null = null;
  for (const parameter of parametersToTry(bound, asked.fastest)) {
    const holds = (points: number) =>
      worstError(scheme, parameter * ratio, parameter, points, asked.duration) <= tolerance;
    // Points at which this step would cost as much as the best so far: where they do not hold, it cannot be cheaper.
    if (best && !holds(best.pointsPerWave * equalCostRatio(scheme, asked.rank, parameter / best.parameter))) continue;
    const points = fewestPoints(holds);
    if (points === null) continue;
    const cost = costAt(scheme, facts, points, parameter);
    if (!best || measure(cost) < measure(best)) best = cost;
  }
  return best;
}

/** Error of the worst speed against points a wave, at the step of `parameter`; both ends included. */
export function errorCurve(
  scheme: NumericScheme,
  parameter: number,
  ratio: number,
  duration: number,
  pointsMax: number,
): { points: number; error: number }[] {
  return Array.from({ length: CURVE_SAMPLES }, (_, k) => {
    const points = CURVE_START * (pointsMax / CURVE_START) ** (k / (CURVE_SAMPLES - 1));
    return { points, error: worstError(scheme, parameter * ratio, parameter, points, duration) };
  });
}

/** How many times the points may grow when the parameter is multiplied by `longer`, at the same measure. */
export function equalCostRatio(scheme: NumericScheme, rank: Requirement['rank'], longer: number): number {
  if (rank === 'memory') return 1;
  const { dims, spaceOrder, timeOrder } = CONVENTIONS[scheme.equation];
  const stepsPower = spaceOrder / timeOrder;
  return longer ** (1 / (rank === 'steps' ? stepsPower : dims + stepsPower));
}
