/**
 * A scheme as plain doubles: what a browser receives to draw curves, and what every numeric analysis evaluates.
 * Systems are carried by their characteristic polynomial, from which the roots that stand at z = 1 for every
 * wave (stationary, semisimple) have been divided out exactly and are only counted.
 */
import type { CanonicalScheme, CanonicalTerm, ScalarScheme } from './canonical-scheme';
import type { Equation } from './equation';
import { systemCharacteristic } from './system-characteristic';
import { complexArray, type ComplexArray } from './roots';
import { equationNumbers } from './equation-terms';
import type { Polynomial } from './polynomial';
import { toNumber } from './rational';

export interface NumericMonomial {
  readonly powers: readonly number[];
  readonly re: number;
  readonly im: number;
}

export interface NumericTerm {
  /** Power of z, 0 at the oldest level. */
  readonly z: number;
  readonly offset: readonly number[];
  /** Value of the coefficient is Σ (re + i im) Π parameter^power. */
  readonly monomials: readonly NumericMonomial[];
}

export interface NumericScheme {
  readonly form: 'scalar' | 'system';
  readonly equation: Equation;
  readonly dims: 1 | 2 | 3;
  readonly timeOrder: 1 | 2;
  readonly parameters: readonly string[];
  /** The equation's own numbers as polynomials in `parameters`. */
  readonly numbers: Readonly<Record<string, readonly NumericMonomial[]>>;
  /** Roots per wave that depend on it: newest level − oldest level. */
  readonly degree: number;
  /** Roots z = 1 of every wave, left out of the polynomial. */
  readonly stationaryRoots: number;
  readonly terms: readonly NumericTerm[];
  /** Whether all coefficients are real: roots at −theta are then conjugates of those at theta. */
  readonly real: boolean;
  /** Per dimension: whether mirroring this component of all offsets changes nothing. */
  readonly mirrored: readonly boolean[];
}

const numericMonomials = (polynomial: Polynomial): NumericMonomial[] =>
  polynomial.map((m) => ({ powers: m.powers, re: toNumber(m.re), im: toNumber(m.im) }));

function numericTerm(term: CanonicalTerm, oldest: number): NumericTerm {
  return {
    z: Math.round(toNumber(term.level) - oldest),
    offset: term.offset.map(toNumber),
    monomials: numericMonomials(term.coefficient),
  };
}

const keyOf = (z: number, offset: readonly number[]) => `${z}:${offset.map((x) => (x === 0 ? 0 : x)).join(',')}`;

function isMirrored(terms: readonly NumericTerm[], dimension: number): boolean {
  const byKey = new Map(terms.map((t) => [keyOf(t.z, t.offset), t]));
  return terms.every((t) => {
    const image = byKey.get(
      keyOf(
        t.z,
        t.offset.map((x, k) => (k === dimension ? -x : x)),
      ),
    );
    return image !== undefined && JSON.stringify(image.monomials) === JSON.stringify(t.monomials);
  });
}

/** The scalar scheme whose roots are the amplification factors, and the number of stationary roots divided out. */
export function characteristicOf(scheme: CanonicalScheme): { scalar: ScalarScheme; stationaryRoots: number } {
  return scheme.form === 'scalar' ? { scalar: scheme, stationaryRoots: 0 } : systemCharacteristic(scheme);
}

/** @throws {RangeError} if the scheme has no terms */
export function compileScheme(scheme: CanonicalScheme): NumericScheme {
  const { scalar, stationaryRoots } = characteristicOf(scheme);
  if (scalar.terms.length === 0) throw new RangeError('compileScheme: the scheme has no terms');
  const levels = scalar.terms.map((t) => toNumber(t.level));
  const oldest = Math.min(...levels);
  const terms = scalar.terms.map((t) => numericTerm(t, oldest));
  return {
    form: scheme.form,
    equation: scheme.equation,
    dims: scheme.dims,
    timeOrder: scheme.timeOrder,
    parameters: scheme.parameters,
    numbers: Object.fromEntries(
      [...equationNumbers(scheme)].map(([name, polynomial]) => [name, numericMonomials(polynomial)]),
    ),
    degree: Math.round(Math.max(...levels) - oldest),
    stationaryRoots,
    terms,
    real: terms.every((t) => t.monomials.every((m) => m.im === 0)),
    mirrored: Array.from({ length: scheme.dims }, (_, d) => isMirrored(terms, d)),
  };
}

/**
 * Coefficients of all terms at parameter values, in the order of `terms`.
 * @param tilt multiplies every parameter by 1 + i·tilt: a way round the points where roots collide
 */
export function coefficientsAt(scheme: NumericScheme, parameters: readonly number[], tilt = 0): ComplexArray {
  const out = complexArray(scheme.terms.length);
  scheme.terms.forEach((term, j) => {
    for (const m of term.monomials) {
      let re = m.re;
      let im = m.im;
      for (let k = 0; k < m.powers.length; k++)
        for (let e = m.powers[k]!; e > 0; e--) {
          [re, im] = tilt === 0 ? [re, im] : [re - tilt * im, im + tilt * re];
          re *= parameters[k]!;
          im *= parameters[k]!;
        }
      out.re[j]! += re;
      out.im[j]! += im;
    }
  });
  return out;
}

/** cos and sin of `angle`, exact where it is a multiple of pi/2 to rounding. */
export function cosSin(angle: number): [number, number] {
  const quarters = angle / (Math.PI / 2);
  const nearest = Math.round(quarters);
  if (Math.abs(quarters - nearest) < 1e-15 * Math.max(1, Math.abs(nearest)))
    return [
      [1, 0],
      [0, 1],
      [-1, 0],
      [0, -1],
    ][((nearest % 4) + 4) % 4] as [number, number];
  return [Math.cos(angle), Math.sin(angle)];
}

/** Polynomial in z, ascending from the oldest level, from coefficients already evaluated. */
export function polynomialFrom(
  scheme: NumericScheme,
  coefficients: ComplexArray,
  theta: readonly number[],
): ComplexArray {
  const out = complexArray(scheme.degree + 1);
  for (let j = 0; j < scheme.terms.length; j++) {
    const term = scheme.terms[j]!;
    let angle = 0;
    for (let d = 0; d < theta.length; d++) angle += term.offset[d]! * theta[d]!;
    const [c, s] = cosSin(angle);
    const re = coefficients.re[j]!;
    const im = coefficients.im[j]!;
    out.re[term.z]! += re * c - im * s;
    out.im[term.z]! += re * s + im * c;
  }
  return out;
}

/**
 * The amplification polynomial at one wave.
 * @param parameters values in the order of `scheme.parameters`
 * @param theta      one angle k h per dimension, radians
 */
export const polynomialAt = (scheme: NumericScheme, parameters: readonly number[], theta: readonly number[]) =>
  polynomialFrom(scheme, coefficientsAt(scheme, parameters), theta);
