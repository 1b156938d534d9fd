/** `npm run administrator -- EMAIL NAME`: the first account of a house without a demo. */
import { existsSync } from 'node:fs';

const [email, ...names] = process.argv.slice(2);
if (!process.env.DATABASE_URL && existsSync('.env')) process.loadEnvFile('.env');

async function main(): Promise<string> {
  if (!email || names.length === 0)
    throw new Error('accepted: npm run administrator -- ada@example.org "Ada Lindqvist"');
  if (!process.env.DATABASE_URL) throw new Error('DATABASE_URL is not set, neither here nor in .env.');
  // Loaded late: the pool takes its address when it is loaded.
  const { db, pool } = await import('@/db/client');
  const { addAdministrator } = await import('./add-administrator');
  try {
    return await addAdministrator(db, { email, name: names.join(' ') });
  } finally {
    await pool.end();
  }
}

/** What the driver said, not the statement that it said it about: that holds the hash of the password. */
function reason(error: unknown): string {
  if (!(error instanceof Error)) return String(error);
  return error.cause instanceof Error ? reason(error.cause) : error.message || 'the database cannot be reached';
}

main().then(
  (password) => process.stdout.write(`${email} is an administrator and signs in with this password: ${password}\n`),
  (error: unknown) => {
    process.stderr.write(`No account was made: ${reason(error)}\n`);
    process.exitCode = 1;
  },
);
