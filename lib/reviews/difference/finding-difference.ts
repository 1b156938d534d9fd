/** What two trials found, finding against finding. */
import type { FindingName, FindingOutcome, FindingView, TrialLanguage } from '@/lib/trials/trial';

export interface FindingSide {
  readonly measured: string;
  readonly outcome: FindingOutcome;
}

export interface FindingChange {
  readonly name: FindingName;
  readonly language: TrialLanguage | null;
  /** null where that trial has no such finding. */
  readonly was: FindingSide | null;
  readonly now: FindingSide | null;
}

/** How fast a machine was on the day says nothing of the kernel; only whether it ran does. */
const VARIES: readonly FindingName[] = ['pace'];

const isSame = ({ name, was, now }: FindingChange) =>
  was?.outcome === now?.outcome && (VARIES.includes(name) || was?.measured === now?.measured);

const sideOf = (finding: FindingView | undefined): FindingSide | null =>
  finding ? { measured: finding.measured, outcome: finding.outcome } : null;

/** Findings that came out otherwise, are new or are gone, in the order of the new trial. */
export function findingDifference(was: readonly FindingView[], now: readonly FindingView[]): FindingChange[] {
  const same = (one: FindingView) => (other: FindingView) => one.name === other.name && one.language === other.language;
  const changes = [
    ...now.map((finding) => ({ finding, was: sideOf(was.find(same(finding))), now: sideOf(finding) })),
    ...was
      .filter((finding) => !now.some(same(finding)))
      .map((finding) => ({ finding, was: sideOf(finding), now: null })),
  ];
  return changes
    .map(({ finding, ...sides }): FindingChange => ({ name: finding.name, language: finding.language, ...sides }))
    .filter((change) => !isSame(change));
}
