'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { queueTrial } from '@/lib/trials/queue-trial';
import { action } from '@/lib/web/action';

const StartTrialInput = z.object({ revisionId: z.uuid() });

/** Asks for a new trial of a revision's kernels; a worker takes it up. */
export const startTrial = action(StartTrialInput, async (actor, { revisionId }) => {
  const { trialId } = await queueTrial(actor, revisionId);
  revalidatePath('/sheets/[slug]', 'page');
  return { trialId };
});
