/** Who may remark, settle and reopen; each rule gives its reason. */
import type { Actor } from '@/lib/people/actor';
import { includesRole } from '@/lib/people/role';
import type { RemarkPart } from './remark-part';
import { partsToRemarkOn, REMARK_PART_WORDS } from './remark-part';
import type { EntryKind } from '@/lib/entries/entry';

/** A thread is settled by whoever opened it, the author of the revision, or a maintainer. */
export function settlingObstacle(
  who: Pick<Actor, 'id' | 'role'>,
  thread: { remarkAuthorId: string; revisionAuthorId: string },
): string | null {
  if (who.id === thread.remarkAuthorId || who.id === thread.revisionAuthorId) return null;
  if (includesRole(who.role, 'maintainer')) return null;
  return 'A remark is settled by who made it, by the author of the revision, or by a maintainer.';
}

/** Why a part cannot be remarked on now. */
export function partObstacle(part: RemarkPart, revision: { kind: EntryKind; hasFacts: boolean }): string | null {
  if (partsToRemarkOn(revision.kind, revision.hasFacts).includes(part)) return null;
  return `The sheet has no part "${REMARK_PART_WORDS[part]}" now. Your words are kept; put them on another part.`;
}

/**
 * Why a line of a kernel cannot be remarked on: it is gone, or no longer the one that was read.
 * @param lines of the kernel as it is now
 */
export function lineObstacle(lines: readonly string[], line: number, quote: string): string | null {
  const now = lines[line - 1];
  if (now === undefined)
    return `The kernel has ${lines.length} lines now; line ${line} is gone. Your words are kept; choose another line.`;
  if (now.trim() !== quote.trim())
    return `Line ${line} has changed while you were reading. Your words are kept; look again, then choose the line.`;
  return null;
}
