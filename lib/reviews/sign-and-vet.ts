import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findReview, insertSignature, lockReview } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { decisionSentence } from './decision-sentence';
import { putInForce } from './put-in-force';
import { refuseBrokenRule } from './refuse-broken-rule';
import { REVIEW_POINT_TEXT } from './review-list';
import { signingObstacle, untickedPoints, vettingObstacle } from './review-rules';
import { changeSince } from './review-stamp';

export interface SigningInput {
  /** Points of the review list that are ticked; a signature needs all. */
  points: string[];
  sentence: string;
  /** What the signer saw (lib/reviews/review-stamp). */
  seen: string;
}

/**
 * A maintainer's signature, and where it is the last one needed, the vetting with it: both, or neither. Two
 * who sign at once do so one after the other, and the second is told that it changed.
 * @returns whether the revision is in force now
 */
export async function signAndVet(actor: Actor, revisionId: string, input: SigningInput): Promise<{ vetted: boolean }> {
  const [unticked] = untickedPoints(input.points);
  const work = () =>
    db.transaction(async (tx) => {
      await lockReview(tx, revisionId);
      const review = await findReview(tx, revisionId);
      if (!review) throw new Refusal('not-found', 'There is no such revision.');
      const change = changeSince(input.seen, review);
      if (change && !review.signerIds.includes(actor.id)) throw new Refusal('conflict', change);
      const obstacle = signingObstacle(actor, review);
      if (obstacle) throw new Refusal('not-allowed', obstacle);
      if (unticked)
        throw new Refusal('invalid', `Not ticked yet: ${REVIEW_POINT_TEXT[unticked]}`, {
          points: 'accepted: every point',
        });
      const sentence = decisionSentence(input.sentence);
      await insertSignature(tx, { revisionId, personId: actor.id, points: input.points, sentence });
      await insertEvent(tx, {
        kind: 'revision.signed',
        actorId: actor.id,
        subjectId: revisionId,
        reason: sentence,
        data: { version: review.version },
      });
      const signed = { ...review, signerIds: [...review.signerIds, actor.id] };
      if (vettingObstacle(actor, signed) !== null) return { vetted: false };
      await putInForce(tx, actor, signed, sentence);
      return { vetted: true };
    });
  return refuseBrokenRule(work);
}
