/**
 * A worker: takes trials from the queue, sends letters and reports that it lives. Any number of them may serve one database.
 * Started with `node --conditions=react-server --import tsx worker.ts`.
 */
import { randomBytes } from 'node:crypto';
import os from 'node:os';
import { setTimeout } from 'node:timers/promises';
import PgBoss from 'pg-boss';
import { db, pool } from '@/db/client';
import { isDatabaseAway } from '@/db/errors';
import { listen } from '@/db/listen';
import { LETTER_WAITING } from '@/db/queries/letters';
import { TRIAL_QUEUED } from '@/db/queries/trials';
import { removeWorker, reportWorker } from '@/db/queries/workers';
import { env } from '@/lib/env';
import { openPost } from '@/lib/mail/deliver';
import { fromOf, senderOf } from '@/lib/mail/sender';
import { type LetterService, serveLetters } from '@/lib/mail/serve-letters';
import { vetDemoEntry, vetWaitingDemoEntries } from '@/lib/reviews/vet-demo-entries';
import { sandboxMode } from '@/lib/sandbox/run-command';
import { serveTrials, type TrialService } from '@/lib/trials/serve-trials';
import { reportFault } from '@/lib/web/report-fault';

const HEARTBEAT_MS = 5_000;
const SWEEP_MS = 5_000;
const START_PAUSE_MS = 1_000;
/** The launcher waits five seconds before it kills. */
const STOP_MS = 4_000;

const settings = env();
const workerId = `${os.hostname()}-${process.pid}-${randomBytes(2).toString('hex')}`;
const stopping = new AbortController();
const { signal } = stopping;

/** Ends at once when the worker stops; keeps no listener afterwards. */
const pause = (ms: number) => setTimeout(ms, undefined, { signal }).catch(() => undefined);

/** The database goes and comes: that is no fault. */
const report = (where: string, error: unknown) => {
  if (!signal.aborted && !isDatabaseAway(error)) reportFault(`worker: ${where}`, error);
};

/** Does something now and then until the worker stops; what fails is tried again at the next turn. */
async function repeat(where: string, everyMs: number, work: () => Promise<void>): Promise<void> {
  while (!signal.aborted) {
    await work().catch((error: unknown) => report(where, error));
    await pause(everyMs);
  }
}

/** A queue that has started; waits for the database as long as it takes. */
async function startQueue(): Promise<PgBoss | null> {
  while (!signal.aborted) {
    const boss = new PgBoss({
      connectionString: settings.DATABASE_URL,
      application_name: 'levelbook worker',
      max: 4,
      schedule: false,
      maintenanceIntervalSeconds: 10,
    });
    boss.on('error', (error) => report('queue', error));
    try {
      await boss.start();
      return boss;
    } catch (error) {
      report('start of the queue', error);
      await boss.stop({ graceful: false, wait: false }).catch(() => undefined);
      await pause(START_PAUSE_MS);
    }
  }
  return null;
}

async function startService(boss: PgBoss): Promise<TrialService | null> {
  while (!signal.aborted) {
    try {
      return await serveTrials(boss, pool, signal, async ({ revisionId, state }) => {
        if (settings.LEVELBOOK_DEMO && state === 'passed')
          await vetDemoEntry(revisionId).catch((error: unknown) => report('the demo’s review', error));
      });
    } catch (error) {
      report('start of the trials', error);
      await pause(START_PAUSE_MS);
    }
  }
  return null;
}

/** Null where the settings name no mail server: letters then wait. */
async function startLetters(boss: PgBoss): Promise<LetterService | null> {
  const { SMTP_URL, LEVELBOOK_DEMO: demoMode } = settings;
  while (SMTP_URL && !signal.aborted) {
    try {
      const post = openPost(SMTP_URL, fromOf(settings));
      return await serveLetters(boss, db, { sender: senderOf(settings), post, demoMode }, signal);
    } catch (error) {
      report('start of the letters', error);
      await pause(START_PAUSE_MS);
    }
  }
  return null;
}

async function main(): Promise<void> {
  // The queue settles its jobs without being waited for; where the database is away, that fails on its own.
  process.on('unhandledRejection', (error) => {
    report('unhandled', error);
    if (!isDatabaseAway(error)) process.exit(1);
  });
  for (const name of ['SIGTERM', 'SIGINT', 'SIGHUP'] as const)
    process.once(name, () => stopping.abort(new Error(`the worker stops (${name})`)));

  const mode = await sandboxMode();
  const heartbeat = repeat('heartbeat', HEARTBEAT_MS, () =>
    reportWorker(db, { id: workerId, sandboxMode: mode, toolchain: [] }),
  );
  const boss = await startQueue();
  const service = boss && (await startService(boss));
  if (boss && service) {
    const letters = await startLetters(boss);
    const sweepLetters = async () => letters?.sweep();
    const sweep = Promise.all([repeat('sweep', SWEEP_MS, service.sweep), repeat('letters', SWEEP_MS, sweepLetters)]);
    const ear = listen(
      settings.DATABASE_URL,
      [TRIAL_QUEUED, LETTER_WAITING],
      (channel) =>
        void (channel === TRIAL_QUEUED ? service.sweep() : sweepLetters()).catch((error: unknown) =>
          report('sweep', error),
        ),
      () => service.wake(),
    );
    if (settings.LEVELBOOK_DEMO)
      await vetWaitingDemoEntries().catch((error: unknown) => report('the demo’s reviews', error));
    await sweep;
    await ear.stop();
    await boss.stop({ graceful: true, timeout: STOP_MS });
  }
  await heartbeat;
  await removeWorker(db, workerId).catch(() => undefined);
  await pool.end();
}

await main();
process.exit(0);
