import { and, asc, eq, isNull, sql } from 'drizzle-orm';
import type { Database } from '../client';
import { people } from '../schema/people';

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
