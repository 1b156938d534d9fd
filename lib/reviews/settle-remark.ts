import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findThread, reopenThread, settleThread } from '@/db/queries/remarks';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { settlingObstacle } from './remark-rules';

async function threadToMove(actor: Actor, remarkId: string) {
  const thread = await findThread(db, actor, remarkId);
  if (!thread || thread.answersId !== null) throw new Refusal('not-found', 'There is no such remark.');
  const obstacle = settlingObstacle(actor, thread);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  return thread;
}

/** Says that a remark is dealt with. */
export async function settleRemark(actor: Actor, remarkId: string): Promise<void> {
  const { revisionId, part } = await threadToMove(actor, remarkId);
  await db.transaction(async (tx) => {
    if (!(await settleThread(tx, remarkId, actor.id)))
      throw new Refusal('conflict', 'Somebody has settled this remark meanwhile.');
    await insertEvent(tx, {
      kind: 'remark.settled',
      actorId: actor.id,
      subjectId: revisionId,
      data: { part, remarkId },
    });
  });
}

/** Takes a settled remark up again. */
export async function reopenRemark(actor: Actor, remarkId: string): Promise<void> {
  const { revisionId, part } = await threadToMove(actor, remarkId);
  await db.transaction(async (tx) => {
    if (!(await reopenThread(tx, remarkId))) throw new Refusal('conflict', 'This remark is open already.');
    await insertEvent(tx, {
      kind: 'remark.reopened',
      actorId: actor.id,
      subjectId: revisionId,
      data: { part, remarkId },
    });
  });
}
