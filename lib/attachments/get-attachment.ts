import 'server-only';
import { db } from '@/db/client';
import { findAttachment } from '@/db/queries/attachments';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';

/** A file of a revision that the actor may see, with its bytes. */
export async function getAttachment(actor: Actor, id: string) {
  const attachment = await findAttachment(db, actor, id);
  if (!attachment) throw new Refusal('not-found', 'There is no such attachment.');
  return attachment;
}
