import { z } from 'zod';
import { db } from '@/db/client';
import { findSheet } from '@/db/queries/entries';
import { KERNEL_LANGUAGES, KernelOptions } from '@/lib/codegen/kernel-request';
import { Refusal } from '@/lib/refusal';
import { problem } from '@/lib/web/problem';
import { route } from '@/lib/web/route';
import { shownKernel } from '../../_components/shown-kernel';

const Wish = KernelOptions.extend({ language: z.enum(KERNEL_LANGUAGES) });

/** A kernel marked up for the sheet, for the language and options that the reader turns to. */
export const GET = route<{ slug: string; revision: string }>(async ({ actor, url, params }) => {
  const wish = Wish.safeParse(Object.fromEntries(url.searchParams));
  if (!wish.success) return problem('invalid', z.prettifyError(wish.error));
  const sheet = await findSheet(db, actor, params.slug, Number(params.revision));
  if (!sheet)
    throw new Refusal('not-found', `There is no revision ${params.revision} of ${params.slug} that you may see.`);
  const { language, ...options } = wish.data;
  return Response.json(await shownKernel(actor, sheet, { language, options }), {
    headers: { 'Cache-Control': 'private, no-cache' },
  });
});
