import { expect, it } from 'vitest';
import { sql } from 'drizzle-orm';
import { findPersonByEmail } from '@/db/queries/people';
import { verifyPassword } from '@/lib/auth/password';
import { addAdministrator } from '@/lib/people/add-administrator';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

it('makes an administrator who can sign in with the password that is told once', async () => {
  const password = await addAdministrator(db, { email: 'Ada@Example.org', name: 'Ada Lindqvist' });
  const person = await findPersonByEmail(db, 'ada@example.org');
  expect(person).toMatchObject({ email: 'ada@example.org', name: 'Ada Lindqvist', role: 'administrator', demo: false });
  expect(await verifyPassword(person?.passwordHash ?? null, password)).toBe(true);
  const { rows } = await db.execute(sql`select kind from events where subject_id = ${person?.id}`);
  expect(rows).toEqual([{ kind: 'person.added' }]);
});

it('refuses a second account for one address, and leaves no line in the ledger', async () => {
  await addAdministrator(db, { email: 'ben@example.org', name: 'Ben Osei' });
  await expect(addAdministrator(db, { email: 'BEN@example.org', name: 'Ben Again' })).rejects.toMatchObject({
    code: 'conflict',
    message: 'ben@example.org has an account already.',
  });
  const { rows } = await db.execute(sql`select count(*)::int as n from events e join people p on p.id = e.subject_id
    where p.email = 'ben@example.org'`);
  expect(rows).toEqual([{ n: 1 }]);
});

it.each([
  // email              name             what the sentence says
  ['ada.example.org', 'Ada Lindqvist', 'email: accepted: an e-mail address'],
  ['ada@example.org', '   ', 'name: accepted: a name'],
])('refuses the address %s with the name "%s", and says what is accepted', async (email, name, sentence) => {
  await expect(addAdministrator(db, { email, name })).rejects.toThrow(sentence);
});
