/** A reference as a BibTeX entry. */
import type { Reference } from './entry';

const SPECIAL: Readonly<Record<string, string>> = {
  '&': '\\&',
  '%': '\\%',
  $: '\\$',
  '#': '\\#',
  _: '\\_',
  '–': '--',
  '—': '---',
};
const safe = (text: string) => text.replace(/[&%$#_–—]/g, (sign) => SPECIAL[sign] ?? sign);

/** Authors in the book are "H. O. Kreiss, J. Oliger"; BibTeX joins them by "and". */
const authorsOf = (authors: string) =>
  authors
    .split(/\s*(?:,|;|\band\b)\s*/)
    .filter(Boolean)
    .join(' and ');

const surname = (authors: string) => {
  const first = authors.split(/[,;]/)[0]?.trim() ?? '';
  const last = first.split(/\s+/).at(-1) ?? '';
  return (
    last
      .normalize('NFD')
      .replace(/[^A-Za-z]/g, '')
      .toLowerCase() || 'anon'
  );
};

/** "Tellus 24, 199–215" is a journal with volume and pages; anything else is taken as a publisher. */
const JOURNAL = /^(.+?),?\s+(\d+)\s*(?:\((\d+)\))?\s*[,:]\s*(\d+(?:\s*[–-]\s*\d+)?)\b.*$/;

/**
 * @returns an @article where the source reads as journal, volume, pages; otherwise a @misc that keeps the
 *          source whole, so that nothing is invented
 */
export function bibtexOf(reference: Reference): string {
  const match = JOURNAL.exec(reference.source);
  const [, journal, volume, number, pages] = match ?? [];
  const fields: [string, string | undefined][] = [
    ['author', authorsOf(reference.authors)],
    ['title', `{${safe(reference.title)}}`],
    ...(match
      ? ([
          ['journal', safe(journal ?? '')],
          ['volume', volume],
          ['number', number],
          ['pages', pages?.replace(/\s*[–-]\s*/, '--')],
        ] as [string, string | undefined][])
      : ([['howpublished', safe(reference.source)]] as [string, string | undefined][])),
    ['year', String(reference.year)],
    ['doi', reference.doi ?? undefined],
  ];
  const body = fields.filter(([, value]) => value).map(([name, value]) => `  ${name} = {${value}}`);
  return `@${match ? 'article' : 'misc'}{${surname(reference.authors)}${reference.year},\n${body.join(',\n')}\n}\n`;
}
