import type { Reference } from './entry';

/** A reference in one line, as the header of a kernel carries it. */
export function referenceLine({ authors, title, source, year, doi }: Reference): string {
  const where = source.trim() === '' ? String(year) : `${source}, ${year}`;
  return `${authors}, ${title}, ${where}${doi ? `, doi:${doi}` : ''}`;
}
