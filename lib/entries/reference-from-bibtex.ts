/** References from BibTeX, by a library that needs no network; what the book has no place for is left out. */
import { entries } from 'bibtex-parse';
import { doiOf } from './doi';
import type { Reference } from './entry';

/** More text than this is not read: a reference has a thousand characters. */
const CHARACTERS_MAX = 100_000;

export type BibtexOutcome = { readonly references: Reference[] } | { readonly problem: string };

const ACCENTS: Readonly<Record<string, string>> = {
  '"': '\u0308',
  "'": '\u0301',
  '`': '\u0300',
  '^': '\u0302',
  '~': '\u0303',
  c: '\u0327',
  v: '\u030C',
  '=': '\u0304',
  '.': '\u0307',
};
const LETTERS: Readonly<Record<string, string>> = {
  ss: 'ß',
  o: 'ø',
  O: 'Ø',
  l: 'ł',
  L: 'Ł',
  ae: 'æ',
  AE: 'Æ',
  aa: 'å',
  AA: 'Å',
  i: 'ı',
};

/** Accents and letters of TeX as single characters; done before parsing, since the parser drops the backslashes. */
const withLetters = (text: string): string =>
  text
    .replace(/\{?\\(["'`^~=.])\s*\{?\\?([a-zA-Z])\}?\}?/g, (whole, accent: string, letter: string) =>
      balanced(whole, letter + (ACCENTS[accent] ?? '')),
    )
    .replace(/\{?\\([cv])(?:\{([a-zA-Z])\}|\s+([a-zA-Z]))\}?/g, (whole, accent: string, a?: string, b?: string) =>
      balanced(whole, (a ?? b ?? '') + (ACCENTS[accent] ?? '')),
    )
    .replace(/\{?\\(ss|ae|AE|aa|AA|o|O|l|L|i)(?![a-zA-Z])(?:\{\}|\s)?\}?/g, (whole, name: string) =>
      balanced(whole, LETTERS[name] ?? ''),
    )
    .replace(/\\([&%$#_])/g, '$1')
    .normalize('NFC');

/** Braces that a pattern took too many or too few of are given back, so that those of the entry still match. */
function balanced(whole: string, letter: string): string {
  const open = (whole.match(/\{/g) ?? []).length - (whole.match(/\}/g) ?? []).length;
  return open > 0 ? '{'.repeat(open) + letter : letter + '}'.repeat(-open);
}

/** What is left of TeX in a field as plain text: protected capitals, dashes, ties. */
const plainTex = (text: string): string =>
  text.replace(/[{}]/g, '').replace(/---/g, '—').replace(/--/g, '–').replace(/~/g, ' ').replace(/\s+/g, ' ').trim();

/** "Kreiss, Heinz-Otto and Oliger, Joseph" as "Heinz-Otto Kreiss, Joseph Oliger". */
const authorsOf = (text: string) =>
  text
    .split(/\s+and\s+/)
    .map((name) => {
      const [last = '', ...first] = plainTex(name).split(/\s*,\s*/);
      return first.length === 0 ? last : `${first.at(-1)} ${last}`;
    })
    .filter(Boolean)
    .join(', ');

/** "Tellus 24(3), 199–215", or the publisher. */
function sourceOf(field: (name: string) => string): string {
  const journal = field('JOURNAL') || field('BOOKTITLE');
  const volume = `${field('VOLUME')}${field('NUMBER') && `(${field('NUMBER')})`}`;
  const pages = field('PAGES').replace(/\s*[-–—]+\s*/, '–');
  if (journal) return `${journal}${volume && ` ${volume}`}${pages && `, ${pages}`}`;
  return [field('PUBLISHER') || field('INSTITUTION') || field('SCHOOL') || field('HOWPUBLISHED'), field('ADDRESS')]
    .filter(Boolean)
    .join(', ');
}

/** Reads one or more entries. @returns the references in order, or what is wrong and what is accepted */
export function referencesFromBibtex(text: string): BibtexOutcome {
  if (text.length > CHARACTERS_MAX)
    return { problem: `${text.length} characters are too many; accepted: BibTeX of at most ${CHARACTERS_MAX}` };
  const accepted = 'accepted: entries such as @article{key, author = {…}, title = {…}, year = {1972}}';
  let parsed: Record<string, unknown>[];
  try {
    parsed = entries(withLetters(text));
  } catch (error) {
    const line = /line (\d+)/i.exec(error instanceof Error ? error.message : '')?.[1];
    return { problem: `${line ? `line ${line}: ` : ''}this is not BibTeX; ${accepted}` };
  }
  if (parsed.length === 0) return { problem: `there is no entry in this; ${accepted}` };
  const references: Reference[] = [];
  for (const [k, entry] of parsed.entries()) {
    const raw = (name: string) => (entry[name] === undefined ? '' : String(entry[name]));
    const field = (name: string) => plainTex(raw(name));
    const year = Number(/\d{4}/.exec(field('YEAR') || field('DATE'))?.[0]);
    const authors = authorsOf(raw('AUTHOR') || raw('EDITOR'));
    const missing = [authors === '' && 'an author', field('TITLE') === '' && 'a title', !year && 'a year'].filter(
      Boolean,
    );
    if (missing.length > 0) return { problem: `entry ${k + 1} lacks ${missing.join(' and ')}; ${accepted}` };
    references.push({
      authors: authors.slice(0, 300),
      title: field('TITLE').slice(0, 400),
      source: sourceOf(field).slice(0, 300),
      year,
      doi: doiOf(raw('DOI') || raw('URL')),
      note: null,
    });
  }
  return { references };
}
