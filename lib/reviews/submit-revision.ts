import 'server-only';
import { db } from '@/db/client';
import { insertEvent, insertLetters } from '@/db/queries/house';
import { findReview, listMaintainerIds, moveRevision } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { changedMeanwhile, refuseBrokenRule } from './refuse-broken-rule';
import { submissionObstacle } from './review-rules';

/** Puts a draft on the review desk: state, ledger and letters to the maintainers together, or none of them. */
export async function submitRevision(actor: Actor, revisionId: string): Promise<void> {
  const review = await findReview(db, revisionId);
  if (!review) throw new Refusal('not-found', 'There is no such revision.');
  const obstacle = submissionObstacle(actor, review);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  const { state, version, slug, number, title } = review;

  const maintainerIds = await listMaintainerIds(db, actor.id);
  await refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      const moved = await moveRevision(tx, revisionId, { from: state, to: 'in-review', version });
      if (!moved) throw changedMeanwhile();
      await insertEvent(tx, {
        kind: 'revision.submitted',
        actorId: actor.id,
        subjectId: revisionId,
        data: { version },
      });
      await insertLetters(tx, 'submitted', maintainerIds, { revisionId, slug, number, title, author: actor.name });
    }),
  );
}
