'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { sendAgain } from '@/lib/mail/send-again';
import { action } from '@/lib/web/action';

const againAction = action(z.object({ letterId: z.uuid().optional() }), async (actor, { letterId }) => {
  const count = await sendAgain(actor, letterId ?? null);
  revalidatePath('/outbox');
  return { count };
});

/** One letter by `letterId`, or every letter that was given up. */
export const sendLetterAgain = async (form: FormData) => againAction(form);
