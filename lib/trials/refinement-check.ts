/** The error of a smooth solution on finer and finer grids, and the order that it shows. */
import type { ApplyTask, DriverTask, MarchTask, StartTask } from '@/lib/codegen/driver-protocol';
import { toNumber } from '@/lib/numerics/rational';
import { expOf, minus, modulus, powerOf, type Complex } from './characteristic';
import { notApplicable, outcomeOf, stateOf, type Answers, type Check, type Judgement } from './check';
import { sized } from './grid';
import { gridOf, planRefinement, slopeOf, type RefinedRun } from './refinement-plan';
import { SMOOTH_WAVES, smoothField, smoothGridField } from './smooth-field';
import type { MarchSubject, StencilSubject } from './subject';

const TOLERANCE = 0.15;
/** Slopes that the definition predicts for these very grids replace the order where they come this near to it. */
const NEAR_ORDER = 0.35;

const startId = (k: number) => `refinement:start:${k}`;
const marchId = (k: number) => `refinement:${k}`;

const exactField = (subject: MarchSubject, run: RefinedRun, steps: number) =>
  smoothGridField(gridOf(subject, run), (theta) => {
    const [re, im] = run.exact(theta);
    return expOf([re * steps, im * steps]);
  });

/** What the start-up routine is given: the field, and for equations of second order in time dt·u_t. */
const initialLevels = (subject: MarchSubject, run: RefinedRun): Float64Array[] => [
  exactField(subject, run, 0),
  ...(subject.scheme.timeOrder === 2 ? [smoothGridField(gridOf(subject, run), run.exact)] : []),
];

function rmsDifference(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  a.forEach((value, j) => (sum += (value - b[j]!) ** 2));
  return Math.sqrt(sum / a.length);
}

function judgement(
  steps: readonly number[],
  errors: readonly number[],
  order: number,
  predicted: number,
  how: string,
  data: Record<string, unknown>,
): Judgement {
  const slope = slopeOf(steps, errors);
  const off = Math.abs(predicted - order);
  const due = off >= 0.1 && off <= NEAR_ORDER ? predicted : order;
  const passed = Math.abs(slope - due) <= TOLERANCE;
  return {
    outcome: outcomeOf(passed),
    measured: Number.isFinite(slope) ? slope.toFixed(2) : 'overflow',
    target: `${due === order ? order : due.toFixed(2)} ± ${TOLERANCE}`,
    how,
    data: { ...data, order, steps, errors, slope: Number.isFinite(slope) ? slope : null },
  };
}

export function refinementCheck(subject: MarchSubject): Check {
  const { order, keptLevels } = subject;
  if (order === null || order < 1)
    return notApplicable(
      'refinement',
      'The definition is not consistent with its equation, so there is no order to show.',
    );
  const plan = planRefinement(subject, order);
  if (!plan)
    return notApplicable(
      'refinement',
      'At every value tried the growth of roundings hides the error, so that no order can be seen.',
    );
  const { runs } = plan;
  const marchFrom = (run: RefinedRun, k: number, levels: Float64Array[]): MarchTask => ({
    kind: 'march',
    id: marchId(k),
    ...sized(gridOf(subject, run)),
    steps: run.steps - (keptLevels - 1),
    parameters: [...run.parameters],
    levels,
  });
  const started = keptLevels > 1;
  const tasks = runs.map((run, k): DriverTask =>
    started
      ? ({
          kind: 'start',
          id: startId(k),
          ...sized(gridOf(subject, run)),
          parameters: [...run.parameters],
          levels: initialLevels(subject, run),
        } satisfies StartTask)
      : marchFrom(run, k, initialLevels(subject, run)),
  );
  return {
    name: 'refinement',
    tasks,
    ...(started && {
      followUp: (answers: Answers) =>
        runs.flatMap((run, k) => {
          const answer = answers.get(startId(k));
          return answer?.kind === 'state' && answer.status === 0 ? [marchFrom(run, k, answer.levels)] : [];
        }),
    }),
    judge: (answers) => {
      if (started) runs.forEach((_, k) => stateOf(answers, startId(k)));
      const errors = runs.map((run, k) =>
        rmsDifference(stateOf(answers, marchId(k)).at(-1)!, exactField(subject, run, run.steps)),
      );
      const from = started ? 'from the kernel’s own start-up' : 'from the exact field';
      const against =
        subject.refine === 'time'
          ? 'in time alone, against the solution that is exact in time for the same space differences'
          : 'at fixed parameters, against the exact solution';
      return judgement(
        runs.map(({ step }) => step),
        errors,
        order,
        plan.predictedSlope,
        `Two smooth waves marched to one time ${from} on ${runs.length} grids, ${against}; slope of the error over the three finest.`,
        {
          grids: runs.map((run) => (subject.scheme.dims === 1 ? run.n : gridOf(subject, run))),
          marchedSteps: runs.map(({ steps }) => steps),
          parameters: runs.map(({ parameters }) => parameters),
          predictedSlope: plan.predictedSlope,
        },
      );
    },
  };
}

const STENCIL_BASES = [16, 24, 48, 96, 192, 384] as const;
const TIMES_FINER = [1, 1.5, 2, 3, 4] as const;

/** The derivative of a stencil's wave, per unit length, against what its weights make of it. */
function stencilError(subject: StencilSubject, n: number): number {
  const spacing = 1 / n;
  const errors = SMOOTH_WAVES.map(({ count, amplitude }) => {
    const theta = 2 * Math.PI * count * spacing;
    const sum = subject.weights.reduce<Complex>(
      (total, weight, k) => {
        const angle = theta * (subject.offsets[k]! - subject.shift);
        return [total[0] + toNumber(weight) * Math.cos(angle), total[1] + toNumber(weight) * Math.sin(angle)];
      },
      [0, 0],
    );
    const scaled: Complex = [sum[0] * n ** subject.derivative, sum[1] * n ** subject.derivative];
    return amplitude * modulus(minus(scaled, powerOf([0, 2 * Math.PI * count], subject.derivative)));
  });
  return Math.hypot(...errors) / Math.SQRT2;
}

export function stencilRefinementCheck(subject: StencilSubject): Check {
  const { order, derivative } = subject;
  if (order === null || order < 1)
    return notApplicable('refinement', 'The stencil is exact or not consistent, so there is no order to show.');
  const size = subject.weights.reduce((total, weight) => total + Math.abs(toNumber(weight)), 0);
  const choices = STENCIL_BASES.map((base) => {
    const grids = TIMES_FINER.map((finer) => base * finer);
    const errors = grids.map((n) => stencilError(subject, n));
    const finest = grids.at(-1)!;
    const clear = errors.at(-1)! > 100 * 2 ** -52 * size * finest ** derivative;
    return {
      grids,
      slope: slopeOf(
        grids.map((n) => 1 / n),
        errors,
      ),
      clear,
    };
  }).filter(({ clear }) => clear);
  const choice = choices.reduce<(typeof choices)[number] | undefined>(
    (best, next) => (!best || Math.abs(next.slope - order) < Math.abs(best.slope - order) ? next : best),
    undefined,
  );
  if (!choice)
    return notApplicable('refinement', 'On every grid tried roundings hide the error, so that no order can be seen.');
  const derivativeField = (n: number) =>
    smoothField(SMOOTH_WAVES, n, (theta) => powerOf([0, theta * n], derivative), subject.shift);
  return {
    name: 'refinement',
    tasks: choice.grids.map((n, k): ApplyTask => ({
      kind: 'apply',
      id: marchId(k),
      n,
      spacing: 1 / n,
      values: smoothField(SMOOTH_WAVES, n, () => [1, 0]),
    })),
    judge: (answers) => {
      const errors = choice.grids.map((n, k) =>
        rmsDifference(stateOf(answers, marchId(k)).at(-1)!, derivativeField(n)),
      );
      return judgement(
        choice.grids.map((n) => 1 / n),
        errors,
        order,
        choice.slope,
        `Derivative ${derivative} of two smooth waves on ${choice.grids.length} grids against the exact one; slope of the error over the three finest.`,
        { grids: choice.grids, predictedSlope: choice.slope },
      );
    },
  };
}
