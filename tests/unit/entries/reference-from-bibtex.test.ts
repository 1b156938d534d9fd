import { describe, expect, it } from 'vitest';
import { bibtexOf } from '@/lib/entries/bibtex';
import { ReferenceInput } from '@/lib/entries/draft-content';
import { doiOf } from '@/lib/entries/doi';
import { referencesFromBibtex } from '@/lib/entries/reference-from-bibtex';

const read = (text: string) => {
  const outcome = referencesFromBibtex(text);
  if ('problem' in outcome) throw new Error(outcome.problem);
  return outcome.references;
};

describe('a reference from BibTeX', () => {
  it('has authors, title, source, year and DOI', () => {
    // P. Lax, B. Wendroff, Comm. Pure Appl. Math. 13 (1960) 217–237.
    const [reference] = read(`@article{LW60, author = {Lax, Peter and Wendroff, Burton},
      title = {Systems of {C}onservation {L}aws}, journal = {Comm. Pure Appl. Math.}, volume = 13, number = {2},
      pages = {217--237}, year = 1960, doi = {https://doi.org/10.1002/cpa.3160130205}}`);
    expect(reference).toEqual({
      authors: 'Peter Lax, Burton Wendroff',
      title: 'Systems of Conservation Laws',
      source: 'Comm. Pure Appl. Math. 13(2), 217–237',
      year: 1960,
      doi: '10.1002/cpa.3160130205',
      note: null,
    });
    expect(ReferenceInput.safeParse(reference).success).toBe(true);
  });
  it('reads the accents and letters of TeX', () => {
    expect(
      read('@book{k, author={G{\\"o}ran M{\\o}ller and Fran\\c{c}ois Vi\\\'ete}, title={A \\& B}, year={1999}}')[0],
    ).toMatchObject({
      authors: 'Göran Møller, François Viéte',
      title: 'A & B',
    });
  });
  it('comes in numbers, in the order of the text', () => {
    expect(
      read('@book{a, author={A}, title={One}, year=1950}\n@book{b, author={B}, title={Two}, year=1951}').map(
        ({ title }) => title,
      ),
    ).toEqual(['One', 'Two']);
  });
  it('reads what the book itself writes', () => {
    const reference = {
      authors: 'H. O. Kreiss, J. Oliger',
      title: 'Comparison',
      source: 'Tellus 24, 199–215',
      year: 1972,
      doi: '10.1111/j.2153-3490.1972.tb01547.x',
      note: null,
    };
    expect(read(bibtexOf(reference))).toEqual([reference]);
  });
  it.each([
    ['hello', 'no entry'],
    ['@article{a, title={x', 'not BibTeX'],
    ['@article{a, title={x}, year=1990}', 'entry 1 lacks an author'],
    ['@article{a, author={x}, title={y}}', 'a year'],
    ['x'.repeat(100_001), 'too many'],
  ])('is refused with a sentence: %.30s', (text, words) => {
    const outcome = referencesFromBibtex(text);
    expect('problem' in outcome && outcome.problem).toContain(words);
  });
});

it.each([
  ['https://doi.org/10.1007/BF01448839', '10.1007/BF01448839'],
  ['doi:10.1090/S0025-5718-1988-0935077-0.', '10.1090/S0025-5718-1988-0935077-0'],
  ['nothing', null],
])('a DOI is found in %s', (text, doi) => expect(doiOf(text)).toBe(doi));
