import { type SQL, and, asc, desc, eq, sql } from 'drizzle-orm';
import type { TrialView } from '@/lib/trials/trial';
import type { Database } from '../client';
import { people } from '../schema/people';
import { revisions } from '../schema/revisions';
import { findings, trials } from '../schema/trials';
import { type Viewer, visibleTo } from './visible-to';

/** The trial that counts for a revision: the last one queued; null where it was never tried. */
export const findLatestTrial = (db: Database, revisionId: string) => findTrial(db, eq(trials.revisionId, revisionId));

/** One trial with its findings; null where it does not exist or its revision is not for this viewer. */
export const findTrialFor = (db: Database, viewer: Viewer, id: string) =>
  findTrial(db, and(eq(trials.id, id), visibleTo(viewer)));

async function findTrial(db: Database, which: SQL | undefined): Promise<TrialView | null> {
  const [trial] = await db
    .select({
      id: trials.id,
      revision: revisions.number,
      state: trials.state,
      queuedAt: trials.queuedAt,
      startedAt: trials.startedAt,
      finishedAt: trials.finishedAt,
      queuedBy: people.name,
      progress: trials.progress,
      note: trials.note,
      toolchain: trials.toolchain,
      generatorRelease: trials.generatorRelease,
    })
    .from(trials)
    .innerJoin(revisions, eq(revisions.id, trials.revisionId))
    .innerJoin(people, eq(people.id, trials.queuedById))
    .where(which)
    .orderBy(desc(trials.queuedAt), asc(trials.id))
    .limit(1);
  if (!trial) return null;
  const found = await db
    .select({
      name: findings.name,
      language: findings.language,
      outcome: findings.outcome,
      measured: findings.measured,
      target: findings.target,
      how: findings.how,
      data: findings.data,
    })
    .from(findings)
    .where(eq(findings.trialId, trial.id))
    // Enums sort in the order in which they were declared.
    .orderBy(asc(findings.name), sql`${findings.language} asc nulls last`);
  return {
    ...trial,
    queuedAt: trial.queuedAt.toISOString(),
    startedAt: trial.startedAt?.toISOString() ?? null,
    finishedAt: trial.finishedAt?.toISOString() ?? null,
    findings: found,
  };
}
