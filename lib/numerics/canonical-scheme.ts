/**
 * The one form in which the engine analyses schemes: every table, lines or filtered definition is brought to
 *
 *     Σ coefficient(p) · u^(n + level) at i + offset = 0        (scalar)
 *
 * or to the same with several unknowns (system). Denominators in the parameters are cleared, so that
 * coefficients are polynomials over Q(i); explicit Runge-Kutta lines become two-level tables by expanding
 * their stability function, implicit and compact ones by multiplying through.
 */
import type { Equation } from './equation';
import type { Polynomial } from './polynomial';
import type { Rational } from './rational';

export interface CanonicalTerm {
  /** Integer in the scalar form; half-integers are allowed in systems. */
  readonly level: Rational;
  /** One component per dimension, in grid spacings. */
  readonly offset: readonly Rational[];
  readonly coefficient: Polynomial;
}

export interface ScalarScheme {
  readonly form: 'scalar';
  readonly equation: Equation;
  readonly dims: 1 | 2 | 3;
  readonly timeOrder: 1 | 2;
  /** Names of the parameters, in the order of the powers of every coefficient. */
  readonly parameters: readonly string[];
  /**
   * What each of the equation's own numbers is in terms of `parameters`, where it is not simply one of them: a fixed
   * number, a common symbol, or what a path makes of it. Read it through `equationNumbers` (equation-terms).
   */
  readonly numbers?: Readonly<Record<string, Polynomial>>;
  /** Distinct (level, offset), nonzero coefficients; newest level is 1. */
  readonly terms: readonly CanonicalTerm[];
}

export interface SystemScheme {
  readonly form: 'system';
  readonly equation: Equation;
  readonly dims: 1 | 2 | 3;
  readonly timeOrder: 1 | 2;
  readonly parameters: readonly string[];
  /**
   * What each of the equation's own numbers is in terms of `parameters`, where it is not simply one of them: a fixed
   * number, a common symbol, or what a path makes of it. Read it through `equationNumbers` (equation-terms).
   */
  readonly numbers?: Readonly<Record<string, Polynomial>>;
  readonly unknowns: readonly string[];
  /** In update order. */
  readonly equations: readonly { readonly terms: readonly (CanonicalTerm & { readonly unknown: number })[] }[];
}

export type CanonicalScheme = ScalarScheme | SystemScheme;
