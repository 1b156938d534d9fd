/** Moments of a one-dimensional scheme: what it makes of the polynomial solutions 1, x, x², … of its equation. */
import type { CanonicalTerm, ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { equationNumbers, symbolTerms } from '@/lib/numerics/equation-terms';
import { add, constant, isZero, mul, neg, type Polynomial, scale, sub, zero } from '@/lib/numerics/polynomial';
import { ONE, rational, type Rational } from '@/lib/numerics/rational';
import { coefficientText } from '@/lib/numerics/coefficient-text';
import { symbolText } from './reading-texts';

export interface Moment {
  /** p of x^p. */
  readonly power: number;
  /** What the older levels give, what the newest level asks for, and their difference; as the page shows them. */
  readonly found: string;
  readonly needed: string;
  readonly left: string;
  readonly holds: boolean;
  /** The difference, for its value at a parameter. */
  readonly residual: Polynomial;
}

const POWER_MAX = 10;

/**
 * Series of e^(s·offset + level·S(s)) to s^highest, S the exponent of the equation over one step: its coefficient of
 * s^p, times p!, is the polynomial solution that is x^p at level 0.
 */
function solutionSeries(exponent: readonly Polynomial[], term: CanonicalTerm, highest: number, variables: number) {
  const one = constant(variables, ONE);
  const inner = Array.from({ length: highest + 1 }, (_, k): Polynomial => {
    const time = scale(exponent[k] ?? zero, term.level);
    return k === 1 ? add(time, scale(one, term.offset[0]!)) : time;
  });
  // E' = I' E gives the coefficients of the exponential one after the other.
  const series: Polynomial[] = [one];
  for (let n = 1; n <= highest; n++) {
    let sum: Polynomial = zero;
    for (let k = 1; k <= n; k++) sum = add(sum, scale(mul(inner[k]!, series[n - k]!), rational(k)));
    series.push(scale(sum, rational(1, n)));
  }
  return series;
}

/** S(s) over one step by powers of s. Waves of u_tt are followed in the direction of growing x. */
function exponentOf(scheme: ScalarScheme): Polynomial[] {
  const exponent: Polynomial[] = [];
  if (scheme.timeOrder === 2) {
    exponent[1] = neg(equationNumbers(scheme).get('lambda')!);
    return exponent;
  }
  for (const { powers, coefficient } of symbolTerms(scheme))
    exponent[powers[0]!] = add(exponent[powers[0]!] ?? zero, coefficient);
  return exponent;
}

/**
 * Moments in order up to the first that does not hold, at least to x², with the residual exact.
 * @returns an empty list in several dimensions
 */
export function schemeMoments(scheme: ScalarScheme): Moment[] {
  if (scheme.dims !== 1) return [];
  const variables = scheme.parameters.length;
  const symbols = scheme.parameters.map(symbolText);
  const exponent = exponentOf(scheme);
  const isNewest = ({ level }: { level: Rational }) => level.num === level.den;
  const moments: Moment[] = [];
  let factorial: Rational = ONE;
  const series = scheme.terms.map((term) => ({ term, series: solutionSeries(exponent, term, POWER_MAX, variables) }));
  for (let power = 0; power <= POWER_MAX; power++) {
    if (power > 1) factorial = rational(factorial.num * BigInt(power));
    let found: Polynomial = zero;
    let needed: Polynomial = zero;
    for (const { term, series: solution } of series) {
      const part = scale(mul(term.coefficient, solution[power]!), factorial);
      if (isNewest(term)) needed = add(needed, part);
      else found = sub(found, part);
    }
    const residual = sub(found, needed);
    const holds = isZero(residual);
    const text = (value: Polynomial) => coefficientText(value, symbols);
    moments.push({ power, found: text(found), needed: text(needed), left: text(residual), holds, residual });
    if (!holds && power >= 2) break;
  }
  return moments;
}
