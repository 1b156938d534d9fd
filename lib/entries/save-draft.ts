import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findReview, saveContent } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { changedMeanwhile, refuseBrokenRule } from '@/lib/reviews/refuse-broken-rule';
import { editingObstacle } from '@/lib/reviews/review-rules';
import { analyseContent } from './analyse-content';
import { callLettersOf, formatCallNumber } from './call-number';
import type { DraftContent } from './draft-content';

/**
 * Keeps new text of a draft, with its facts.
 * @param version the version that the writer started from
 * @returns the version now, to be sent with the next save
 * @throws {Refusal} conflict where somebody else saved, submitted or decided meanwhile; nothing is overwritten
 */
export async function saveDraft(actor: Actor, revisionId: string, version: number, content: DraftContent) {
  const draft = await findReview(db, revisionId);
  if (!draft) throw new Refusal('not-found', 'There is no such revision.');
  const obstacle = editingObstacle(actor, draft);
  if (obstacle) throw new Refusal('not-allowed', obstacle);
  if (callLettersOf(content.definition) !== draft.letters)
    throw new Refusal('invalid', `This draft is booked under ${draft.letters}.`, {
      definition: `accepted: a definition that is booked under ${draft.letters}`,
    });

  const analysed = analyseContent(content, formatCallNumber(draft.letters, draft.entryNumber), draft.slug);
  return refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      const saved = await saveContent(tx, revisionId, version, analysed);
      if (saved === null) throw changedMeanwhile();
      // Saving the same again changes nothing, and the ledger tells of changes.
      if (saved !== version)
        await insertEvent(tx, {
          kind: 'draft.saved',
          actorId: actor.id,
          subjectId: revisionId,
          data: { version: saved },
        });
      return saved;
    }),
  );
}
