import 'server-only';
import { db } from '@/db/client';
import { insertEvent, insertLetters } from '@/db/queries/house';
import { findRevisionToUse, findReview, listAdopters, moveRevision } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { decisionSentence } from './decision-sentence';
import { changedMeanwhile } from './refuse-broken-rule';
import { withdrawalObstacle } from './review-rules';
import { changeSince } from './review-stamp';

export interface Withdrawal {
  reason: string;
  /** Slug of the entry that stands in its place, where there is one. */
  useInstead?: string | null;
  /** What the maintainer saw (lib/reviews/review-stamp). */
  seen?: string;
}

/** Takes a vetted revision out of use for a reason; every adopter is told in the same transaction. */
export async function withdrawRevision(actor: Actor, revisionId: string, input: Withdrawal): Promise<void> {
  const review = await findReview(db, revisionId);
  if (!review) throw new Refusal('not-found', 'There is no such revision.');
  const change = input.seen === undefined ? null : changeSince(input.seen, review);
  if (change) throw new Refusal('conflict', change);
  const obstacle = withdrawalObstacle(actor, review);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  const reason = decisionSentence(input.reason);
  const { slug, number, title, state } = review;

  const replacement = input.useInstead ? await findRevisionToUse(db, input.useInstead) : null;
  if (input.useInstead && (!replacement || replacement.entryId === review.entryId))
    throw new Refusal('invalid', `There is no other entry at ${input.useInstead}.`, {
      useInstead: 'accepted: the address of another entry, or nothing',
    });

  await db.transaction(async (tx) => {
    const moved = await moveRevision(tx, revisionId, {
      from: state,
      to: 'withdrawn',
      reason,
      ...(replacement && { replacedById: replacement.id }),
    });
    if (!moved) throw changedMeanwhile();
    await insertEvent(tx, { kind: 'revision.withdrawn', actorId: actor.id, subjectId: revisionId, reason });
    const adopters = await listAdopters(tx, revisionId);
    await insertLetters(
      tx,
      'recall',
      adopters.map(({ personId }) => personId),
      {
        kind: 'withdrawn',
        revisionId,
        slug,
        number,
        title,
        sentence: reason,
        useInstead: input.useInstead ?? null,
        codes: adopters.map(({ code }) => code),
      },
    );
  });
}
