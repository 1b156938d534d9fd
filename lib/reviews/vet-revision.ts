import 'server-only';
import { db } from '@/db/client';
import { findReview } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { decisionSentence } from './decision-sentence';
import { putInForce } from './put-in-force';
import { refuseBrokenRule } from './refuse-broken-rule';
import { vettingObstacle } from './review-rules';

/**
 * Puts a signed revision in force and supersedes the one before it. States, ledger, the author's letter and
 * the recall to adopters of the old revision happen together, or none of them.
 */
export async function vetRevision(actor: Actor, revisionId: string, text: string): Promise<void> {
  const review = await findReview(db, revisionId);
  if (!review) throw new Refusal('not-found', 'There is no such revision.');
  const obstacle = vettingObstacle(actor, review);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  const sentence = decisionSentence(text);
  await refuseBrokenRule(() => db.transaction((tx) => putInForce(tx, actor, review, sentence)));
}
