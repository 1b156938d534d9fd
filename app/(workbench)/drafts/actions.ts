'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { BLANKS } from '@/lib/entries/blank-definition';
import { createDraft } from '@/lib/entries/create-draft';
import { newDraftFrom } from '@/lib/entries/new-draft-from';
import { EQUATIONS } from '@/lib/numerics/equation';
import { action } from '@/lib/web/action';

const Title = z.string().trim().min(1, 'A draft needs a title: its address is made of it.').max(200);
const Slug = z.string().trim().min(1, 'Choose an entry.').max(80);
const Beginning = z.discriminatedUnion('kind', [
  z.object({ kind: z.literal('blank'), blank: z.enum(BLANKS), equation: z.enum(EQUATIONS), title: Title }),
  z.object({ kind: z.literal('next'), slug: Slug }),
  z.object({ kind: z.literal('copy'), slug: Slug, title: Title }),
]);

/** Begins a draft; the form then goes to its table. */
export const beginDraft = action(Beginning, async (actor, beginning) => {
  const { revisionId } = await createDraft(actor, await newDraftFrom(actor, beginning));
  revalidatePath('/drafts');
  return { revisionId };
});
