import { describe, expect, it } from 'vitest';
import { AlgebraicNumber, decimalText } from '@/lib/numerics/algebraic-number';
import { type IntegerPolynomial, multiply } from '@/lib/numerics/integer-polynomial';
import { isolateRealRoots } from '@/lib/numerics/real-roots';
import { realRootCount, rootsInHalfOpen, rootsInOpen, sturmChain } from '../../support/sturm';
import { rational } from '@/lib/numerics/rational';
import { dice } from './scalar-scheme-maker';

/** (x − 1)(x − 2) … (x − 20): Wilkinson's polynomial, whose roots doubles cannot find. */
const WILKINSON = Array.from({ length: 20 }, (_, k): IntegerPolynomial => [-BigInt(k + 1), 1n]).reduce(multiply);

describe('real roots', () => {
  it('finds the twenty roots of Wilkinson’s polynomial', () => {
    expect(AlgebraicNumber.rootsOf(WILKINSON).map((root) => root.toDecimal(20))).toEqual(
      Array.from({ length: 20 }, (_, k) => String(k + 1)),
    );
  });

  it('tells roots apart that differ by less than 1e-30', () => {
    const big = 10n ** 31n;
    const roots = AlgebraicNumber.rootsOf(multiply([-big, big], [-big - 1n, big]));
    expect(roots.map((root) => root.toDecimal(33))).toEqual(['1', `1.${'0'.repeat(30)}1`]);
  });

  it('counts by Sturm on open and half-open intervals and on the line as many as it isolates', () => {
    const random = dice(5);
    for (let round = 0; round < 60; round++) {
      const f: IntegerPolynomial = [...Array.from({ length: 7 }, () => BigInt(Math.floor(random() * 25) - 12)), 3n];
      expect(realRootCount(f)).toBe(isolateRealRoots(f).length);
      const inUnit = isolateRealRoots(f, [0n, 1n]);
      const chain = sturmChain(f);
      const atZero = f[0] === 0n ? 1 : 0;
      expect(rootsInHalfOpen(chain, rational(0n), rational(1n)) + atZero).toBe(inUnit.length);
    }
    const chain = sturmChain([0n, -1n, 0n, 1n]);
    expect(rootsInHalfOpen(chain, rational(-1n), rational(1n))).toBe(2);
    expect(rootsInOpen(chain, rational(-1n), rational(1n))).toBe(1);
    expect(rootsInOpen(chain, 'minus-infinity', 'infinity')).toBe(3);
  });
});

describe('algebraic numbers', () => {
  const sqrt2 = AlgebraicNumber.rootsOf([-2n, 0n, 1n])[1]!;

  it('prints as many digits as asked for, correctly rounded', () => {
    // 50 digits of the square root of 2: OEIS A002193.
    expect(sqrt2.toDecimal(50)).toBe('1.4142135623730950488016887242096980785696718753769');
    expect(AlgebraicNumber.rootsOf([-1n, 3n])[0]!.toDecimal(20)).toBe('0.33333333333333333333');
    expect(AlgebraicNumber.rootsOf([-1n, 8n])[0]!.toDecimal(20)).toBe('0.125');
  });

  it('knows that two descriptions are the same number', () => {
    const other = AlgebraicNumber.rootsOf([-4n, 0n, 0n, 0n, 1n])[1]!;
    expect(sqrt2.compare(other)).toBe(0);
    expect(sqrt2.compare(AlgebraicNumber.rootsOf([-577n, 408n])[0]!)).toBe(-1);
  });

  it('is told from a fraction that nearly equals it, and knows which polynomials vanish there', () => {
    // 665857/470832 is a convergent of the square root of 2, above it by 1.6e-12.
    expect(sqrt2.compareRational(rational(665_857n, 470_832n))).toBe(-1);
    expect(sqrt2.isRootOf([-4n, 0n, 0n, 0n, 1n])).toBe(true);
    expect(sqrt2.isRootOf([-665_857n, 470_832n])).toBe(false);
  });

  it.each([
    [1n, 2n, '0.5'],
    [-2n, 3n, '-0.66666666666666666667'],
    [10n ** 25n, 1n, '10000000000000000000000000'],
    [1n, 10n ** 9n, '1e-9'],
    [999_999_999_999_999_999_999n, 10n ** 21n, '1'],
  ])('writes %s/%s as %s', (num, den, text) => {
    expect(decimalText(num, den, 20)).toBe(text);
  });
});
