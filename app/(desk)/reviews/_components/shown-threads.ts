import type { ShownThread } from '@/components/reviews/part-remarks';
import type { SheetView } from '@/lib/entries/entry';
import type { Actor } from '@/lib/people/actor';
import { threadsOf } from '@/lib/reviews/remark';
import { settlingObstacle } from '@/lib/reviews/remark-rules';

/** The threads on a sheet, each with what this reader may do with it. */
export const shownThreads = (actor: Actor, { remarks, authorId }: SheetView): ShownThread[] =>
  threadsOf(remarks).map((thread) => ({
    thread,
    obstacle: settlingObstacle(actor, { remarkAuthorId: thread.authorId, revisionAuthorId: authorId }),
  }));
