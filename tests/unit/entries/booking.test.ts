import { describe, expect, it } from 'vitest';
import { authorSurnames } from '@/lib/entries/author-surnames';
import { callLettersOf, formatCallNumber, slugOfTitle } from '@/lib/entries/call-number';
import { Definition } from '@/lib/entries/definition';
import { DraftContent } from '@/lib/entries/draft-content';
import { referenceLine } from '@/lib/entries/reference-line';
import { visibleStates } from '@/lib/entries/visibility';

describe('call numbers and addresses', () => {
  it('has three figures at least', () => {
    expect(formatCallNumber('AD', 3)).toBe('AD 003');
    expect(formatCallNumber('ST', 1204)).toBe('ST 1204');
  });

  it.each([
    [
      'AD',
      {
        kind: 'scheme',
        form: 'table',
        equation: 'advection-2d',
        terms: [{ level: 1, offset: [0, 0], coefficient: 1 }],
      },
    ],
    [
      'DI',
      {
        kind: 'scheme',
        form: 'table',
        equation: 'diffusion-3d',
        terms: [{ level: 1, offset: [0, 0, 0], coefficient: 1 }],
      },
    ],
    [
      'AX',
      {
        kind: 'scheme',
        form: 'table',
        equation: 'advection-diffusion',
        terms: [{ level: 1, offset: 0, coefficient: 1 }],
      },
    ],
    ['TM', { kind: 'time-method', time: { kind: 'multistep', alpha: [-1, 1], beta: [1, 0] } }],
    ['ST', { kind: 'stencil', derivative: 1, offsets: [-1, 1] }],
    [
      'VP',
      {
        kind: 'scheme',
        form: 'system',
        equation: 'wave',
        unknowns: ['v', 'p'],
        equations: [{ terms: [{ unknown: 'v', level: 1, offset: 0, coefficient: 1 }] }],
      },
    ],
  ])('books under %s', (letters, definition) => {
    expect(callLettersOf(Definition.parse(definition))).toBe(letters);
  });

  it.each([
    ['Lax–Wendroff', 'lax-wendroff'],
    ['Leapfrog in time, centred in space', 'leapfrog-in-time-centred-in-space'],
    ['Crank–Nicolson (θ = 1/2)', 'crank-nicolson-1-2'],
    ['Schrödinger', 'schrodinger'],
    ['∂⁴', '4'],
    ['—', 'entry'],
  ])('makes of the title "%s" the address %s', (title, slug) => expect(slugOfTitle(title)).toBe(slug));
});

describe('literature', () => {
  it.each([
    ['H. O. Kreiss, J. Oliger', ['Kreiss', 'Oliger']],
    ['R. Courant, K. Friedrichs, H. Lewy', ['Courant', 'Friedrichs', 'Lewy']],
    ['P. J. van der Houwen and B. P. Sommeijer', ['van der Houwen', 'Sommeijer']],
    ['J.-L. Lions; Crank', ['Lions', 'Crank']],
  ])('finds the surnames in "%s"', (authors, surnames) => expect(authorSurnames([{ authors }])).toEqual(surnames));

  it('names every author once', () => {
    expect(authorSurnames([{ authors: 'P. D. Lax' }, { authors: 'P. D. Lax, B. Wendroff' }])).toEqual([
      'Lax',
      'Wendroff',
    ]);
  });

  it('is one line in the header of a kernel', () => {
    const reference = {
      authors: 'B. Fornberg',
      title: 'Generation of finite difference formulas',
      year: 1988,
      note: null,
    };
    expect(
      referenceLine({ ...reference, source: 'Math. Comp. 51, 699–706', doi: '10.1090/S0025-5718-1988-0935077-0' }),
    ).toBe(
      'B. Fornberg, Generation of finite difference formulas, Math. Comp. 51, 699–706, 1988, doi:10.1090/S0025-5718-1988-0935077-0',
    );
    expect(referenceLine({ ...reference, source: '', doi: null })).toBe(
      'B. Fornberg, Generation of finite difference formulas, 1988',
    );
  });
});

describe('who sees what', () => {
  it('shows readers what is published, contributors what is in review and their own, maintainers all', () => {
    expect(visibleStates({ role: 'reader' })).toEqual({ anyones: ['vetted', 'superseded', 'withdrawn'], own: [] });
    expect(visibleStates({ role: 'contributor' })).toEqual({
      anyones: ['vetted', 'superseded', 'withdrawn', 'in-review'],
      own: ['draft', 'returned'],
    });
    for (const role of ['maintainer', 'administrator'] as const)
      expect(visibleStates({ role }).anyones).toEqual(expect.arrayContaining(['draft', 'returned', 'in-review']));
  });
});

describe('what an author brings', () => {
  const content = { title: 'Central', definition: { kind: 'stencil', derivative: 1, offsets: [-1, 1] } };
  const complaint = (more: object) => {
    const parsed = DraftContent.safeParse({ ...content, ...more });
    return parsed.success ? null : parsed.error.issues.map(({ path, message }) => `${path.join('.')}: ${message}`)[0];
  };

  it('needs a title and a definition only', () => {
    expect(complaint({})).toBeNull();
    expect(complaint({ title: '  ' })).toBe('title: accepted: a title of 1 to 200 characters');
    expect(complaint({ title: 'two\nlines' })).toBe('title: accepted: one line');
  });

  it('is refused with the place and what is accepted', () => {
    const reference = { authors: 'B. Fornberg', title: 'T', year: 1988 };
    expect(complaint({ references: [{ ...reference, doi: 'doi.org/10.1090/x' }] })).toBe(
      'references.0.doi: accepted: a DOI such as 10.1007/BF01448839',
    );
    expect(complaint({ references: [{ ...reference, year: 88 }] })).toBe(
      'references.0.year: accepted: a year from 1600 on',
    );
    expect(complaint({ notes: 'x'.repeat(40_001) })).toBe('notes: accepted: notes of at most 40 000 characters');
  });
});
