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

/** @throws {NoAnswer} where the kernel did not answer */
export function statusOf(answers: Answers, id: string): number {
  const answer = answers.get(id);
  if (!answer || answer.kind !== 'state') throw new NoAnswer('the kernel gave no answer');
  return answer.status;
}

/** Status by which a kernel tells that a parameter lies outside its stable range. */
export const OUTSIDE_BOUND = 3;

/**
 * @param outside whether the state may come from outside the stable range
 * @throws {NoAnswer} where the kernel did not answer, or refused with a status
 */
export function stateOf(answers: Answers, id: string, outside = false): Float64Array[] {
  const status = statusOf(answers, id);
  const answer = answers.get(id);
  const accepted = status === 0 || (outside && status === OUTSIDE_BOUND);
  if (!accepted || answer?.kind !== 'state' || answer.levels.length === 0)
    throw new NoAnswer(`the kernel refused with status ${status}`);
  return answer.levels;
}

/**
 * Judges, and turns a missing answer into a failed finding.
 * @param fault why the kernel's run did not end well, where it did not
 */
export function judgeCheck(
  check: Check,
  answers: Answers,
  language: TrialLanguage,
  fault: string | null = null,
): FindingView {
  try {
    return { name: check.name, language, ...check.judge(answers, language) };
  } catch (error) {
    if (!(error instanceof NoAnswer)) throw error;
    const measured = fault ?? error.message;
    return {
      name: check.name,
      language,
      outcome: 'failed',
      measured,
      target: 'an answer',
      how: `A task of this finding was not carried out: ${error.message}${fault ? `, since ${fault}` : ''}.`,
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
