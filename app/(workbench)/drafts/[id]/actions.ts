'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { db } from '@/db/client';
import { findDraft } from '@/db/queries/drafts';
import { removeAttachment as remove } from '@/lib/attachments/remove-attachment';
import { DraftContent } from '@/lib/entries/draft-content';
import { saveDraft } from '@/lib/entries/save-draft';
import { Refusal } from '@/lib/refusal';
import { submitRevision } from '@/lib/reviews/submit-revision';
import { takeBackRevision } from '@/lib/reviews/take-back-revision';
import { queueTrial } from '@/lib/trials/queue-trial';
import { action } from '@/lib/web/action';

const OfRevision = z.object({ revisionId: z.uuid() });
const Kept = OfRevision.extend({ version: z.int().positive(), content: DraftContent });

export type KeepAnswer =
  | { kind: 'kept'; version: number }
  /** Somebody else kept text meanwhile: theirs, so that both can be shown. */
  | { kind: 'conflict'; theirs: { version: number; at: string; content: DraftContent } };

/** Keeps the text of a draft as it is being written; nothing of another writer is overwritten. */
export const keepDraft = action(Kept, async (actor, { revisionId, version, content }): Promise<KeepAnswer> => {
  try {
    const kept = await saveDraft(actor, revisionId, version, content);
    revalidatePath(`/drafts/${revisionId}`);
    return { kind: 'kept', version: kept };
  } catch (error) {
    if (!(error instanceof Refusal && error.code === 'conflict')) throw error;
    const now = await findDraft(db, actor, revisionId);
    if (!now || now.version === version) throw error;
    return { kind: 'conflict', theirs: { version: now.version, at: now.updatedAt, content: now.content } };
  }
});

export const sendToReview = action(OfRevision, async (actor, { revisionId }) => {
  await submitRevision(actor, revisionId);
  revalidatePath(`/drafts/${revisionId}`);
});

export const takeBack = action(OfRevision, async (actor, { revisionId }) => {
  await takeBackRevision(actor, revisionId);
  revalidatePath(`/drafts/${revisionId}`);
});

export const startTrial = action(OfRevision, async (actor, { revisionId }) => {
  const { trialId } = await queueTrial(actor, revisionId);
  return { trialId };
});

export const removeAttachment = action(z.object({ id: z.uuid(), revisionId: z.uuid() }), async (actor, input) => {
  await remove(actor, input.id);
  revalidatePath(`/drafts/${input.revisionId}`);
});
