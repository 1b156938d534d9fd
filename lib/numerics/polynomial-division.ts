/**
 * Division of multivariate polynomials over Q(i): the exact quotient, and the common factor of polynomials in
 * one variable. Coefficients of schemes are small, so plain long division suffices.
 */
import { add as addQ, div as divQ, isZero as isZeroQ, mul as mulQ, neg as negQ, sub as subQ, ZERO } from './rational';
import { isZero, mul, sub, type Monomial, type Polynomial } from './polynomial';

/** Leading monomial in the lexicographic order of the powers; a ≠ 0. */
const leading = (a: Polynomial): Monomial => a[a.length - 1]!;

function quotientOfMonomials(a: Monomial, b: Monomial): Monomial | null {
  const powers = a.powers.map((p, k) => p - b.powers[k]!);
  if (powers.some((p) => p < 0)) return null;
  const norm = addQ(mulQ(b.re, b.re), mulQ(b.im, b.im));
  return {
    powers,
    re: divQ(addQ(mulQ(a.re, b.re), mulQ(a.im, b.im)), norm),
    im: divQ(subQ(mulQ(a.im, b.re), mulQ(a.re, b.im)), norm),
  };
}

/** a / b where b divides a, else null. b ≠ 0. */
export function exactQuotient(a: Polynomial, b: Polynomial): Polynomial | null {
  const terms: Monomial[] = [];
  let rest = a;
  while (!isZero(rest)) {
    const term = quotientOfMonomials(leading(rest), leading(b));
    if (!term) return null;
    terms.push(term);
    rest = sub(rest, mul([term], b));
  }
  return terms.reverse();
}

/** Scaled so that the leading coefficient is 1. a ≠ 0. */
export function monic(a: Polynomial): Polynomial {
  const { re, im, powers } = leading(a);
  const norm = addQ(mulQ(re, re), mulQ(im, im));
  const zeros = powers.map(() => 0);
  return mul(a, [{ powers: zeros, re: divQ(re, norm), im: isZeroQ(im) ? ZERO : negQ(divQ(im, norm)) }]);
}

function remainder(a: Polynomial, b: Polynomial): Polynomial {
  let rest = a;
  for (;;) {
    if (isZero(rest)) return rest;
    const term = quotientOfMonomials(leading(rest), leading(b));
    if (!term) return rest;
    rest = sub(rest, mul([term], b));
  }
}

/** The largest power product dividing every monomial of every polynomial, as powers. */
function commonPowers(polynomials: readonly Polynomial[], variables: number): number[] {
  const least = new Array<number>(variables).fill(Infinity);
  for (const a of polynomials) for (const m of a) m.powers.forEach((p, k) => (least[k] = Math.min(least[k]!, p)));
  return least.map((p) => (Number.isFinite(p) ? p : 0));
}

/** Which single variable a set of polynomials depends on; null where on none or on several. */
function onlyVariable(polynomials: readonly Polynomial[], variables: number): number | null {
  const used = new Set<number>();
  for (const a of polynomials) for (const m of a) m.powers.forEach((p, k) => p > 0 && used.add(k));
  return used.size === 1 && variables > 0 ? [...used][0]! : null;
}

/**
 * A common factor of nonzero polynomials: the greatest one in a single variable, otherwise the common power product
 * together with the greatest common divisor of those among them that happens to divide all.
 */
export function commonFactor(polynomials: readonly Polynomial[], variables: number): Polynomial {
  const nonzero = polynomials.filter((a) => !isZero(a));
  const one: Polynomial = [{ powers: new Array<number>(variables).fill(0), re: { num: 1n, den: 1n }, im: ZERO }];
  if (nonzero.length === 0) return one;
  if (onlyVariable(nonzero, variables) !== null) {
    let gcd = monic(nonzero[0]!);
    for (const a of nonzero.slice(1)) {
      let b = a;
      let c = gcd;
      while (!isZero(b)) [c, b] = [b, remainder(c, b)];
      gcd = monic(c);
      if (gcd.length === 1 && gcd[0]!.powers.every((p) => p === 0)) return one;
    }
    return gcd;
  }
  const powers = commonPowers(nonzero, variables);
  const shared: Polynomial = [{ powers, re: { num: 1n, den: 1n }, im: ZERO }];
  const degree = (a: Polynomial) => Math.max(...a.map((m) => m.powers.reduce((sum, p) => sum + p, 0)));
  const candidates = nonzero.filter((a) => a.length > 1).sort((a, b) => degree(a) - degree(b) || a.length - b.length);
  for (const candidate of candidates.slice(0, 2))
    if (nonzero.every((a) => exactQuotient(a, candidate) !== null)) return monic(candidate);
  return shared;
}
