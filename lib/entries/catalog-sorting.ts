/** Orders in which the catalog can show its lines. */
import { largestStable } from '@/lib/facts/reading-texts';
import type { CatalogLine } from './entry';

export const SORTINGS = ['number', 'order', 'bound', 'arrays', 'flops'] as const;
export type Sorting = (typeof SORTINGS)[number];

export const parseSorting = (text: string | null): Sorting => SORTINGS.find((sorting) => sorting === text) ?? 'number';

const LAST = Number.MAX_SAFE_INTEGER;
const small = (reading: number | null) => reading ?? LAST;
const large = (reading: number | null) => -(reading ?? -LAST);

/** Lower comes first. */
const KEYS: Readonly<Record<Exclude<Sorting, 'number'>, (line: CatalogLine) => number>> = {
  order: ({ summary }) => large(Math.min(summary.orderTime ?? LAST, summary.orderSpace ?? LAST)),
  bound: ({ summary }) => -(summary.verdict === null ? -1 : (largestStable(summary) ?? LAST)),
  arrays: ({ summary }) => small(summary.arrays),
  flops: ({ summary }) => small(summary.operations),
};

const byNumber = (a: CatalogLine, b: CatalogLine) => a.callNumber.localeCompare(b.callNumber);

/** A sorted copy; lines that read the same keep the order of their call numbers. */
export function sortLines(lines: readonly CatalogLine[], sorting: Sorting): CatalogLine[] {
  if (sorting === 'number') return lines.toSorted(byNumber);
  const key = KEYS[sorting];
  return lines.toSorted((a, b) => key(a) - key(b) || byNumber(a, b));
}
