/** Laurent polynomials in the grid shifts E_x, E_y, E_z with polynomial coefficients in the parameters. */
import { add as addP, isZero, mul as mulP, type Polynomial } from './polynomial';

export interface ShiftTerm {
  /** Whole grid spacings, one per dimension. */
  readonly offset: readonly number[];
  readonly coefficient: Polynomial;
}
/** Distinct offsets, nonzero coefficients. */
export type ShiftPolynomial = readonly ShiftTerm[];

export function collectShifts(terms: Iterable<ShiftTerm>): ShiftPolynomial {
  const byOffset = new Map<string, ShiftTerm>();
  for (const term of terms) {
    const key = term.offset.join(',');
    const present = byOffset.get(key);
    byOffset.set(
      key,
      present ? { offset: term.offset, coefficient: addP(present.coefficient, term.coefficient) } : term,
    );
  }
  return [...byOffset.values()].filter((term) => !isZero(term.coefficient));
}

export const addShifts = (a: ShiftPolynomial, b: ShiftPolynomial): ShiftPolynomial => collectShifts([...a, ...b]);

export const scaleShifts = (a: ShiftPolynomial, factor: Polynomial): ShiftPolynomial =>
  collectShifts(a.map(({ offset, coefficient }) => ({ offset, coefficient: mulP(coefficient, factor) })));

export function mulShifts(a: ShiftPolynomial, b: ShiftPolynomial): ShiftPolynomial {
  const products: ShiftTerm[] = [];
  for (const x of a)
    for (const y of b)
      products.push({
        offset: x.offset.map((k, axis) => k + y.offset[axis]!),
        coefficient: mulP(x.coefficient, y.coefficient),
      });
  return collectShifts(products);
}

/** a⁰ … aⁿ. */
export function shiftPowers(a: ShiftPolynomial, one: ShiftPolynomial, highest: number): ShiftPolynomial[] {
  const powers = [one];
  for (let k = 1; k <= highest; k++) powers.push(mulShifts(powers[k - 1]!, a));
  return powers;
}
