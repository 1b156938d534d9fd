/** Consistency and orders of a scheme, the terms it adds to its equation, and the values at which it does better. */
import type { CanonicalScheme, ScalarScheme } from './canonical-scheme';
import { CONVENTIONS, type Equation } from './equation';
import { isZeroG } from './gaussian';
import { gradedResidual, isGraded, normalisation, type GradedResidual } from './graded-residual';
import { addedTerms, isTimeSymmetric, residualSeries, type AddedTerm, type ResidualSeries } from './modified-equation';
import { add, scale, type Polynomial } from './polynomial';
import { toNumber } from './rational';
import { polynomialText, quotientText } from './polynomial-text';
import { specialValues, type SpecialValue } from './special-values';
import { systemCharacteristic } from './system-characteristic';

export interface PowerPair {
  dt: number;
  dx: number;
}
export interface OrderResult {
  consistent: boolean;
  orderAtFixedParameter: number | null;
  pT: number | null;
  pX: number | null;
  conditionalTerms: PowerPair[];
  mixedLowest: PowerPair[];
  modifiedEquationLeading: { powerOfITheta: number; coefficient: string } | null;
  modifiedEquationSecond: { powerOfITheta: number; coefficient: string } | null;
  meaning: string | null;
  specialValues: SpecialValue[];
  reason: string | null;
}

export interface TruncationAnalysis {
  readonly order: OrderResult;
  /** The added terms as functions of the parameters (and X, Y, Z), for statements at a value. */
  readonly added: { readonly leading: AddedTerm; readonly second: AddedTerm | null } | null;
}

const HIGHEST = { time: 14, space: 26, degree: 34 } as const;
/** Terms with more derivatives than this are not listed among the conditional and mixed ones. */
const LISTED_DERIVATIVES = { 1: 12, 2: 8, 3: 6 } as const;

const EQUATION_WORDS: Readonly<Record<Equation, string>> = {
  advection: 'u_t + c u_x = 0',
  diffusion: 'u_t = nu u_xx',
  'advection-diffusion': 'u_t + c u_x = nu u_xx',
  wave: 'u_tt = c^2 u_xx',
  schrodinger: 'u_t = i eps u_xx',
  airy: 'u_t + eps u_xxx = 0',
  hyperdiffusion: 'u_t = -kappa u_xxxx',
  'advection-2d': 'u_t + a u_x + b u_y = 0',
  'diffusion-2d': 'u_t = nu (u_xx + u_yy)',
  'diffusion-3d': 'u_t = nu (u_xx + u_yy + u_zz)',
  'wave-2d': 'u_tt = c^2 (u_xx + u_yy)',
  'wave-3d': 'u_tt = c^2 (u_xx + u_yy + u_zz)',
};

const nothing = (reason: string): TruncationAnalysis => ({
  order: {
    consistent: false,
    orderAtFixedParameter: null,
    pT: null,
    pX: null,
    conditionalTerms: [],
    mixedLowest: [],
    modifiedEquationLeading: null,
    modifiedEquationSecond: null,
    meaning: null,
    specialValues: [],
    reason,
  },
  added: null,
});

/** The ratio dt : dx^W held fixed; advection-diffusion is looked at along both. */
function ratios(equation: Equation): number[] {
  if (equation === 'advection-diffusion') return [1, 2];
  const { spaceOrder, timeOrder } = CONVENTIONS[equation];
  return [spaceOrder / timeOrder];
}

/** Terms that are absent within the rounding of the scheme's decimals count as absent. */
interface Reading {
  readonly graded: GradedResidual;
  /** Relative size of what rounding may leave; 0 reads exactly. */
  readonly rounding: number;
}
function isPresent({ graded, rounding }: Reading, dt: number, dx: number): boolean {
  const value = graded.coefficient(dt, dx);
  if (isZeroG(value)) return false;
  return rounding === 0 || Math.hypot(toNumber(value.re), toNumber(value.im)) > rounding * graded.magnitude(dt, dx);
}

/** Least W·dt + dx over all terms; null where none is found up to the highest degree. */
function orderAlong(reading: Reading, ratio: number): number | null {
  const { deepest, multiplicity } = reading.graded;
  for (let total = -deepest - ratio * multiplicity; total <= HIGHEST.space; total++)
    for (let dt = -multiplicity; ratio * dt <= total + deepest; dt++)
      if (isPresent(reading, dt, total - ratio * dt)) return total;
  return null;
}

function firstPure(reading: Reading, direction: 'dt' | 'dx', limit: number): number | null {
  for (let k = 1; k <= limit; k++)
    if (direction === 'dt' ? isPresent(reading, k, 0) : isPresent(reading, 0, k)) return k;
  return null;
}

function listTerms(reading: Reading, limit: number, wanted: (dt: number, dx: number) => boolean): PowerPair[] {
  const list: PowerPair[] = [];
  const { graded } = reading;
  for (let dt = -graded.multiplicity; dt <= limit; dt++)
    for (let dx = -graded.deepest; dx <= limit; dx++)
      if (wanted(dt, dx) && graded.fewestDerivatives(dt, dx) <= limit && isPresent(reading, dt, dx))
        list.push({ dt, dx });
  return list;
}

function reasonBeside(degree: number | null, reading: Reading | null, rounding: number): string | null {
  if (rounding > 0)
    return 'consistent within the rounding of its decimals; as printed they leave a small error that refinement does not remove';
  if (degree === null) return 'no error term was found: the scheme reproduces the solution exactly';
  return reading
    ? null
    : 'dt and dx are tied to each other by fixed numbers, so that orders in time and space cannot be told apart';
}

/** Least degree of the residual; null where none is found. */
function lowestDegree(series: ResidualSeries): number | null {
  for (let k = 0; k <= HIGHEST.degree; k++) if (series.part(k).length > 0) return k;
  return null;
}

const textOf = ({ degree, coefficient }: AddedTerm, names: readonly string[]) => ({
  powerOfITheta: degree,
  coefficient: quotientText(coefficient.num, coefficient.den, names),
});

function scalarOf(scheme: CanonicalScheme): ScalarScheme | string {
  if (scheme.form === 'scalar') return scheme;
  try {
    return { ...systemCharacteristic(scheme).scalar, ...(scheme.numbers ? { numbers: scheme.numbers } : {}) };
  } catch (error) {
    if (error instanceof RangeError)
      return 'the equations do not determine the unknowns: the determinant of the system vanishes';
    throw error;
  }
}

function reasonWithoutNormal(multiplicity: number | null, scheme: ScalarScheme, sum: Polynomial): string {
  if (multiplicity === 0)
    return `does not approximate ${EQUATION_WORDS[scheme.equation]}: the coefficients sum to ${polynomialText(sum, scheme.parameters)}, not to 0, so that a constant is not a solution`;
  return `does not approximate ${EQUATION_WORDS[scheme.equation]}: the time levels do not make a ${scheme.timeOrder === 1 ? 'first' : 'second'} time derivative`;
}

function reasonOf(scheme: ScalarScheme, series: ResidualSeries, degree: number): string {
  const { leading } = addedTerms(series, degree);
  const text = textOf(leading, series.names);
  return `does not approximate ${EQUATION_WORDS[scheme.equation]}: it adds (${text.coefficient}) times the derivative of order ${degree}, which refinement does not remove`;
}

/**
 * Orders of any scheme; systems are read through their characteristic polynomial.
 * @param rounding relative error of the decimals from which the scheme was made; 0 reads every number as exact
 */
export function analyseTruncation(scheme: CanonicalScheme, rounding = 0): TruncationAnalysis {
  const scalar = scalarOf(scheme);
  if (typeof scalar === 'string') return nothing(scalar);
  const { equation, timeOrder, dims } = scalar;
  const normal = normalisation(scalar, (weights) =>
    scalar.terms.reduce<Polynomial>((sum, t) => add(sum, scale(t.coefficient, weights(t.level))), []),
  );
  const isExtended = scheme.form === 'system' && normal !== null && normal.multiplicity > timeOrder;
  if (!normal || (normal.multiplicity !== timeOrder && !isExtended))
    return nothing(reasonWithoutNormal(normal?.multiplicity ?? null, scalar, normal?.value ?? []));
  const graded = gradedResidual(scalar, normal);
  const reading = graded && isGraded(scalar) ? { graded, rounding } : null;
  const series = residualSeries(scalar, normal.value, HIGHEST.degree);
  const isPolynomial = !isExtended && (dims === 1 || timeOrder === 1 || isTimeSymmetric(scalar));

  const along = reading ? ratios(equation).map((ratio) => orderAlong(reading, ratio)) : null;
  const isMixed = equation === 'advection-diffusion';
  const degreeFromOrder = along && !isMixed && along[0] !== null ? along[0]! + CONVENTIONS[equation].spaceOrder : null;
  const degree = degreeFromOrder ?? (isPolynomial && (isMixed || !along) ? lowestDegree(series) : null);
  const spaceOrder = CONVENTIONS[equation].spaceOrder;
  const orderFixed = isMixed ? null : degree === null ? null : degree - spaceOrder;
  const consistent =
    isMixed && along
      ? along.some((order) => order === null || order > 0)
      : degree === null || degree > (isMixed ? 1 : spaceOrder);
  const canAdd = isPolynomial && degree !== null;
  if (!consistent) {
    const reason = canAdd
      ? reasonOf(scalar, series, degree!)
      : `does not approximate ${EQUATION_WORDS[equation]}: the error does not fall under refinement`;
    return nothing(reason);
  }
  const added = canAdd ? addedTerms(series, degree) : null;
  const limit = LISTED_DERIVATIVES[dims];
  return {
    order: {
      consistent: true,
      orderAtFixedParameter: orderFixed,
      pT: reading && firstPure(reading, 'dt', HIGHEST.time),
      pX: reading && firstPure(reading, 'dx', HIGHEST.space),
      conditionalTerms: reading ? listTerms(reading, limit, (dt, dx) => dt < 0 || dx < 0) : [],
      mixedLowest: reading
        ? listTerms(reading, limit, (dt, dx) => dt > 0 && dx > 0)
            .sort((a, b) => a.dt + a.dx - b.dt - b.dx || a.dt - b.dt)
            .slice(0, 2)
        : [],
      modifiedEquationLeading: added && textOf(added.leading, series.names),
      modifiedEquationSecond: added?.second ? textOf(added.second, series.names) : null,
      meaning: null,
      specialValues: canAdd && !isMixed ? specialValues(scalar, series, degree, degree - spaceOrder) : [],
      reason: reasonBeside(degree, reading, rounding),
    },
    added,
  };
}
