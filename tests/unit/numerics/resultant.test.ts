import { describe, expect, it } from 'vitest';
import {
  type BivariatePolynomial,
  bivariateGcd,
  exactBivariateQuotient,
  splitSquareFree,
  transposed,
} from '@/lib/numerics/bivariate-polynomial';
import { possibleFactorDegrees } from '@/lib/numerics/factor-degrees';
import { multiply } from '@/lib/numerics/integer-polynomial';
import { reducedLattice } from '@/lib/numerics/lattice-reduction';
import { discriminant, resultant } from '@/lib/numerics/resultant';

const product = (a: BivariatePolynomial, b: BivariatePolynomial): BivariatePolynomial => {
  const rows: bigint[][] = Array.from({ length: a.length + b.length - 1 }, () => []);
  a.forEach((left, j) =>
    b.forEach((right, k) =>
      multiply(left, right).forEach((c, n) => {
        const row = rows[j + k]!;
        while (row.length <= n) row.push(0n);
        row[n]! += c;
      }),
    ),
  );
  return rows;
};

describe('elimination', () => {
  it('gives the textbook discriminant b² − 4ac, times the leading coefficient and with its sign', () => {
    // x² + p x + 1: resultant with 2x + p is −(p² − 4).
    expect(discriminant([[1n], [0n, 1n], [1n]])).toEqual([4n, 0n, -1n]);
  });

  it('vanishes exactly where two curves meet', () => {
    // x² + p² = 1 and x = p meet at p² = 1/2.
    expect(resultant([[-1n, 0n, 1n], [], [1n]], [[0n, -1n], [1n]])).toEqual([-1n, 0n, 2n]);
  });

  it('is zero where the curves share a component', () => {
    const line: BivariatePolynomial = [[1n, 2n], [3n]];
    expect(resultant(product(line, [[1n], [1n]]), product(line, [[2n], [0n, 1n]]))).toEqual([]);
  });

  it('finds common components, also where a denominator appears on the way', () => {
    // The square (1 + 2p − 2pc)² and its derivative share 1 + 2p − 2pc, monic only with a half.
    const factor: BivariatePolynomial = [
      [1n, 2n],
      [0n, -2n],
    ];
    const square = product(factor, factor);
    const found = bivariateGcd(
      square,
      square.slice(1).map((row, k) => row.map((c) => c * BigInt(k + 1))),
    );
    expect(exactBivariateQuotient(square, found)).not.toBeNull();
    expect(found).toHaveLength(2);
    expect(splitSquareFree(square).mixed).toHaveLength(2);
  });

  it('splits factors by the variables they depend on', () => {
    const curve = product(product([[-1n], [1n]], [[0n, 0n, 1n]]), [[1n, 1n], [], [1n]]);
    const split = splitSquareFree(curve);
    expect(split.inner).toEqual([0n, 1n]);
    expect(split.outer).toEqual([-1n, 1n]);
    expect(split.mixed).toEqual([[1n, 1n], [], [1n]]);
    expect(transposed(transposed(curve))).toEqual(curve);
  });
});

describe('the search for factors', () => {
  it('rules out factors of low degree of an irreducible polynomial', () => {
    expect(possibleFactorDegrees([-3n, 6n, -8n, 8n]).slice(1, 3)).toEqual([false, false]);
    expect(possibleFactorDegrees(multiply([-2n, 0n, 1n], [-3n, 0n, 0n, 1n]))[2]).toBe(true);
  });

  it('reduces a lattice to its short vector', () => {
    // The relation 1 − 2·(1/2) hides behind large numbers.
    const reduced = reducedLattice([
      [1n, 0n, 1_000_000n],
      [0n, 1n, 500_000n],
    ]);
    expect(reduced[0]!.map((c) => (c < 0n ? -c : c))).toEqual([1n, 2n, 0n]);
  });
});
