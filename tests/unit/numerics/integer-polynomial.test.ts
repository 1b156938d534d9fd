import { describe, expect, it } from 'vitest';
import {
  derivative,
  exactQuotient,
  gcd,
  type IntegerPolynomial,
  multiply,
  polynomialText,
  primitivePart,
  pseudoRemainder,
  squareFreeDecomposition,
  squareFreePart,
} from '@/lib/numerics/integer-polynomial';
import { dice } from './scalar-scheme-maker';

const random = dice(11);
const randomPolynomial = (degree: number): IntegerPolynomial => [
  ...Array.from({ length: degree }, () => BigInt(Math.floor(random() * 41) - 20)),
  BigInt(1 + Math.floor(random() * 9)),
];

describe('polynomials over the integers', () => {
  it('finds the common factor that was multiplied in, and nothing more for coprime cofactors', () => {
    for (let round = 0; round < 40; round++) {
      const common = primitivePart(randomPolynomial(1 + (round % 5)));
      const [a, b] = [randomPolynomial(4), randomPolynomial(5)];
      const found = gcd(multiply(a, common), multiply(b, common));
      expect(exactQuotient(found, common)).not.toBeNull();
      expect(found).toEqual(primitivePart(multiply(common, gcd(a, b))));
    }
  });

  it('divides exactly what was multiplied, and answers null where a remainder is left', () => {
    const [a, b] = [randomPolynomial(6), randomPolynomial(3)];
    expect(exactQuotient(multiply(a, b), b)).toEqual(a);
    expect(exactQuotient([1n, 0n, 1n], [1n, 1n])).toBeNull();
  });

  it('keeps the sign of the remainder in pseudo-division by a negative leading coefficient', () => {
    // x² + 1 = (−2x + 1)(−x/2 − 1/4) + 5/4: the multiple must be positive.
    const rest = pseudoRemainder([1n, 0n, 1n], [1n, -2n]);
    expect(rest).toHaveLength(1);
    expect(rest[0]! > 0n).toBe(true);
  });

  it('takes a product apart by multiplicity', () => {
    const [f, g, h]: readonly [IntegerPolynomial, IntegerPolynomial, IntegerPolynomial] = [
      [-1n, 1n],
      [1n, 0n, 1n],
      [-3n, 2n],
    ];
    const product = multiply(f, multiply(multiply(g, g), multiply(h, multiply(h, h))));
    expect(squareFreeDecomposition(product)).toEqual([
      { factor: f, multiplicity: 1 },
      { factor: g, multiplicity: 2 },
      { factor: h, multiplicity: 3 },
    ]);
    expect(squareFreePart(product)).toEqual(multiply(f, multiply(g, h)));
    expect(gcd(product, derivative(product))).toEqual(multiply(g, multiply(h, h)));
  });

  it('writes a polynomial in the language of expressions', () => {
    expect(polynomialText([-3n, 6n, -8n, 8n], 'r')).toBe('8*r**3 - 8*r**2 + 6*r - 3');
    expect(polynomialText([0n, -1n, 0n, 1n], 'lambda')).toBe('lambda**3 - lambda');
    expect(polynomialText([], 'lambda')).toBe('0');
  });
});
