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
import { seedEntry } from './seed-entry';
import { seedPeople } from './seed-people';

// Any number that nothing else in the house uses.
const SEED_LOCK = 550_731_847;

async function seed(say: (line: string) => void): Promise<number> {
  const added = await seedPeople();
  if (added > 0) say(`${added} people`);
  let filled = 0;
  let troubles = 0;
  for (const entry of DEMO_ENTRIES) {
    try {
      if (await seedEntry(entry)) filled += 1;
    } catch (error) {
      // One entry that cannot be had must not keep the others away.
      troubles += 1;
      say(`${entry.letters} ${entry.number} ${entry.slug}: ${error instanceof Error ? error.message : String(error)}`);
    }
    if (filled > 0 && filled % 10 === 0) say(`${filled} of ${DEMO_ENTRIES.length} entries`);
  }
  say(filled === 0 ? 'The demo is complete.' : `${filled} entries with their facts; the worker tries them now.`);
  return troubles;
}

if (!env().LEVELBOOK_DEMO) {
  process.stderr.write('The demo is put into a database only where LEVELBOOK_DEMO=1 says so.\n');
  process.exit(1);
}
const lock = new pg.Client({ connectionString: env().DATABASE_URL });
await lock.connect();
let troubles: number;
try {
  await lock.query('select pg_advisory_lock($1)', [SEED_LOCK]);
  troubles = await seed((line) => process.stdout.write(`demo: ${line}\n`));
} finally {
  await lock.end();
  await pool.end();
}
process.exitCode = troubles === 0 ? 0 : 1;
