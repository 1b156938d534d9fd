import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findLiveTrial, insertTrial, lockRevisionForTrial, raiseTrial } from '@/db/queries/trials';
import { visibleStates } from '@/lib/entries/visibility';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';

/** Somebody waits for it; the house's own trials have 0. */
const ASKED_FOR = 10;

export interface QueuedTrial {
  trialId: string;
  /** False where a trial of the same text was already waiting or running, and stands for this one too. */
  isNew: boolean;
}

/**
 * Asks for a trial of a revision; anyone who may read it may ask. It waits until a worker takes it up.
 * @throws {Refusal} not-found: no such revision that the actor may see; invalid: it has no facts to be held against
 */
export async function queueTrial(actor: Actor, revisionId: string): Promise<QueuedTrial> {
  return db.transaction(async (tx) => {
    const revision = await lockRevisionForTrial(tx, revisionId);
    const { anyones, own } = visibleStates(actor);
    const isVisible =
      revision &&
      (anyones.some((state) => state === revision.state) ||
        (revision.authorId === actor.id && own.some((state) => state === revision.state)));
    if (!isVisible) throw new Refusal('not-found', 'There is no such revision.');
    if (!revision.hasFacts)
      throw new Refusal('invalid', 'This definition has no facts yet, so there is nothing to hold a trial against.');
    const live = await findLiveTrial(tx, revisionId);
    if (live) {
      await raiseTrial(tx, live, ASKED_FOR);
      return { trialId: live, isNew: false };
    }
    const trialId = await insertTrial(tx, revisionId, actor.id, ASKED_FOR);
    await insertEvent(tx, { kind: 'trial.queued', actorId: actor.id, subjectId: revisionId, data: { trialId } });
    return { trialId, isNew: true };
  });
}
