import type { FindingOutcome } from '@/lib/trials/trial';

const WORDS = {
  passed: 'holds',
  failed: 'fails',
  'not-run': 'not run',
  'not-applicable': 'does not apply',
} as const satisfies Record<FindingOutcome, string>;

const LOOKS = {
  passed: 'holds',
  failed: 'fails',
  'not-run': 'notrun',
  'not-applicable': 'notrun',
} as const satisfies Record<FindingOutcome, string>;

/** Verdict of a finding: a small bubble "holds", a small hatched box "fails", a plain word otherwise. */
export const Verdict = ({ outcome }: { outcome: FindingOutcome }) => (
  <span className={LOOKS[outcome]}>{WORDS[outcome]}</span>
);
