import { describe, expect, it } from 'vitest';
import { readExpression, type Vocabulary } from '@/lib/numerics/expression';
import { evaluate, variable } from '@/lib/numerics/polynomial';
import { fromPolynomial } from '@/lib/numerics/rational-function';

const real: Vocabulary = {
  variables: 1,
  symbols: new Map([['lambda', fromPolynomial(variable(1, 0), 1)]]),
  complex: false,
};
const complex: Vocabulary = { ...real, complex: true };

function valueOf(text: string, lambda: number, vocabulary = real): [number, number] {
  const outcome = readExpression(text, vocabulary);
  if ('problem' in outcome) throw new Error(outcome.problem.message);
  const [a, b] = evaluate(outcome.value.num, [lambda]);
  const [c] = evaluate(outcome.value.den, [lambda]);
  return [a / c, b / c];
}

describe('the language of coefficients', () => {
  it.each([
    ['-lambda/2', -0.15],
    ['lambda**2 - 1', -0.91],
    ['-2^2', -4],
    ['2^3^2 / 2^9', 1],
    ['lambda^-2', 1 / 0.09],
    ['1 - 2*(lambda - 3)*lambda', 1 - 2 * -2.7 * 0.3],
    ['(1 - 2*lambda)/(1 + 2*lambda)', 0.4 / 1.6],
    ['0.125*lambda', 0.0375],
    ['  + .5 ', 0.5],
    ['--lambda', 0.3],
    ['1/3/2', 1 / 6],
  ])('reads %s', (text, value) => {
    expect(valueOf(text, 0.3)[0]).toBeCloseTo(value, 14);
  });

  it('takes decimals as the exact decimal', () => {
    const outcome = readExpression('0.79926643', real);
    expect(outcome).toMatchObject({ value: { num: [{ re: { num: 79926643n, den: 100000000n } }] } });
  });

  it('cancels what is common to numerator and denominator', () => {
    const outcome = readExpression('(lambda^2 - 1)/(lambda - 1)', real);
    expect(outcome).toMatchObject({ value: { num: { length: 2 }, den: { length: 1 } } });
  });

  it('has an imaginary unit where the equation is complex, and only there', () => {
    expect(valueOf('i*lambda + i^2', 0.3, complex)).toEqual([-1, 0.3]);
    expect(readExpression('i*lambda', real)).toMatchObject({ problem: { code: 'not-complex', column: 1 } });
  });

  it.each([
    'constructor',
    'import("fs")',
    'f(x)=x',
    '[1,2]',
    '"a"',
    'lambda; lambda',
    'lambda!',
    "lambda'",
    'true',
    'cm',
    'lambda ? 1 : 2',
  ])('refuses %s, which mathjs itself would take', (text) => {
    expect(readExpression(text, real)).toHaveProperty('problem.column');
  });
});
