import { describe, expect, it } from 'vitest';
import { AlgebraicNumber } from '@/lib/numerics/algebraic-number';
import { type IntegerPolynomial, multiply } from '@/lib/numerics/integer-polynomial';
import { closedForm } from '@/lib/numerics/stability/closed-form';

/** Something irreducible that hides the factor looked for, as a discriminant does. */
const HIDING: IntegerPolynomial = [17n, -3n, 0n, 5n, 0n, 0n, 11n, 2n];

const polynomial = (text: string): IntegerPolynomial => text.split(' ').map(BigInt);

describe('closed forms', () => {
  it.each([
    // coefficients       near    text                          minimal polynomial
    ['-3 2', 1.5, '3/2', null],
    ['-3 0 1', 1.7, 'sqrt(3)', 'p**2 - 3'],
    ['-3 0 1', -1.7, '-sqrt(3)', 'p**2 - 3'],
    ['-8 0 1', 2.8, '2*sqrt(2)', 'p**2 - 8'],
    ['-4 0 27', 0.38, '2*sqrt(3)/9', '27*p**2 - 4'],
    ['-2 0 0 3', 0.87, '(2/3)^(1/3)', '3*p**3 - 2'],
    ['-2 0 0 1', 1.26, '2^(1/3)', 'p**3 - 2'],
    ['-1 -1 1', 1.6, '(1 + sqrt(5))/2', 'p**2 - p - 1'],
    ['-1 -1 1', -0.6, '(1 - sqrt(5))/2', 'p**2 - p - 1'],
    ['-48 0 24 0 125', 0.73, 'sqrt((32*sqrt(6) - 12)/125)', '125*p**4 + 24*p**2 - 48'],
    ['-3 3 -2 1', 1.39, null, 'p**3 - 2*p**2 + 3*p - 3'],
  ])('the root of %s near %d is %s', (coefficients, near, text, minimalPolynomial) => {
    for (const each of [polynomial(coefficients), multiply(polynomial(coefficients), HIDING)]) {
      const root = AlgebraicNumber.rootsOf(each).find((one) => Math.abs(one.toNumber() - near) < 0.05)!;
      expect(closedForm(root, 'p')).toEqual({ text, minimalPolynomial });
    }
  });
});
