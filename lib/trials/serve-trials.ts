import 'server-only';
import type pg from 'pg';
import type PgBoss from 'pg-boss';
import { databaseOn } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { listUnheldTrials, soleSweeper } from '@/db/queries/trial-locks';
import { giveUpTrial, listLiveTrials, raiseJob } from '@/db/queries/trials';
import { carryOutTrial, type EndedTrial } from './carry-out-trial';

const QUEUE = 'trials';
/**
 * Beyond the six boxes of a trial at their wall limit: the queue then takes the job for lost even though its worker lives. A worker that
 * dies is noticed much sooner, by the lock that goes with it.
 */
const EXPIRE_SECONDS = 400;
const RETRIES = 4;
/** From taking a job to holding its trial is a matter of milliseconds. */
const TAKING_MS = 5_000;

const LOST = 'The worker was lost each time this trial was run; the log of the workers may tell why.';

export interface TrialService {
  /** Looks for work at once. */
  wake: () => void;
  /** Brings queue and trials together again, after anything that may have parted them. */
  sweep: () => Promise<void>;
}

/**
 * Takes trials from the queue, one at a time, until the queue is stopped.
 *
 * A trial is a row in state `waiting`; its job has the same id and is made from it here, so that whoever asks for a
 * trial needs no queue, and a job that is lost is made again.
 * @param onEnded called after each trial; what it throws is the caller's affair
 */
export async function serveTrials(
  boss: PgBoss,
  pool: pg.Pool,
  signal: AbortSignal,
  onEnded: (ended: EndedTrial) => Promise<void>,
): Promise<TrialService> {
  const db = databaseOn(pool);
  await boss.createQueue(QUEUE, { name: QUEUE, policy: 'standard' });
  const send = (trialId: string, revisionId: string, priority: number) =>
    boss.send(
      QUEUE,
      { trialId },
      {
        id: trialId,
        singletonKey: revisionId,
        priority,
        expireInSeconds: EXPIRE_SECONDS,
        retryLimit: RETRIES,
        retryDelay: 1,
        retryBackoff: true,
      },
    );

  async function mend(trialId: string, revisionId: string, priority: number): Promise<void> {
    const job = await boss.getJobById(QUEUE, trialId);
    switch (job?.state) {
      case undefined:
        await send(trialId, revisionId, priority);
        return;
      case 'created':
      case 'retry':
        if (job!.priority < priority) await raiseJob(db, QUEUE, trialId, priority);
        return;
      case 'active':
        // Its worker is gone: nobody holds the trial.
        if (Date.now() - job!.startedOn.getTime() > TAKING_MS)
          await boss.fail(QUEUE, trialId, { message: 'the worker is gone' });
        return;
      case 'failed':
        await db.transaction(async (tx) => {
          const given = await giveUpTrial(tx, trialId, LOST);
          if (given)
            await insertEvent(tx, {
              kind: 'trial.finished',
              actorId: null,
              subjectId: given.revisionId,
              data: { trialId, state: 'failed' },
            });
        });
        return;
      default:
        // The job ended and its trial did not: the worker stopped between the two.
        await boss.deleteJob(QUEUE, trialId);
        await send(trialId, revisionId, priority);
    }
  }

  const workId = await boss.work<{ trialId: string }>(
    QUEUE,
    { batchSize: 1, pollingIntervalSeconds: 1 },
    async ([job]) => {
      if (!job) return;
      const ended = await carryOutTrial(pool, job.data.trialId, signal);
      if (ended) await onEnded(ended);
    },
  );

  return {
    wake: () => boss.notifyWorker(workId),
    sweep: async () => {
      const done = await soleSweeper(db, async () => {
        const live = await listLiveTrials(db);
        const unheld = new Set(
          await listUnheldTrials(
            db,
            live.map(({ id }) => id),
          ),
        );
        for (const { id, revisionId, priority } of live) if (unheld.has(id)) await mend(id, revisionId, priority);
      });
      if (done) boss.notifyWorker(workId);
    },
  };
}
