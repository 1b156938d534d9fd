/** Cosine and sine of rational multiples of pi, exact where the value is 0, ±1/2 or ±1. */
import { parseRational, rational, toNumber, type Rational } from './rational';

/** "1/4*pi", "pi", "3*pi/4", "0": the factor of pi, or null where the text is none of these. */
export function parseAngle(text: string): Rational | null {
  const compact = text.replace(/\s+/g, '');
  const match = /^([+-]?)(?:([\d./]+)\*?)?pi(?:\/(\d+))?$/.exec(compact);
  try {
    if (!match) return parseRational(compact).num === 0n ? rational(0) : null;
    const factor = match[2] ? parseRational(match[2]) : rational(1);
    const divisor = BigInt(match[3] ?? '1');
    return divisor === 0n ? null : rational(match[1] === '-' ? -factor.num : factor.num, factor.den * divisor);
  } catch {
    return null;
  }
}

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
