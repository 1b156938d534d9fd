import 'server-only';
import { db } from '@/db/client';
import { deleteAttachment, findAttachmentOwner } from '@/db/queries/attachments';
import { insertEvent } from '@/db/queries/house';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { refuseBrokenRule } from '@/lib/reviews/refuse-broken-rule';
import { editingObstacle } from '@/lib/reviews/review-rules';

/** Takes a file off a draft. The ledger keeps its name and fingerprint. */
export async function removeAttachment(actor: Actor, id: string): Promise<void> {
  const owner = await findAttachmentOwner(db, id);
  if (!owner) throw new Refusal('not-found', 'There is no such attachment.');
  const obstacle = editingObstacle(actor, owner);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  await refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      if (!(await deleteAttachment(tx, id))) throw new Refusal('not-found', 'This attachment is gone already.');
      await insertEvent(tx, {
        kind: 'attachment.removed',
        actorId: actor.id,
        subjectId: owner.revisionId,
        data: { name: owner.name },
      });
    }),
  );
}
