import 'server-only';
import { db } from '@/db/client';
import { insertEvent, insertLetters } from '@/db/queries/house';
import { endLinks } from '@/db/queries/links';
import { insertPerson } from '@/db/queries/people';
import { Refusal } from '@/lib/refusal';
import { administrationObstacle, secondInvitationObstacle } from './account-rules';
import type { Actor } from './actor';
import { loadAccount } from './load-account';
import type { Invitation } from './person-input';
import { refuseTaken } from './refuse-taken';

/**
 * Makes an account without a password and writes to its address: account, ledger and letter together.
 * @returns the new person's id
 * @throws {Refusal} not-allowed; conflict where the address has an account
 */
export async function invite(actor: Actor, { name, email, role }: Invitation): Promise<string> {
  const obstacle = administrationObstacle(actor);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  return refuseTaken(() =>
    db.transaction(async (tx) => {
      const id = await insertPerson(tx, { name, email, role });
      await insertEvent(tx, { kind: 'person.invited', actorId: actor.id, subjectId: id, data: { role } });
      await insertLetters(tx, 'invitation', [id], { by: actor.name, role });
      return id;
    }),
  );
}

/** Writes once more to somebody who has not taken up an invitation; the links of earlier letters end. */
export async function inviteAgain(actor: Actor, personId: string): Promise<void> {
  await db.transaction(async (tx) => {
    const account = await loadAccount(tx, personId);
    const obstacle = secondInvitationObstacle(actor, account);
    if (obstacle) throw new Refusal('not-allowed', obstacle);
    await endLinks(tx, personId, 'invitation');
    await insertEvent(tx, {
      kind: 'person.invited',
      actorId: actor.id,
      subjectId: personId,
      data: { role: account.role, again: true },
    });
    await insertLetters(tx, 'invitation', [personId], { by: actor.name, role: account.role });
  });
}
