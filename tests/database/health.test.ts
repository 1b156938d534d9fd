import { expect, it } from 'vitest';
import { GET } from '@/app/api/health/route';
import { workers } from '@/db/schema/trials';
import { sql } from 'drizzle-orm';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

async function health() {
  const answer = await GET();
  return { status: answer.status, body: await answer.json() };
}

it('is well, and says that no worker was seen, on a fresh database', async () => {
  const { status, body } = await health();
  expect(status).toBe(200);
  expect(body.database.reachable).toBe(true);
  expect(body.database.migrations.applied).toBe(body.database.migrations.known);
  expect(body.database.migrations.known).toBeGreaterThan(0);
  expect(body.workers.seenLately).toBe(0);
});

it('counts the workers that reported lately, and leaves out the silent ones', async () => {
  await db.insert(workers).values([
    { id: 'alive', sandboxMode: 'user-namespace' },
    { id: 'silent', sandboxMode: 'none', seenAt: sql`now() - interval '5 minutes'` },
  ]);
  const { body } = await health();
  expect(body.workers).toMatchObject({ seenLately: 1, sandboxModes: ['user-namespace'] });
});

it('answers 503 when the database lacks a migration of this release', async () => {
  await db.execute(sql`delete from drizzle.__drizzle_migrations`);
  const { status, body } = await health();
  expect(status).toBe(503);
  expect(body.database.reachable).toBe(true);
});

it('answers 503 without details when the database is not set up', async () => {
  await db.execute(sql`drop schema drizzle cascade`);
  const { status, body } = await health();
  expect(status).toBe(503);
  expect(body).toEqual({
    status: 'database unreachable or empty',
    database: { reachable: false },
    workers: { seenLately: 0 },
  });
});
