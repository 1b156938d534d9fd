import 'server-only';
import { db } from '@/db/client';
import { countWaitingFor } from '@/db/queries/review-desk';
import type { Actor } from '@/lib/people/actor';
import { includesRole } from '@/lib/people/role';

/** How many things wait for this person at each tool of the head, by its address. */
export async function countWaiting(actor: Actor): Promise<Readonly<Record<string, number>>> {
  if (!includesRole(actor.role, 'maintainer')) return {};
  return { '/reviews': await countWaitingFor(db, actor.id) };
}
