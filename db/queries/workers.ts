import { eq, lt, sql } from 'drizzle-orm';
import type { TrialView } from '@/lib/trials/trial';
import type { Database } from '../client';
import { workers } from '../schema/trials';

export interface WorkerReport {
  id: string;
  sandboxMode: string;
  toolchain: TrialView['toolchain'];
}

/** Says that this worker lives, and what it can do. */
export async function reportWorker(db: Database, { id, sandboxMode, toolchain }: WorkerReport): Promise<void> {
  const said = { sandboxMode, toolchain, seenAt: sql`now()` };
  await db
    .insert(workers)
    .values({ id, ...said })
    .onConflictDoUpdate({ target: workers.id, set: said });
}

/** Takes a worker that stops off the list, and those that were silent for a day. */
export async function removeWorker(db: Database, id: string): Promise<void> {
  await db.delete(workers).where(eq(workers.id, id));
  await db.delete(workers).where(lt(workers.seenAt, sql`now() - interval '1 day'`));
}
