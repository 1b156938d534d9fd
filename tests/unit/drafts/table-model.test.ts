import { describe, expect, it } from 'vitest';
import type { TableScheme } from '@/lib/entries/definition';
import {
  prettyWeight,
  siteName,
  sitesOf,
  spokenSite,
  withSiteTurned,
  withWeight,
} from '@/app/(workbench)/drafts/[id]/_components/table-model';

const UPWIND: TableScheme = {
  kind: 'scheme',
  form: 'table',
  equation: 'advection',
  terms: [
    { level: '1', offset: '0', coefficient: '1' },
    { level: '0', offset: '-1', coefficient: '-lambda' },
    { level: '0', offset: '0', coefficient: '-1 + lambda' },
  ],
};

describe('a table as sites', () => {
  it('has the weights of the formula: signs turned on the older levels', () => {
    expect(sitesOf(UPWIND).map(({ level, offset, weight }) => [level, offset[0], weight])).toEqual([
      [1, 0, '1'],
      [0, -1, 'lambda'],
      [0, 0, '1 - lambda'],
    ]);
  });
  it('counts levels from the newest, whatever their figures', () => {
    const shifted = {
      ...UPWIND,
      terms: UPWIND.terms.map((term) => ({ ...term, level: String(Number(term.level) + 3) })),
    };
    expect(sitesOf(shifted).map(({ level }) => level)).toEqual([1, 0, 0]);
    expect(withSiteTurned(shifted, -1, [0]).terms.at(-1)).toEqual({ level: '2', offset: '0', coefficient: '0' });
  });
  it('reads a site that is pressed and lets it go when it is pressed again', () => {
    const more = withSiteTurned(UPWIND, -1, [2]);
    expect(more.terms).toHaveLength(4);
    expect(withSiteTurned(more, -1, [2])).toEqual(UPWIND);
  });
  it('never lets go of the point that is computed', () => {
    expect(withSiteTurned(UPWIND, 1, [0])).toEqual(UPWIND);
  });
  it('keeps a typed weight as it is read, and stores its negative', () => {
    const site = sitesOf(UPWIND)[1]!;
    const changed = withWeight(UPWIND, site, 'lambda/2 - 1');
    expect(changed.terms[1]?.coefficient).toBe('-lambda/2 + 1');
    expect(sitesOf(changed)[1]?.weight).toBe('lambda/2 - 1');
  });
  it('has tuples in several dimensions', () => {
    const plane = withSiteTurned(
      { ...UPWIND, equation: 'advection-2d', terms: [{ level: '1', offset: ['0', '0'], coefficient: '1' }] },
      0,
      [1, -1],
    );
    expect(plane.terms[1]).toEqual({ level: '0', offset: ['1', '-1'], coefficient: '0' });
  });
});

it('sites are named and spoken', () => {
  expect(siteName(-1, [1])).toBe('n − 1, i + 1');
  expect(siteName(0, [0, -2])).toBe('n, i, j − 2');
  expect(spokenSite(-1, [0.5])).toBe('n minus 1, i plus a half');
});

it.each([
  ['1 - 2*lambda', '1 − 2λ'],
  ['lambda^2/2', 'λ²/2'],
  ['2*r', '2r'],
  ['lambda_x*(1-lambda_y)', 'λx(1−λy)'],
])('the weight %s is set as %s', (text, due) => expect(prettyWeight(text)).toBe(due));
