import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { sendLettersAgain } from '@/db/queries/letters';
import { administrationObstacle } from '@/lib/people/account-rules';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';

/**
 * Lets a letter that was given up wait again, with all its tries; without an id, every one of them.
 * @returns how many wait again
 * @throws {Refusal} not-allowed; conflict where there is none
 */
export async function sendAgain(actor: Actor, letterId: string | null): Promise<number> {
  if (administrationObstacle(actor)) throw new Refusal('not-allowed', 'Only an administrator sends letters again.');
  return db.transaction(async (tx) => {
    const count = await sendLettersAgain(tx, letterId);
    if (count === 0) throw new Refusal('conflict', 'Somebody has sent it again already.');
    await insertEvent(tx, { kind: 'letter.sent-again', actorId: actor.id, subjectId: letterId, data: { count } });
    return count;
  });
}
