import { describe, expect, it } from 'vitest';
import { bibtexOf } from '@/lib/entries/bibtex';
import { conditionToLetGo, conditionsOf, countOptions, linesMeeting } from '@/lib/entries/catalog-conditions';
import { catalogSearch } from '@/lib/entries/catalog-search';
import type { CatalogLine } from '@/lib/entries/entry';

const aLine = (callNumber: string, title: string, more: Partial<CatalogLine> = {}): CatalogLine => ({
  entryId: callNumber,
  callNumber,
  slug: callNumber.toLowerCase().replace(' ', '-'),
  kind: 'scheme',
  equation: 'advection',
  title,
  gist: '',
  synonyms: [],
  authors: [],
  revision: 1,
  state: 'vetted',
  vettedAt: null,
  summary: {
    dims: 1,
    explicit: true,
    orderTime: 2,
    orderSpace: 2,
    arrays: 2,
    levels: 2,
    halo: [1, 1],
    operations: 3,
    bytes: 24,
    parameter: 'lambda',
    verdict: 'conditionally stable',
    bounds: [],
    dissipative: false,
    sketch: { sites: [], stages: 0 },
    curves: null,
  },
  languages: [],
  usedBy: [],
  trialOutcome: 'none',
  ...more,
});

const BOOK = [
  aLine('AD 002', 'Lax–Wendroff', { authors: ['Lax', 'Wendroff'] }),
  aLine('AD 003', 'Leapfrog in time, centred in space', { synonyms: ['midpoint rule'] }),
  aLine('AD 012', 'Crank–Nicolson, centred', { summary: { ...aLine('', '').summary, explicit: false } }),
  aLine('WA 001', 'Wave equation by second differences', { equation: 'wave', gist: 'Like leapfrog, for u_tt.' }),
];
const numbers = (lines: readonly CatalogLine[]) => lines.map(({ callNumber }) => callNumber);

describe('looking for a line', () => {
  const search = catalogSearch(BOOK);

  it.each([
    ['leap frog', 'AD 003'],
    ['Leap-Frog', 'AD 003'],
    ['leapfrgo', 'AD 003'],
    ['midpoint', 'AD 003'],
    ['ad3', 'AD 003'],
    ['wendroff', 'AD 002'],
    ['lax wendrof', 'AD 002'],
    ['crank nicholson', 'AD 012'],
  ])('"%s" finds %s first', (asked, expected) => {
    expect(numbers(search(asked))[0]).toBe(expected);
  });

  it('gives every line as it came for an empty text', () => {
    expect(search('  ')).toEqual(BOOK);
  });

  it('finds nothing for what the book does not know', () => {
    expect(search('zebra crossing')).toEqual([]);
  });
});

describe('conditions', () => {
  const conditions = conditionsOf(BOOK);
  const equation = (asked: Record<string, string>) =>
    countOptions(BOOK, conditions, asked)
      .find(({ key }) => key === 'equation')
      ?.options.map(({ value, count }) => [value, count]);

  it('count what each option would leave beside the others in force', () => {
    expect(equation({})).toEqual([
      ['advection', 3],
      ['wave', 1],
    ]);
    expect(equation({ coupling: 'implicit' })).toEqual([
      ['advection', 1],
      ['wave', 0],
    ]);
  });

  it('leave the lines that meet all of them', () => {
    expect(numbers(linesMeeting(BOOK, conditions, { equation: 'advection', coupling: 'explicit' }))).toEqual([
      'AD 002',
      'AD 003',
    ]);
  });

  it('ask nothing by an answer that they do not know', () => {
    expect(linesMeeting(BOOK, conditions, { coupling: 'sideways' })).toHaveLength(BOOK.length);
  });

  it('name the one to let go of, and what it would bring', () => {
    const letGo = conditionToLetGo(BOOK, conditions, { equation: 'wave', coupling: 'implicit' });
    expect(letGo && [letGo.condition.key, letGo.count]).toEqual(['equation', 1]);
  });
});

describe('a reference as BibTeX', () => {
  it('is an article where the source reads as journal, volume and pages', () => {
    const reference = {
      authors: 'H. O. Kreiss, J. Oliger',
      title: 'Comparison of accurate methods',
      source: 'Tellus 24, 199–215',
      year: 1972,
      doi: null,
      note: null,
    };
    expect(bibtexOf(reference)).toBe(
      '@article{kreiss1972,\n  author = {H. O. Kreiss and J. Oliger},\n  title = {{Comparison of accurate methods}},\n  journal = {Tellus},\n  volume = {24},\n  pages = {199--215},\n  year = {1972}\n}\n',
    );
  });

  it('keeps any other source whole', () => {
    const book = { authors: 'R. J. LeVeque', title: 'Methods', source: 'SIAM', year: 2007, doi: null, note: null };
    expect(bibtexOf(book)).toContain('howpublished = {SIAM}');
  });
});
