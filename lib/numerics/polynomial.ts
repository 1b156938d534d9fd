/**
 * Multivariate polynomials with coefficients in Q(i), the coefficient ring of every scheme.
 * Variables are positional: `powers[k]` is the exponent of the k-th parameter of the scheme.
 */
import {
  add as addQ,
  isZero as isZeroQ,
  mul as mulQ,
  neg as negQ,
  sub as subQ,
  toNumber,
  ZERO,
  type Rational,
  ONE,
} from './rational';

export interface Monomial {
  readonly powers: readonly number[];
  readonly re: Rational;
  readonly im: Rational;
}
/** Nonzero monomials with distinct powers, in lexicographic order of `powers`. The zero polynomial is []. */
export type Polynomial = readonly Monomial[];

function collect(monomials: Iterable<Monomial>): Polynomial {
  const byPowers = new Map<string, Monomial>();
  for (const m of monomials) {
    const key = m.powers.join(',');
    const present = byPowers.get(key);
    byPowers.set(key, present ? { powers: m.powers, re: addQ(present.re, m.re), im: addQ(present.im, m.im) } : m);
  }
  return [...byPowers.values()]
    .filter((m) => !isZeroQ(m.re) || !isZeroQ(m.im))
    .sort((a, b) => {
      for (let k = 0; k < a.powers.length; k++) if (a.powers[k] !== b.powers[k]) return a.powers[k]! - b.powers[k]!;
      return 0;
    });
}

export const zero: Polynomial = [];
/** @param variables number of variables of the ring */
export const constant = (variables: number, re: Rational, im: Rational = ZERO): Polynomial =>
  collect([{ powers: new Array<number>(variables).fill(0), re, im }]);
export const variable = (variables: number, index: number): Polynomial => [
  { powers: Array.from({ length: variables }, (_, k) => (k === index ? 1 : 0)), re: ONE, im: ZERO },
];

export const add = (a: Polynomial, b: Polynomial): Polynomial => collect([...a, ...b]);
export const neg = (a: Polynomial): Polynomial => a.map((m) => ({ powers: m.powers, re: negQ(m.re), im: negQ(m.im) }));
export const sub = (a: Polynomial, b: Polynomial): Polynomial => add(a, neg(b));
export function mul(a: Polynomial, b: Polynomial): Polynomial {
  const products: Monomial[] = [];
  for (const x of a)
    for (const y of b)
      products.push({
        powers: x.powers.map((p, k) => p + y.powers[k]!),
        re: subQ(mulQ(x.re, y.re), mulQ(x.im, y.im)),
        im: addQ(mulQ(x.re, y.im), mulQ(x.im, y.re)),
      });
  return collect(products);
}
export const isZero = (a: Polynomial) => a.length === 0;
export const scale = (a: Polynomial, factor: Rational): Polynomial =>
  collect(a.map((m) => ({ powers: m.powers, re: mulQ(m.re, factor), im: mulQ(m.im, factor) })));

/** Value at real parameter values, as [re, im] doubles. */
export function evaluate(a: Polynomial, values: readonly number[]): [number, number] {
  let re = 0;
  let im = 0;
  for (const m of a) {
    let product = 1;
    m.powers.forEach((p, k) => (product *= values[k]! ** p));
    re += toNumber(m.re) * product;
    im += toNumber(m.im) * product;
  }
  return [re, im];
}
