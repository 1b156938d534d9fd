import 'server-only';
import { markedLines } from '@/components/code/code-lines';
import type { KernelDifference, KernelLine } from '@/components/reviews/kernel-difference';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { KERNEL_LANGUAGES, type KernelInput, type KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';
import { lineDifference } from '@/lib/reviews/difference/text-difference';

const OPTIONS = KernelOptions.parse({});

const printed = (input: KernelInput | null, language: KernelLanguage) =>
  input
    ? generateKernel(input, language, OPTIONS)
    : ({ kind: 'none', reason: 'No kernel: the definition has no facts.' } as const);

async function kernelDifference(was: KernelInput | null, now: KernelInput | null, language: KernelLanguage) {
  const after = printed(now, language);
  if (after.kind === 'none') return { kind: 'none', language, reason: after.reason } satisfies KernelDifference;
  const { source, fileName } = after.kernel;
  const before = was && printed(was, language);
  // Where there is none to hold it against, the kernel is shown as it is, and not as added line by line.
  const old = before?.kind === 'kernel' ? before.kernel.source : source;
  const marked = await markedLines(source, language);
  const lines = lineDifference(old, source).map((line): KernelLine =>
    line.kind === 'same' ? { ...line, html: marked[line.now - 1] ?? '' } : line,
  );
  return { kind: 'kernel', language, fileName, lines } satisfies KernelDifference;
}

/** The kernels of two revisions in every language, with the usual options. */
export const kernelDifferences = (was: KernelInput | null, now: KernelInput | null): Promise<KernelDifference[]> =>
  Promise.all(KERNEL_LANGUAGES.map((language) => kernelDifference(was, now, language)));
