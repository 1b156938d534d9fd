import { sql } from 'drizzle-orm';
import pg from 'pg';
import { afterEach, describe, expect, it, vi } from 'vitest';
import { applyMigrations } from '@/db/apply-migrations';
import { databaseOn, openPool } from '@/db/client';
import { isDatabaseAway } from '@/db/errors';
import { signIn } from '@/lib/auth/sign-in';
import { answerOfError } from '@/lib/web/answer-of-error';
import { runStatement, within } from '../support/cluster';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();
const url = process.env.DATABASE_URL ?? '';
const administration = within(url, 'postgres');
const database = new URL(url).pathname.slice(1);

const pools: pg.Pool[] = [];
const aPool = () => {
  const pool = openPool(url);
  pools.push(pool);
  return pool;
};
const failure = async (work: PromiseLike<unknown>) => {
  try {
    await work;
  } catch (error) {
    return error;
  }
  throw new Error('it did not fail');
};
const cutConnections = () =>
  runStatement(administration, `select pg_terminate_backend(pid) from pg_stat_activity where datname = '${database}'`);
const stop = async () => {
  await runStatement(administration, `alter database ${database} allow_connections false`);
  await cutConnections();
};
const start = () => runStatement(administration, `alter database ${database} allow_connections true`);

afterEach(async () => {
  await start();
  await Promise.all(pools.splice(0).map((pool) => pool.end()));
});

describe('PostgreSQL away under a running pool', () => {
  it('is survived: every idle connection is cut, and the next queries are answered', async () => {
    const running = databaseOn(aPool());
    await Promise.all(Array.from({ length: 5 }, () => running.execute(sql`select pg_sleep(0.02)`)));
    await cutConnections();
    // Until the pool has heard of it a query may still meet a dead connection; it may not fail for longer.
    await vi.waitFor(async () => expect((await running.execute(sql`select 1 as one`)).rows).toEqual([{ one: 1 }]));
    const answers = await Promise.all(Array.from({ length: 20 }, () => running.execute(sql`select 1 as one`)));
    expect(answers).toHaveLength(20);
  });

  it('breaks a query under way as "away", not as a fault', async () => {
    const running = databaseOn(aPool());
    const sleeping = failure(running.execute(sql`select pg_sleep(20)`));
    await vi.waitFor(async () => {
      const { rows } = await db.execute(sql`select from pg_stat_activity where query like 'select pg_sleep(20)%'`);
      expect(rows.length).toBeGreaterThan(0);
    });
    await cutConnections();
    expect(isDatabaseAway(await sleeping)).toBe(true);
  });

  it('rolls back a transaction that is cut, whole', async () => {
    await db.execute(sql`create table if not exists kept (n int)`);
    const running = databaseOn(aPool());
    const error = await failure(
      running.transaction(async (tx) => {
        await tx.execute(sql`insert into kept values (1)`);
        await cutConnections();
        await tx.execute(sql`insert into kept values (2)`);
      }),
    );
    expect(isDatabaseAway(error)).toBe(true);
    await vi.waitFor(async () => expect((await running.execute(sql`select n from kept`)).rows).toEqual([]));
  });

  it('refuses while it is stopped, says so at the sign-in, and works again when it returns', async () => {
    const running = databaseOn(aPool());
    await running.execute(sql`select 1`);
    await stop();
    const attempt = { email: 'a@example.org', password: 'wrong', address: '192.0.2.1' };
    await vi.waitFor(async () => expect(await signIn(running, attempt, true)).toEqual({ kind: 'away' }));
    await start();
    expect(await signIn(running, attempt, true)).toMatchObject({ kind: 'no-match' });
  });

  it.each([
    ['nothing listens', 'postgres://app:x@127.0.0.1:1/levelbook'],
    ['the name is unknown', 'postgres://app:x@nowhere.invalid:5432/levelbook'],
  ])('is told apart from other errors where %s', async (_, address) => {
    const pool = openPool(address);
    const error = await failure(databaseOn(pool).execute(sql`select 1`));
    await pool.end();
    expect(isDatabaseAway(error)).toBe(true);
    expect(answerOfError('test', error)).toMatchObject({
      code: 'unavailable',
      message: expect.stringContaining('The database does not answer just now.'),
    });
  });

  it('is not what a mistake in a query is called', async () => {
    expect(isDatabaseAway(await failure(db.execute(sql`select nonsense`)))).toBe(false);
    expect(isDatabaseAway(new Error('Connection'))).toBe(false);
    expect(isDatabaseAway(null)).toBe(false);
  });
});

describe('migrations', () => {
  it('are applied once where four processes start at the same moment', async () => {
    const fresh = `${database}_fresh`;
    await runStatement(administration, `create database ${fresh}`);
    try {
      await Promise.all(Array.from({ length: 4 }, () => applyMigrations(within(url, fresh))));
      const client = new pg.Client({ connectionString: within(url, fresh) });
      await client.connect();
      const applied = await client.query(
        'select count(*)::int as n, count(distinct hash)::int as distinct from drizzle.__drizzle_migrations',
      );
      const settings = await client.query('select signatures_needed from settings');
      await client.end();
      expect(applied.rows[0].n).toBeGreaterThan(1);
      expect(applied.rows[0].n).toBe(applied.rows[0].distinct);
      expect(settings.rows).toEqual([{ signatures_needed: 2 }]);
    } finally {
      await runStatement(administration, `drop database if exists ${fresh} with (force)`);
    }
  });
});
