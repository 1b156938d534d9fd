import { describe, expect, it } from 'vitest';
import { boundText, decimalText, largestStable, limitText, symbolText } from '@/lib/facts/reading-texts';

const bound = (lo: number | null, hi: number | null, exact: string | null = null) => ({
  lo,
  hi,
  loExact: exact && (lo === 0 ? '0' : `-${exact}`),
  hiExact: exact,
  loIncluded: true,
  hiIncluded: true,
});

describe('readings in words and signs', () => {
  it.each([
    ['lambda', 'λ'],
    ['sigma', 'σ'],
    ['lambda_x', 'λₓ'],
    ['r', 'r'],
  ])('sets the parameter %s as %s', (parameter, letter) => {
    expect(symbolText(parameter)).toBe(letter);
  });

  it.each([
    [0.7287450680124659, '0.7287'],
    [-0.5, '−0.5'],
    [0, '0'],
    [2, '2'],
    [1.1e-16, '1.1 × 10⁻¹⁶'],
  ])('prints %d as %s', (value, text) => {
    expect(decimalText(value)).toBe(text);
  });

  it.each([
    [0.5, '1/2', '1/2'],
    [Math.sqrt(3) / 2, 'sqrt(3)/2', '√3/2'],
    [0.7287450680124659, '1/((4-c)/3*sqrt(1-c^2)), c=1-sqrt(6)/2', '0.7287'],
    [2.828, null, '2.828'],
  ])('prints the limit %d with closed form %s as %s', (value, exact, text) => {
    expect(limitText(value, exact)).toBe(text);
  });

  it('joins mirrored ends into one magnitude', () => {
    expect(boundText({ bounds: [bound(-1, 1, '1')], parameter: 'lambda', verdict: 'conditionally stable' })).toBe(
      '|λ| ≤ 1',
    );
  });

  it('names both ends where they are not mirrored', () => {
    expect(boundText({ bounds: [bound(0, 0.5, '1/2')], parameter: 'r', verdict: 'conditionally stable' })).toBe(
      '0 ≤ r ≤ 1/2',
    );
  });

  it('says plainly that a scheme is never stable, or always', () => {
    expect(boundText({ bounds: [], parameter: 'lambda', verdict: 'unstable for all nonzero values' })).toBe('no λ ≠ 0');
    expect(boundText({ bounds: [bound(null, null)], parameter: 'r', verdict: 'unconditionally stable' })).toBe(
      'no limit',
    );
  });

  it('gives staffs no reach where nothing is stable and no end where everything is', () => {
    expect(largestStable({ bounds: [], verdict: 'weakly unstable for all nonzero values' })).toBe(0);
    expect(largestStable({ bounds: [bound(null, null)], verdict: 'unconditionally stable' })).toBeNull();
    expect(largestStable({ bounds: [bound(0, 0.5)], verdict: 'conditionally stable' })).toBe(0.5);
  });
});
