/** A scheme along a line: parameters replaced by numbers or by one another, waves confined to one direction. */
import type { CanonicalScheme, CanonicalTerm, ScalarScheme } from './canonical-scheme';
import { equationNumbers } from './equation-terms';
import { add as addP, constant, isZero, mul as mulP, zero, type Polynomial } from './polynomial';
import { add, compare, formatRational, mul, rational, ZERO, type Rational } from './rational';

/** Value of `polynomial` with its variables replaced by polynomials in `variables` variables. */
export function substitute(polynomial: Polynomial, by: readonly Polynomial[], variables: number): Polynomial {
  const powersOf: Polynomial[][] = by.map((p) => [constant(variables, rational(1n)), p]);
  const power = (index: number, exponent: number): Polynomial => {
    const known = powersOf[index]!;
    while (known.length <= exponent) known.push(mulP(known[known.length - 1]!, by[index]!));
    return known[exponent]!;
  };
  let sum: Polynomial = zero;
  for (const m of polynomial) {
    let product = constant(variables, m.re, m.im);
    m.powers.forEach((exponent, index) => {
      if (exponent > 0) product = mulP(product, power(index, exponent));
    });
    sum = addP(sum, product);
  }
  return sum;
}

/**
 * The scheme with new parameters.
 * @param by one polynomial in the new parameters for each old one
 */
export function withParameters<S extends CanonicalScheme>(
  scheme: S,
  parameters: readonly string[],
  by: readonly Polynomial[],
): S {
  const replaced = (p: Polynomial) => substitute(p, by, parameters.length);
  const numbers = Object.fromEntries([...equationNumbers(scheme)].map(([name, p]) => [name, replaced(p)]));
  const replacedTerms = <T extends CanonicalTerm>(terms: readonly T[]) =>
    terms.map((t) => ({ ...t, coefficient: replaced(t.coefficient) })).filter((t) => !isZero(t.coefficient));
  if (scheme.form === 'scalar') return { ...scheme, parameters, numbers, terms: replacedTerms(scheme.terms) };
  return {
    ...scheme,
    parameters,
    numbers,
    equations: scheme.equations.map((e) => ({ terms: replacedTerms(e.terms) })),
  };
}

function summed(terms: readonly CanonicalTerm[]): CanonicalTerm[] {
  const byPlace = new Map<string, CanonicalTerm>();
  for (const t of terms) {
    const key = [t.level, ...t.offset].map(formatRational).join(',');
    const present = byPlace.get(key);
    byPlace.set(key, present ? { ...present, coefficient: addP(present.coefficient, t.coefficient) } : t);
  }
  return [...byPlace.values()]
    .filter((t) => !isZero(t.coefficient))
    .sort((a, b) => -compare(a.level, b.level) || compare(a.offset[0]!, b.offset[0]!));
}

/**
 * The one-dimensional scheme that a scheme of several dimensions is on the waves theta = shift·pi + t·direction.
 * @param direction integers
 * @param shift     0 or 1 per dimension; offsets must be integers where it is 1
 * @returns null where a shifted offset is not an integer
 */
export function alongLine(
  scheme: ScalarScheme,
  direction: readonly bigint[],
  shift: readonly (0 | 1)[],
): ScalarScheme | null {
  const terms: CanonicalTerm[] = [];
  for (const t of scheme.terms) {
    let odd = false;
    for (let d = 0; d < scheme.dims; d++) {
      if (shift[d] !== 1) continue;
      if (t.offset[d]!.den !== 1n) return null;
      if (t.offset[d]!.num % 2n !== 0n) odd = !odd;
    }
    const offset = t.offset.reduce<Rational>((sum, o, d) => add(sum, mul(o, rational(direction[d]!))), ZERO);
    const coefficient = odd
      ? t.coefficient.map((m) => ({ ...m, re: mul(m.re, rational(-1n)), im: mul(m.im, rational(-1n)) }))
      : t.coefficient;
    terms.push({ level: t.level, offset: [offset], coefficient });
  }
  const collected = summed(terms);
  return collected.length === 0 ? null : { ...scheme, dims: 1, terms: collected };
}
