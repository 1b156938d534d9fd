import { describe, expect, it } from 'vitest';
import { complexArray, polynomialRoots } from '@/lib/numerics/roots';
import { rootPosition } from '@/lib/numerics/stability/schur-cohn';
import type { GaussianInteger } from '@/lib/numerics/stability/wave-polynomial';
import { dice } from '../scalar-scheme-maker';

const real = (...coefficients: number[]): GaussianInteger[] => coefficients.map((c) => ({ re: BigInt(c), im: 0n }));

describe('the position of roots, by Schur, Cohn and Miller', () => {
  it.each([
    // ascending coefficients      position
    [[-1, 2], 'inside'],
    [[-2, 1], 'outside'],
    [[-1, 1], 'simple on circle'],
    [[1, 0, 1], 'simple on circle'],
    [[1, -2, 1], 'multiple on circle'],
    // (z − 1)(z + 1)²
    [[-1, -1, 1, 1], 'multiple on circle'],
    // (z − 2)(2z − 1): mirrored, hence conservative in form, but outside
    [[2, -5, 2], 'outside'],
    // (z − 1)(2z − 1)²: a double root inside does no harm
    [[-1, 5, -8, 4], 'simple on circle'],
    // z²(z − 1)
    [[0, 0, -1, 1], 'simple on circle'],
    [[1, 1, 0], 'degenerate'],
    [[5], 'inside'],
  ] as const)('of %j is %s', (coefficients, position) => {
    expect(rootPosition(real(...coefficients))).toBe(position);
  });

  it('agrees with computed roots on random complex polynomials', () => {
    const random = dice(3);
    const digit = () => Math.floor(random() * 11) - 5;
    let [inside, outside] = [0, 0];
    for (let round = 0; round < 400; round++) {
      const m = 1 + (round % 5);
      const coefficients = Array.from({ length: m + 1 }, (_, k) => ({
        re: BigInt(k === m ? 7 + 2 * m : digit()),
        im: BigInt(digit()),
      }));
      const numeric = complexArray(m + 1);
      coefficients.forEach(({ re, im }, k) => {
        numeric.re[k] = Number(re);
        numeric.im[k] = Number(im);
      });
      const roots = polynomialRoots(numeric);
      const modulus = Math.max(...Array.from(roots.re, (re, k) => Math.hypot(re, roots.im[k]!)));
      if (Math.abs(modulus - 1) < 1e-6) continue;
      expect(rootPosition(coefficients)).toBe(modulus < 1 ? 'inside' : 'outside');
      if (modulus < 1) inside++;
      else outside++;
    }
    expect(Math.min(inside, outside)).toBeGreaterThan(20);
  });
});
