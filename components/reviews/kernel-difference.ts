/** A kernel held against that of an earlier revision, as a page shows it. */
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
import type { LineChange } from '@/lib/reviews/difference/text-difference';

/** A line; those that both kernels have come marked up. */
export type KernelLine =
  (Extract<LineChange, { kind: 'same' }> & { readonly html: string }) | Exclude<LineChange, { kind: 'same' }>;

export type KernelDifference =
  | {
      readonly kind: 'kernel';
      readonly language: KernelLanguage;
      readonly fileName: string;
      readonly lines: readonly KernelLine[];
    }
  | { readonly kind: 'none'; readonly language: KernelLanguage; readonly reason: string };

/** Number of the line in the new kernel; null where it is gone. */
export const numberOf = (line: KernelLine) => ('now' in line ? line.now : null);

/** The line as it is now. */
export const textNow = (line: KernelLine) =>
  line.kind === 'changed'
    ? line.pieces.map((piece) => (piece.kind === 'same' ? piece.text : piece.now)).join('')
    : line.text;
