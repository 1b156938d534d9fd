/** Quotients of polynomials over Q(i), kept reduced where the common factor is found by plain division. */
import { commonFactor, exactQuotient, monic } from './polynomial-division';
import { add as addP, constant, isZero as isZeroP, mul as mulP, neg as negP, type Polynomial } from './polynomial';
import { ONE, type Rational } from './rational';

export interface RationalFunction {
  readonly num: Polynomial;
  /** Nonzero, leading coefficient 1. */
  readonly den: Polynomial;
}

const isConstant = (a: Polynomial) => a.length === 0 || (a.length === 1 && a[0]!.powers.every((p) => p === 0));

/** @throws {RangeError} if `den` is the zero polynomial */
function reduced(num: Polynomial, den: Polynomial, variables: number): RationalFunction {
  if (isZeroP(den)) throw new RangeError('rational function: denominator is identically 0');
  if (isZeroP(num)) return { num, den: constant(variables, ONE) };
  if (!isConstant(den)) {
    const factor = commonFactor([num, den], variables);
    if (!isConstant(factor)) {
      num = exactQuotient(num, factor) ?? num;
      den = exactQuotient(den, factor) ?? den;
    }
  }
  const unit = monic(den);
  const scale = exactQuotient(unit, den)!;
  return { num: mulP(num, scale), den: unit };
}

export const fromPolynomial = (num: Polynomial, variables: number): RationalFunction => ({
  num,
  den: constant(variables, ONE),
});
export const fromRational = (value: Rational, variables: number): RationalFunction =>
  fromPolynomial(constant(variables, value), variables);

export const addF = (a: RationalFunction, b: RationalFunction, variables: number): RationalFunction =>
  isConstant(a.den) && isConstant(b.den)
    ? { num: addP(a.num, b.num), den: a.den }
    : reduced(addP(mulP(a.num, b.den), mulP(b.num, a.den)), mulP(a.den, b.den), variables);
export const negF = (a: RationalFunction): RationalFunction => ({ num: negP(a.num), den: a.den });
export const mulF = (a: RationalFunction, b: RationalFunction, variables: number): RationalFunction =>
  isConstant(a.den) && isConstant(b.den)
    ? { num: mulP(a.num, b.num), den: a.den }
    : reduced(mulP(a.num, b.num), mulP(a.den, b.den), variables);
/** @throws {RangeError} if b is identically 0 */
export const divF = (a: RationalFunction, b: RationalFunction, variables: number): RationalFunction =>
  reduced(mulP(a.num, b.den), mulP(a.den, b.num), variables);

/**
 * Polynomials proportional to the given functions, with no common polynomial factor that plain division finds:
 * denominators are cleared by their least common multiple as far as one divides the other.
 */
export function clearDenominators(functions: readonly RationalFunction[], variables: number): Polynomial[] {
  let multiple: Polynomial = constant(variables, ONE);
  for (const { den } of functions) {
    if (exactQuotient(multiple, den)) continue;
    const factor = commonFactor([multiple, den], variables);
    multiple = mulP(multiple, exactQuotient(den, factor) ?? den);
  }
  const cleared = functions.map(({ num, den }) => mulP(num, exactQuotient(multiple, den)!));
  const factor = commonFactor(cleared, variables);
  return isConstant(factor) ? cleared : cleared.map((a) => exactQuotient(a, factor) ?? a);
}
