import type { Reference } from './entry';

/** Surnames of the authors of references, for the search: "H. O. Kreiss, J. Oliger" gives Kreiss and Oliger. */
export function authorSurnames(references: readonly Pick<Reference, 'authors'>[]): string[] {
  const surnames = references.flatMap(({ authors }) =>
    authors
      .split(/,|;|&|\band\b/)
      // Initials end in a full stop, also joined ones such as J.-L.
      .map((name) =>
        name
          .trim()
          .split(/\s+/)
          .filter((word) => !word.includes('.'))
          .join(' '),
      )
      .filter((surname) => surname !== '' && surname !== 'et al'),
  );
  return [...new Set(surnames)];
}
