/**
 * A check is one finding in the making: the tasks that a compiled kernel is set, and what its answers are worth.
 * Checks are pure; they know neither the sandbox nor the queue.
 */
import type { DriverAnswer, DriverTask } from '@/lib/codegen/driver-protocol';
import type { FindingName, FindingView, TrialLanguage } from './trial';

export type Answers = ReadonlyMap<string, DriverAnswer>;

export type Judgement = Omit<FindingView, 'name' | 'language'>;

export interface Check {
  readonly name: FindingName;
  readonly tasks: readonly DriverTask[];
  /** Tasks that need the answers to the first ones, such as a march from what the start-up routine gave. */
  readonly followUp?: (answers: Answers) => DriverTask[];
  readonly judge: (answers: Answers, language: TrialLanguage) => Judgement;
}

/** A check that the entry has no ground for. */
export const notApplicable = (name: FindingName, reason: string): Check => ({
  name,
  tasks: [],
  judge: () => ({ outcome: 'not-applicable', measured: '—', target: '—', how: reason, data: null }),
});

/** Thrown inside a judgement where the kernel gave no usable answer; the finding then fails with this sentence. */
export class NoAnswer extends Error {}

/** Status by which a kernel tells that a parameter lies outside its stable range; the steps are taken all the same. */
export const OUTSIDE_BOUND = 3;

/**
 * @param due the status that the kernel must give
 * @throws {NoAnswer} where the kernel did not answer, or gave another status
 */
export function stateOf(answers: Answers, id: string, due = 0): Float64Array[] {
  const answer = answers.get(id);
  if (!answer || answer.kind !== 'state') throw new NoAnswer('the kernel gave no answer');
  const { status, levels } = answer;
  if (status === due && levels.length > 0) return levels;
  if (due === OUTSIDE_BOUND && status === 0)
    throw new NoAnswer('the kernel takes a value outside the bound for one inside');
  if (status === OUTSIDE_BOUND && due === 0)
    throw new NoAnswer('the kernel takes a value inside the bound for one outside');
  throw new NoAnswer(`the kernel refused with status ${status}`);
}

/** Judges, and turns a missing answer into a failed finding. */
export function judgeCheck(check: Check, answers: Answers, language: TrialLanguage): FindingView {
  try {
    return { name: check.name, language, ...check.judge(answers, language) };
  } catch (fault) {
    if (!(fault instanceof NoAnswer)) throw fault;
    const how = `A task of this finding was not carried out: ${fault.message}.`;
    return {
      name: check.name,
      language,
      outcome: 'failed',
      measured: fault.message,
      target: 'an answer',
      how,
      data: null,
    };
  }
}

/** "1.1e-16", "0", "0.25": at most three digits. */
export function short(value: number): string {
  if (!Number.isFinite(value)) return Number.isNaN(value) ? 'not a number' : 'overflow';
  if (value === 0) return '0';
  const size = Math.abs(value);
  return size >= 1e-3 && size < 1e5 ? String(Number(value.toPrecision(3))) : value.toExponential(1);
}

export const outcomeOf = (passed: boolean) => (passed ? 'passed' : 'failed');
