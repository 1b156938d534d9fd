import { type SQL, and, eq, inArray, or } from 'drizzle-orm';
import { visibleStates } from '@/lib/entries/visibility';
import type { Actor } from '@/lib/people/actor';
import { revisions } from '../schema/revisions';

export type Viewer = Pick<Actor, 'id' | 'role'>;

/** The condition of lib/entries/visibility as SQL on `revisions`. */
export function visibleTo(viewer: Viewer): SQL | undefined {
  const { anyones, own } = visibleStates(viewer);
  const published = inArray(revisions.state, [...anyones]);
  if (own.length === 0) return published;
  return or(published, and(inArray(revisions.state, [...own]), eq(revisions.authorId, viewer.id)));
}
