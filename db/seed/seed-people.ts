import { hashPassword } from '@/lib/auth/password';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '@/lib/people/demo-people';
import { db } from '../client';
import { findPersonByEmail, insertPerson } from '../queries/people';

/** The demo's people who are missing; a person who is there keeps role, password and state. */
export async function seedPeople(): Promise<number> {
  let added = 0;
  for (const { name, email, role } of DEMO_PEOPLE) {
    if (await findPersonByEmail(db, email)) continue;
    await insertPerson(db, { name, email, role, demo: true, passwordHash: await hashPassword(DEMO_PASSWORD) });
    added += 1;
  }
  return added;
}
