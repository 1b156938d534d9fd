import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { raiseSessionVersion } from '@/db/queries/people';
import { endSessions } from '@/db/queries/sessions';
import type { Actor } from '@/lib/people/actor';

/** Ends every session of the actor, on every machine, this one too. */
export async function signOutEverywhere(actor: Actor): Promise<void> {
  await db.transaction(async (tx) => {
    await raiseSessionVersion(tx, actor.id);
    await endSessions(tx, actor.id);
    await insertEvent(tx, { kind: 'person.signed-out-everywhere', actorId: actor.id, subjectId: actor.id });
  });
}
