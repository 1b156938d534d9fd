/** Orders and modified equations of schemes from the literature, against an independent computer-algebra computation. */
import { describe, expect, it } from 'vitest';
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { analyseTruncation } from '@/lib/numerics/truncation';
import { expressionValue } from '../support/expression-value';
import { differences, referenceValues } from '../support/reference-values';

interface Term {
  powerOfITheta: number;
  coefficient: string;
}
interface Case {
  name: string;
  source: string;
  definition: unknown;
  order: Record<string, unknown> & { modifiedEquationLeading?: Term | null; modifiedEquationSecond?: Term | null };
}

/** Unrelated numbers: two formulas that agree at both points are the same. */
const POINTS = [
  {
    lambda: 0.37,
    r: 0.23,
    sigma: 0.41,
    mu: 0.19,
    q: 0.13,
    lambda_x: 0.31,
    lambda_y: 0.47,
    r_x: 0.17,
    r_y: 0.29,
    r_z: 0.11,
    X: 0.7,
    Y: 1.3,
    Z: 0.9,
  },
  {
    lambda: 1.71,
    r: 0.83,
    sigma: -0.77,
    mu: 0.59,
    q: 0.53,
    lambda_x: -0.91,
    lambda_y: 0.27,
    r_x: 0.77,
    r_y: 0.39,
    r_z: 0.61,
    X: -1.1,
    Y: 0.6,
    Z: 0.4,
  },
];

function expectSameTerm(found: Term | null, due: Term) {
  expect(found?.powerOfITheta).toBe(due.powerOfITheta);
  for (const point of POINTS) {
    const [a, b] = [expressionValue(found!.coefficient, point), expressionValue(due.coefficient, point)];
    expect(a.re).toBeCloseTo(b.re, 11);
    expect(a.im).toBeCloseTo(b.im, 11);
  }
}

describe.each(referenceValues<Case[]>('scheme-orders.json'))('$name ($source)', ({ definition, order }) => {
  const { scheme } = canonicalScheme(SchemeDefinition.parse(definition));
  const found = analyseTruncation(scheme!).order;
  const { modifiedEquationLeading, modifiedEquationSecond, ...orders } = order;

  it('has the orders of the reference', () => {
    expect(differences(orders, found)).toEqual([]);
  });

  if (modifiedEquationLeading)
    it('adds the leading terms of the reference to its equation', () => {
      expectSameTerm(found.modifiedEquationLeading, modifiedEquationLeading);
      if (modifiedEquationSecond) expectSameTerm(found.modifiedEquationSecond, modifiedEquationSecond);
    });
});
