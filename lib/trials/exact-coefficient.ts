/** Coefficients of a scheme at parameter values that are doubles, without rounding. */
import type { Polynomial } from '@/lib/numerics/polynomial';
import { add, mul, power, rational, ZERO, type Rational } from '@/lib/numerics/rational';

/** The double as the fraction it is. */
export function rationalOf(value: number): Rational {
  let whole = value;
  let twos = 0;
  while (!Number.isInteger(whole)) {
    whole *= 2;
    twos++;
  }
  return rational(BigInt(whole), 1n << BigInt(twos));
}

/**
 * @returns the real part; trials have no complex kernels
 * @throws {RangeError} if the value is not real
 */
export function exactCoefficient(coefficient: Polynomial, parameters: readonly number[]): Rational {
  const values = parameters.map(rationalOf);
  return coefficient.reduce((sum, { powers, re, im }) => {
    if (im.num !== 0n) throw new RangeError('exactCoefficient: the coefficient is not real');
    return add(
      sum,
      powers.reduce((product, p, k) => mul(product, power(values[k]!, p)), re),
    );
  }, ZERO);
}
