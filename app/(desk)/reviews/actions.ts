'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { answerRemark } from '@/lib/reviews/answer-remark';
import { AnswerInput, RemarkId, RemarkInput } from '@/lib/reviews/remark-input';
import { returnRevision } from '@/lib/reviews/return-revision';
import { reopenRemark, settleRemark } from '@/lib/reviews/settle-remark';
import { signAndVet } from '@/lib/reviews/sign-and-vet';
import { withdrawRevision } from '@/lib/reviews/withdraw-revision';
import { writeRemark } from '@/lib/reviews/write-remark';
import { action } from '@/lib/web/action';

const Decision = z.object({ revisionId: z.uuid(), seen: z.string().max(80), sentence: z.string().max(5000) });
const SigningInput = Decision.extend({ points: z.array(z.string().max(40)).max(20) });

/** A maintainer's signature; the last one needed puts the revision in force. */
export const sign = action(SigningInput, async (actor, { revisionId, ...input }) => {
  const { vetted } = await signAndVet(actor, revisionId, input);
  revalidatePath('/', 'layout');
  return { vetted };
});

export const sendBack = action(Decision, async (actor, { revisionId, sentence, seen }) => {
  await returnRevision(actor, revisionId, sentence, seen);
  revalidatePath('/', 'layout');
});

export const withdraw = action(
  Decision.extend({ useInstead: z.string().trim().max(80).nullable() }),
  async (actor, { revisionId, sentence, seen, useInstead }) => {
    await withdrawRevision(actor, revisionId, { reason: sentence, useInstead: useInstead || null, seen });
    revalidatePath('/', 'layout');
  },
);

export const remark = action(RemarkInput, writeRemark);
export const answer = action(AnswerInput, (actor, { remarkId, text }) => answerRemark(actor, remarkId, text));
export const settle = action(RemarkId, (actor, { remarkId }) => settleRemark(actor, remarkId));
export const reopen = action(RemarkId, (actor, { remarkId }) => reopenRemark(actor, remarkId));
