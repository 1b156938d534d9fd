/** Cosine and sine of rational multiples of pi, exact where the value is 0, ±1/2 or ±1. */
import { rational, toNumber, type Rational } from './rational';

/** cos(turns · pi). */
export function cosPi(turns: Rational): number {
  const period = 2n * turns.den;
  let num = ((turns.num % period) + period) % period;
  if (num > turns.den) num = period - num;
  const mirrored = 2n * num > turns.den;
  if (mirrored) num = turns.den - num;
  const value =
    2n * num === turns.den ? 0 : 3n * num === turns.den ? 0.5 : Math.cos(toNumber(rational(num, turns.den)) * Math.PI);
  return mirrored ? -value : value;
}

/** sin(turns · pi). */
export const sinPi = (turns: Rational): number => cosPi(rational(2n * turns.num - turns.den, 2n * turns.den));
