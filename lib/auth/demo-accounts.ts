import 'server-only';
import { db } from '@/db/client';
import { listDemoPeople } from '@/db/queries/people';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '@/lib/people/demo-people';
import { env } from '@/lib/env';
import type { Role } from '@/lib/people/role';

export interface DemoAccount {
  name: string;
  email: string;
  role: Role;
  comesFor: string;
  password: string;
}

/** The accounts that the sign-in page may show: the demo's, in demo mode; none otherwise. */
export async function demoAccounts(): Promise<DemoAccount[]> {
  if (!env().LEVELBOOK_DEMO) return [];
  const people = await listDemoPeople(db);
  return people.map(({ name, email, role }) => ({
    name,
    email,
    role,
    comesFor: DEMO_PEOPLE.find((person) => person.email === email)?.comesFor ?? '',
    password: DEMO_PASSWORD,
  }));
}
