import { describe, expect, it } from 'vitest';
import { parseRational, rational } from '@/lib/numerics/rational';
import { exactMultiplicity, isMultipleUnitRoot } from '@/lib/numerics/stability/unit-root-multiplicity';
import { type WavePolynomial, wavePolynomial } from '@/lib/numerics/stability/wave-polynomial';
import { type Row, scalarScheme } from '../scalar-scheme-maker';

const LEAPFROG: Row[] = [
  [1, 0, ['1']],
  [0, 1, ['0', '1']],
  [0, -1, ['0', '-1']],
  [-1, 0, ['-1']],
];
const waveOf = (rows: readonly Row[]): WavePolynomial => {
  const wave = wavePolynomial(scalarScheme(rows));
  if (typeof wave === 'string') throw new Error(wave);
  return wave;
};

describe('multiple roots on the unit circle', () => {
  const wave = waveOf(LEAPFROG);

  it('are told exactly at rational values and the waves 0, π/2 and π', () => {
    expect(exactMultiplicity(wave, rational(1n), Math.PI / 2)).toBe('multiple');
    expect(exactMultiplicity(wave, parseRational('999999999999/1000000000000'), Math.PI / 2)).toBe('not multiple');
    expect(exactMultiplicity(wave, rational(1n), Math.PI)).toBe('not multiple');
    expect(exactMultiplicity(wave, rational(1n), 1)).toBeNull();
  });

  it('are told from two roots that doubles cannot part', () => {
    const right = { cosine: rational(0n), side: 1 } as const;
    expect(isMultipleUnitRoot(wave, rational(1n), right, [0, -1], 2)).toBe(true);
    // The roots stand 2 · sqrt(2 · 10⁻²⁰) apart: one in double precision.
    const justInside = parseRational('99999999999999999999/100000000000000000000');
    expect(isMultipleUnitRoot(wave, justInside, right, [0, -1], 2)).toBe(false);
  });
});
