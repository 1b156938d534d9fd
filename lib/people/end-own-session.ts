import 'server-only';
import { db } from '@/db/client';
import { endSession } from '@/db/queries/sessions';
import { Refusal } from '@/lib/refusal';
import type { Actor } from './actor';

/** Ends one of the actor's sessions, in whatever browser it is. @throws {Refusal} not-found where it is none of theirs */
export async function endOwnSession(actor: Actor, sessionId: string): Promise<void> {
  if (!(await endSession(db, actor.id, sessionId))) throw new Refusal('not-found', 'This session has ended already.');
}
