/** Trials as the queue and the worker move them: waiting, running, and one of the three ends. */
import { and, asc, desc, eq, inArray, lt, sql } from 'drizzle-orm';
import type { FindingView, TrialState, TrialView } from '@/lib/trials/trial';
import type { Database } from '../client';
import { revisions } from '../schema/revisions';
import { findings, trials } from '../schema/trials';

/** Channels of pg_notify; the payload is the id of a trial. */
export const TRIAL_QUEUED = 'trial_queued';
export const TRIAL_PROGRESS = 'trial_progress';

const announce = (db: Database, channel: string, trialId: string) =>
  db.execute(sql`select pg_notify(${channel}, ${trialId})`);

/** Locks the revision until the transaction ends, so that two clicks queue one trial; null where there is none. */
export async function lockRevisionForTrial(tx: Database, revisionId: string) {
  const [row] = await tx
    .select({
      id: revisions.id,
      state: revisions.state,
      authorId: revisions.authorId,
      hasFacts: sql<boolean>`${revisions.facts} is not null`,
    })
    .from(revisions)
    .where(eq(revisions.id, revisionId))
    .for('update');
  return row ?? null;
}

/** The trial of this revision's present text that is waiting or running. */
export async function findLiveTrial(db: Database, revisionId: string): Promise<string | null> {
  const [row] = await db
    .select({ id: trials.id })
    .from(trials)
    .innerJoin(revisions, eq(revisions.id, trials.revisionId))
    .where(
      and(
        eq(trials.revisionId, revisionId),
        eq(trials.revisionVersion, revisions.version),
        inArray(trials.state, ['waiting', 'running']),
      ),
    )
    .orderBy(asc(trials.queuedAt))
    .limit(1);
  return row?.id ?? null;
}

/** A new trial; workers hear of it when the transaction commits. */
export async function insertTrial(tx: Database, revisionId: string, queuedById: string, priority = 0): Promise<string> {
  const [row] = await tx.insert(trials).values({ revisionId, queuedById, priority }).returning({ id: trials.id });
  if (!row) throw new Error('insertTrial: the inserted row did not come back');
  await announce(tx, TRIAL_QUEUED, row.id);
  return row.id;
}

/** Puts a waiting trial before those of lower priority. */
export async function raiseTrial(tx: Database, id: string, priority: number): Promise<void> {
  const raised = await tx
    .update(trials)
    .set({ priority })
    .where(and(eq(trials.id, id), eq(trials.state, 'waiting'), lt(trials.priority, priority)))
    .returning({ id: trials.id });
  if (raised.length > 0) await announce(tx, TRIAL_QUEUED, id);
}

export interface ClaimedTrial {
  id: string;
  revisionId: string;
  queuedById: string;
  /** When this run began; later writes name it, so that a run that was given up cannot write into the next one. */
  startedAt: Date;
  /** False where the text was changed after the trial was queued. */
  isCurrent: boolean;
}

/** Begins a run, from the start; null where the trial has already ended or does not exist. */
export async function claimTrial(db: Database, id: string): Promise<ClaimedTrial | null> {
  return db.transaction(async (tx) => {
    const [row] = await tx
      .update(trials)
      // A Date keeps milliseconds only, and the value must come back equal.
      .set({
        state: 'running',
        startedAt: sql`date_trunc('milliseconds', clock_timestamp())`,
        finishedAt: null,
        note: null,
      })
      .where(and(eq(trials.id, id), inArray(trials.state, ['waiting', 'running'])))
      .returning({
        id: trials.id,
        revisionId: trials.revisionId,
        queuedById: trials.queuedById,
        startedAt: trials.startedAt,
        isCurrent: sql<boolean>`${trials.revisionVersion} = (select version from revisions r where r.id = trials.revision_id)`,
      });
    if (!row?.startedAt) return null;
    await tx.delete(findings).where(eq(findings.trialId, id));
    await announce(tx, TRIAL_PROGRESS, id);
    return { ...row, startedAt: row.startedAt };
  });
}

export type Run = Pick<ClaimedTrial, 'id' | 'startedAt'>;
const stillOurs = ({ id, startedAt }: Run) =>
  and(eq(trials.id, id), eq(trials.state, 'running'), eq(trials.startedAt, startedAt));

/** @returns false where this run is no longer the trial's */
export async function saveProgress(db: Database, run: Run, progress: TrialView['progress']): Promise<boolean> {
  const saved = await db.update(trials).set({ progress }).where(stillOurs(run)).returning({ id: trials.id });
  await announce(db, TRIAL_PROGRESS, run.id);
  return saved.length === 1;
}

/** Findings of one language, shown while the others still run. */
export async function saveFindings(db: Database, run: Run, found: readonly FindingView[]): Promise<void> {
  if (found.length === 0) return;
  await db.transaction(async (tx) => {
    const [ours] = await tx.select({ id: trials.id }).from(trials).where(stillOurs(run)).for('update');
    if (ours) await tx.insert(findings).values(found.map((finding) => ({ ...finding, trialId: run.id })));
  });
}

export interface TrialEnd {
  state: Extract<TrialState, 'passed' | 'failed' | 'refused'>;
  note: string | null;
  toolchain: TrialView['toolchain'];
  generatorRelease: string;
}

/** Ends a run; false where it is no longer the trial's. */
export async function endTrial(tx: Database, run: Run, end: TrialEnd): Promise<boolean> {
  const ended = await tx
    .update(trials)
    .set({ ...end, finishedAt: sql`now()`, answers: null })
    .where(stillOurs(run))
    .returning({ id: trials.id });
  await announce(tx, TRIAL_PROGRESS, run.id);
  return ended.length === 1;
}

/** Ends a trial that no run could bring to an end. */
export async function giveUpTrial(tx: Database, id: string, note: string) {
  const ended = await tx
    .update(trials)
    .set({ state: 'failed', note, startedAt: sql`coalesce(started_at, now())`, finishedAt: sql`now()` })
    .where(and(eq(trials.id, id), inArray(trials.state, ['waiting', 'running'])))
    .returning({ revisionId: trials.revisionId });
  await announce(tx, TRIAL_PROGRESS, id);
  return ended[0] ?? null;
}

/** Gives a run back, to be taken up again from the start. */
export async function releaseTrial(db: Database, run: Run): Promise<void> {
  await db
    .update(trials)
    .set({ state: 'waiting', startedAt: null, progress: { done: 0, total: 0, label: 'waiting' } })
    .where(stillOurs(run));
  await announce(db, TRIAL_PROGRESS, run.id);
}

/** Trials that have not ended, in the order in which they are taken up. */
export const listLiveTrials = (db: Database) =>
  db
    .select({ id: trials.id, revisionId: trials.revisionId, state: trials.state, priority: trials.priority })
    .from(trials)
    .where(inArray(trials.state, ['waiting', 'running']))
    .orderBy(desc(trials.priority), asc(trials.queuedAt), asc(trials.id));

/**
 * Puts a job that nobody has taken yet before those of lower priority. The queue's own interface can only delete
 * and send again, and would then also delete a job that is being taken at this moment.
 */
export async function raiseJob(db: Database, queue: string, id: string, priority: number): Promise<void> {
  await db.execute(sql`update pgboss.job set priority = ${priority}
    where name = ${queue} and id = ${id} and state < 'active'`);
}
