/** What can be asked of the generator, and what it answers. */
import { z } from 'zod';
import type { Definition } from '@/lib/entries/definition';
import type { Facts } from '@/lib/facts/facts';

export const KERNEL_LANGUAGES = ['c', 'fortran', 'python'] as const;
export type KernelLanguage = (typeof KERNEL_LANGUAGES)[number];

/** Options that are offered today; each later one is a member of its list. */
export const KernelOptions = z.object({
  precision: z.enum(['double']).default('double'),
  /** periodic: the kernel carries the ghost-cell fill; caller: ghost cells are the caller's business. */
  boundary: z.enum(['periodic', 'caller']).default('periodic'),
});
export type KernelOptions = z.infer<typeof KernelOptions>;

/** All that a kernel's text depends on. */
export interface KernelInput {
  readonly callNumber: string;
  readonly slug: string;
  readonly title: string;
  readonly revision: number;
  readonly definition: Definition;
  readonly facts: Facts;
  /** One line each, for the header. */
  readonly references: readonly string[];
}

export interface GeneratedKernel {
  readonly language: KernelLanguage;
  readonly options: KernelOptions;
  /** "lb_ad003.c", "lb_ad003.f90", "lb_ad003.py" */
  readonly fileName: string;
  readonly source: string;
  /** levelbook:<entry>/<revision>/<language>/<options>:<sha256> */
  readonly fingerprint: string;
  /** Notes for the page's margin, each level with a line of the source (1-based). */
  readonly notes: readonly { readonly line: number; readonly text: string }[];
}

export type KernelAnswer =
  { readonly kind: 'kernel'; readonly kernel: GeneratedKernel } | { readonly kind: 'none'; readonly reason: string };
