import 'server-only';
import type pg from 'pg';
import { databaseOn, type Database } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findKernelSubjectById } from '@/db/queries/kernel-subjects';
import { holdTrial } from '@/db/queries/trial-locks';
import { claimTrial, endTrial, releaseTrial, saveFindings, saveProgress, type ClaimedTrial } from '@/db/queries/trials';
import { runTrial, type TrialHooks, type TrialResult } from './run-trial';

export interface EndedTrial {
  revisionId: string;
  state: TrialResult['state'];
}

const CHANGED = 'The text of this revision was changed after the trial was queued; start a new one.';
const NO_FACTS = 'This definition has no facts, so there is nothing to hold a trial against.';

const refused = (note: string): TrialResult => ({
  state: 'refused',
  note,
  findings: [],
  toolchain: [],
  generatorRelease: '',
});

async function resultOf(db: Database, run: ClaimedTrial, hooks: TrialHooks): Promise<TrialResult> {
  if (!run.isCurrent) return refused(CHANGED);
  const subject = await findKernelSubjectById(db, run.revisionId);
  return subject?.input ? runTrial(subject.input, hooks) : refused(NO_FACTS);
}

/**
 * Runs a trial from its start to its end and stores what was found; another process that tries the same is kept off.
 * @returns null where there was nothing left to do
 * @throws whatever broke the run off, and the trial then waits to be taken up again
 */
export async function carryOutTrial(pool: pg.Pool, trialId: string, signal: AbortSignal): Promise<EndedTrial | null> {
  const db = databaseOn(pool);
  const held = await holdTrial(pool, trialId);
  if (!held) throw new Error(`carryOutTrial: trial ${trialId} is being run by another process`);
  try {
    const claimed = await claimTrial(db, trialId);
    if (!claimed) return null;
    const hooks: TrialHooks = {
      signal: AbortSignal.any([signal, held.lost]),
      onProgress: async (progress) => {
        if (!(await saveProgress(db, claimed, progress))) throw new Error(`carryOutTrial: trial ${trialId} moved on`);
      },
      onFindings: (found) => saveFindings(db, claimed, found),
    };
    try {
      const { state, note, toolchain, generatorRelease } = await resultOf(db, claimed, hooks);
      const ended = await db.transaction(async (tx) => {
        const ours = await endTrial(tx, claimed, { state, note, toolchain, generatorRelease });
        if (ours)
          await insertEvent(tx, {
            kind: 'trial.finished',
            actorId: null,
            subjectId: claimed.revisionId,
            data: { trialId, state },
          });
        return ours;
      });
      return ended ? { revisionId: claimed.revisionId, state } : null;
    } catch (fault) {
      // Best effort: where the database is away, the sweep finds the trial without its holder.
      await releaseTrial(db, claimed).catch(() => undefined);
      throw fault;
    }
  } finally {
    await held.letGo();
  }
}
