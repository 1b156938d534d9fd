import 'server-only';
import { db } from '@/db/client';
import { findSheet } from '@/db/queries/entries';
import { findSettings } from '@/db/queries/house';
import { findKernelSubject } from '@/db/queries/kernel-subjects';
import { type findVisibleRevision, findComparedWith, listAllSignatures, listDesk } from '@/db/queries/review-desk';
import { findReview, listAdopters } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { kernelDifferences } from '../../_components/kernel-differences';

type Revision = NonNullable<Awaited<ReturnType<typeof findVisibleRevision>>>;

/** All that a review shows of a revision this reader may see; null where it went meanwhile. */
export async function readReview(actor: Actor, revision: Revision) {
  const { id, slug, number, entryId } = revision;
  const compared = await findComparedWith(db, entryId, number);
  const [now, was, review, reviewWas, given, items, settings, subject, subjectWas, adopters] = await Promise.all([
    findSheet(db, actor, slug, number),
    compared && findSheet(db, actor, slug, compared.number),
    findReview(db, id),
    compared && findReview(db, compared.id),
    listAllSignatures(db, id),
    listDesk(db, actor),
    findSettings(db),
    findKernelSubject(db, actor, slug, number),
    compared && findKernelSubject(db, actor, slug, compared.number),
    listAdopters(db, compared?.state === 'vetted' ? compared.id : id),
  ]);
  if (!now || !review) return null;
  const kernels = await kernelDifferences(subjectWas?.input ?? null, subject?.input ?? null);
  const codes = [...new Set(adopters.map(({ code }) => code))].sort();
  return {
    ...{ revision, review, reviewWas, now, was },
    ...{ given, items, kernels, codes },
    signaturesNeeded: settings.signaturesNeeded,
  };
}
export type Review = NonNullable<Awaited<ReturnType<typeof readReview>>>;
