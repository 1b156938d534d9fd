import 'server-only';
import { db } from '@/db/client';
import { insertEvent, insertLetters } from '@/db/queries/house';
import { findReview, moveRevision } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { decisionSentence } from './decision-sentence';
import { changedMeanwhile } from './refuse-broken-rule';
import { returnObstacle } from './review-rules';
import { changeSince } from './review-stamp';

/**
 * Sends a revision back to its author with what must change.
 * @param seen what the maintainer saw (lib/reviews/review-stamp); left out by those who did not read a page
 */
export async function returnRevision(actor: Actor, revisionId: string, text: string, seen?: string): Promise<void> {
  const review = await findReview(db, revisionId);
  if (!review) throw new Refusal('not-found', 'There is no such revision.');
  const change = seen === undefined ? null : changeSince(seen, review);
  if (change) throw new Refusal('conflict', change);
  const obstacle = returnObstacle(actor, review);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  const reason = decisionSentence(text);
  const { slug, number, title, version } = review;

  await db.transaction(async (tx) => {
    const moved = await moveRevision(tx, revisionId, { from: 'in-review', to: 'returned', reason, version });
    if (!moved) throw changedMeanwhile();
    await insertEvent(tx, { kind: 'revision.returned', actorId: actor.id, subjectId: revisionId, reason });
    await insertLetters(tx, 'returned', [review.authorId], { revisionId, slug, number, title, sentence: reason });
  });
}
