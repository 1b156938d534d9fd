import { and, asc, eq, isNotNull, isNull, sql } from 'drizzle-orm';
import type { LetterWish } from '@/lib/mail/letter';
import type { Role } from '@/lib/people/role';
import type { Database } from '../client';
import { links, people, sessions } from '../schema/people';

const person = {
  id: people.id,
  name: people.name,
  email: people.email,
  role: people.role,
  sessionVersion: people.sessionVersion,
  disabledAt: people.disabledAt,
  demo: people.demo,
};

export async function findPerson(db: Database, id: string) {
  const [row] = await db.select(person).from(people).where(eq(people.id, id));
  return row ?? null;
}

/** With the password hash: for signing in only. */
export async function findPersonByEmail(db: Database, email: string) {
  const [row] = await db
    .select({ ...person, passwordHash: people.passwordHash })
    .from(people)
    .where(eq(people.email, email.trim().toLowerCase()));
  return row ?? null;
}

/** @returns the new person's id; breaks `one_account_per_email` where the address is taken */
export async function insertPerson(tx: Database, row: typeof people.$inferInsert): Promise<string> {
  const [inserted] = await tx.insert(people).values(row).returning({ id: people.id });
  if (!inserted) throw new Error('insertPerson: no row came back');
  return inserted.id;
}

/** Ends every session of a person, this one too. */
export async function raiseSessionVersion(db: Database, id: string) {
  await db
    .update(people)
    .set({ sessionVersion: sql`${people.sessionVersion} + 1` })
    .where(eq(people.id, id));
}

/** The demo's people who can sign in, the highest role last. */
export async function listDemoPeople(db: Database) {
  return db
    .select({ name: people.name, email: people.email, role: people.role })
    .from(people)
    .where(and(eq(people.demo, true), isNull(people.disabledAt)))
    .orderBy(asc(people.role), asc(people.name));
}

/** Everyone, by name, with what the page for administrators says of them. */
export async function listPeople(db: Database) {
  return db
    .select({
      id: people.id,
      name: people.name,
      email: people.email,
      role: people.role,
      disabledAt: people.disabledAt,
      demo: people.demo,
      createdAt: people.createdAt,
      hasPassword: sql<boolean>`${people.passwordHash} is not null`,
      // Written out: in the columns of a single table the name of that table is left out, and `id` would be theirs.
      seenAt: sql`(select max(s.seen_at) from sessions s where s.person_id = people.id)`.mapWith(sessions.seenAt),
      /** Until when an invitation that was sent can be taken up. */
      invitedUntil: sql`(select max(l.expires_at) from links l where l.person_id = people.id
        and l.purpose = 'invitation' and l.ended_at is null)`.mapWith(links.expiresAt),
    })
    .from(people)
    .orderBy(asc(sql`lower(${people.name})`), asc(people.id));
}
export type ListedPerson = Awaited<ReturnType<typeof listPeople>>[number];

/** With what decides on changes to an account. */
export async function findAccount(db: Database, id: string) {
  const [row] = await db
    .select({ ...person, passwordHash: people.passwordHash, letterWish: people.letterWish })
    .from(people)
    .where(eq(people.id, id));
  return row ?? null;
}

/** People who can open the house to others: administrators with a password and an open account. */
export async function countAdministrators(db: Database, countDemo: boolean): Promise<number> {
  return db.$count(
    people,
    and(
      eq(people.role, 'administrator'),
      isNull(people.disabledAt),
      isNotNull(people.passwordHash),
      countDemo ? undefined : eq(people.demo, false),
    ),
  );
}

/** @returns false where the role has changed meanwhile; breaks `an_administrator_stays` */
export async function moveRole(tx: Database, id: string, step: { from: Role; to: Role }): Promise<boolean> {
  const rows = await tx
    .update(people)
    .set({ role: step.to })
    .where(and(eq(people.id, id), eq(people.role, step.from)))
    .returning({ id: people.id });
  return rows.length === 1;
}

/** Closes an open account. @returns false where it is closed already; breaks `an_administrator_stays` */
export async function closeAccountOf(tx: Database, id: string): Promise<boolean> {
  const rows = await tx
    .update(people)
    .set({ disabledAt: sql`now()`, sessionVersion: sql`${people.sessionVersion} + 1` })
    .where(and(eq(people.id, id), isNull(people.disabledAt)))
    .returning({ id: people.id });
  return rows.length === 1;
}

export async function openAccountOf(tx: Database, id: string): Promise<boolean> {
  const rows = await tx
    .update(people)
    .set({ disabledAt: null })
    .where(and(eq(people.id, id), isNotNull(people.disabledAt)))
    .returning({ id: people.id });
  return rows.length === 1;
}

/** @returns false where there is no open account of that id */
export async function setPassword(tx: Database, id: string, passwordHash: string): Promise<boolean> {
  const rows = await tx
    .update(people)
    .set({ passwordHash })
    .where(and(eq(people.id, id), isNull(people.disabledAt)))
    .returning({ id: people.id });
  return rows.length === 1;
}

export async function renamePerson(tx: Database, id: string, name: string) {
  await tx.update(people).set({ name }).where(eq(people.id, id));
}

export async function setLetterWish(db: Database, id: string, letterWish: LetterWish) {
  await db.update(people).set({ letterWish }).where(eq(people.id, id));
}
