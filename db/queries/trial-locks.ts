/**
 * Who runs a trial holds a lock on it, on a connection of its own: PostgreSQL lets go of it the moment that process
 * is gone, however it went, and nobody else can hold it meanwhile.
 */
import { sql } from 'drizzle-orm';
import type pg from 'pg';
import type { Database } from '../client';

/** First key of the advisory locks on trials; the second is a hash of the trial's id. */
const LOCK_SPACE = 5_121;

export interface HeldTrial {
  /** Aborted when the connection breaks, and with it the lock. */
  readonly lost: AbortSignal;
  readonly letGo: () => Promise<void>;
}

/** @returns null where another process holds it */
export async function holdTrial(pool: pg.Pool, trialId: string): Promise<HeldTrial | null> {
  const client = await pool.connect();
  const broken = new AbortController();
  const onError = (error: Error) => broken.abort(error);
  client.on('error', onError);
  const hangUp = (fault?: unknown) => {
    client.off('error', onError);
    client.release(fault !== undefined || broken.signal.aborted);
  };
  try {
    const { rows } = await client.query<{ held: boolean }>('select pg_try_advisory_lock($1, hashtext($2)) as held', [
      LOCK_SPACE,
      trialId,
    ]);
    if (!rows[0]?.held) {
      hangUp();
      return null;
    }
  } catch (fault) {
    hangUp(fault);
    throw fault;
  }
  return {
    lost: broken.signal,
    letGo: async () => {
      const fault = await client.query('select pg_advisory_unlock($1, hashtext($2))', [LOCK_SPACE, trialId]).then(
        () => undefined,
        (error: unknown) => error ?? true,
      );
      hangUp(fault);
    },
  };
}

/** Those of these trials that no process holds at this moment. */
export async function listUnheldTrials(db: Database, trialIds: readonly string[]): Promise<string[]> {
  if (trialIds.length === 0) return [];
  const ids = sql.join(
    trialIds.map((id) => sql`${id}`),
    sql`, `,
  );
  // The lock is taken for the length of this statement only.
  const { rows } = await db.execute<{ id: string }>(
    sql`select id from unnest(array[${ids}]::text[]) as id where pg_try_advisory_xact_lock(${LOCK_SPACE}::int, hashtext(id))`,
  );
  return rows.map(({ id }) => id);
}

/**
 * Does something that only one process may do at a time.
 * @returns false, without doing it, where another process is at it
 */
export async function soleSweeper(db: Database, work: () => Promise<void>): Promise<boolean> {
  return db.transaction(async (tx) => {
    const { rows } = await tx.execute<{ ours: boolean }>(
      sql`select pg_try_advisory_xact_lock(${LOCK_SPACE}::int, 0) as ours`,
    );
    if (!rows[0]?.ours) return false;
    await work();
    return true;
  });
}
