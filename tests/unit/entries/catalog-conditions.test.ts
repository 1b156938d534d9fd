import { describe, expect, it } from 'vitest';
import { conditionsOf, linesMeeting } from '@/lib/entries/catalog-conditions';
import type { CatalogLine } from '@/lib/entries/entry';

function lineOf(slug: string, summary: Partial<CatalogLine['summary']>, languages: string[] = []): CatalogLine {
  return {
    entryId: slug,
    callNumber: 'AD 001',
    slug,
    kind: 'scheme',
    equation: 'advection',
    title: slug,
    gist: '',
    synonyms: [],
    authors: [],
    revision: 1,
    state: 'vetted',
    vettedAt: null,
    languages,
    usedBy: [],
    trialOutcome: 'none',
    summary: {
      dims: 1,
      explicit: true,
      orderTime: 1,
      orderSpace: 1,
      arrays: 1,
      levels: 2,
      halo: [1, 1],
      operations: 1,
      bytes: 16,
      parameter: 'lambda',
      verdict: 'conditionally stable',
      bounds: [],
      dissipative: null,
      sketch: { sites: [], stages: 0 },
      curves: null,
      ...summary,
    },
  };
}

const LINES = [
  lineOf('bounded', {}, ['c', 'python']),
  lineOf('region', { verdict: 'two-parameter region', levels: 3 }),
  lineOf('weak', { verdict: 'weakly unstable for all nonzero values', levels: 4 }),
  lineOf('plain', { verdict: 'unstable for all nonzero values', levels: 5 }, ['fortran']),
];
const found = (asked: Record<string, string>) =>
  linesMeeting(LINES, conditionsOf(LINES), asked).map(({ slug }) => slug);

describe('conditions of the catalog', () => {
  it('tell weakly unstable from unstable, and regions from bounds', () => {
    expect(found({ stable: 'weak' })).toEqual(['weak']);
    expect(found({ stable: 'never' })).toEqual(['plain']);
    expect(found({ stable: 'region' })).toEqual(['region']);
    expect(found({ stable: 'bounded' })).toEqual(['bounded']);
  });

  it('ask for the number of time levels', () => {
    expect(found({ levels: '2' })).toEqual(['bounded']);
    expect(found({ levels: '4' })).toEqual(['weak', 'plain']);
  });

  it('ask for the language of a kernel', () => {
    expect(found({ language: 'fortran' })).toEqual(['plain']);
    expect(found({ language: 'c' })).toEqual(['bounded']);
  });
});
