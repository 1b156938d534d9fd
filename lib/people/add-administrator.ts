import 'server-only';
import { randomBytes } from 'node:crypto';
import { z } from 'zod';
import type { Database } from '@/db/client';
import { brokenRule } from '@/db/errors';
import { insertEvent } from '@/db/queries/house';
import { insertPerson } from '@/db/queries/people';
import { hashPassword } from '@/lib/auth/password';
import { Refusal } from '@/lib/refusal';

const NewAdministrator = z.object({
  email: z.email('accepted: an e-mail address such as ada@example.org').transform((text) => text.toLowerCase()),
  name: z
    .string()
    .trim()
    .min(1, 'accepted: a name such as "Ada Lindqvist"')
    .max(120, 'accepted: at most 120 characters'),
});

/**
 * Gives a house its first administrator, who invites everyone else. The house itself acts: whoever can reach
 * its database may.
 * @returns the password, made here and stored nowhere in clear
 * @throws {Refusal} `invalid` for an address or name that is none, `conflict` where the address has an account
 */
export async function addAdministrator(db: Database, input: { email: string; name: string }): Promise<string> {
  const parsed = NewAdministrator.safeParse(input);
  if (!parsed.success) {
    throw new Refusal(
      'invalid',
      parsed.error.issues.map((issue) => `${issue.path.join('.')}: ${issue.message}`).join('; '),
    );
  }
  const password = randomBytes(15).toString('base64url');
  const passwordHash = await hashPassword(password);
  try {
    await db.transaction(async (tx) => {
      const id = await insertPerson(tx, { ...parsed.data, role: 'administrator', passwordHash });
      await insertEvent(tx, { kind: 'person.added', actorId: null, subjectId: id, data: { role: 'administrator' } });
    });
  } catch (error) {
    if (brokenRule(error) !== 'one_account_per_email') throw error;
    throw new Refusal('conflict', `${parsed.data.email} has an account already.`);
  }
  return password;
}
