import { afterAll } from 'vitest';
import { db, pool } from '@/db/client';

/**
 * The database of this test file, migrated and empty, which the use cases under test reach too:
 * `own-database.ts` has made it before the file was loaded.
 */
export function useTestDatabase() {
  afterAll(() => pool.end());
  return { db, pool };
}
