import { and, asc, eq, sql } from 'drizzle-orm';
import type { StoredDemoPlan } from '@/lib/reviews/demo-plan';
import type { Database } from '../client';
import { demoPlans } from '../schema/demo';
import { entries } from '../schema/entries';
import { revisions } from '../schema/revisions';
import { trials } from '../schema/trials';

/** Keeps the plan of a revision; one that is there already stands. */
export async function insertDemoPlan(db: Database, revisionId: string, plan: StoredDemoPlan) {
  await db.insert(demoPlans).values({ revisionId, plan }).onConflictDoNothing();
}

export async function findDemoPlan(db: Database, revisionId: string) {
  const [row] = await db
    .select({ plan: demoPlans.plan, placed: demoPlans.placed, done: demoPlans.done })
    .from(demoPlans)
    .where(eq(demoPlans.revisionId, revisionId));
  return row ?? null;
}

/** True for one transaction at a time; the others do not wait. */
export async function tryToLockDemoPlan(tx: Database, revisionId: string): Promise<boolean> {
  const { rows } = await tx.execute<{ locked: boolean }>(
    sql`select pg_try_advisory_xact_lock(hashtextextended(${'demo plan ' + revisionId}, 0)) as locked`,
  );
  return rows[0]?.locked === true;
}

export async function markDemoPlan(db: Database, revisionId: string, marks: { placed?: true; done?: true }) {
  await db.update(demoPlans).set(marks).where(eq(demoPlans.revisionId, revisionId));
}

export async function findRevision(db: Database, slug: string, number: number) {
  const [row] = await db
    .select({ id: revisions.id, state: revisions.state, authorId: revisions.authorId })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(eq(entries.slug, slug), eq(revisions.number, number)));
  return row ?? null;
}

/** Revisions in review whose trial has passed and whose plan is still to be carried out, the oldest first. */
export async function listDemoRevisionsToDecide(db: Database) {
  const passed = sql`exists (select from ${trials} where ${trials.revisionId} = ${revisions.id} and ${trials.state} = 'passed')`;
  const rows = await db
    .select({ id: revisions.id })
    .from(demoPlans)
    .innerJoin(revisions, eq(revisions.id, demoPlans.revisionId))
    .where(and(eq(demoPlans.done, false), eq(demoPlans.placed, true), passed))
    .orderBy(asc(revisions.createdAt));
  return rows.map(({ id }) => id);
}

/** The next revision of the same entry whose turn comes after this one. */
export async function findNextDemoRevision(db: Database, entryId: string, number: number) {
  const [row] = await db
    .select({ id: revisions.id, authorId: revisions.authorId, plan: demoPlans.plan })
    .from(demoPlans)
    .innerJoin(revisions, eq(revisions.id, demoPlans.revisionId))
    .where(and(eq(revisions.entryId, entryId), eq(revisions.number, number + 1), eq(demoPlans.placed, false)));
  return row ?? null;
}
