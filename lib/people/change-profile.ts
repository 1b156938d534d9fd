import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { renamePerson, setLetterWish } from '@/db/queries/people';
import type { LetterWish } from '@/lib/mail/letter';
import type { Actor } from './actor';

/** The actor's own name, and when letters come. A new name is a line of the ledger: signatures bear it. */
export async function changeProfile(actor: Actor, { name, letterWish }: { name: string; letterWish: LetterWish }) {
  await db.transaction(async (tx) => {
    await setLetterWish(tx, actor.id, letterWish);
    if (name === actor.name) return;
    await renamePerson(tx, actor.id, name);
    await insertEvent(tx, {
      kind: 'person.renamed',
      actorId: actor.id,
      subjectId: actor.id,
      data: { from: actor.name, to: name },
    });
  });
}
