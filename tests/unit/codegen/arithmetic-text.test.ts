import { describe, expect, it } from 'vitest';
import { C } from '@/lib/codegen/c';
import { coefficientSource, literalSource } from '@/lib/codegen/coefficient';
import { combine } from '@/lib/codegen/combination';
import { infix } from '@/lib/codegen/expression-tree';
import { FORTRAN } from '@/lib/codegen/fortran';
import { pythonSweep } from '@/lib/codegen/python';
import { wrapStatement } from '@/lib/codegen/wrap-text';
import { readExpression } from '@/lib/numerics/expression';
import { variable } from '@/lib/numerics/polynomial';
import { fromPolynomial, type RationalFunction } from '@/lib/numerics/rational-function';
import { parseRational } from '@/lib/numerics/rational';

function coefficient(text: string): RationalFunction {
  const outcome = readExpression(text, {
    variables: 1,
    symbols: new Map([['lam', fromPolynomial(variable(1, 0), 1)]]),
    complex: false,
  });
  if (!('value' in outcome)) throw new Error(outcome.problem.message);
  return outcome.value;
}
/** "offset: coefficient" pairs over u. */
function formula(pairs: [number, string][]) {
  const terms = pairs.map(([offset, text]) => ({ array: 'u', offset, coefficient: coefficient(text) }));
  const { node, coefficients } = combine(terms, new Map([['u', 'a']]), ['lam']);
  const soften = (text: string) => text.replaceAll('\u00a0', ' ');
  return {
    node,
    c: soften(infix(node, C)),
    fortran: infix(node, FORTRAN),
    hoisted: coefficients.map((k) => `${k.name} = ${coefficientSource(k.value, ['lam'], C.literal)}`),
  };
}

describe('an exact number in code', () => {
  it.each([
    // number       C and Python          Fortran
    ['3', '3.0', '3.0_wp'],
    ['-2', '(-2.0)', '(-2.0_wp)'],
    ['1/2', '0.5', '0.5_wp'],
    ['-1/12', '(-1.0/12.0)', '(-1.0_wp/12.0_wp)'],
    ['2/3', '(2.0/3.0)', '(2.0_wp/3.0_wp)'],
    ['0.79926643', '(79926643.0/100000000.0)', '(79926643.0_wp/100000000.0_wp)'],
  ])('%s is a quotient that every compiler rounds alike', (text, c, fortran) => {
    expect(literalSource(parseRational(text))).toBe(c);
    expect(literalSource(parseRational(text), '_wp')).toBe(fortran);
  });
});

describe('a coefficient in code', () => {
  it.each([
    ['lam^2/2 + lam/2', '0.5*lam + 0.5*lam*lam'],
    ['lam^2 - 1', 'lam*lam - 1.0'],
    ['2*lam/(1+2*lam)', '2.0*lam/(1.0 + 2.0*lam)'],
    ['(1-2*lam)/(1+2*lam)', '(1.0 - 2.0*lam)/(1.0 + 2.0*lam)'],
    ['-lam^3/6', '-(1.0/6.0)*lam*lam*lam'],
  ])('%s reads %s: powers are products, denominators are cleared', (text, source) => {
    expect(coefficientSource(coefficient(text), ['lam'], (q) => literalSource(q))).toBe(source);
  });
});

describe('a combination of neighbours', () => {
  it('takes opposite coefficients together and keeps a plain parameter by its name', () => {
    expect(
      formula([
        [-1, 'lam'],
        [1, '-lam'],
        [0, '1'],
      ]),
    ).toMatchObject({
      c: 'u[i] - lam*(u[i + 1] - u[i - 1])',
      fortran: 'u(i) - lam*(u(i+1) - u(i-1))',
      hoisted: [],
    });
  });

  it('computes products of the parameters once', () => {
    const { c, hoisted } = formula([
      [-2, '-lam/12'],
      [-1, '2*lam/3'],
      [1, '-2*lam/3'],
      [2, 'lam/12'],
    ]);
    expect(c).toBe('a2*(u[i + 2] - u[i - 2]) - a1*(u[i + 1] - u[i - 1])');
    expect(hoisted).toEqual(['a1 = (2.0/3.0)*lam', 'a2 = (1.0/12.0)*lam']);
  });

  it('begins with a minus sign only where every term has one', () => {
    expect(
      formula([
        [0, '-lam'],
        [1, 'lam^2'],
      ]).c,
    ).toBe('ap1*u[i + 1] - lam*u[i]');
    expect(
      formula([
        [0, '-lam'],
        [1, '-lam^2'],
      ]).c,
    ).toBe('-lam*u[i] - ap1*u[i + 1]');
  });

  it('becomes ufunc calls in the same order, with no temporary array', () => {
    const { node } = formula([
      [-1, '-lam'],
      [1, '-lam'],
      [0, '1'],
    ]);
    const { lines, scratch } = pythonSweep([{ kind: 'store', array: 'w', node }], (name) => `self.${name}`);
    expect(lines).toEqual(['np.add(u_p1, u_m1, out=w)', 'np.multiply(self.lam, w, out=w)', 'np.subtract(u, w, out=w)']);
    expect(scratch).toEqual([]);
  });
});

describe('a sweep in NumPy that overwrites what it reads', () => {
  it('puts the intermediate values into scratch', () => {
    const terms = [
      { array: 'w', offset: 0, coefficient: coefficient('1') },
      { array: 'u', offset: 1, coefficient: coefficient('-lam') },
      { array: 'u', offset: -1, coefficient: coefficient('lam') },
    ];
    const { node } = combine(terms, new Map(), ['lam']);
    const { lines, scratch } = pythonSweep([{ kind: 'store', array: 'w', node }], (name) => `self.${name}`);
    expect(lines).toEqual([
      'np.subtract(u_p1, u_m1, out=s)',
      'np.multiply(self.lam, s, out=s)',
      'np.subtract(w, s, out=w)',
    ]);
    expect(scratch).toEqual(['s']);
  });
});

describe('a long statement', () => {
  it('is broken before a sign, with the mark of continuation that Fortran wants', () => {
    const text = `w(i) = ${Array.from({ length: 12 }, (_, k) => `a${k}*u(i+${k})`).join(' + ')}`;
    const lines = wrapStatement(text, 60, ' &').split('\n');
    expect(Math.max(...lines.map((l) => l.length))).toBeLessThanOrEqual(62);
    expect(lines.slice(0, -1).every((l) => l.endsWith(' &'))).toBe(true);
    expect(lines.map((l) => l.replace(' &', '').trim()).join(' ')).toBe(text);
  });
});
