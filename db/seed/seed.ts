/**
 * `node --conditions=react-server --import tsx db/seed/seed.ts`: the demo's office, people and entries.
 *
 * May be run at any time and by several processes: what is there stays as it is, what is missing is added, and
 * an entry that was cut off is finished. Facts are computed here; trials and vettings follow in the worker.
 */
import { env } from '@/lib/env';
import pg from 'pg';
import { pool } from '../client';
import { DEMO_ENTRIES } from './entries/all-entries';
import { seedBook } from './seed-book';

// Any number that nothing else in the house uses.
const SEED_LOCK = 550_731_847;

if (!env().LEVELBOOK_DEMO) {
  process.stderr.write('The demo is put into a database only where LEVELBOOK_DEMO=1 says so.\n');
  process.exit(1);
}
const lock = new pg.Client({ connectionString: env().DATABASE_URL });
await lock.connect();
try {
  await lock.query('select pg_advisory_lock($1)', [SEED_LOCK]);
  await seedBook(DEMO_ENTRIES, (line) => process.stdout.write(`demo: ${line}\n`));
} finally {
  await lock.end();
  await pool.end();
}
