import 'server-only';
import { db } from '@/db/client';
import { findKernelSubject } from '@/db/queries/kernel-subjects';
import { codeLines } from '@/components/code/code-lines';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { type KernelLanguage, KernelOptions } from '@/lib/codegen/kernel-request';
import type { SheetView } from '@/lib/entries/entry';
import type { Actor } from '@/lib/people/actor';

/** A kernel as the sheet shows it; its text is fetched from `address` when it is copied. */
export type ShownKernel =
  | {
      readonly kind: 'kernel';
      readonly language: KernelLanguage;
      readonly options: KernelOptions;
      readonly fileName: string;
      readonly fingerprint: string;
      /** Path and query of the file. */
      readonly address: string;
      /** Marked-up lines. */
      readonly html: string;
      readonly notes: readonly { readonly line: number; readonly text: string }[];
    }
  | { readonly kind: 'none'; readonly language: KernelLanguage; readonly reason: string };

interface KernelWish {
  language: KernelLanguage;
  options?: Partial<KernelOptions>;
}

const addressOf = (sheet: SheetView, fileName: string, options: KernelOptions) => {
  const usual = KernelOptions.parse({});
  const query = new URLSearchParams(
    Object.entries(options).filter(([name, value]) => value !== usual[name as keyof KernelOptions]),
  ).toString();
  return `/kernels/${sheet.slug}/${sheet.revision}/${fileName}${query && `?${query}`}`;
};

/** Prints and marks up one kernel of a sheet, or says why there is none. */
export async function shownKernel(actor: Actor, sheet: SheetView, wish: KernelWish): Promise<ShownKernel> {
  const { language } = wish;
  const options = KernelOptions.parse(wish.options ?? {});
  const subject = await findKernelSubject(db, actor, sheet.slug, sheet.revision);
  if (!subject?.input) {
    return {
      kind: 'none',
      language,
      reason: 'No kernel: the definition has no facts, and a kernel carries them in its header.',
    };
  }
  const answer = generateKernel(subject.input, language, options);
  if (answer.kind === 'none') return { kind: 'none', language, reason: answer.reason };
  const { fileName, fingerprint, source, notes } = answer.kernel;
  return {
    kind: 'kernel',
    language,
    options,
    fileName,
    fingerprint,
    address: addressOf(sheet, fileName, options),
    html: await codeLines(source, language),
    notes,
  };
}
