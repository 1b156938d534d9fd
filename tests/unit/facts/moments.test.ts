import { describe, expect, it } from 'vitest';
import type { SchemeDefinition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { schemeMoments } from '@/lib/facts/moments';
import type { Equation } from '@/lib/numerics/equation';

const table = (equation: Equation, rows: [string, string, string][]): SchemeDefinition => ({
  kind: 'scheme',
  form: 'table',
  equation,
  terms: rows.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
});
const momentsOf = (definition: SchemeDefinition) => {
  const { scheme } = canonicalScheme(definition);
  if (scheme?.form !== 'scalar') throw new Error('no scalar scheme');
  return schemeMoments(scheme);
};
const UPWIND_LEAPFROG = table('advection', [
  ['1', '0', '1'],
  ['-1', '-1', '-1'],
  ['0', '0', '-(1 - 2*lambda)'],
  ['0', '-1', '1 - 2*lambda'],
]);
const FTCS = table('diffusion', [
  ['1', '0', '1'],
  ['0', '-1', '-r'],
  ['0', '0', '-1 + 2*r'],
  ['0', '1', '-r'],
]);

describe('the moments of a scheme', () => {
  // By hand: (i − 1 + λ)^p and the like, with x = i − λ n.
  it('of the upwind leapfrog hold up to x², and leave λ(1 − λ)(1 − 2λ) at x³', () => {
    expect(momentsOf(UPWIND_LEAPFROG).map(({ power, found, needed, left }) => [power, found, needed, left])).toEqual([
      [0, '1', '1', '0'],
      [1, '−λ', '−λ', '0'],
      [2, 'λ²', 'λ²', '0'],
      [3, 'λ³ − 3λ² + λ', '−λ³', '2λ³ − 3λ² + λ'],
    ]);
  });

  // Heat polynomials over one step: x² + 2r, x⁴ + 12 r x² + 12 r².
  it('of forward Euler for diffusion fail at x⁴ by 2r − 12r²', () => {
    const moments = momentsOf(FTCS);
    expect(moments.map(({ holds }) => holds)).toEqual([true, true, true, true, false]);
    expect(moments.at(-1)).toMatchObject({ found: '2r', needed: '12r²', left: '−12r² + 2r' });
  });

  it('hold at x² for the wave equation by the three-point formula, and end where the scheme errs', () => {
    const wave = table('wave', [
      ['1', '0', '1'],
      ['-1', '0', '1'],
      ['0', '0', '-2 + 2*lambda^2'],
      ['0', '-1', '-lambda^2'],
      ['0', '1', '-lambda^2'],
    ]);
    expect(momentsOf(wave).map(({ holds }) => holds)).toEqual([true, true, true, true, false]);
  });

  it('tell a scheme that does not approximate its equation', () => {
    const still = table('advection', [
      ['1', '0', '1'],
      ['0', '0', '-1'],
    ]);
    expect(momentsOf(still)[1]).toMatchObject({ holds: false, found: '0', needed: '−λ' });
  });

  it('fail first one above the order that the engine states for a two-level advection scheme', () => {
    const lax = table('advection', [
      ['1', '0', '1'],
      ['0', '-1', '-lambda/2 - lambda^2/2'],
      ['0', '0', '-1 + lambda^2'],
      ['0', '1', 'lambda/2 - lambda^2/2'],
    ]);
    const facts = analyseDefinition(lax).facts;
    const order = facts?.kind === 'scheme' ? facts.order.orderAtFixedParameter : null;
    expect(momentsOf(lax).find(({ holds }) => !holds)?.power).toBe((order ?? 0) + 1);
  });

  it('are for one dimension', () => {
    const plane = canonicalScheme({
      kind: 'scheme',
      form: 'table',
      equation: 'advection-2d',
      terms: [
        { level: '1', offset: ['0', '0'], coefficient: '1' },
        { level: '0', offset: ['0', '0'], coefficient: '-1' },
      ],
    }).scheme;
    expect(plane?.form === 'scalar' && schemeMoments(plane)).toEqual([]);
  });
});
