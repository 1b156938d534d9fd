import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { endLinks } from '@/db/queries/links';
import { closeAccountOf, openAccountOf } from '@/db/queries/people';
import { endSessions } from '@/db/queries/sessions';
import { Refusal } from '@/lib/refusal';
import { closingObstacle, openingObstacle } from './account-rules';
import type { Actor } from './actor';
import { changedMeanwhile, loadAccount } from './load-account';
import { refuseTaken } from './refuse-taken';

/** Closes an account: its sessions and links end at once. What the person wrote stays. */
export async function closeAccount(actor: Actor, personId: string, reason: string): Promise<void> {
  const obstacle = closingObstacle(actor, await loadAccount(db, personId));
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  await refuseTaken(() =>
    db.transaction(async (tx) => {
      if (!(await closeAccountOf(tx, personId))) throw changedMeanwhile();
      await endSessions(tx, personId);
      await endLinks(tx, personId);
      await insertEvent(tx, { kind: 'person.disabled', actorId: actor.id, subjectId: personId, reason });
    }),
  );
}

/** Opens a closed account again, with the role and password that it had. */
export async function openAccount(actor: Actor, personId: string, reason: string): Promise<void> {
  const obstacle = openingObstacle(actor, await loadAccount(db, personId));
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  await db.transaction(async (tx) => {
    if (!(await openAccountOf(tx, personId))) throw changedMeanwhile();
    await insertEvent(tx, { kind: 'person.opened', actorId: actor.id, subjectId: personId, reason });
  });
}
