/** All that one trial sets its kernels, the same in every language. */
import type { DriverTask } from '@/lib/codegen/driver-protocol';
import { agreementTasks } from './agreement-check';
import { amplificationCheck, symbolCheck } from './amplification-check';
import { notApplicable, type Answers, type Check } from './check';
import { exactStencilCheck, exactStepCheck } from './exact-step-check';
import { guardTasks } from './guard-tasks';
import { marginCheck } from './margin-check';
import { paceCheck } from './pace-check';
import { refinementCheck, stencilRefinementCheck } from './refinement-check';
import type { Subject } from './subject';

export interface TrialPlan {
  /** Judged for each language by itself. */
  readonly checks: readonly Check[];
  readonly agreement: readonly DriverTask[];
  readonly guards: readonly DriverTask[];
}

export function planTrial(subject: Subject): TrialPlan {
  const checks =
    subject.kind === 'stencil'
      ? [
          exactStencilCheck(subject),
          symbolCheck(subject),
          stencilRefinementCheck(subject),
          notApplicable('margin', 'A stencil by itself has no stability bound.'),
        ]
      : [exactStepCheck(subject), amplificationCheck(subject), refinementCheck(subject), marginCheck(subject)];
  return {
    checks: [...checks, paceCheck(subject)],
    agreement: agreementTasks(subject),
    guards: guardTasks(subject),
  };
}

export const firstTasks = (plan: TrialPlan): DriverTask[] => [
  ...plan.checks.flatMap(({ tasks }) => tasks),
  ...plan.agreement,
];

export const followUpTasks = (plan: TrialPlan, answers: Answers): DriverTask[] =>
  plan.checks.flatMap(({ followUp }) => followUp?.(answers) ?? []);

export const hasFollowUp = (plan: TrialPlan) => plan.checks.some(({ followUp }) => followUp !== undefined);
