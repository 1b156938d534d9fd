import { describe, expect, it } from 'vitest';
import type { TableScheme } from '@/lib/entries/definition';
import { additiveTerms, negatedExpression } from '@/lib/entries/negated-expression';
import { formulaOf, readFormula } from '@/lib/entries/scheme-formula';
import type { Equation } from '@/lib/numerics/equation';
import { expressionValue } from '../../support/expression-value';

const read = (text: string, equation: Equation = 'advection') => {
  const outcome = readFormula(text, equation);
  if ('problem' in outcome) throw new Error(`${outcome.problem.column}: ${outcome.problem.message}`);
  return outcome.terms;
};
const problemOf = (text: string, equation: Equation = 'advection') => {
  const outcome = readFormula(text, equation);
  return 'problem' in outcome ? outcome.problem : null;
};
const at = (
  terms: readonly { level: string; offset: string | string[]; coefficient: string }[],
  level: string,
  offset: string,
) => terms.find((term) => term.level === level && String(term.offset) === offset)?.coefficient;

describe('turning the sign of an expression', () => {
  it.each([
    ['1 - 2*lambda', '-1 + 2*lambda'],
    ['-lambda/2', 'lambda/2'],
    ['-(1 - lambda)*r', '(1 - lambda)*r'],
    ['2*-lambda', '-2*-lambda'],
    ['1e-3*r - 4', '-1e-3*r + 4'],
    ['lambda^-1', '-lambda^-1'],
    ['', ''],
  ])('makes %s of it %s', (text, due) => expect(negatedExpression(text)).toBe(due));

  it.each(['1 - 2*lambda', '-(a+b)/2 + c^-2', '1 -', 'lambda*(1-lambda)/2', '(1'])(
    'twice gives %s again, also where it is unfinished',
    (text) => expect(negatedExpression(negatedExpression(text))).toBe(text),
  );

  it('keeps the value but for its sign', () => {
    const text = '-2/3*lambda^2 + (1 - lambda)*3 - -lambda';
    const value = (one: string) => expressionValue(one, { lambda: 0.37 }).re;
    expect(value(negatedExpression(text))).toBeCloseTo(-value(text), 14);
  });

  it('finds terms outside brackets only', () => {
    expect(additiveTerms('u[n,i-1] - (a+b)*c').map(({ sign, body }) => sign + body)).toEqual(['+u[n,i-1]', '-(a+b)*c']);
  });
});

describe('the formula line', () => {
  it('reads leapfrog into its terms', () => {
    const terms = read('u[n+1,i] = u[n-1,i] - lambda*(u[n,i+1] - u[n,i-1])');
    expect(at(terms, '1', '0')).toBe('1');
    expect(at(terms, '-1', '0')).toBe('-1');
    expect(at(terms, '0', '1')).toBe('lambda');
    expect(at(terms, '0', '-1')).toBe('-lambda');
  });

  it('writes what it reads, and reads what it writes', () => {
    const line =
      'u[n+1,i] = (lambda/2 + lambda^2/2)*u[n,i-1] + (1 - lambda^2)*u[n,i] + (-lambda/2 + lambda^2/2)*u[n,i+1]';
    const terms = read(line);
    expect(formulaOf(terms as TableScheme['terms'])).toBe(line);
    expect(read(formulaOf(terms as TableScheme['terms']))).toEqual(terms);
  });

  it('gathers a point that comes twice, and what stands on both sides', () => {
    const terms = read('2*u[n+1,i] - u[n,i] = u[n,i] - 2*lambda*(u[n,i] - u[n,i-1])');
    expect(at(terms, '1', '0')).toBe('2');
    expect(expressionValue(at(terms, '0', '0') ?? '', { lambda: 0.3 }).re).toBeCloseTo(-2 + 0.6, 14);
  });

  it('reads implicit schemes, several dimensions, half offsets and the imaginary unit', () => {
    expect(at(read('(1+2*r)*u[n+1,i] - r*(u[n+1,i-1]+u[n+1,i+1]) = u[n,i]', 'diffusion'), '1', '1')).toBe('-r');
    expect(at(read('u[n+1,i,j] = u[n,i,j] + r_x*(u[n,i+1,j]-2*u[n,i,j]+u[n,i-1,j])', 'diffusion-2d'), '0', '1,0')).toBe(
      '-r_x',
    );
    expect(at(read('u[n+1,i] = u[n,i+1/2]'), '0', '1/2')).toBe('-1');
    expect(at(read('u[n+1,i] = i*sigma*u[n,i]', 'schrodinger'), '0', '0')).toMatch(/^-i\*sigma$|^-1?\*?i\*sigma$/);
  });

  it.each([
    ['u[n+1,i] = u[n,i', 12, 'not closed'],
    ['u[n+1,i] = u[n,q]', 16, "'q' cannot be read"],
    ['u[n+1,i] = u[n,i,j]', 12, '3 indices'],
    ['u[n+1,i] = 3*mu*u[n,i]', 14, "unknown symbol 'mu'"],
    ['u[n+1,i] = u[n,i] + ', 21, 'a term is missing'],
    ['u[n+1,i]', 9, 'no equals sign'],
    ['u[n+1,i] = u[n,i] = 0', 19, 'two equals signs'],
    ['lambda = 2', 1, 'no point'],
    ['u[n+1,i] = u[n,i]*u[n,i-1]', 1, 'linear in u'],
    ['u[n+1,i] + 2 = u[n,i]', 1, 'without a point'],
    ['u[n,i] = u[n,i]', 1, 'everything cancels'],
  ])('refuses %s at column %i', (text, column, words) => {
    const problem = problemOf(text);
    expect(problem?.message).toContain(words);
    expect(problem?.column).toBe(column);
  });

  it('names no placeholder of its own in what it says', () => {
    expect(problemOf('u[n+1,i] = q*u[n,i]')?.message).not.toMatch(/u_\d/);
  });

  it('never throws, whatever is typed', () => {
    for (const text of [
      '=',
      'u[',
      'u[]=u[]',
      'u[n,i]=1/0*u[n,i]',
      '((((',
      'u[n+1,i]=u[n,i]^2',
      'u[n,i]=u[n-1,i]/u[n,i]',
    ])
      expect(problemOf(text), text).not.toBeNull();
  });
});
