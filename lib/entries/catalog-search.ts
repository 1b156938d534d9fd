/** Looking for a line by names, usual wordings, people, numbers, with typing errors forgiven. */
import Fuse from 'fuse.js';
import type { CatalogLine } from './entry';

interface Searched {
  line: CatalogLine;
  callNumber: string;
  names: string[];
  gist: string;
  authors: string[];
  equation: string;
}

/** One spelling for "Leap-frog", "leap frog" and "leapfrog", "Padé" and "pade". */
const plain = (text: string) =>
  text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase().replace(/[–—-]/g, ' ').trim();
const joined = (text: string) => plain(text).replace(/\s+/g, '');

/** "ad003" and "ad3" are one number. */
const withoutZeros = (callNumber: string) => callNumber.replace(/^([a-z]{2})0+(?=\d)/, '$1');

const searchedOf = (line: CatalogLine): Searched => ({
  line,
  callNumber: joined(line.callNumber),
  names: [line.title, ...line.synonyms].map(plain),
  gist: plain(line.gist),
  authors: line.authors.map(plain),
  equation: plain(line.equation ?? line.kind),
});

/**
 * A search over lines, best first.
 * @returns a function of the asked text; the empty text gives all lines as they came
 */
export function catalogSearch(lines: readonly CatalogLine[]): (asked: string) => readonly CatalogLine[] {
  const searched = lines.map(searchedOf);
  const fuse = new Fuse(searched, {
    keys: [
      { name: 'names', weight: 5 },
      { name: 'callNumber', weight: 4 },
      { name: 'authors', weight: 2 },
      { name: 'equation', weight: 1.5 },
      { name: 'gist', weight: 1 },
    ],
    threshold: 0.34,
    ignoreLocation: true,
    includeScore: true,
    minMatchCharLength: 2,
  });

  return (asked) => {
    const wanted = plain(asked);
    if (wanted === '') return lines;
    const whole = joined(asked);
    const numbered = searched.filter(({ callNumber }) => withoutZeros(callNumber) === withoutZeros(whole));
    if (numbered.length > 0) return numbered.map(({ line }) => line);
    // A name that holds the text with its spaces and hyphens closed up is what was meant; the fuzzy matches follow.
    const exact = searched.filter(
      ({ names, callNumber, authors }) =>
        callNumber.includes(whole) || [...names, ...authors].some((name) => joined(name).includes(whole)),
    );
    const startsFirst = (one: Searched) => (one.names.some((name) => joined(name).startsWith(whole)) ? 0 : 1);
    exact.sort((a, b) => startsFirst(a) - startsFirst(b));
    if (exact.length > 0) return exact.map(({ line }) => line);

    const words = wanted.split(/\s+/).filter((word) => word.length > 1);
    const found = fuse.search({ $and: words.map((word) => ({ $or: anyField(word) })) });
    return found.map(({ item }) => item.line);
  };
}

const FIELDS = ['names', 'callNumber', 'authors', 'equation', 'gist'] as const;
const anyField = (word: string) => FIELDS.map((field) => ({ [field]: word }));
