import 'server-only';
import { createHash } from 'node:crypto';
import { db } from '@/db/client';
import { countAttachments, insertAttachment } from '@/db/queries/attachments';
import { insertEvent } from '@/db/queries/house';
import { findReview } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { refuseBrokenRule } from '@/lib/reviews/refuse-broken-rule';
import { editingObstacle } from '@/lib/reviews/review-rules';
import { ACCEPTED, ATTACHMENT_BYTES_MAX, ATTACHMENTS_MAX, safeFileName } from './attachment';
import { fileTypeOf } from './file-type-of';

/** Why `actor` may not add to this revision, asked before a body is read. */
export async function refuseUnlessAttachable(actor: Actor, revisionId: string): Promise<void> {
  const draft = await findReview(db, revisionId);
  if (!draft) throw new Refusal('not-found', 'There is no such revision.');
  const obstacle = editingObstacle(actor, draft);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  if ((await countAttachments(db, revisionId)) >= ATTACHMENTS_MAX)
    throw new Refusal('invalid', `This revision has ${ATTACHMENTS_MAX} attachments already, which is the most.`);
}

/**
 * Keeps a file with a draft. Its type is told from its bytes.
 * @throws {Refusal} invalid: empty, too large, or of a type that is not accepted
 */
export async function attachFile(actor: Actor, revisionId: string, file: { name: string; bytes: Buffer }) {
  await refuseUnlessAttachable(actor, revisionId);
  const { bytes } = file;
  const name = safeFileName(file.name);
  if (bytes.length === 0) throw new Refusal('invalid', `${name} is empty; ${ACCEPTED}.`);
  if (bytes.length > ATTACHMENT_BYTES_MAX) throw new Refusal('invalid', `${name} is larger than 10 MB; ${ACCEPTED}.`);
  const type = await fileTypeOf(bytes);
  if (!type) throw new Refusal('invalid', `${name} is none of these by its content; ${ACCEPTED}.`);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  return refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      const size = bytes.length;
      const id = await insertAttachment(tx, { revisionId, name, type, size, sha256, bytes, addedById: actor.id });
      await insertEvent(tx, {
        kind: 'attachment.added',
        actorId: actor.id,
        subjectId: revisionId,
        data: { name, type, size, sha256 },
      });
      return { id, name, type };
    }),
  );
}
