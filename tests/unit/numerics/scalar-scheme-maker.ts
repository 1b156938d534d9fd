/** Scalar schemes for tests, written as rows of numbers: the engine's canonical form without the definition language. */
import type { CanonicalTerm, ScalarScheme } from '@/lib/numerics/canonical-scheme';
import type { Equation } from '@/lib/numerics/equation';
import { add, constant, type Polynomial } from '@/lib/numerics/polynomial';
import { parseRational, ZERO } from '@/lib/numerics/rational';

/** Ascending powers of the parameter, each "p/q"; "i p/q" is imaginary. */
export type Powers = readonly string[];
/** [level, offset, coefficient] */
export type Row = readonly [level: number, offset: number | string, coefficient: Powers];

export function coefficientOf(powers: Powers): Polynomial {
  let sum: Polynomial = [];
  powers.forEach((text, k) => {
    const imaginary = text.startsWith('i ');
    const value = parseRational(imaginary ? text.slice(2) : text);
    const term = imaginary ? constant(1, ZERO, value) : constant(1, value);
    sum = add(
      sum,
      term.map((monomial) => ({ ...monomial, powers: [k] })),
    );
  });
  return sum;
}

export function scalarScheme(
  rows: readonly Row[],
  options: { equation?: Equation; timeOrder?: 1 | 2; parameter?: string } = {},
): ScalarScheme {
  const byPlace = new Map<string, CanonicalTerm>();
  for (const [level, offset, powers] of rows) {
    const present = byPlace.get(`${level},${offset}`)?.coefficient ?? [];
    byPlace.set(`${level},${offset}`, {
      level: parseRational(String(level)),
      offset: [parseRational(String(offset))],
      coefficient: add(present, coefficientOf(powers)),
    });
  }
  return {
    form: 'scalar',
    equation: options.equation ?? 'advection',
    dims: 1,
    timeOrder: options.timeOrder ?? 1,
    parameters: [options.parameter ?? 'lambda'],
    terms: [...byPlace.values()].filter(({ coefficient }) => coefficient.length > 0),
  };
}

/** Reproducible numbers in [0, 1). */
export function dice(seed: number): () => number {
  let state = seed;
  return () => {
    state = (state * 1_103_515_245 + 12_345) % 2_147_483_648;
    return state / 2_147_483_648;
  };
}
