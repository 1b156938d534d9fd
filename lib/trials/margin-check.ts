/** Bounded just below the bound, growing just above it; or growing at any value where the facts say so. */
import type { MarchTask, RunTask } from '@/lib/codegen/driver-protocol';
import { gridGrowth, sampleScheme, type Angle } from './characteristic';
import { gridText, pointsOf, sized } from './grid';
import { notApplicable, OUTSIDE_BOUND, outcomeOf, short, stateOf, statusOf, type Answers, type Check } from './check';
import { randomField } from './smooth-field';
import type { BoundEnd, MarchSubject } from './subject';

/** Past the bound by these parts of it, the first at which growth shows within the steps allowed. */
const EXCESSES = [0.01, 0.02, 0.03, 0.05, 0.1, 0.2, 0.4] as const;
/** Long waves need long grids: some schemes lose stability there first. */
const GRIDS: Readonly<Record<1 | 2 | 3, readonly (readonly number[])[]>> = {
  1: [[64], [128], [256], [512]],
  2: [
    [12, 12],
    [24, 24],
  ],
  3: [
    [6, 6, 6],
    [10, 10, 10],
  ],
};
/** Growth that the worst wave must reach by itself; a random field holds about 1/sqrt(n) of it. */
const GROWTH_WANTED = 1e6;
const STEPS_MAX = 3000;
const POINT_STEPS_MAX = 400_000;
/** Measured logarithm of growth against the computed one. */
const RATE_TOLERANCE = 0.25;

const CALM_GRIDS: Readonly<Record<1 | 2 | 3, readonly number[]>> = { 1: [64], 2: [12, 10], 3: [8, 6, 6] };
const CALM_STEPS = [300, 900] as const;
/** Waves that beat against each other change the norm by small factors; growth of any rate does not stop there. */
const CALM_LIMIT = 4;

interface Growing {
  readonly value: number;
  readonly parameters: readonly number[];
  readonly grid: readonly number[];
  readonly steps: number;
  /** Largest factor a step over the waves of the grid; null where the definition gives none above 1. */
  readonly rate: number | null;
  readonly theta: Angle | null;
}

/** A random field without its mean, which may grow linearly where the equation is of second order in time. */
function meanFree(n: number, seed: number): Float64Array {
  const values = randomField(n, seed);
  const mean = values.reduce((sum, value) => sum + value, 0) / n;
  return values.map((value) => value - mean);
}

const norm = (levels: readonly Float64Array[]) =>
  Math.sqrt(levels.reduce((sum, level) => sum + level.reduce((inner, value) => inner + value * value, 0), 0));

function growingAt(subject: MarchSubject, value: number, parameters: readonly number[]): Growing | null {
  const sampled = sampleScheme(subject.scheme, parameters);
  for (const grid of GRIDS[subject.scheme.dims]) {
    const { growth, theta } = gridGrowth(sampled, grid);
    if (growth <= 1 + 1e-9) continue;
    const steps = 2 * Math.ceil(Math.log(GROWTH_WANTED) / Math.log(growth) / 2);
    if (steps <= STEPS_MAX && steps * pointsOf(grid) <= POINT_STEPS_MAX)
      return { value, parameters, grid, steps: Math.max(8, steps), rate: growth, theta };
  }
  return null;
}

const march = (
  subject: MarchSubject,
  id: string,
  parameters: readonly number[],
  grid: readonly number[],
  steps: number,
): MarchTask => ({
  kind: 'march',
  id,
  ...sized(grid),
  steps,
  parameters: [...parameters],
  levels: Array.from({ length: subject.keptLevels }, (_, l) => meanFree(pointsOf(grid), l + 7)),
});

const calmTasks = (subject: MarchSubject, id: string, parameters: readonly number[]) =>
  CALM_STEPS.map((steps, k) => march(subject, `${id}:${k}`, parameters, CALM_GRIDS[subject.scheme.dims], steps));

/** How many times the norm grew between the two calm runs. */
function calmRatio(answers: Answers, id: string): number {
  const [early, late] = CALM_STEPS.map((_, k) => norm(stateOf(answers, `${id}:${k}`)));
  return late === 0 ? 0 : late! / early!;
}

const growthTasks = (subject: MarchSubject, id: string, { parameters, grid, steps }: Growing) =>
  [steps / 2, steps].map((count, k) => march(subject, `${id}:${k}`, parameters, grid, count));

function measuredRate(answers: Answers, id: string, steps: number): number {
  const [half, full] = [0, 1].map((k) => norm(stateOf(answers, `${id}:${k}`, true)));
  return (full! / half!) ** (2 / steps);
}

/** One step of the kernel's own loop, which compares the parameter with the bound. */
const probe = (subject: MarchSubject, id: string, parameters: readonly number[]): RunTask => ({
  ...march(subject, id, parameters, CALM_GRIDS[subject.scheme.dims], 1),
  kind: 'run',
});

/** Why the kernel's own check of the bound is wrong; null where it is right or there is none. */
function wrongCheck(subject: MarchSubject, answers: Answers, id: string): string | null {
  if (!subject.checksBound) return null;
  if (statusOf(answers, `${id}:in`) !== 0) return 'the kernel refuses a value inside the bound';
  return statusOf(answers, `${id}:out`) === OUTSIDE_BOUND ? null : 'the kernel takes a value outside the bound';
}

const agrees = (measured: number, computed: number | null) =>
  computed !== null && Math.abs(Math.log(measured) / Math.log(computed) - 1) <= RATE_TOLERANCE;

interface EndPlan {
  readonly end: BoundEnd;
  readonly outside: Growing;
}

function planEnd(subject: MarchSubject, end: BoundEnd): EndPlan {
  for (const excess of EXCESSES) {
    const value = end.bound + end.outward * excess * Math.abs(end.bound);
    const outside = growingAt(subject, value, end.vector(value));
    if (outside) return { end, outside };
  }
  // The definition itself shows no growth out there: march all the same, and let the finding say so.
  const value = end.bound + end.outward * 0.1 * Math.abs(end.bound);
  return {
    end,
    outside: {
      value,
      parameters: end.vector(value),
      grid: CALM_GRIDS[subject.scheme.dims],
      steps: 1000,
      rate: null,
      theta: null,
    },
  };
}

function boundedCheck(subject: MarchSubject): Check {
  const plans = subject.ends.map((end) => planEnd(subject, end));
  return {
    name: 'margin',
    tasks: plans.flatMap(({ end, outside }, k) => [
      ...calmTasks(subject, `margin:${k}:in`, end.vector(end.inside)),
      ...growthTasks(subject, `margin:${k}:out`, outside),
      ...(subject.checksBound
        ? [
            probe(subject, `margin:${k}:probe:in`, end.vector(end.inside)),
            probe(subject, `margin:${k}:probe:out`, outside.parameters),
          ]
        : []),
    ]),
    judge: (answers) => {
      const rows = plans.map(({ end, outside }, k) => {
        const calm = calmRatio(answers, `margin:${k}:in`);
        const rate = measuredRate(answers, `margin:${k}:out`, outside.steps);
        const wrong = wrongCheck(subject, answers, `margin:${k}:probe`);
        return {
          parameter: end.parameter,
          bound: end.bound,
          boundText: end.text,
          inside: { value: end.inside, normRatio: Number.isFinite(calm) ? calm : null, steps: CALM_STEPS },
          outside: {
            value: outside.value,
            points: pointsOf(outside.grid),
            steps: outside.steps,
            computedRate: outside.rate,
            measuredRate: Number.isFinite(rate) ? rate : null,
            theta: outside.theta,
          },
          wrong,
          passed: wrong === null && calm <= CALM_LIMIT && agrees(rate, outside.rate),
        };
      });
      const worst = rows.find(({ passed }) => !passed) ?? rows[0]!;
      const place = (value: number) => `${short(value / worst.bound)} of the bound`;
      const calm = worst.inside.normRatio;
      const rate = worst.outside.measuredRate;
      return {
        outcome: outcomeOf(rows.every(({ passed }) => passed)),
        measured:
          worst.wrong ??
          `x ${calm === null ? 'overflow' : short(calm)} at ${place(worst.inside.value)}; x ${rate === null ? 'overflow' : rate.toPrecision(6)} a step at ${place(worst.outside.value)}`,
        target:
          worst.outside.computedRate === null
            ? `<= x ${CALM_LIMIT} inside; growth outside, where the definition gives none`
            : `<= x ${CALM_LIMIT} inside; x ${worst.outside.computedRate.toPrecision(6)} a step outside`,
        how: `A random field marched ${CALM_STEPS[1]} steps just inside each end of the stable set, its norm compared with that after ${CALM_STEPS[0]}, and outside at the nearest value where a run of at most ${STEPS_MAX} steps shows growth, its rate compared with the computed one within ${100 * RATE_TOLERANCE} %.`,
        data: { ends: rows },
      };
    },
  };
}

function alwaysStableCheck(subject: MarchSubject, parameters: readonly number[]): Check {
  return {
    name: 'margin',
    tasks: calmTasks(subject, 'margin:far', parameters),
    judge: (answers) => {
      const ratio = calmRatio(answers, 'margin:far');
      return {
        outcome: outcomeOf(ratio <= CALM_LIMIT),
        measured: `x ${short(ratio)}`,
        target: `<= x ${CALM_LIMIT}`,
        how: `No bound is known, so a random field was marched ${CALM_STEPS[1]} steps at a large value (${parameters.map(short).join(', ')}); its norm compared with that after ${CALM_STEPS[0]}.`,
        data: { parameters, normRatio: Number.isFinite(ratio) ? ratio : null, steps: CALM_STEPS },
      };
    },
  };
}

/** Typical values, then larger ones for instabilities that are too slow to show at those. */
const TYPICAL = [0.4, 0.8, 1.2, 2] as const;

function unstableCheck(subject: MarchSubject): Check {
  const main = subject.working[0]!;
  const scale = Math.max(...main.map(Math.abs));
  let growing: Growing | null = null;
  for (const value of TYPICAL) {
    const parameters = main.map((parameter) => (parameter / scale) * value);
    growing ??= growingAt(subject, value, parameters);
  }
  if (!growing)
    return notApplicable(
      'margin',
      `The scheme is ${subject.verdict}, but so slowly that a run of ${STEPS_MAX} steps cannot show it.`,
    );
  const shown = growing;
  return {
    name: 'margin',
    tasks: growthTasks(subject, 'margin:unstable', shown),
    judge: (answers) => {
      const rate = measuredRate(answers, 'margin:unstable', shown.steps);
      return {
        outcome: outcomeOf(agrees(rate, shown.rate)),
        measured: `x ${Number.isFinite(rate) ? rate.toPrecision(6) : 'overflow'} a step`,
        target: `x ${shown.rate!.toPrecision(6)} a step`,
        how: `The facts say "${subject.verdict}": a random field of ${gridText(shown.grid)} points was marched ${shown.steps} steps at ${shown.parameters.map(short).join(', ')}, and its growth compared with the computed one within ${100 * RATE_TOLERANCE} %.`,
        data: { ...shown, n: pointsOf(shown.grid), measuredRate: Number.isFinite(rate) ? rate : null },
      };
    },
  };
}

export function marginCheck(subject: MarchSubject): Check {
  if (!subject.stable) return unstableCheck(subject);
  if (subject.ends.length > 0) return boundedCheck(subject);
  if (subject.farInside) return alwaysStableCheck(subject, subject.farInside);
  return notApplicable('margin', `There is no bound to test: the facts say "${subject.verdict}".`);
}
