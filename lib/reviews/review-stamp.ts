/** What a reader of a review has seen of it, so that a decision on something older is told from one on this. */
import type { RevisionState } from '@/lib/entries/revision-state';

export interface Stamped {
  state: RevisionState;
  /** Version of the text. */
  version: number;
  /** Those who signed this version. */
  signerIds: readonly string[];
}

/** "in-review:3:1": state, version of the text, signatures under it. */
export const stampOf = ({ state, version, signerIds }: Stamped) => `${state}:${version}:${signerIds.length}`;

const NOW: Readonly<Record<RevisionState, string>> = {
  draft: 'its author has taken it back',
  'in-review': 'its author has sent it in again',
  returned: 'it has been returned to its author',
  vetted: 'it has been vetted',
  superseded: 'a later revision has superseded it',
  withdrawn: 'it has been withdrawn',
};

/** What became of a revision since `stamp` was read, as a sentence; null where it stands as it did. */
export function changeSince(stamp: string, now: Stamped): string | null {
  if (stamp === stampOf(now)) return null;
  const [state, version] = stamp.split(':');
  const what =
    state !== now.state
      ? NOW[now.state]
      : version !== String(now.version)
        ? 'its author has changed the text'
        : 'somebody else has signed it';
  return `This changed while you were reading: ${what}. Nothing of yours is lost; look again, then decide.`;
}
