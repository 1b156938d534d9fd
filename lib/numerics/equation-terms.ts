/**
 * The right-hand side of every equation as data: dt^timeOrder · L = Σ coefficient · parameter^power · (dx ∂)^powers.
 * With ∂ → iθ/dx this is σ (first order in time) or σ² (second order in time).
 */
import type { CanonicalScheme } from './canonical-scheme';
import { CONVENTIONS, type Equation } from './equation';
import { constant, mul, variable, type Polynomial } from './polynomial';
import { neg, ONE, ZERO, type Rational } from './rational';

export interface EquationTerm {
  readonly parameter: string;
  readonly parameterPower: 1 | 2;
  readonly re: Rational;
  readonly im: Rational;
  /** Order of the derivative in each dimension. */
  readonly powers: readonly number[];
}

const SIGNS: Readonly<Record<Equation, readonly ('+' | '-' | 'i')[]>> = {
  advection: ['-'],
  diffusion: ['+'],
  'advection-diffusion': ['-', '+'],
  wave: ['+'],
  schrodinger: ['i'],
  airy: ['-'],
  hyperdiffusion: ['-'],
  'advection-2d': ['-', '-'],
  'diffusion-2d': ['+', '+'],
  'diffusion-3d': ['+', '+', '+'],
  'wave-2d': ['+', '+'],
  'wave-3d': ['+', '+', '+'],
};

/** Operator terms in the order of the equation. */
export function equationTerms(equation: Equation): EquationTerm[] {
  const { dims, timeOrder, operators, parameters } = CONVENTIONS[equation];
  return operators.map((order, k) => {
    const sign = SIGNS[equation][k]!;
    return {
      parameter: parameters[Math.min(k, parameters.length - 1)]!,
      parameterPower: timeOrder,
      re: sign === '+' ? ONE : sign === '-' ? neg(ONE) : ZERO,
      im: sign === 'i' ? ONE : ZERO,
      powers: Array.from({ length: dims }, (_, axis) => (dims === 1 || axis === k ? order : 0)),
    };
  });
}

/**
 * Each of the equation's own numbers as a polynomial in the parameters of the scheme: itself, a common symbol, a fixed
 * number, or what a path makes of it.
 */
export function equationNumbers(scheme: CanonicalScheme): ReadonlyMap<string, Polynomial> {
  const { parameters, equation, numbers } = scheme;
  const { common } = CONVENTIONS[equation];
  const map = new Map<string, Polynomial>();
  for (const name of CONVENTIONS[equation].parameters) {
    const given = numbers?.[name];
    const index = parameters.indexOf(name) >= 0 ? parameters.indexOf(name) : common ? parameters.indexOf(common) : -1;
    if (given) map.set(name, given);
    else if (index >= 0) map.set(name, variable(parameters.length, index));
    else throw new RangeError(`equationNumbers: the scheme has no number '${name}'`);
  }
  return map;
}

/** Coefficient polynomials of σ (or σ²) by the powers of (iθ_x, iθ_y, iθ_z). */
export function symbolTerms(scheme: CanonicalScheme): { powers: readonly number[]; coefficient: Polynomial }[] {
  const numbers = equationNumbers(scheme);
  return equationTerms(scheme.equation).map(({ parameter, parameterPower, re, im, powers }) => {
    const number = numbers.get(parameter)!;
    const product = parameterPower === 2 ? mul(number, number) : number;
    return { powers, coefficient: mul(product, constant(scheme.parameters.length, re, im)) };
  });
}
