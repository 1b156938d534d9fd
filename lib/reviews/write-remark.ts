import 'server-only';
import { db } from '@/db/client';
import { insertLetters } from '@/db/queries/house';
import { findKernelSubjectById } from '@/db/queries/kernel-subjects';
import { insertRemark } from '@/db/queries/remarks';
import { findVisibleRevision } from '@/db/queries/review-desk';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { type KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import type { RemarkInput } from './remark-input';
import { remarkPlace } from './remark-part';
import { lineObstacle, partObstacle } from './remark-rules';

/** The kernel as it is printed now; no lines where there is none. */
async function kernelLines(revisionId: string, language: KernelLanguage): Promise<string[]> {
  const subject = await findKernelSubjectById(db, revisionId);
  const answer = subject?.input && generateKernel(subject.input, language, KernelOptions.parse({}));
  return answer?.kind === 'kernel' ? answer.kernel.source.replace(/\n$/, '').split('\n') : [];
}

/** A remark on a part of a sheet or a line of its kernel; the author of the revision has a letter. */
export async function writeRemark(actor: Actor, { revisionId, part, at, text }: RemarkInput): Promise<void> {
  const revision = await findVisibleRevision(db, actor, revisionId);
  if (!revision) throw new Refusal('not-found', 'There is no such revision.');
  const gone = partObstacle(part, { kind: revision.kind, hasFacts: revision.verdict === 'facts' });
  if (gone) throw new Refusal('conflict', gone);
  if (at && part !== 'kernel')
    throw new Refusal('invalid', 'Only the kernel has lines.', { at: 'accepted: a line of the kernel' });
  const lineGone = at && lineObstacle(await kernelLines(revisionId, at.language), at.line, at.quote);
  if (lineGone) throw new Refusal('conflict', lineGone, { at: lineGone });

  await db.transaction(async (tx) => {
    const id = await insertRemark(tx, { revisionId, authorId: actor.id, part, at, text });
    if (id === null || revision.authorId === actor.id) return;
    const { slug, number, title } = revision;
    const place = remarkPlace(part, at?.line ?? null);
    await insertLetters(tx, 'remark', [revision.authorId], {
      revisionId,
      slug,
      number,
      title,
      author: actor.name,
      part: place,
      text,
    });
  });
}
