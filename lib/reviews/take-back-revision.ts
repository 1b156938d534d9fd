import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findReview, moveRevision } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { changedMeanwhile } from './refuse-broken-rule';

/** The author takes a submission back from the desk to change it. */
export async function takeBackRevision(actor: Actor, revisionId: string): Promise<void> {
  const review = await findReview(db, revisionId);
  if (!review) throw new Refusal('not-found', 'There is no such revision.');
  if (review.authorId !== actor.id) throw new Refusal('not-allowed', 'Only the author takes a revision back.');
  if (review.state !== 'in-review')
    throw new Refusal('not-allowed', `This revision is not in review; it is ${review.state}.`);

  await db.transaction(async (tx) => {
    if (!(await moveRevision(tx, revisionId, { from: 'in-review', to: 'draft' }))) throw changedMeanwhile();
    await insertEvent(tx, { kind: 'revision.taken-back', actorId: actor.id, subjectId: revisionId });
  });
}
