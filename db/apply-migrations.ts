/** Brings a database to the newest schema; any number of processes may try at once. */
import { drizzle } from 'drizzle-orm/node-postgres';
import { migrate } from 'drizzle-orm/node-postgres/migrator';
import path from 'node:path';
import { fileURLToPath } from 'node:url';
import pg from 'pg';

// Any number that nothing else in the house uses.
const MIGRATION_LOCK = 550_731_846;

export const MIGRATIONS = path.join(path.dirname(fileURLToPath(import.meta.url)), '..', 'drizzle');

/** @throws the driver's error where the database cannot be reached or a migration fails; nothing is half applied */
export async function applyMigrations(url: string): Promise<void> {
  // One connection, not the pool: the advisory lock belongs to it and goes with it.
  const client = new pg.Client({ connectionString: url, connectionTimeoutMillis: 10_000 });
  await client.connect();
  try {
    await client.query('select pg_advisory_lock($1)', [MIGRATION_LOCK]);
    await migrate(drizzle(client), { migrationsFolder: MIGRATIONS });
  } finally {
    await client.end();
  }
}
