import 'server-only';
import type PgBoss from 'pg-boss';
import type { Database } from '@/db/client';
import { areLettersDue } from '@/db/queries/letters';
import { type Round, sendDueLetters } from './send-due-letters';

const QUEUE = 'letters';
/** A job sends what is due and ends; what is left is the next one's. */
const ROUND_MS = 60_000;
/** Longer than a round and the delivery under way at its end: only a worker that was lost leaves a job for longer. */
const EXPIRE_SECONDS = 240;

export interface LetterService {
  /** Asks for a round where letters are due. */
  sweep: () => Promise<void>;
}

/**
 * Sends letters from the outbox until the queue is stopped. The rows of the outbox say what is due and who has
 * taken it up; a job only says that it is time to look. One waits at most, however often it is asked for.
 */
export async function serveLetters(
  boss: PgBoss,
  db: Database,
  round: Omit<Round, 'isOver'>,
  signal: AbortSignal,
): Promise<LetterService> {
  await boss.createQueue(QUEUE, { name: QUEUE, policy: 'short' });
  const workId = await boss.work(QUEUE, { batchSize: 1, pollingIntervalSeconds: 2 }, async () => {
    const until = Date.now() + ROUND_MS;
    await sendDueLetters(db, { ...round, isOver: () => signal.aborted || Date.now() > until });
  });
  return {
    sweep: async () => {
      if (!(await areLettersDue(db))) return;
      await boss.send(QUEUE, {}, { expireInSeconds: EXPIRE_SECONDS, retryLimit: 0 });
      boss.notifyWorker(workId);
    },
  };
}
