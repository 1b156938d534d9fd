/** The parts of a sheet that a remark can be on. */
import type { EntryKind } from '@/lib/entries/entry';

export const REMARK_PARTS = [
  'sheet',
  'naming',
  'definition',
  'readings',
  'bound',
  'curves',
  'kernel',
  'trials',
  'notes',
  'references',
] as const;
export type RemarkPart = (typeof REMARK_PARTS)[number];

export const REMARK_PART_WORDS: Readonly<Record<RemarkPart, string>> = {
  sheet: 'the whole sheet',
  naming: 'name and gist',
  definition: 'definition',
  readings: 'readings',
  bound: 'bound',
  curves: 'curves',
  kernel: 'kernel',
  trials: 'trials',
  notes: 'notes',
  references: 'references',
};

const isRemarkPart = (part: string): part is RemarkPart => (REMARK_PARTS as readonly string[]).includes(part);
/** "kernel, line 4"; a part that the book no longer knows keeps its name. */
export const remarkPlace = (part: string, line: number | null) =>
  `${isRemarkPart(part) ? REMARK_PART_WORDS[part] : part}${line === null ? '' : `, line ${line}`}`;

/** The parts that a revision has now. Without facts there is nothing computed to remark on. */
export function partsToRemarkOn(kind: EntryKind, hasFacts: boolean): RemarkPart[] {
  const computed: RemarkPart[] = !hasFacts
    ? []
    : kind === 'scheme'
      ? ['readings', 'bound', 'curves', 'kernel', 'trials']
      : kind === 'stencil'
        ? ['readings', 'curves', 'kernel', 'trials']
        : ['readings', 'kernel', 'trials'];
  return REMARK_PARTS.filter(
    (part) => computed.includes(part) || ['sheet', 'naming', 'definition', 'notes', 'references'].includes(part),
  );
}
