import { describe, expect, it } from 'vitest';
import { growthAsymptotics } from '@/lib/numerics/growth';
import { characteristicOf, compileScheme } from '@/lib/numerics/numeric-scheme';
import { variable } from '@/lib/numerics/polynomial';
import { withParameters } from '@/lib/numerics/restricted-scheme';
import { CASES, schemeFrom } from './amplification-case';

const derivative = (...offsets: string[]) => ({ kind: 'stencil', dims: 1, derivative: 1, offsets, weights: null });
const advection = (space: unknown, time: unknown) => ({
  kind: 'scheme',
  equation: 'advection',
  form: 'lines',
  space: [space],
  time,
});
const multistep = (alpha: string[], beta: string[]) => ({ kind: 'multistep', alpha, beta });

const central = derivative('-1', '0', '1');
const upwind3 = derivative('-2', '-1', '0', '1');
const upwind5 = derivative('-3', '-2', '-1', '0', '1', '2');
const euler = multistep(['-1', '1'], ['1', '0']);
const midpoint = {
  kind: 'runge-kutta',
  A: [
    ['0', '0'],
    ['1/2', '0'],
  ],
  b: ['0', '1'],
};
const thirdCoefficientEighth = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0'],
    ['1/4', '0', '0'],
    ['0', '1/2', '0'],
  ],
  b: ['0', '0', '1'],
};

const withOneNumber = (definition: unknown) => {
  const scheme = schemeFrom(definition);
  return withParameters(
    scheme,
    ['p'],
    scheme.parameters.map(() => variable(1, 0)),
  );
};
const numeric = (definition: unknown) => compileScheme(withOneNumber(definition));
const scalarOf = (definition: unknown) => characteristicOf(withOneNumber(definition)).scalar;

describe('growth exponents', () => {
  it.each([
    // The exponents follow from the Newton polygon of ln|z|; computed by hand for forward Euler with upwind 3 (q = 3,
    // K = 3/4), with upwind 5 (q = 5/2, K = sqrt(10)/3) and for RK2 with upwind 5 (q = 10, K = 25/24).
    ['forward Euler with third-order upwind', advection(upwind3, euler), '3', 3 / 4],
    ['forward Euler with fifth-order upwind', advection(upwind5, euler), '5/2', Math.sqrt(10) / 3],
    ['RK2 with fifth-order upwind', advection(upwind5, midpoint), '10', 25 / 24],
    [
      'BDF3 with central differences',
      advection(central, multistep(['-1/3', '3/2', '-3', '11/6'], ['0', '0', '0', '1'])),
      '4',
      1 / 4,
    ],
    [
      'Adams-Moulton 3 with central differences',
      advection(central, multistep(['0', '-1', '1'], ['-1/12', '2/3', '5/12'])),
      '4',
      1 / 24,
    ],
    [
      'three stages with cubic coefficient 1/8, central differences',
      advection(central, thirdCoefficientEighth),
      '6',
      1 / 128,
    ],
  ])('%s: max|z| − 1 ~ K lambda^q', (_, definition, q, factor) => {
    const growth = growthAsymptotics(numeric(definition), 1)!;
    expect(growth.q).toBe(q);
    expect(growth.factor).toBeCloseTo(factor, 9);
    expect(growth).toMatchObject({ method: 'numeric', tolerance: '1e-8', exponentMethod: 'numeric' });
    const known = growthAsymptotics(numeric(definition), 1, scalarOf(definition))!;
    expect([known.q, known.exponentMethod]).toEqual([q, 'exact']);
    expect(known.factor).toBeCloseTo(factor, 9);
  });

  it('finds the square root by which a double root of rho on the unit circle splits', () => {
    const growth = growthAsymptotics(
      numeric(advection(central, multistep(['-1', '-1', '1', '1'], ['0', '0', '4', '0']))),
      1,
    );
    expect(growth?.q).toBe('1/2');
  });

  it('calls growth that does not vanish with the parameter exponent 0', () => {
    const growth = growthAsymptotics(numeric(advection(central, multistep(['2', '-3', '1'], ['0', '-1', '0']))), 1);
    expect(growth?.q).toBe('0');
  });

  it.each(CASES.flatMap((c) => (c.growth ? [[c.title, c, c.growth] as const] : [])))(
    'agrees with independent values for %s',
    (_, { definition }, expected) => {
      for (const side of ['positive', 'negative'] as const) {
        const reference = expected[side];
        if (!reference) continue;
        const growth = growthAsymptotics(numeric(definition), side === 'positive' ? 1 : -1)!;
        expect(growth.q).toBe(reference.q);
        const [num, den] = growth.q.split('/').map(Number);
        // The factor is the limit; at 0.01 the sampled growth is still a few per cent off it.
        const [p, sampled] = Object.entries(reference.growthAt).sort(([a], [b]) => Number(a) - Number(b))[0]!;
        const predicted = growth.factor! * Number(p) ** (num! / (den ?? 1));
        expect(Math.abs(predicted / sampled - 1)).toBeLessThan(0.03);
      }
    },
  );
});
