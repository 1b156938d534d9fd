/** Which grids and parameter values show an order: chosen by what the definition itself predicts there. */
import { expOf, gridGrowth, minus, modulus, powerOf, principalRoot, sampleScheme, type Symbol } from './characteristic';
import { anglesOf, pointsOf } from './grid';
import { SMOOTH_WAVES, waveCounts } from './smooth-field';
import type { MarchSubject } from './subject';
import { CONVENTIONS } from '@/lib/numerics/equation';

export interface RefinedRun {
  /** Points along every axis. */
  readonly n: number;
  readonly steps: number;
  readonly parameters: readonly number[];
  /** What is halved, in units of its largest value. */
  readonly step: number;
  /** Logarithm of the exact factor of one step. */
  readonly exact: Symbol;
}

export interface RefinementPlan {
  readonly runs: readonly RefinedRun[];
  readonly predictedSlope: number;
}

/** Steps 1, 2/3, 1/2, 1/3, 1/4 of the coarsest: five runs over two halvings. */
const TIMES_FINER = [1, 1.5, 2, 3, 4] as const;
const BASES: Readonly<Record<1 | 2 | 3, readonly number[]>> = { 1: [16, 24, 48, 96, 192], 2: [8, 16], 3: [8] };
/** In space the points grow with the cube: one run less. */
const finerIn = (dims: number) => (dims === 3 ? TIMES_FINER.slice(0, 4) : TIMES_FINER);
/** Waves of so many points an axis stand for those of finer grids, which are more than can be asked one by one. */
const GROWTH_POINTS: Readonly<Record<2 | 3, number>> = { 2: 16, 3: 8 };

export const gridOf = ({ scheme }: MarchSubject, { n }: Pick<RefinedRun, 'n'>): number[] =>
  Array.from({ length: scheme.dims }, () => n);
/** Fine enough in space that only the steps in time matter, coarse enough for every wave of the field. */
const POINTS_IN_TIME = 16;
/** Point updates of one march that a trial may cost. */
const WORK_MAX = 1_500_000;
const SLOPE_TOLERANCE = 0.06;

/** Least-squares slope of ln error against ln step over the three finest runs. */
export function slopeOf(steps: readonly number[], errors: readonly number[]): number {
  const x = steps.slice(-3).map(Math.log);
  const y = errors.slice(-3).map(Math.log);
  const mean = (v: readonly number[]) => v.reduce((a, b) => a + b, 0) / v.length;
  const [mx, my] = [mean(x), mean(y)];
  const sum = (f: (k: number) => number) => x.reduce((total, _, k) => total + f(k), 0);
  return sum((k) => (x[k]! - mx) * (y[k]! - my)) / sum((k) => (x[k]! - mx) ** 2);
}

/** Root mean square over the grid of a field whose waves have these complex amplitudes. */
const rms = (amplitudes: readonly number[]) => Math.sqrt(amplitudes.reduce((sum, a) => sum + (a * a) / 2, 0));

/** Error of the principal root alone after all steps; null where roundings would reach it. */
function predictedError(subject: MarchSubject, run: RefinedRun): number | null {
  const sampled = sampleScheme(subject.scheme, run.parameters);
  const { dims } = subject.scheme;
  const amplitudes = SMOOTH_WAVES.map(({ amplitude }, k) => {
    const theta = anglesOf(waveCounts(dims)[k]!, gridOf(subject, run));
    const root = principalRoot(sampled, theta, run.exact);
    if (!root) return null;
    const [re, im] = run.exact(theta);
    return amplitude * modulus(minus(powerOf(root, run.steps), expOf([re * run.steps, im * run.steps])));
  });
  if (amplitudes.some((a) => a === null)) return null;
  const error = rms(amplitudes as number[]);
  const waves = gridOf(subject, { n: dims === 1 ? run.n : Math.min(run.n, GROWTH_POINTS[dims]) });
  const roundings = 2 ** -52 * 16 * run.steps * Math.max(1, gridGrowth(sampled, waves).growth) ** run.steps;
  return roundings < 1e-2 * error ? error : null;
}

/** Logarithm of the factor of one step that is exact in time, the space differences being the kernel's own. */
function exactInTime(subject: MarchSubject, parameters: readonly number[]): Symbol {
  const { spaceSymbol } = subject;
  if (!spaceSymbol) throw new RangeError('exactInTime: the subject has no space differences of its own');
  return (theta) => spaceSymbol(parameters, typeof theta === 'number' ? theta : theta[0]!);
}

/**
 * Exponent of "times finer" by which a parameter changes while dt goes with dx^(s/timeOrder): 0 for the number of the
 * highest derivative, −1 for lambda beside r, since c dt/dx then goes with dx.
 */
function scaling({ scheme }: MarchSubject, k: number): number {
  const { parameters, operators, spaceOrder, timeOrder } = CONVENTIONS[scheme.equation];
  const place = parameters.indexOf(scheme.parameters[k]!);
  const operator = place >= 0 && parameters.length === operators.length ? operators[place]! : spaceOrder;
  return (operator - spaceOrder) / timeOrder;
}

function runsFor(subject: MarchSubject, parameters: readonly number[], base: number, firstSteps: number): RefinedRun[] {
  const { spaceOrder, timeOrder } = CONVENTIONS[subject.scheme.equation];
  return finerIn(subject.scheme.dims).map((finer) => {
    if (subject.refine === 'time') {
      const scaled = parameters.map((value) => value / finer);
      return {
        n: POINTS_IN_TIME,
        steps: Math.round(firstSteps * finer),
        parameters: scaled,
        step: 1 / finer,
        exact: exactInTime(subject, scaled),
      };
    }
    const scaled = parameters.map((value, k) => value * finer ** scaling(subject, k));
    return {
      n: base * finer,
      steps: Math.round(firstSteps * finer ** (spaceOrder / timeOrder)),
      parameters: scaled,
      step: 1 / finer,
      exact: sampleScheme(subject.scheme, scaled).exact,
    };
  });
}

/** Values to try in turn; those of an unstable scheme small, so that its growth stays below its error. */
function candidates(subject: MarchSubject): readonly (readonly number[])[] {
  const main = subject.working[0]!;
  const scales = subject.stable ? [1, 0.75, 0.5, 0.25] : [1, 0.5, 0.25, 0.1, 0.05, 0.02];
  return scales.map((scale) => main.map((value) => value * scale));
}

/** @returns null where no choice shows the order above the roundings */
export function planRefinement(subject: MarchSubject, order: number): RefinementPlan | null {
  const { spaceOrder, timeOrder } = CONVENTIONS[subject.scheme.equation];
  // A multiple of 2^(s/timeOrder), so that 1.5 times finer takes whole steps, and even on every grid, so that a
  // computational mode of alternating sign has the same sign on all of them.
  const unit = subject.refine === 'time' ? 4 : 2 ** (Math.ceil(spaceOrder / timeOrder) + 1);
  // The levels of the start-up carry none of the scheme's error: with many steps they are few among all.
  const multiples = subject.keptLevels === 1 ? [1, 2, 4] : subject.keptLevels === 2 ? [4, 2] : [8, 16, 4];
  let best: RefinementPlan | null = null;
  for (const base of subject.refine === 'time' ? [POINTS_IN_TIME] : BASES[subject.scheme.dims])
    for (const parameters of candidates(subject))
      for (const firstSteps of multiples.map((multiple) => multiple * unit)) {
        const runs = runsFor(subject, parameters, base, firstSteps);
        if (firstSteps < subject.keptLevels || pointsOf(gridOf(subject, runs.at(-1)!)) * runs.at(-1)!.steps > WORK_MAX)
          continue;
        const errors = runs.slice(-3).map((run) => predictedError(subject, run));
        if (errors.some((error) => error === null)) continue;
        const predictedSlope = slopeOf(
          runs.slice(-3).map(({ step }) => step),
          errors as number[],
        );
        const plan = { runs, predictedSlope };
        if (Math.abs(predictedSlope - order) <= SLOPE_TOLERANCE) return plan;
        if (!best || Math.abs(predictedSlope - order) < Math.abs(best.predictedSlope - order)) best = plan;
      }
  return best;
}
