import { describe, expect, it } from 'vitest';
import { TimeMethod } from '@/lib/entries/definition';
import { readTimeMethod } from '@/lib/facts/canonical-time-method';
import { analyseTimeMethod } from '@/lib/numerics/time-method';

function facts(time: unknown) {
  const problems: never[] = [];
  return analyseTimeMethod(readTimeMethod(TimeMethod.parse(time), '', problems)!);
}
const rungeKutta = (A: string[][], b: string[]) => facts({ kind: 'runge-kutta', A, b });
const multistep = (alpha: string[], beta: string[]) => facts({ kind: 'multistep', alpha, beta });
const classical = rungeKutta(
  [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  ['1/6', '1/3', '1/3', '1/6'],
);

describe('Runge-Kutta methods', () => {
  // Hairer & Wanner, Solving Ordinary Differential Equations II, section IV.2 (from memory).
  it('have the limits along the axes that textbooks give', () => {
    expect(classical).toMatchObject({
      imaginaryLimitExact: '2*sqrt(2)',
      orderLinear: 4,
      orderNonlinear: 4,
      explicit: true,
      stages: 4,
    });
    expect(Number(classical.realLimit)).toBeCloseTo(2.785293563405282, 14);
    const third = rungeKutta(
      [
        ['0', '0', '0'],
        ['1', '0', '0'],
        ['1/4', '1/4', '0'],
      ],
      ['1/6', '1/6', '2/3'],
    );
    expect(third).toMatchObject({ imaginaryLimitExact: 'sqrt(3)', orderLinear: 3, orderNonlinear: 3 });
    expect(Number(third.realLimit)).toBeCloseTo(2.512745326618329, 14);
    const second = rungeKutta(
      [
        ['0', '0'],
        ['1/2', '0'],
      ],
      ['0', '1'],
    );
    expect(second).toMatchObject({ imaginaryLimit: '0', realLimitExact: '2' });
  });

  it('tell the linear from the nonlinear order: stages 1/3, 1/2, 1', () => {
    const wicker = rungeKutta(
      [
        ['0', '0', '0'],
        ['1/3', '0', '0'],
        ['0', '1/2', '0'],
      ],
      ['0', '0', '1'],
    );
    expect(wicker).toMatchObject({ orderLinear: 3, orderNonlinear: 2, registersAccumulating: 3 });
  });

  it('know the two-register form where the tableau has one, exactly', () => {
    const williamson = [
      ['0', '0', '0'],
      ['1/3', '0', '0'],
      ['-3/16', '15/16', '0'],
    ];
    expect(rungeKutta(williamson, ['1/6', '3/10', '8/15'])).toMatchObject({
      registersGeneral: 5,
      registersLowStorage: 2,
    });
    expect(rungeKutta(williamson, ['1/6', '3/10', '8/15'].reverse())).toMatchObject({ registersLowStorage: null });
    expect(classical).toMatchObject({ registersGeneral: 6, registersAccumulating: 4, registersLowStorage: null });
  });

  it('keep the implicit ones apart: the midpoint rule has no limit and order 2', () => {
    expect(rungeKutta([['1/2']], ['1'])).toMatchObject({
      explicit: false,
      imaginaryLimit: null,
      realLimit: null,
      orderLinear: 2,
      orderNonlinear: 2,
    });
  });

  it('read printed decimals twice: exactly, and within their rounding', () => {
    const decimal = rungeKutta(
      [
        ['0', '0', '0'],
        ['0.33333333', '0', '0'],
        ['0', '0.66666667', '0'],
      ],
      ['0.25', '0', '0.75'],
    );
    expect(decimal).toMatchObject({ orderLinear: 1, orderNominal: 3 });
  });
});

describe('multistep methods', () => {
  // Limits: Hairer & Wanner II, section V.1, and Durran (2010), table 2.1 (from memory).
  it.each([
    ['Adams-Bashforth 2', ['0', '-1', '1'], ['-1/2', '3/2', '0'], 2, '0', '1'],
    ['Adams-Bashforth 3', ['0', '0', '-1', '1'], ['5/12', '-4/3', '23/12', '0'], 3, '12*sqrt(11)/55', '6/11'],
    [
      'Adams-Bashforth 4',
      ['0', '0', '0', '-1', '1'],
      ['-9/24', '37/24', '-59/24', '55/24', '0'],
      4,
      '4*sqrt(65)/75',
      '3/10',
    ],
    ['Adams-Moulton 3', ['0', '-1', '1'], ['-1/12', '2/3', '5/12'], 3, '0', '6'],
    ['Adams-Moulton 4', ['0', '0', '-1', '1'], ['1/24', '-5/24', '19/24', '9/24'], 4, '0', '3'],
    ['leapfrog', ['-1', '0', '1'], ['0', '2', '0'], 2, '1', '0'],
    ['Milne', ['-1', '0', '1'], ['1/3', '4/3', '1/3'], 4, 'sqrt(3)', '0'],
    ['backward differences 2', ['1/2', '-2', '3/2'], ['0', '0', '1'], 2, null, null],
  ] as const)('%s', (_name, alpha, beta, order, imaginary, real) => {
    const found = multistep([...alpha], [...beta]);
    expect(found).toMatchObject({
      orderLinear: order,
      zeroStable: true,
      imaginaryLimitExact: imaginary,
      realLimitExact: real,
    });
    expect(found.startUpSteps).toBe(found.steps! - 1);
  });

  it('are called zero-unstable where a root of rho lies outside: order 3 in two explicit steps', () => {
    expect(multistep(['-5', '4', '1'], ['2', '4', '0'])).toMatchObject({ orderLinear: 3, zeroStable: false });
  });

  it('are called zero-unstable where a root on the circle is double', () => {
    expect(multistep(['1', '-2', '1'], ['0', '0', '0']).zeroStable).toBe(false);
  });
});
