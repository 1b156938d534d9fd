/**
 * The parameter values at which the picture of a crossing curve over the wave can change: between two neighbours of
 * them the curve has the same branches in the same order, so that one rational value decides for all.
 */
import { AlgebraicNumber } from '../algebraic-number';
import {
  atOuter,
  type BivariatePolynomial,
  bivariateGcd,
  exactBivariateQuotient,
  primitive,
  splitSquareFree,
} from '../bivariate-polynomial';
import {
  exactQuotient,
  gcd,
  type IntegerPolynomial,
  primitivePart,
  squareFreeDecomposition,
} from '../integer-polynomial';
import { isolateRealRoots } from '../real-roots';
import { discriminant, resultant } from '../resultant';
import type { CrossingCurve, CurveFactor } from './crossing-curve';

/** A curve split into components that share no factor. */
export interface CurveComponents {
  readonly variable: CrossingCurve['variable'];
  /** Square-free and pairwise coprime, in both variables. */
  readonly mixed: readonly BivariatePolynomial[];
  /** Square-free, pairwise coprime: waves that are special for every parameter. */
  readonly waves: readonly IntegerPolynomial[];
  /** Square-free, pairwise coprime: parameters that are special for every wave. */
  readonly parameters: readonly IntegerPolynomial[];
}

/** Adds a polynomial to a coprime basis: only what is new of it. */
function include(basis: IntegerPolynomial[], addition: IntegerPolynomial, check: () => void): void {
  for (const { factor } of squareFreeDecomposition(addition, check)) {
    let rest = factor;
    for (const known of basis) {
      if (rest.length <= 1) break;
      const common = gcd(rest, known, check);
      if (common.length > 1) rest = primitivePart(exactQuotient(rest, common)!);
    }
    if (rest.length > 1) basis.push(rest);
  }
}

export function components(curve: CrossingCurve, check: () => void): CurveComponents {
  const mixed: BivariatePolynomial[] = [];
  const waves: IntegerPolynomial[] = [];
  const parameters: IntegerPolynomial[] = [];
  for (const { polynomial } of curve.factors as readonly CurveFactor[]) {
    const split = splitSquareFree(polynomial, check);
    include(parameters, split.inner, check);
    include(waves, split.outer, check);
    let rest = split.mixed;
    for (const known of mixed) {
      if (rest.length <= 1) break;
      const common = bivariateGcd(rest, known, check);
      if (common.length > 1) rest = primitive(exactBivariateQuotient(rest, common)!);
    }
    if (rest.length > 1) mixed.push(rest);
  }
  return { variable: curve.variable, mixed, waves, parameters };
}

/** Coprime square-free polynomials in the parameter whose real roots hold every critical value; 0 is always one. */
export function criticalPolynomials(curve: CurveComponents, check: () => void): IntegerPolynomial[] {
  const basis: IntegerPolynomial[] = [[0n, 1n]];
  for (const polynomial of curve.parameters) include(basis, polynomial, check);
  for (const component of curve.mixed) {
    if (curve.variable === 'cosine') {
      include(basis, atOuter(component, 1n), check);
      include(basis, atOuter(component, -1n), check);
    } else include(basis, component.at(-1)!, check);
    for (const wave of curve.waves) {
      const inside = withoutEnds(wave);
      if (inside.length > 1)
        include(
          basis,
          resultant(
            inside.map((c) => (c === 0n ? [] : [c])),
            component,
            check,
          ),
          check,
        );
    }
  }
  curve.mixed.forEach((component, k) => {
    include(basis, discriminant(component, check), check);
    for (const other of curve.mixed.slice(0, k)) include(basis, resultant(component, other, check), check);
  });
  return basis;
}

/** The ends cos θ = ±1 are looked at by themselves. */
function withoutEnds(wave: IntegerPolynomial): IntegerPolynomial {
  let rest = wave;
  for (const end of [1n, -1n]) rest = exactQuotient(rest, [-end, 1n]) ?? rest;
  return rest;
}

/**
 * All real critical values, ascending.
 * @param side 'non-negative' leaves out values below 0
 */
export function criticalValues(
  basis: readonly IntegerPolynomial[],
  side: 'both' | 'non-negative',
  check: () => void,
): AlgebraicNumber[] {
  const values = basis
    .flatMap((polynomial) =>
      isolateRealRoots(polynomial, undefined, check).map((root) => new AlgebraicNumber(polynomial, root)),
    )
    .filter((value) => side === 'both' || value.compareRational({ num: 0n, den: 1n }) >= 0);
  return values.sort((a, b) => a.compare(b));
}
