import 'server-only';
import type { Database } from '@/db/client';
import { insertEvent, insertLetters } from '@/db/queries/house';
import { type findReview, listAdopters, lockVettedRevision, moveRevision } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { changedMeanwhile } from './refuse-broken-rule';

type Review = NonNullable<Awaited<ReturnType<typeof findReview>>>;

/**
 * Puts a signed revision in force and supersedes the one before it, within the caller's transaction: states,
 * ledger, the author's letter and the recall to adopters of the old revision.
 */
export async function putInForce(tx: Database, actor: Actor, review: Review, sentence: string): Promise<void> {
  const { id: revisionId, slug, number, title, version } = review;
  const letter = { revisionId, slug, number, title, sentence };
  const before = await lockVettedRevision(tx, review.entryId);
  if (before) {
    if (before.number > number)
      throw new Refusal('not-allowed', `Revision ${before.number} is in force; an earlier one cannot replace it.`);
    const superseded = await moveRevision(tx, before.id, {
      from: 'vetted',
      to: 'superseded',
      reason: sentence,
      replacedById: revisionId,
    });
    if (!superseded) throw changedMeanwhile();
    await insertEvent(tx, {
      kind: 'revision.superseded',
      actorId: actor.id,
      subjectId: before.id,
      reason: sentence,
      data: { replacedById: revisionId },
    });
    const adopters = await listAdopters(tx, before.id);
    const recalled = { ...letter, revisionId: before.id, number: before.number, replacedByNumber: number };
    await insertLetters(
      tx,
      'recall',
      adopters.map(({ personId }) => personId),
      { ...recalled, kind: 'superseded', codes: adopters.map(({ code }) => code) },
    );
  }
  const moved = await moveRevision(tx, revisionId, { from: 'in-review', to: 'vetted', version, reason: sentence });
  if (!moved) throw changedMeanwhile();
  await insertEvent(tx, { kind: 'revision.vetted', actorId: actor.id, subjectId: revisionId, reason: sentence });
  await insertLetters(tx, 'vetted', [review.authorId], letter);
}
