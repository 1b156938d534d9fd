import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { cache } from 'react';
import { z } from 'zod';
import { db } from '@/db/client';
import { listAttachments } from '@/db/queries/attachments';
import { findDraft, listBuildingBlocks } from '@/db/queries/drafts';
import { findLatestTrial } from '@/db/queries/latest-trial';
import { currentActor } from '@/lib/auth/current-actor';
import { requireActor } from '@/lib/auth/require-actor';
import { editingObstacle } from '@/lib/reviews/review-rules';
import { DraftDesk } from './_components/draft-desk';

interface DraftPageProps {
  params: Promise<{ id: string }>;
}

const readDraft = cache(async (id: string) => {
  const actor = await currentActor();
  return actor && z.uuid().safeParse(id).success ? findDraft(db, actor, id) : null;
});

export async function generateMetadata({ params }: DraftPageProps): Promise<Metadata> {
  const draft = await readDraft((await params).id);
  return { title: draft ? `${draft.callNumber} ${draft.content.title}, draft` : 'Nothing here' };
}

/** One draft on the table. */
export default async function DraftPage({ params }: DraftPageProps) {
  const actor = await requireActor('contributor');
  const { id } = await params;
  const draft = await readDraft(id);
  if (!draft) notFound();
  const [blocks, attachments, latestTrial] = await Promise.all([
    draft.content.definition.kind === 'scheme' && draft.content.definition.form === 'lines'
      ? listBuildingBlocks(db)
      : [],
    listAttachments(db, id),
    findLatestTrial(db, id),
  ]);
  return (
    <DraftDesk
      key={draft.id}
      draft={draft}
      blocks={blocks}
      attachments={attachments}
      latestTrial={latestTrial}
      obstacle={editingObstacle(actor, draft)}
      isAuthor={actor.id === draft.authorId}
    />
  );
}
