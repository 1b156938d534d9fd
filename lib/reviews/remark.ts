/** Remarks as they are shown: threads of a remark and its answers. */
import type { KernelLanguage } from '@/lib/codegen/kernel-request';

export interface Remark {
  id: string;
  authorId: string;
  author: string;
  role: string;
  /** ISO time. */
  at: string;
  /** null for the first of a thread. */
  answersId: string | null;
  part: string;
  /** Language and number of a line of the kernel, with its text as it stood. */
  language: KernelLanguage | null;
  line: number | null;
  quote: string | null;
  /** Version of the revision's text that was read; 0 where it was not kept. */
  version: number;
  text: string;
  settledAt: string | null;
  settledBy: string | null;
}

export interface RemarkThread extends Remark {
  answers: Remark[];
}

/** In the order in which they were begun; answers in the order in which they came. */
export function threadsOf(remarks: readonly Remark[]): RemarkThread[] {
  const threads = remarks
    .filter(({ answersId }) => answersId === null)
    .map((remark): RemarkThread => ({ ...remark, answers: [] }));
  const byId = new Map(threads.map((thread) => [thread.id, thread]));
  for (const remark of remarks) if (remark.answersId) byId.get(remark.answersId)?.answers.push(remark);
  return threads;
}

/**
 * Where a thread on a line of a kernel stands now: the line with its words that is nearest to where it stood.
 * @param lines of the kernel as it is now
 * @returns the number of the line from 1, or null where those words are gone
 */
export function lineNow({ line, quote }: Pick<Remark, 'line' | 'quote'>, lines: readonly string[]): number | null {
  if (line === null || quote === null) return null;
  const same = lines.flatMap((text, k) => (text.trim() === quote.trim() ? [k + 1] : []));
  return same.reduce<number | null>(
    (best, one) => (best === null || Math.abs(one - line) < Math.abs(best - line) ? one : best),
    null,
  );
}
