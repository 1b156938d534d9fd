import 'server-only';
import { getServerSession } from 'next-auth';
import { cache } from 'react';
import { db } from '@/db/client';
import { isDatabaseAway } from '@/db/errors';
import { findPerson } from '@/db/queries/people';
import { touchSession } from '@/db/queries/sessions';
import { env } from '@/lib/env';
import type { Actor } from '@/lib/people/actor';
import { DatabaseAway } from '@/lib/web/database-away';
import { actorOfSession } from './actor-of-session';
import { authOptions } from './auth-options';

/**
 * Who is asking, and in which session, as the database says now: a role taken away or a session ended counts from
 * the next request. Asked once per request.
 * @returns null where nobody is signed in
 * @throws {DatabaseAway} where the database does not answer
 */
export const currentSession = cache(async (): Promise<{ actor: Actor; sessionId: string } | null> => {
  const session = await getServerSession(authOptions());
  const { personId, sessionId } = session?.claim ?? {};
  if (!session || !personId || !sessionId) return null;
  try {
    const actor = actorOfSession(session.claim, await findPerson(db, personId), env().LEVELBOOK_DEMO);
    return actor && (await touchSession(db, sessionId, personId)) ? { actor, sessionId } : null;
  } catch (error) {
    if (isDatabaseAway(error)) throw new DatabaseAway(error);
    throw error;
  }
});

/** Who is asking; null where nobody is signed in. @throws {DatabaseAway} where the database does not answer */
export const currentActor = async (): Promise<Actor | null> => (await currentSession())?.actor ?? null;
