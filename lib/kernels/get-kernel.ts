import 'server-only';
import { db } from '@/db/client';
import { findKernelSubject } from '@/db/queries/kernel-subjects';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import type { GeneratedKernel } from '@/lib/codegen/kernel-request';
import type { RevisionState } from '@/lib/entries/revision-state';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import type { KernelAddress } from './kernel-address';

export interface KernelFile {
  kernel: GeneratedKernel;
  state: RevisionState;
  /** One sentence where the revision is not in force; whoever serves the file passes it on. */
  warning: string | null;
}

const WARNING: Readonly<Record<RevisionState, string | null>> = {
  draft: 'This revision is a draft; nobody has vetted it.',
  'in-review': 'This revision is in review; it is not vetted yet.',
  returned: 'This revision was returned to its author; it is not vetted.',
  vetted: null,
  superseded: 'This revision is superseded; a later one is in force.',
  withdrawn: 'This revision is withdrawn; its sheet says why. Do not use it in new code.',
};

/**
 * The kernel at an address, for a reader who may see its revision.
 * @throws {Refusal} not-found: no such entry, revision or file name; invalid: no kernel can be printed of it
 */
export async function getKernel(actor: Actor, address: KernelAddress): Promise<KernelFile> {
  const { slug, revision, language, options, fileName } = address;
  const subject = await findKernelSubject(db, actor, slug, revision);
  if (!subject) throw new Refusal('not-found', `There is no revision ${revision} of ${slug} in the book.`);
  if (!subject.input)
    throw new Refusal('invalid', 'This definition has no facts yet, and a kernel carries facts in its header.');
  const answer = generateKernel(subject.input, language, options);
  if (answer.kind === 'none') throw new Refusal('invalid', answer.reason);
  if (answer.kernel.fileName !== fileName)
    throw new Refusal('not-found', `The file is called ${answer.kernel.fileName}, not ${fileName}.`);
  return { kernel: answer.kernel, state: subject.state, warning: WARNING[subject.state] };
}
