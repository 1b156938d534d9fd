import { spawn, type ChildProcess } from 'node:child_process';
import path from 'node:path';
import { eq, sql } from 'drizzle-orm';
import pg from 'pg';
import { afterEach, describe, expect, it } from 'vitest';
import { findTrialFor } from '@/db/queries/latest-trial';
import { holdTrial, listUnheldTrials } from '@/db/queries/trial-locks';
import { claimTrial, endTrial, insertTrial, releaseTrial, saveFindings, saveProgress } from '@/db/queries/trials';
import { events } from '@/db/schema/house';
import { revisions } from '@/db/schema/revisions';
import { findings, trials, workers } from '@/db/schema/trials';
import type { Actor } from '@/lib/people/actor';
import { queueTrial } from '@/lib/trials/queue-trial';
import type { FindingView, TrialView } from '@/lib/trials/trial';
import { aDraft, aPerson, aVettedRevision } from '@/tests/support/makers';
import { useTestDatabase } from '@/tests/support/test-database';

const ROOT = path.resolve(import.meta.dirname, '..', '..');
/** A trial takes two seconds of processor time; a machine that runs other things may need many times that. */
const LONG_MS = 600_000;

const { db, pool } = useTestDatabase();

async function until<T>(what: () => Promise<T | null | undefined | false>, withinMs = 280_000): Promise<T> {
  const end = Date.now() + withinMs;
  for (;;) {
    const found = await what();
    if (found) return found;
    if (Date.now() > end) throw new Error(`not within ${withinMs} ms`);
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
}

const stateOf = async (id: string) => (await db.select().from(trials).where(eq(trials.id, id)))[0]!;
const inState = (id: string, state: string) =>
  until(async () => {
    const trial = await stateOf(id);
    return trial.state === state ? trial : null;
  });
const finishedEvents = (id: string) =>
  db
    .select()
    .from(events)
    .where(sql`${events.kind} = 'trial.finished' and ${events.data} ->> 'trialId' = ${id}`);

const started: ChildProcess[] = [];
function startWorker(): ChildProcess {
  const worker = spawn(process.execPath, ['--conditions=react-server', '--import', 'tsx', 'worker.ts'], {
    cwd: ROOT,
    env: { ...process.env, LEVELBOOK_DEMO: '0' },
    stdio: ['ignore', 'inherit', 'inherit'],
  });
  started.push(worker);
  return worker;
}
const hasEnded = (worker: ChildProcess) =>
  until(async () => (worker.exitCode !== null || worker.signalCode !== null ? worker : null));

afterEach(async () => {
  for (const worker of started.splice(0)) {
    worker.kill('SIGKILL');
    await hasEnded(worker);
  }
}, 60_000);

describe('asking for a trial', () => {
  it('queues one trial for two clicks at once, with one line in the ledger', async () => {
    const reader = await aPerson('reader');
    const revision = await aVettedRevision(await aPerson('contributor'));
    const answers = await Promise.all([queueTrial(reader, revision.id), queueTrial(reader, revision.id)]);
    expect(answers.map(({ isNew }) => isNew).sort()).toEqual([false, true]);
    expect(answers[0].trialId).toBe(answers[1].trialId);
    const lines = await db
      .select()
      .from(events)
      .where(sql`${events.kind} = 'trial.queued' and ${events.data} ->> 'trialId' = ${answers[0].trialId}`);
    expect(lines).toHaveLength(1);
    expect(lines[0]).toMatchObject({ actorId: reader.id, subjectId: revision.id });
  });

  it('takes a new trial once the one before has ended', async () => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    const first = await queueTrial(author, revision.id);
    const run = await claimTrial(db, first.trialId);
    expect((await queueTrial(author, revision.id)).trialId).toBe(first.trialId);
    await endTrial(db, run!, { state: 'passed', note: null, toolchain: [], generatorRelease: 'test' });
    expect(await queueTrial(author, revision.id)).toMatchObject({ isNew: true });
  });

  it('takes a new trial of a text that was changed while the old one waits', async () => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    const first = await queueTrial(author, revision.id);
    await db.update(revisions).set({ title: 'Another title' }).where(eq(revisions.id, revision.id));
    const second = await queueTrial(author, revision.id);
    expect(second.isNew).toBe(true);
    expect((await claimTrial(db, first.trialId))?.isCurrent).toBe(false);
    expect((await claimTrial(db, second.trialId))?.isCurrent).toBe(true);
  });

  it.each<[string, (author: Actor) => Promise<Actor>]>([
    ['a reader', () => aPerson('reader')],
    ['another contributor', () => aPerson('contributor')],
  ])('hides the draft of one from %s', async (_, other) => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    await expect(queueTrial(await other(author), revision.id)).rejects.toMatchObject({ code: 'not-found' });
  });

  it('refuses what has no facts', async () => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author, { content: { verdict: 'invalid', facts: null, summary: null } });
    await expect(queueTrial(author, revision.id)).rejects.toMatchObject({ code: 'invalid' });
  });
});

const FINDING: FindingView = {
  name: 'pace',
  language: 'c',
  outcome: 'passed',
  measured: '1',
  target: '1',
  how: 'By hand.',
  data: { n: 1 },
};

describe('a run of a trial', () => {
  const aWaitingTrial = async () => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    return { author, trialId: await insertTrial(db, revision.id, author.id) };
  };

  it('keeps what a run that was given up writes late out of the next one', async () => {
    const { trialId } = await aWaitingTrial();
    const late = (await claimTrial(db, trialId))!;
    await new Promise((resolve) => setTimeout(resolve, 5));
    const now = (await claimTrial(db, trialId))!;
    const progress = { done: 1, total: 7, label: 'late' };
    expect(await saveProgress(db, late, progress)).toBe(false);
    await saveFindings(db, late, [FINDING]);
    await releaseTrial(db, late);
    expect(await endTrial(db, late, { state: 'passed', note: null, toolchain: [], generatorRelease: '' })).toBe(false);
    expect(await db.select().from(findings).where(eq(findings.trialId, trialId))).toEqual([]);
    expect(await saveProgress(db, now, { ...progress, label: 'now' })).toBe(true);
    expect((await stateOf(trialId)).progress.label).toBe('now');
  });

  it('starts from nothing when it is begun again', async () => {
    const { author, trialId } = await aWaitingTrial();
    const first = (await claimTrial(db, trialId))!;
    await saveFindings(db, first, [FINDING]);
    await releaseTrial(db, first);
    const second = (await claimTrial(db, trialId))!;
    await saveFindings(db, second, [FINDING]);
    await endTrial(db, second, { state: 'passed', note: null, toolchain: [], generatorRelease: '' });
    expect((await findTrialFor(db, author, trialId))?.findings).toEqual([FINDING]);
    expect(await claimTrial(db, trialId)).toBeNull();
  });

  it('is held by one process, and free again when that one lets go or breaks off', async () => {
    const { trialId } = await aWaitingTrial();
    const held = await holdTrial(pool, trialId);
    expect(held).not.toBeNull();
    expect(await holdTrial(pool, trialId)).toBeNull();
    expect(await listUnheldTrials(db, [trialId])).toEqual([]);
    await held!.letGo();
    expect(await listUnheldTrials(db, [trialId])).toEqual([trialId]);

    const cut = (await holdTrial(pool, trialId))!;
    await db.execute(
      sql`select pg_terminate_backend(pid) from pg_locks where locktype = 'advisory' and pid <> pg_backend_pid()`,
    );
    await until(async () => cut.lost.aborted);
    expect(await listUnheldTrials(db, [trialId])).toEqual([trialId]);
    await cut.letGo();
  });

  it('is seen only by those who may see its revision', async () => {
    const { author, trialId } = await aWaitingTrial();
    expect((await findTrialFor(db, author, trialId))?.state).toBe('waiting');
    expect(await findTrialFor(db, await aPerson('reader'), trialId)).toBeNull();
  });
});

describe('workers', () => {
  const aQueuedTrial = async () => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    return (await queueTrial(author, revision.id)).trialId;
  };

  it('carry a waiting trial to its end and report that they live', { timeout: LONG_MS }, async () => {
    const trialId = await aQueuedTrial();
    const worker = startWorker();
    const trial = await inState(trialId, 'passed');
    expect(trial.note).toBeNull();
    expect(trial.toolchain).toHaveLength(3);
    expect(trial.finishedAt).not.toBeNull();
    expect(await db.select().from(workers)).toHaveLength(1);
    expect(await finishedEvents(trialId)).toHaveLength(1);

    worker.kill('SIGTERM');
    await hasEnded(worker);
    expect(worker.exitCode).toBe(0);
    expect(await db.select().from(workers)).toEqual([]);
  });

  it('that are killed in the middle are replaced, and the trial completes', { timeout: LONG_MS }, async () => {
    const trialId = await aQueuedTrial();
    const first = startWorker();
    await until(async () => {
      const { state, progress } = await stateOf(trialId);
      return state === 'running' && progress.done >= 1;
    });
    first.kill('SIGKILL');
    await hasEnded(first);
    expect((await stateOf(trialId)).state).toBe('running');
    const killedAt = Date.now();

    startWorker();
    const again = await until(async () => {
      const trial = await stateOf(trialId);
      return trial.state === 'running' && trial.startedAt!.getTime() > killedAt ? trial : null;
    });
    // Within a minute, on a machine that does other things too.
    expect(again.startedAt!.getTime() - killedAt).toBeLessThan(60_000);
    await inState(trialId, 'passed');
    expect(await finishedEvents(trialId)).toHaveLength(1);
    const found = await db.select().from(findings).where(eq(findings.trialId, trialId));
    const names = found.map(({ name, language }) => `${name} ${language}`);
    expect(new Set(names).size).toBe(names.length);
  });

  it('side by side never run the same trial', { timeout: LONG_MS }, async () => {
    const ids = await Promise.all([aQueuedTrial(), aQueuedTrial(), aQueuedTrial()]);
    startWorker();
    startWorker();
    for (const id of ids) await inState(id, 'passed');
    for (const id of ids) expect(await finishedEvents(id)).toHaveLength(1);
    const { rows } = await pool.query<{ id: string; retry_count: number; state: string }>(
      'select id, retry_count, state from pgboss.job where name = $1 and id = any($2)',
      ['trials', ids],
    );
    expect(rows.map(({ retry_count }) => retry_count)).toEqual([0, 0, 0]);
  });

  it('that are asked to stop give their trial back', { timeout: LONG_MS }, async () => {
    const trialId = await aQueuedTrial();
    const worker = startWorker();
    await inState(trialId, 'running');
    worker.kill('SIGTERM');
    await hasEnded(worker);
    expect(worker.exitCode).toBe(0);
    const trial = await stateOf(trialId);
    expect(trial).toMatchObject({ state: 'waiting', startedAt: null });
  });
});

describe('a worker whose database goes away', () => {
  it('goes on when it is back, and completes the trial it was in', { timeout: LONG_MS }, async () => {
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    const { trialId } = await queueTrial(author, revision.id);
    const worker = startWorker();
    await inState(trialId, 'running');
    const { rows } = await pool.query<{ name: string }>('select current_database() as name');
    const name = rows[0]!.name;
    // From another database of the cluster, since nobody may be connected to this one for a while.
    const outside = new pg.Client({
      connectionString: Object.assign(new URL(process.env.DATABASE_URL!), { pathname: '/postgres' }).href,
    });
    await outside.connect();
    try {
      await outside.query(`alter database ${name} allow_connections false`);
      await outside.query('select pg_terminate_backend(pid) from pg_stat_activity where datname = $1', [name]);
      await new Promise((resolve) => setTimeout(resolve, 6_000));
    } finally {
      await outside.query(`alter database ${name} allow_connections true`);
      await outside.end();
    }
    await inState(trialId, 'passed');
    expect(worker.exitCode).toBeNull();
    expect(worker.signalCode).toBeNull();
    expect(await finishedEvents(trialId)).toHaveLength(1);
  });
});

describe('the stream of a trial', () => {
  it('tells each state until the last, and lets go of the database', { timeout: LONG_MS }, async () => {
    const { eventHub } = await import('@/lib/web/event-hub');
    const { eventStream } = await import('@/lib/web/event-stream');
    const author = await aPerson('contributor');
    const revision = await aDraft(author);
    const { trialId } = await queueTrial(author, revision.id);
    const answer = eventStream<TrialView>(
      trialId,
      () => findTrialFor(db, author, trialId),
      ({ finishedAt }) => finishedAt !== null,
      new AbortController().signal,
    );
    expect(answer.headers.get('Content-Type')).toMatch(/^text\/event-stream/);
    const reader = answer.body!.pipeThrough(new TextDecoderStream()).getReader();
    let text = '';
    const heard = (part: string) =>
      until(async () => {
        if (text.includes(part)) return true;
        const { value, done } = await reader.read();
        text += value ?? '';
        return done || text.includes(part);
      });
    await heard('"state":"waiting"');
    const run = (await claimTrial(db, trialId))!;
    await heard('"state":"running"');
    await saveProgress(db, run, { done: 3, total: 7, label: 'Fortran, built and marched' });
    await heard('"label":"Fortran, built and marched"');
    await endTrial(db, run, { state: 'passed', note: null, toolchain: [], generatorRelease: '' });
    await heard('"state":"passed"');
    expect((await reader.read()).done).toBe(true);
    expect(eventHub().followed).toBe(0);
    await eventHub().closeAllStreams();
  });

  it('ends when the process is asked to stop', { timeout: LONG_MS }, async () => {
    const { eventHub } = await import('@/lib/web/event-hub');
    const { eventStream } = await import('@/lib/web/event-stream');
    const answer = eventStream(
      '00000000-0000-4000-8000-000000000000',
      async () => ({ state: 'waiting' }),
      () => false,
      new AbortController().signal,
    );
    const reader = answer.body!.getReader();
    await reader.read();
    await eventHub().closeAllStreams();
    let ended = false;
    while (!ended) ended = (await reader.read()).done;
    expect(eventHub().followed).toBe(0);
  });
});
