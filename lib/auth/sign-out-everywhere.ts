import 'server-only';
import { db } from '@/db/client';
import { raiseSessionVersion } from '@/db/queries/people';
import type { Actor } from '@/lib/people/actor';

/** Ends every session of the actor, this one too, from the next request on. */
export async function signOutEverywhere(actor: Actor): Promise<void> {
  await raiseSessionVersion(db, actor.id);
}
