/** The readings of two revisions, reading against reading. */
import type { Reading } from '@/lib/facts/readings';

export interface ReadingChange {
  readonly term: string;
  /** Value as plain text; null where the revision has no such reading. */
  readonly was: string | null;
  readonly now: string | null;
  /** What it means, in the new revision, or in the old one where the reading is gone. */
  readonly how: string;
  /** What it meant, where only that is otherwise. */
  readonly howWas: string | null;
}

const valueText = ({ value }: Reading) => (typeof value === 'string' ? value : value.map(({ text }) => text).join(''));

export const isChangedReading = ({ was, now, howWas }: ReadingChange) => was !== now || howWas !== null;

/** Every reading of either revision, in the order of the new one; those that are gone come last. */
export function readingDifference(was: readonly Reading[], now: readonly Reading[]): ReadingChange[] {
  const old = new Map(was.map((reading) => [reading.term, reading]));
  const present = now.map((reading): ReadingChange => {
    const before = old.get(reading.term);
    const [wasText, nowText] = [before ? valueText(before) : null, valueText(reading)];
    const isReworded = wasText === nowText && before?.how !== reading.how;
    return {
      term: reading.term,
      was: wasText,
      now: nowText,
      how: reading.how,
      howWas: isReworded ? (before?.how ?? null) : null,
    };
  });
  const gone = was
    .filter(({ term }) => !now.some((reading) => reading.term === term))
    .map((reading): ReadingChange => ({
      term: reading.term,
      was: valueText(reading),
      now: null,
      how: reading.how,
      howWas: null,
    }));
  return [...present, ...gone];
}
