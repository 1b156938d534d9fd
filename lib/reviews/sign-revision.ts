import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findReview, insertSignature } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { decisionSentence } from './decision-sentence';
import { refuseBrokenRule } from './refuse-broken-rule';
import { REVIEW_POINT_TEXT } from './review-list';
import { signingObstacle, untickedPoints } from './review-rules';

export interface SignatureInput {
  /** Points of the review list that are ticked; a signature needs all. */
  points: string[];
  sentence: string;
}

/** A maintainer's signature under the present text of a revision, with a line in the ledger. */
export async function signRevision(actor: Actor, revisionId: string, input: SignatureInput): Promise<void> {
  const review = await findReview(db, revisionId);
  if (!review) throw new Refusal('not-found', 'There is no such revision.');
  const obstacle = signingObstacle(actor, review);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  const [unticked] = untickedPoints(input.points);
  if (unticked)
    throw new Refusal('invalid', `Not ticked yet: ${REVIEW_POINT_TEXT[unticked]}`, { points: 'accepted: every point' });
  const sentence = decisionSentence(input.sentence);

  await refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      await insertSignature(tx, { revisionId, personId: actor.id, points: input.points, sentence });
      await insertEvent(tx, {
        kind: 'revision.signed',
        actorId: actor.id,
        subjectId: revisionId,
        reason: sentence,
        data: { version: review.version },
      });
    }),
  );
}
