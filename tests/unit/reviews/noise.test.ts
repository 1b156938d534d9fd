import { describe, expect, it } from 'vitest';
import { noiseExponents } from '@/lib/reviews/noise';

describe('noise under a scheme', () => {
  it('keeps its size where every wave keeps its height', () => {
    for (const exponent of noiseExponents([1, 1, 1, 1], [0, 10, 400])) expect(exponent).toBeCloseTo(0, 12);
  });

  it('grows in the long run by the factor of the worst wave', () => {
    const [early, late] = noiseExponents([0.9, 1, 1.06, 1], [300, 400]);
    expect((late! - early!) / 100).toBeCloseTo(Math.log10(1.06), 6);
  });

  it('stays finite where the size itself would overflow', () => {
    const [exponent] = noiseExponents([3, 1], [1000]);
    expect(exponent).toBeCloseTo(1000 * Math.log10(3) + Math.log10(1 / 2) / 2, 6);
  });

  it('says the same as the sum itself where that can be formed', () => {
    const moduli = [1, 0.99, 0.97, 1.01];
    const [exponent] = noiseExponents(moduli, [40]);
    const sum = moduli.reduce((total, modulus) => total + modulus ** 80, 0);
    expect(exponent).toBeCloseTo(Math.log10(Math.sqrt(sum / moduli.length)), 10);
  });
});
