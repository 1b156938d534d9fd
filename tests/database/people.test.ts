import { and, eq, sql } from 'drizzle-orm';
import { beforeEach, describe, expect, it } from 'vitest';
import { insertLink } from '@/db/queries/links';
import { findAccount, findPerson, listPeople } from '@/db/queries/people';
import { insertSession, listSessions, touchSession } from '@/db/queries/sessions';
import { events, letters } from '@/db/schema/house';
import { links, people } from '@/db/schema/people';
import { hashPassword, verifyPassword } from '@/lib/auth/password';
import { signOutEverywhere } from '@/lib/auth/sign-out-everywhere';
import { LAST_ADMINISTRATOR } from '@/lib/people/account-rules';
import type { Actor } from '@/lib/people/actor';
import { changePassword } from '@/lib/people/change-password';
import { changeProfile } from '@/lib/people/change-profile';
import { changeRole } from '@/lib/people/change-role';
import { closeAccount, openAccount } from '@/lib/people/close-account';
import { endOwnSession } from '@/lib/people/end-own-session';
import { invite, inviteAgain } from '@/lib/people/invite';
import type { LinkPurpose } from '@/lib/people/link';
import { hashOfSecret, newSecret } from '@/lib/people/link-secret';
import { readLink, redeemLink } from '@/lib/people/redeem-link';
import { requestPasswordReset } from '@/lib/people/request-password-reset';
import { Refusal } from '@/lib/refusal';
import { aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();
const PASSWORD = 'neap tide in march';
const ANOTHER = 'slack water at noon';
const passwordHash = await hashPassword(PASSWORD);

let ruth: Actor;
let mirre: Actor;
beforeEach(async () => {
  // The trigger keeps the last administrator; the tests begin with one each.
  await db.execute(sql`alter table people disable trigger an_administrator_stays`);
  await db.update(people).set({ role: 'reader' });
  await db.execute(sql`alter table people enable trigger an_administrator_stays`);
  await db.execute(sql`delete from sign_in_attempts`);
  ruth = await aPerson('administrator', { passwordHash });
  mirre = await aPerson('reader', { passwordHash });
});

const ledgerOf = async (id: string) =>
  db
    .select({ kind: events.kind, actorId: events.actorId, reason: events.reason, data: events.data })
    .from(events)
    .where(eq(events.subjectId, id))
    .orderBy(events.id);
const lettersTo = (id: string) => db.select().from(letters).where(eq(letters.recipientId, id));
async function aLink(purpose: LinkPurpose, personId: string, hours = 2): Promise<string> {
  const secret = newSecret();
  await insertLink(db, { purpose, personId, hash: hashOfSecret(secret), hours });
  return secret;
}
const aSession = (personId: string) => insertSession(db, { personId, userAgent: 'Firefox', address: '192.0.2.1' });

let guests = 0;
const aGuest = () => ({
  name: 'Ada Lindqvist',
  email: `ada-${(guests += 1)}@example.org`,
  role: 'contributor' as const,
});

/** What two get who press at the same moment, refusals as their codes. */
const atOnce = async (...calls: Promise<unknown>[]) =>
  (await Promise.allSettled(calls))
    .map((call) =>
      call.status === 'fulfilled' ? 'done' : call.reason instanceof Refusal ? call.reason.code : String(call.reason),
    )
    .sort();

describe('an invitation', () => {
  it('makes an account without a password, a line of the ledger and a letter without a secret', async () => {
    const guest = aGuest();
    const id = await invite(ruth, guest);
    expect(await findAccount(db, id)).toMatchObject({ ...guest, passwordHash: null });
    expect(await ledgerOf(id)).toEqual([
      { kind: 'person.invited', actorId: ruth.id, reason: null, data: { role: 'contributor' } },
    ]);
    expect(await lettersTo(id)).toMatchObject([
      { kind: 'invitation', payload: { by: ruth.name, role: 'contributor' } },
    ]);
  });

  it('is the business of administrators, and refuses an address that has an account', async () => {
    await expect(invite(mirre, aGuest())).rejects.toMatchObject({ code: 'not-allowed' });
    await expect(invite(ruth, { ...aGuest(), email: mirre.email })).rejects.toMatchObject({
      code: 'conflict',
      fields: { email: expect.any(String) },
    });
  });

  it('of one address by two at once makes one account and one letter', async () => {
    const guest = aGuest();
    expect(await atOnce(invite(ruth, guest), invite(ruth, guest))).toEqual(['conflict', 'done']);
    const [account] = await db.select({ id: people.id }).from(people).where(eq(people.email, guest.email));
    expect(await lettersTo(account!.id)).toHaveLength(1);
  });

  it('is not used up by opening its page, and then serves once', async () => {
    const guest = aGuest();
    const id = await invite(ruth, guest);
    const secret = await aLink('invitation', id);
    for (let k = 0; k < 3; k++)
      expect(await readLink('invitation', secret)).toEqual({ name: guest.name, email: guest.email });
    expect(await redeemLink('invitation', secret, PASSWORD)).toEqual({ email: guest.email });
    expect(await verifyPassword((await findAccount(db, id))!.passwordHash, PASSWORD)).toBe(true);
    expect((await ledgerOf(id)).map(({ kind }) => kind)).toEqual(['person.invited', 'person.joined']);
    expect(await readLink('invitation', secret)).toBeNull();
    await expect(redeemLink('invitation', secret, ANOTHER)).rejects.toMatchObject({ code: 'not-found' });
    expect(await verifyPassword((await findAccount(db, id))!.passwordHash, PASSWORD)).toBe(true);
  });

  it('taken up by several at once serves one of them', async () => {
    const id = await invite(ruth, aGuest());
    const secret = await aLink('invitation', id);
    const passwords = [PASSWORD, ANOTHER, 'ebb tide in april', 'spring tide in may'];
    expect(await atOnce(...passwords.map((password) => redeemLink('invitation', secret, password)))).toEqual([
      'done',
      'not-found',
      'not-found',
      'not-found',
    ]);
    expect((await ledgerOf(id)).filter(({ kind }) => kind === 'person.joined')).toHaveLength(1);
  });

  it('stays whole where the password is too short, and says so at the field', async () => {
    const secret = await aLink('invitation', await invite(ruth, aGuest()));
    await expect(redeemLink('invitation', secret, 'short')).rejects.toMatchObject({
      code: 'invalid',
      fields: { password: expect.stringContaining('at least 12') },
    });
    expect(await readLink('invitation', secret)).not.toBeNull();
  });

  it('does not serve when it has run out, for another purpose, with another secret, or once the account is closed', async () => {
    const id = await invite(ruth, aGuest());
    const secret = await aLink('invitation', id);
    expect(await readLink('password-reset', secret)).toBeNull();
    expect(await readLink('invitation', newSecret())).toBeNull();
    expect(await readLink('invitation', "' or true --")).toBeNull();
    await db
      .update(links)
      .set({ expiresAt: sql`now() - interval '1 second'` })
      .where(eq(links.hash, hashOfSecret(secret)));
    expect(await readLink('invitation', secret)).toBeNull();
    await expect(redeemLink('invitation', secret, PASSWORD)).rejects.toMatchObject({ code: 'not-found' });
    const later = await aLink('invitation', id);
    await closeAccount(ruth, id, 'Left before coming.');
    await expect(redeemLink('invitation', later, PASSWORD)).rejects.toMatchObject({ code: 'not-found' });
  });

  it('sent again ends the links of earlier letters; not for somebody who has come', async () => {
    const id = await invite(ruth, aGuest());
    const early = await aLink('invitation', id);
    await inviteAgain(ruth, id);
    expect(await readLink('invitation', early)).toBeNull();
    expect(await lettersTo(id)).toHaveLength(2);
    await expect(inviteAgain(ruth, mirre.id)).rejects.toThrow('taken up the invitation already');
  });
});

describe('roles', () => {
  it('change with a line of the ledger that says from what to what, and why', async () => {
    await changeRole(ruth, { personId: mirre.id, from: 'reader', to: 'maintainer', reason: 'Reviews from now on.' });
    expect((await findPerson(db, mirre.id))?.role).toBe('maintainer');
    expect(await ledgerOf(mirre.id)).toEqual([
      {
        kind: 'person.role-changed',
        actorId: ruth.id,
        reason: 'Reviews from now on.',
        data: { from: 'reader', to: 'maintainer' },
      },
    ]);
  });

  it('are refused where somebody else has changed them meanwhile', async () => {
    const change = (to: 'contributor' | 'maintainer') =>
      changeRole(ruth, { personId: mirre.id, from: 'reader', to, reason: '' });
    expect(await atOnce(change('contributor'), change('maintainer'))).toEqual(['conflict', 'done']);
    expect(await ledgerOf(mirre.id)).toHaveLength(1);
  });
});

describe('the last administrator', () => {
  const demote = (actor: Actor, of: Actor) =>
    changeRole(actor, { personId: of.id, from: 'administrator', to: 'reader', reason: '' });

  it('keeps role and account', async () => {
    await expect(demote(ruth, ruth)).rejects.toThrow(LAST_ADMINISTRATOR);
    await expect(closeAccount(ruth, ruth.id, 'Leaves.')).rejects.toThrow(LAST_ADMINISTRATOR);
    // Invited, but not yet there: nobody who could keep the house.
    await invite(ruth, { ...aGuest(), role: 'administrator' });
    await expect(closeAccount(ruth, ruth.id, 'Leaves.')).rejects.toThrow(LAST_ADMINISTRATOR);
  });

  it('is there still when two administrators remove each other at the same moment', async () => {
    for (let round = 0; round < 5; round++) {
      const other = await aPerson('administrator', { passwordHash });
      expect(await atOnce(demote(ruth, other), closeAccount(other, ruth.id, 'Leaves.'))).toHaveLength(2);
      const left = await db.$count(
        people,
        and(eq(people.role, 'administrator'), sql`disabled_at is null and password_hash is not null`),
      );
      expect(left).toBe(1);
      await db.update(people).set({ role: 'administrator', disabledAt: null }).where(eq(people.id, ruth.id));
      await db.update(people).set({ role: 'reader' }).where(eq(people.id, other.id));
    }
  });

  it('is kept by the database whoever writes', async () => {
    await expect(db.update(people).set({ role: 'reader' }).where(eq(people.id, ruth.id))).rejects.toMatchObject({
      cause: { constraint: 'an_administrator_stays' },
    });
  });

  it('is not thought to be one of the demo, whose accounts do not work outside demo mode', async () => {
    await aPerson('administrator', { passwordHash, demo: true });
    await expect(demote(ruth, ruth)).rejects.toThrow(LAST_ADMINISTRATOR);
  });
});

describe('closing an account', () => {
  it('ends sessions and links at once, with the reason in the ledger; opening gives neither back', async () => {
    const session = await aSession(mirre.id);
    const secret = await aLink('password-reset', mirre.id);
    expect(await touchSession(db, session, mirre.id)).toBe(true);
    await closeAccount(ruth, mirre.id, 'Moved to another office.');
    expect(await touchSession(db, session, mirre.id)).toBe(false);
    expect(await findPerson(db, mirre.id)).toMatchObject({ disabledAt: expect.any(Date), sessionVersion: 2 });
    await openAccount(ruth, mirre.id, 'Came back.');
    expect(await touchSession(db, session, mirre.id)).toBe(false);
    expect(await readLink('password-reset', secret)).toBeNull();
    expect((await ledgerOf(mirre.id)).map(({ kind, reason }) => [kind, reason])).toEqual([
      ['person.disabled', 'Moved to another office.'],
      ['person.opened', 'Came back.'],
    ]);
  });

  it('happens once where two press at the same moment', async () => {
    const close = () => closeAccount(ruth, mirre.id, 'Left.');
    const [first, second] = await atOnce(close(), close());
    expect(second).toBe('done' === first ? 'not-allowed' : 'done');
    expect(await ledgerOf(mirre.id)).toHaveLength(1);
  });
});

describe('a forgotten password', () => {
  it('gives a letter to an open account that has a password, and to no other, with the same answer', async () => {
    const guest = await invite(ruth, aGuest());
    const closed = await aPerson('reader', { passwordHash });
    await closeAccount(ruth, closed.id, 'Left.');
    for (const email of [mirre.email, closed.email, (await findPerson(db, guest))!.email, 'nobody@example.org'])
      await expect(requestPasswordReset(email, '192.0.2.7')).resolves.toBeUndefined();
    expect((await lettersTo(mirre.id)).map(({ kind }) => kind)).toEqual(['password-reset']);
    expect(await lettersTo(closed.id)).toEqual([]);
    expect((await lettersTo(guest)).map(({ kind }) => kind)).toEqual(['invitation']);
  });

  it('takes a quarter of a second whether there is an account or not', async () => {
    for (const email of [mirre.email, 'nobody@example.org']) {
      const since = performance.now();
      await requestPasswordReset(email, '192.0.2.8');
      expect(performance.now() - since).toBeGreaterThan(240);
    }
  });

  it('may be asked for three times in a quarter of an hour, for any address alike; that locks nobody out', async () => {
    for (const email of [mirre.email, 'nobody@example.org']) {
      for (let k = 0; k < 3; k++) await requestPasswordReset(email, '192.0.2.9');
      await expect(requestPasswordReset(email, '192.0.2.9')).rejects.toMatchObject({
        code: 'too-many',
        message: 'Too many tries. Wait 15 minutes, then try again.',
      });
    }
    expect(await lettersTo(mirre.id)).toHaveLength(3);
  });

  it('is set anew once by the link; every session and every other link ends', async () => {
    const session = await aSession(mirre.id);
    const [secret, other] = [await aLink('password-reset', mirre.id), await aLink('password-reset', mirre.id)];
    await redeemLink('password-reset', secret, ANOTHER);
    expect(await verifyPassword((await findAccount(db, mirre.id))!.passwordHash, ANOTHER)).toBe(true);
    expect(await touchSession(db, session, mirre.id)).toBe(false);
    expect(await readLink('password-reset', other)).toBeNull();
    expect((await ledgerOf(mirre.id)).map(({ kind, actorId }) => [kind, actorId])).toEqual([
      ['person.password-reset', mirre.id],
    ]);
  });

  it('of the demo’s people stays the one on the sign-in page', async () => {
    const demo = await aPerson('reader', { passwordHash, demo: true });
    const secret = await aLink('password-reset', demo.id);
    await expect(redeemLink('password-reset', secret, ANOTHER)).rejects.toThrow('stay the one on the sign-in page');
    await expect(
      changePassword(demo, await aSession(demo.id), { present: PASSWORD, password: ANOTHER }),
    ).rejects.toThrow('stay the one on the sign-in page');
  });
});

describe('one’s own account', () => {
  it('changes its password with the present one; other sessions end, this one stays', async () => {
    const [here, there] = [await aSession(mirre.id), await aSession(mirre.id)];
    await changePassword(mirre, here, { present: PASSWORD, password: ANOTHER });
    expect((await listSessions(db, mirre.id)).map(({ id }) => id)).toEqual([here]);
    expect(await touchSession(db, there, mirre.id)).toBe(false);
    expect((await findPerson(db, mirre.id))?.sessionVersion).toBe(1);
  });

  it('says which field is at fault, and stops after five wrong present passwords', async () => {
    const here = await aSession(mirre.id);
    await expect(changePassword(mirre, here, { present: PASSWORD, password: 'short' })).rejects.toMatchObject({
      fields: { password: expect.stringContaining('at least 12') },
    });
    const wrong = () => changePassword(mirre, here, { present: 'not this one', password: ANOTHER });
    for (let k = 0; k < 5; k++)
      await expect(wrong()).rejects.toMatchObject({ fields: { present: expect.any(String) } });
    await expect(changePassword(mirre, here, { present: PASSWORD, password: ANOTHER })).rejects.toMatchObject({
      code: 'too-many',
    });
  });

  it('lists its sessions, ends one of them, and nobody else’s', async () => {
    const [first, second] = [await aSession(mirre.id), await aSession(mirre.id)];
    const foreign = await aSession(ruth.id);
    await expect(endOwnSession(mirre, foreign)).rejects.toMatchObject({ code: 'not-found' });
    await endOwnSession(mirre, first);
    expect((await listSessions(db, mirre.id)).map(({ id }) => id)).toEqual([second]);
    await signOutEverywhere(mirre);
    expect(await listSessions(db, mirre.id)).toEqual([]);
    expect(await touchSession(db, foreign, ruth.id)).toBe(true);
  });

  it('takes another name, which the ledger tells, and another wish for letters, which it does not', async () => {
    await changeProfile(mirre, { name: 'Mirre Okafor-Lind', letterWish: 'daily' });
    expect(await findAccount(db, mirre.id)).toMatchObject({ name: 'Mirre Okafor-Lind', letterWish: 'daily' });
    expect(await ledgerOf(mirre.id)).toMatchObject([
      { kind: 'person.renamed', data: { from: mirre.name, to: 'Mirre Okafor-Lind' } },
    ]);
  });
});

it('the page of people tells who was seen when, and how long an invitation serves', async () => {
  const id = await invite(ruth, aGuest());
  await aLink('invitation', id, 48);
  await aSession(mirre.id);
  const everyone = await listPeople(db);
  const guest = everyone.find((one) => one.id === id);
  expect(guest).toMatchObject({ hasPassword: false, seenAt: null, invitedUntil: expect.any(Date) });
  expect(guest!.invitedUntil!.getTime() - Date.now()).toBeGreaterThan(47 * 3600_000);
  expect(everyone.find((one) => one.id === mirre.id)).toMatchObject({
    hasPassword: true,
    seenAt: expect.any(Date),
    invitedUntil: null,
  });
});
