/**
 * The one pool of this process. A `Database` is the pool or an open transaction on it, so that a query
 * does not care which.
 *
 * The pool outlives PostgreSQL: connections that break are dropped, the next query opens a new one, and a
 * query that cannot have one within `connectionTimeoutMillis` fails with an error that `isDatabaseAway` knows.
 */
import { drizzle, type NodePgQueryResultHKT } from 'drizzle-orm/node-postgres';
import type { PgDatabase } from 'drizzle-orm/pg-core';
import pg from 'pg';

export type Database = PgDatabase<NodePgQueryResultHKT>;

/** A pool on `url`; close it with `end()` on the pool. */
export function openPool(url: string | undefined, connectionsMax = 10): pg.Pool {
  const pool = new pg.Pool({
    connectionString: url,
    max: connectionsMax,
    connectionTimeoutMillis: 5_000,
    idleTimeoutMillis: 30_000,
    statement_timeout: 30_000,
    idle_in_transaction_session_timeout: 60_000,
    keepAlive: true,
  });
  // A connection that breaks while no query is under way reports here, or on itself where a transaction holds
  // it. Without listeners the process would end; the pool has dropped the connection, or drops it when it is
  // given back, and the next query says what matters.
  pool.on('error', () => undefined);
  pool.on('connect', (client) => client.on('error', () => undefined));
  return pool;
}

export const databaseOn = (pool: pg.Pool): Database => drizzle(pool, { casing: 'snake_case' });

// Kept on globalThis: a development server evaluates modules again at every change.
const kept = globalThis as typeof globalThis & { levelbookPool?: pg.Pool };

export const pool = (kept.levelbookPool ??= openPool(process.env.DATABASE_URL));
export const db: Database = databaseOn(pool);
