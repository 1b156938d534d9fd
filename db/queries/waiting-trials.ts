import type { Database } from '../client';
import { trials } from '../schema/trials';
import { insertEvent } from './house';

/** A trial in state waiting, which the worker finds and takes up, with its line in the ledger. */
export async function insertWaitingTrial(db: Database, revisionId: string, queuedById: string) {
  await db.transaction(async (tx) => {
    const [trial] = await tx.insert(trials).values({ revisionId, queuedById }).returning({ id: trials.id });
    await insertEvent(tx, {
      kind: 'trial.queued',
      actorId: queuedById,
      subjectId: revisionId,
      data: { trialId: trial?.id },
    });
  });
}
