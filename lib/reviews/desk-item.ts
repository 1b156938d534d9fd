/** A line of the review desk. */
import type { RevisionState } from '@/lib/entries/revision-state';
import type { TrialState } from '@/lib/trials/trial';

export interface DeskItem {
  /** Of the revision. */
  id: string;
  callNumber: string;
  number: number;
  title: string;
  state: RevisionState;
  /** ISO time at which it came to the desk, or was returned. */
  since: string;
  authorId: string;
  author: string;
  /** Those who signed its present text. */
  signers: { id: string; name: string }[];
  signaturesNeeded: number;
  latestTrial: TrialState | null;
  openRemarks: number;
}

const DAY_MS = 86_400_000;

/** "today", "1 day", "9 days": whole days between two moments. */
export function daysText(since: string, now: Date): string {
  const days = Math.max(0, Math.floor((now.getTime() - new Date(since).getTime()) / DAY_MS));
  return days === 0 ? 'today' : days === 1 ? '1 day' : `${days} days`;
}

/** For whom or what it waits. */
export function waitsFor(item: DeskItem, viewerId: string): string {
  if (item.state === 'returned') return item.authorId === viewerId ? 'returned to you' : `returned to ${item.author}`;
  if (item.latestTrial === null) return 'waits for a trial';
  if (item.latestTrial === 'waiting' || item.latestTrial === 'running') return 'waits for its trial to end';
  if (item.latestTrial !== 'passed') return 'waits for its author: the trial did not pass';
  const missing = item.signaturesNeeded - item.signers.length;
  if (item.authorId === viewerId || item.signers.some(({ id }) => id === viewerId))
    return missing === 1 ? 'waits for another maintainer' : `waits for ${missing} maintainers`;
  return missing === 1 ? 'waits for you or one more maintainer' : `waits for you and ${missing - 1} more`;
}
