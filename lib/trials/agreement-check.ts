/** The same task in three languages, compared bit by bit. */
import type { DriverTask } from '@/lib/codegen/driver-protocol';
import { gridGrowth, sampleScheme } from './characteristic';
import { type Answers, outcomeOf } from './check';
import { gridText, pointsOf, sized } from './grid';
import { randomField } from './smooth-field';
import type { Subject } from './subject';
import { TRIAL_LANGUAGES, type FindingView, type TrialLanguage } from './trial';

const GRIDS: Readonly<Record<1 | 2 | 3, readonly number[]>> = { 1: [64], 2: [13, 9], 3: [7, 6, 5] };
const STEPS = 1000;
/** An unstable scheme marches as far as its numbers stay well within range. */
const GROWTH_MAX = 1e100;
const ID = 'agreement:0';

export function agreementTasks(subject: Subject): DriverTask[] {
  if (subject.kind === 'stencil')
    return [{ kind: 'apply', id: ID, n: 1000, spacing: 0.3, values: randomField(1000, 3) }];
  const parameters = [...subject.working[0]!];
  const grid = GRIDS[subject.scheme.dims];
  const { growth } = gridGrowth(sampleScheme(subject.scheme, parameters), grid);
  const steps = growth > 1 + 1e-9 ? Math.min(STEPS, Math.floor(Math.log(GROWTH_MAX) / Math.log(growth))) : STEPS;
  const levels = Array.from({ length: subject.keptLevels }, (_, l) => randomField(pointsOf(grid), l + 11));
  return [{ kind: 'march', id: ID, ...sized(grid), steps: Math.max(1, steps), parameters, levels }];
}

/** Position of a double among all doubles, so that neighbours differ by 1. */
function rank(value: number): bigint {
  const bits = new BigInt64Array(new Float64Array([value]).buffer)[0]!;
  return bits < 0n ? -(bits & 0x7fffffffffffffffn) : bits;
}

/** Largest distance in units of the last place; Infinity where the shapes differ or a value is no number. */
function distance(a: readonly Float64Array[], b: readonly Float64Array[]): number {
  if (a.length !== b.length) return Infinity;
  let worst = 0;
  for (let l = 0; l < a.length; l++) {
    if (a[l]!.length !== b[l]!.length) return Infinity;
    for (let j = 0; j < a[l]!.length; j++) {
      const [x, y] = [a[l]![j]!, b[l]![j]!];
      if (Number.isNaN(x) || Number.isNaN(y)) return Infinity;
      if (x === y) continue;
      const ulps = rank(x) - rank(y);
      worst = Math.max(worst, Number(ulps < 0n ? -ulps : ulps));
    }
  }
  return worst;
}

const NAMES: Readonly<Record<TrialLanguage, string>> = { c: 'C', fortran: 'Fortran', python: 'Python' };

export function judgeAgreement(
  tasks: readonly DriverTask[],
  answers: Readonly<Partial<Record<TrialLanguage, Answers>>>,
): FindingView {
  const base = { name: 'agreement', language: null, target: '0 ulp' } as const;
  const states = TRIAL_LANGUAGES.map((language) => {
    const answer = answers[language]?.get(ID);
    return { language, levels: answer?.kind === 'state' && answer.status === 0 ? answer.levels : null };
  });
  const absent = states.filter(({ language }) => !answers[language]);
  if (absent.length > 0)
    return {
      ...base,
      outcome: 'not-run',
      measured: 'not run',
      how: `${absent.map(({ language }) => NAMES[language]).join(' and ')} did not run here, so that there is nothing to compare.`,
      data: null,
    };
  const silent = states.filter(({ levels }) => !levels);
  if (silent.length > 0)
    return {
      ...base,
      outcome: 'failed',
      measured: 'no answer',
      how: `${silent.map(({ language }) => NAMES[language]).join(' and ')} gave no state to compare.`,
      data: null,
    };
  const pairs = states.flatMap((a, k) =>
    states.slice(k + 1).map((b) => ({ between: [a.language, b.language], ulps: distance(a.levels!, b.levels!) })),
  );
  const worst = Math.max(...pairs.map(({ ulps }) => ulps));
  const [task] = tasks;
  const done =
    task?.kind === 'march'
      ? `${task.steps} steps on ${gridText(task.grid ?? [task.n])} points`
      : 'One application on 1000 points';
  return {
    ...base,
    outcome: outcomeOf(worst === 0),
    measured: Number.isFinite(worst) ? `${worst} ulp` : 'not a number',
    how: `${done} from the same random data in C, Fortran and Python, the results compared bit by bit.`,
    data: { pairs: pairs.map(({ between, ulps }) => ({ between, ulps: Number.isFinite(ulps) ? ulps : null })) },
  };
}
