import 'server-only';
import { db } from '@/db/client';
import { insertLetters } from '@/db/queries/house';
import { findThread, insertRemark, listThreadAuthorIds } from '@/db/queries/remarks';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { remarkPlace } from './remark-part';

/** An answer in a thread; all others in it, and the author of the revision, have a letter. */
export async function answerRemark(actor: Actor, remarkId: string, text: string): Promise<void> {
  const thread = await findThread(db, actor, remarkId);
  if (!thread || thread.answersId !== null) throw new Refusal('not-found', 'There is no such remark.');
  const { revisionId, slug, number, title, part } = thread;
  await db.transaction(async (tx) => {
    const id = await insertRemark(tx, { revisionId, authorId: actor.id, part, text, answersId: remarkId });
    if (id === null) return;
    const told = [thread.revisionAuthorId, ...(await listThreadAuthorIds(tx, remarkId))];
    await insertLetters(
      tx,
      'remark',
      told.filter((person) => person !== actor.id),
      { revisionId, slug, number, title, author: actor.name, part: remarkPlace(part, null), text },
    );
  });
}
