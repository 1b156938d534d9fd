import { drizzle } from 'drizzle-orm/node-postgres';
import { Pool } from 'pg';
import { afterAll } from 'vitest';

/**
 * The database of this test file, migrated and empty; `own-database.ts` has made it before the file was loaded.
 * Use cases reach the same one through `@/db/client`.
 */
export function useTestDatabase() {
  const pool = new Pool({ connectionString: process.env.DATABASE_URL, max: 5 });
  // The database is dropped under whoever is still connected.
  pool.on('error', () => {});
  afterAll(() => pool.end());
  return { db: drizzle(pool, { casing: 'snake_case' }), pool };
}
