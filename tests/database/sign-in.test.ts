import { eq, sql } from 'drizzle-orm';
import { beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { databaseOn, openPool } from '@/db/client';
import { findPerson, listDemoPeople } from '@/db/queries/people';
import { events } from '@/db/schema/house';
import { people } from '@/db/schema/people';
import { actorOfSession } from '@/lib/auth/actor-of-session';
import { hashPassword } from '@/lib/auth/password';
import { signIn } from '@/lib/auth/sign-in';
import { SIGN_IN_LIMIT } from '@/lib/auth/sign-in-limit';
import { signOutEverywhere } from '@/lib/auth/sign-out-everywhere';
import type { Actor } from '@/lib/people/actor';
import { aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();
const PASSWORD = 'neap tide in march';

let passwordHash: string;
let person: Actor;
beforeAll(async () => {
  passwordHash = await hashPassword(PASSWORD);
});
beforeEach(async () => {
  await db.execute(sql`delete from sign_in_attempts`);
  person = await aPerson('contributor', { passwordHash });
});

const attempt = (password: string, more: Partial<{ email: string; address: string }> = {}, on = db) =>
  signIn(on, { email: person.email, password, address: '192.0.2.1', ...more }, true);

describe('signing in', () => {
  it('gives the id and the session version, and nothing else to carry', async () => {
    expect(await attempt(PASSWORD)).toEqual({
      kind: 'signed-in',
      claim: { personId: person.id, sessionVersion: 1 },
    });
  });

  it('takes the address in any capitals and with spaces around it', async () => {
    expect(await attempt(PASSWORD, { email: `  ${person.email.toUpperCase()} ` })).toMatchObject({ kind: 'signed-in' });
  });

  it('says how many tries are left, the same for an address that has no account', async () => {
    expect(await attempt('wrong')).toEqual({ kind: 'no-match', triesLeft: 4 });
    expect(await attempt('wrong')).toEqual({ kind: 'no-match', triesLeft: 3 });
    expect(await attempt('wrong', { email: 'nobody@example.org' })).toEqual({ kind: 'no-match', triesLeft: 4 });
  });

  it('takes as long for an unknown address as for a known one', async () => {
    const time = async (email: string) => {
      const times = [];
      for (let i = 0; i < 4; i++) {
        const start = performance.now();
        await signIn(db, { email, password: 'wrong', address: `192.0.2.${i + 10}` }, true);
        times.push(performance.now() - start);
      }
      return Math.min(...times);
    };
    const known = await time(person.email);
    const unknown = await time('nobody-at-all@example.org');
    // Without the decoy the unknown one would skip argon2, some 20 ms; half is far from noise and far from that.
    expect(unknown).toBeGreaterThan(known / 2);
  });

  it('refuses a password that no person set, and one of absurd length without hashing it', async () => {
    const invited = await aPerson('reader');
    expect(await attempt('', { email: invited.email })).toMatchObject({ kind: 'no-match' });
    const start = performance.now();
    expect(await attempt('x'.repeat(1_000_000))).toMatchObject({ kind: 'no-match' });
    expect(performance.now() - start).toBeLessThan(2_000);
  });

  it('tells an account that is closed only to whoever has its password', async () => {
    await db.update(people).set({ disabledAt: new Date() }).where(eq(people.id, person.id));
    expect(await attempt('wrong')).toMatchObject({ kind: 'no-match' });
    expect(await attempt(PASSWORD)).toEqual({ kind: 'closed' });
  });

  it('knows the demo accounts in demo mode only', async () => {
    const demo = await aPerson('reader', { passwordHash, demo: true });
    const attempt = { email: demo.email, password: PASSWORD, address: '192.0.2.1' };
    expect(await signIn(db, attempt, false)).toMatchObject({ kind: 'no-match' });
    expect(await signIn(db, attempt, true)).toMatchObject({ kind: 'signed-in' });
    expect((await listDemoPeople(db)).map(({ email }) => email)).toEqual([demo.email]);
  });
});

describe('the limit of tries', () => {
  it('stops after five failures, also for the right password, and says how long to wait', async () => {
    for (let i = 0; i < SIGN_IN_LIMIT.perEmail; i++) await attempt('wrong', { address: `198.51.100.${i}` });
    const refused = await attempt(PASSWORD);
    expect(refused).toMatchObject({ kind: 'too-many' });
    if (refused.kind !== 'too-many') throw new Error('unreachable');
    expect(refused.waitSeconds).toBeGreaterThan(SIGN_IN_LIMIT.windowSeconds - 60);
    expect(refused.waitSeconds).toBeLessThanOrEqual(SIGN_IN_LIMIT.windowSeconds);
  });

  it('forgets failures after a success, and after a quarter of an hour', async () => {
    for (let i = 0; i < 4; i++) await attempt('wrong');
    await attempt(PASSWORD);
    expect(await attempt('wrong')).toEqual({ kind: 'no-match', triesLeft: 4 });
    for (let i = 0; i < 4; i++) await attempt('wrong');
    expect(await attempt(PASSWORD)).toMatchObject({ kind: 'too-many' });
    await db.execute(sql`update sign_in_attempts set at = at - interval '15 minutes 1 second'`);
    expect(await attempt(PASSWORD)).toMatchObject({ kind: 'signed-in' });
  });

  it('holds across instances: twenty tries at once through two pools give five looks at the password', async () => {
    const pools = [openPool(process.env.DATABASE_URL), openPool(process.env.DATABASE_URL)];
    const instances = pools.map(databaseOn);
    const outcomes = await Promise.all(
      Array.from({ length: 20 }, (_, i) => attempt('wrong', { address: `203.0.113.${i}` }, instances[i % 2])),
    );
    await Promise.all(pools.map((pool) => pool.end()));
    const looks = outcomes.filter(({ kind }) => kind === 'no-match');
    expect(looks).toHaveLength(SIGN_IN_LIMIT.perEmail);
    // Counted one after the other: each of 4, 3, 2, 1, 0 is told once.
    expect(looks.map((look) => ('triesLeft' in look ? look.triesLeft : -1)).sort()).toEqual([0, 1, 2, 3, 4]);
  });

  it('stops one network address that tries many people', async () => {
    const address = '203.0.113.77';
    await db.execute(sql`insert into sign_in_attempts (email, address)
      select 'p' || i || '@example.org', ${address} from generate_series(1, ${SIGN_IN_LIMIT.perAddress}) i`);
    expect(await attempt(PASSWORD, { address })).toMatchObject({ kind: 'too-many' });
    expect(await attempt(PASSWORD, { address: '203.0.113.78' })).toMatchObject({ kind: 'signed-in' });
  });
});

describe('a session', () => {
  const claim = async () => {
    const outcome = await attempt(PASSWORD);
    if (outcome.kind !== 'signed-in') throw new Error(`signing in gave ${outcome.kind}`);
    return outcome.claim;
  };
  const actorNow = async (of: Awaited<ReturnType<typeof claim>>) =>
    actorOfSession(of, await findPerson(db, of.personId), true);

  it('carries the role that the database has now', async () => {
    const session = await claim();
    expect(await actorNow(session)).toMatchObject({ role: 'contributor' });
    await db.update(people).set({ role: 'reader' }).where(eq(people.id, person.id));
    expect(await actorNow(session)).toMatchObject({ role: 'reader' });
  });

  it('ends at once where its account is closed', async () => {
    const session = await claim();
    await db.update(people).set({ disabledAt: new Date() }).where(eq(people.id, person.id));
    expect(await actorNow(session)).toBeNull();
  });

  it('ends with all others of the person on signing out everywhere, and the ledger tells', async () => {
    const [here, there] = [await claim(), await claim()];
    await signOutEverywhere(person);
    expect(await actorNow(here)).toBeNull();
    expect(await actorNow(there)).toBeNull();
    expect(await actorNow(await claim())).toMatchObject({ id: person.id });
    const [event] = await db.select().from(events).where(eq(events.subjectId, person.id));
    expect(event).toMatchObject({ kind: 'person.signed-out-everywhere', actorId: person.id });
  });
});
