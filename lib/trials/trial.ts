/** A trial and its findings as stored and shown. */
export const TRIAL_STATES = ['waiting', 'running', 'passed', 'failed', 'refused'] as const;
export type TrialState = (typeof TRIAL_STATES)[number];

export const FINDING_NAMES = [
  'clean-build',
  'exact-step',
  'amplification',
  'refinement',
  'margin',
  'agreement',
  'guards',
  'pace',
] as const;
export type FindingName = (typeof FINDING_NAMES)[number];

export const TRIAL_LANGUAGES = ['c', 'fortran', 'python'] as const;
export type TrialLanguage = (typeof TRIAL_LANGUAGES)[number];

/** `not-run`: the language or sandbox is missing here; `not-applicable`: the fact it would test does not exist for this entry. */
export const FINDING_OUTCOMES = ['passed', 'failed', 'not-run', 'not-applicable'] as const;
export type FindingOutcome = (typeof FINDING_OUTCOMES)[number];

export interface FindingView {
  name: FindingName;
  /** null where the finding is about all languages together (agreement). */
  language: TrialLanguage | null;
  outcome: FindingOutcome;
  /** What was measured: "2.0003", "0 ulp", "1.1e-16". */
  measured: string;
  /** What was due: ">= 1.9". */
  target: string;
  /** One sentence: how it was measured. */
  how: string;
  /** Numbers behind it, for plots: {grids:[..], errors:[..], slope:..} and the like. */
  data: Record<string, unknown> | null;
}

export interface TrialView {
  id: string;
  revision: number;
  state: TrialState;
  queuedAt: string;
  startedAt: string | null;
  finishedAt: string | null;
  queuedBy: string;
  /** Steps done and in all, and the step under way, for the live page. */
  progress: { done: number; total: number; label: string };
  /** One sentence where it was refused or could not run. */
  note: string | null;
  toolchain: { language: TrialLanguage; version: string; flags: string }[];
  generatorRelease: string;
  findings: FindingView[];
}
