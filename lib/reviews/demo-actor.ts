import 'server-only';
import { db } from '@/db/client';
import { findPersonByEmail } from '@/db/queries/people';
import type { Actor } from '@/lib/people/actor';
import type { DemoEmail } from '@/lib/people/demo-people';

/** @throws {Error} where the person is not in this database, or not of the demo */
export async function demoActor(email: DemoEmail): Promise<Actor> {
  const person = await findPersonByEmail(db, email);
  if (!person?.demo) throw new Error(`demoActor: ${email} is not a person of the demo`);
  return { id: person.id, name: person.name, email: person.email, role: person.role };
}
