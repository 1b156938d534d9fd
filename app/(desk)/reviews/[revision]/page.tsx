import type { Metadata } from 'next';
import { notFound } from 'next/navigation';
import { cache } from 'react';
import { z } from 'zod';
import { db } from '@/db/client';
import { findVisibleRevision } from '@/db/queries/review-desk';
import { currentActor } from '@/lib/auth/current-actor';
import { requireActor } from '@/lib/auth/require-actor';
import { ReviewBody } from './_components/review-body';
import { readReview } from './_components/read-review';

type Props = PageProps<'/reviews/[revision]'>;

const findOnce = cache(async (id: string) => {
  const actor = await currentActor();
  return actor && z.uuid().safeParse(id).success ? findVisibleRevision(db, actor, id) : null;
});

export async function generateMetadata({ params }: Props): Promise<Metadata> {
  const revision = await findOnce((await params).revision);
  return { title: revision ? `Review of ${revision.title}, revision ${revision.number}` : 'Nothing here' };
}

/** One revision on the desk: what it changes, what speaks for it, what is said of it, and the decision. */
export default async function ReviewPage({ params }: Props) {
  const actor = await requireActor('contributor');
  const revision = await findOnce((await params).revision);
  const review = revision && (await readReview(actor, revision));
  if (!review) notFound();
  return <ReviewBody actor={actor} {...review} />;
}
