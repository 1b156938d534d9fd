import { gte, sql } from 'drizzle-orm';
import type { Database } from '@/db/client';
import { workers } from '@/db/schema/trials';

/** How many migrations this database has had. */
export async function countMigrations(db: Database): Promise<number> {
  const { rows } = await db.execute<{ applied: number }>(
    sql`select count(*)::int as applied from drizzle.__drizzle_migrations`,
  );
  return rows[0]?.applied ?? 0;
}

/** Workers that reported within the last `withinSeconds`, the latest first. */
export async function listWorkersSeen(db: Database, withinSeconds: number) {
  return db
    .select({ seenAt: workers.seenAt, sandboxMode: workers.sandboxMode })
    .from(workers)
    .where(gte(workers.seenAt, sql`now() - make_interval(secs => ${withinSeconds})`))
    .orderBy(sql`${workers.seenAt} desc`);
}
