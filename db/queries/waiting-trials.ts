import type { Database } from '../client';
import { insertEvent } from './house';
import { insertTrial } from './trials';

/** A trial that the house itself asks for, on behalf of a person, with its line in the ledger. */
export async function insertWaitingTrial(db: Database, revisionId: string, queuedById: string) {
  await db.transaction(async (tx) => {
    const trialId = await insertTrial(tx, revisionId, queuedById);
    await insertEvent(tx, { kind: 'trial.queued', actorId: queuedById, subjectId: revisionId, data: { trialId } });
  });
}
