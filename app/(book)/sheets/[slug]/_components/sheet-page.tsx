import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { cache } from 'react';
import { db } from '@/db/client';
import { listAttachments } from '@/db/queries/attachments';
import { findSheet } from '@/db/queries/entries';
import { currentActor } from '@/lib/auth/current-actor';
import { requireActor } from '@/lib/auth/require-actor';
import { env } from '@/lib/env';
import { SheetBody } from './sheet-body';
import { shownKernel } from './shown-kernel';

/** Asked once per request, for the title and for the page. */
const readSheet = cache(async (slug: string, revision?: number) => {
  const actor = await currentActor();
  return actor && findSheet(db, actor, slug, revision);
});

export async function sheetMetadata(slug: string, revision?: number): Promise<Metadata> {
  const sheet = await readSheet(slug, revision);
  return { title: sheet ? `${sheet.callNumber} ${sheet.title}` : 'Nothing here' };
}

/** A sheet for this reader; "nothing here" where there is none, or none that they may see. */
export async function SheetPage({ slug, revision }: { slug: string; revision?: number }) {
  const actor = await requireActor();
  const sheet = await readSheet(slug, revision);
  if (!sheet) notFound();
  const [kernel, attachments] = await Promise.all([
    shownKernel(actor, sheet, { language: 'c' }),
    listAttachments(db, sheet.revisionId),
  ]);
  return (
    <SheetBody
      actor={actor}
      sheet={sheet}
      kernel={kernel}
      attachments={attachments}
      origin={env().NEXTAUTH_URL.replace(/\/$/, '')}
    />
  );
}
