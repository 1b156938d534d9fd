import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { moveRole } from '@/db/queries/people';
import { Refusal } from '@/lib/refusal';
import { roleObstacle } from './account-rules';
import type { Actor } from './actor';
import { changedMeanwhile, loadAccount } from './load-account';
import { refuseTaken } from './refuse-taken';
import type { Role } from './role';

/** Gives a person another role; it counts from their next request. `from` is the role that the actor saw. */
export async function changeRole(
  actor: Actor,
  { personId, from, to, reason }: { personId: string; from: Role; to: Role; reason: string },
): Promise<void> {
  const account = await loadAccount(db, personId);
  if (account.role !== from) throw changedMeanwhile();
  const obstacle = roleObstacle(actor, account, to);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  await refuseTaken(() =>
    db.transaction(async (tx) => {
      if (!(await moveRole(tx, personId, { from, to }))) throw changedMeanwhile();
      await insertEvent(tx, {
        kind: 'person.role-changed',
        actorId: actor.id,
        subjectId: personId,
        ...(reason && { reason }),
        data: { from, to },
      });
    }),
  );
}
