import 'server-only';
import { getServerSession } from 'next-auth';
import { cache } from 'react';
import { db } from '@/db/client';
import { isDatabaseAway } from '@/db/errors';
import { findPerson } from '@/db/queries/people';
import { env } from '@/lib/env';
import type { Actor } from '@/lib/people/actor';
import { DatabaseAway } from '@/lib/web/database-away';
import { actorOfSession } from './actor-of-session';
import { authOptions } from './auth-options';

/**
 * Who is asking, as the database says now: a role taken away or a session ended counts from the next request.
 * Asked once per request.
 * @returns null where nobody is signed in
 * @throws {DatabaseAway} where the database does not answer
 */
export const currentActor = cache(async (): Promise<Actor | null> => {
  const session = await getServerSession(authOptions());
  if (!session?.claim.personId) return null;
  try {
    return actorOfSession(session.claim, await findPerson(db, session.claim.personId), env().LEVELBOOK_DEMO);
  } catch (error) {
    if (isDatabaseAway(error)) throw new DatabaseAway(error);
    throw error;
  }
});
