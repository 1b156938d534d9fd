import 'server-only';
import type { Database } from '@/db/client';
import { countAdministrators, findAccount } from '@/db/queries/people';
import { env } from '@/lib/env';
import { Refusal } from '@/lib/refusal';
import type { Account } from './account-rules';

/** An account with what its rules ask for. @throws {Refusal} not-found */
export async function loadAccount(db: Database, personId: string): Promise<Account & { demo: boolean }> {
  const found = await findAccount(db, personId);
  if (!found) throw new Refusal('not-found', 'There is no such person.');
  return {
    id: found.id,
    name: found.name,
    role: found.role,
    demo: found.demo,
    isClosed: found.disabledAt !== null,
    hasPassword: found.passwordHash !== null,
    // Outside demo mode the demo's administrators cannot sign in, and keep no house.
    administrators: await countAdministrators(db, env().LEVELBOOK_DEMO),
  };
}

export const changedMeanwhile = () =>
  new Refusal('conflict', 'This account changed while you were reading it. Look again, then decide.');
