/** Browsers that people are signed in with. */
import { and, desc, eq, gt, isNull, lt, ne, sql } from 'drizzle-orm';
import type { Database } from '../client';
import { sessions } from '../schema/people';

/** A cookie lives seven days after its last use; older rows stand for nobody. */
const ALIVE = sql`now() - interval '8 days'`;

/** @returns the new session's id */
export async function insertSession(db: Database, row: { personId: string; userAgent: string; address: string }) {
  await db
    .delete(sessions)
    .where(and(eq(sessions.personId, row.personId), lt(sessions.seenAt, sql`now() - interval '90 days'`)));
  const [inserted] = await db.insert(sessions).values(row).returning({ id: sessions.id });
  if (!inserted) throw new Error('insertSession: no row came back');
  return inserted.id;
}

/** Notes that a session is in use, at most once a minute. @returns whether it still counts */
export async function touchSession(db: Database, id: string, personId: string): Promise<boolean> {
  const its = and(eq(sessions.id, id), eq(sessions.personId, personId), isNull(sessions.endedAt));
  const [row] = await db
    .select({ isStale: sql<boolean>`${sessions.seenAt} < now() - interval '1 minute'` })
    .from(sessions)
    .where(its);
  if (row?.isStale)
    await db
      .update(sessions)
      .set({ seenAt: sql`now()` })
      .where(its);
  return row !== undefined;
}

/** Those in use, the latest first. */
export async function listSessions(db: Database, personId: string) {
  return db
    .select({
      id: sessions.id,
      userAgent: sessions.userAgent,
      address: sessions.address,
      seenAt: sessions.seenAt,
      createdAt: sessions.createdAt,
    })
    .from(sessions)
    .where(and(eq(sessions.personId, personId), isNull(sessions.endedAt), gt(sessions.seenAt, ALIVE)))
    .orderBy(desc(sessions.seenAt), desc(sessions.id));
}

/** Ends one session of a person. @returns whether there was one to end */
export async function endSession(db: Database, personId: string, id: string): Promise<boolean> {
  const rows = await db
    .update(sessions)
    .set({ endedAt: sql`now()` })
    .where(and(eq(sessions.id, id), eq(sessions.personId, personId), isNull(sessions.endedAt)))
    .returning({ id: sessions.id });
  return rows.length > 0;
}

/** Ends every session of a person, or all but one. */
export async function endSessions(tx: Database, personId: string, except: string | null = null): Promise<void> {
  await tx
    .update(sessions)
    .set({ endedAt: sql`now()` })
    .where(
      and(
        eq(sessions.personId, personId),
        isNull(sessions.endedAt),
        except === null ? undefined : ne(sessions.id, except),
      ),
    );
}
