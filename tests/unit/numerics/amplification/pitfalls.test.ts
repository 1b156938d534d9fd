import { describe, expect, it } from 'vitest';
import { characteristicOf, compileScheme } from '@/lib/numerics/numeric-scheme';
import { principalDampingOrder } from '@/lib/numerics/damping-order';
import { ONE, rational } from '@/lib/numerics/rational';
import { analyseStability } from '@/lib/numerics/stability/analyse-stability';
import { numericIntervals } from '@/lib/numerics/stability/numeric-intervals';
import { systemEigenvalues, amplificationMatrix, isPowerBounded } from '@/lib/numerics/system-matrix';
import { systemCharacteristic } from '@/lib/numerics/system-characteristic';
import { variable } from '@/lib/numerics/polynomial';
import { withParameters } from '@/lib/numerics/restricted-scheme';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import {
  central,
  CRANK_NICOLSON,
  EULER,
  LAX_WENDROFF_2D,
  LEAPFROG,
  lines,
  multistep,
  RK2,
  RK4,
  schemeFrom,
  STAGGERED_2D,
  stencil,
  table,
} from './definitions';

/** Ends found by the numeric search alone, with all parameters equal. */
function searched(scheme: CanonicalScheme, sides: readonly (1 | -1)[]): [number | null, number | null][] {
  const one = withParameters(
    scheme,
    ['p'],
    scheme.parameters.map(() => variable(1, 0)),
  );
  const found = numericIntervals(compileScheme(one), characteristicOf(one).scalar, sides, () => false);
  if (found.kind !== 'found') throw new Error('stopped');
  return found.intervals.map(({ lo, hi }) => [lo && lo.value, hi && hi.value]);
}

describe('bounds that plain sampling gets wrong, found by the numeric search', () => {
  it('the low band of RK2 with third-order upwind: (2/3)^(1/3), not 0.873640', () => {
    const [[, hi]] = searched(lines('advection', [stencil(1, -2, -1, 0, 1)], RK2), [1]) as [[number, number]];
    expect(Math.abs(hi - (2 / 3) ** (1 / 3))).toBeLessThan(1e-9);
  });

  it('the low band of two-dimensional Lax-Wendroff: sqrt(2)/4 (Turkel 1977, from memory), not 0.35361', () => {
    const [[lo, hi]] = searched(table('advection-2d', LAX_WENDROFF_2D), [1, -1]) as [[number, number]];
    expect(Math.abs(hi - Math.SQRT2 / 4)).toBeLessThan(1e-9);
    expect(lo).toBe(-hi);
  });

  it('RK2 with fifth-order upwind is unstable for every lambda, though samples below 0.067 show nothing', () => {
    expect(searched(lines('advection', [stencil(1, -3, -2, -1, 0, 1, 2)], RK2), [1])).toEqual([]);
  });

  it('the double root of leapfrog with fourth-order differences, in a band narrower than a grid of 720 waves', () => {
    const [[, hi]] = searched(lines('advection', [stencil(1, -2, -1, 0, 1, 2)], LEAPFROG), [1]) as [[number, number]];
    const c = 1 - Math.sqrt(6) / 2;
    expect(Math.abs(hi - 3 / ((4 - c) * Math.sqrt(1 - c * c)))).toBeLessThan(1e-12);
  });

  it('wave leapfrog is not called unstable near theta = 0, where its roots nearly coincide', () => {
    const wave = table('wave-2d', [
      [1, [0, 0], '1'],
      [0, [0, 0], '-2+4*lambda^2'],
      [0, [1, 0], '-lambda^2'],
      [0, [-1, 0], '-lambda^2'],
      [0, [0, 1], '-lambda^2'],
      [0, [0, -1], '-lambda^2'],
      [-1, [0, 0], '1'],
    ]);
    const [[lo, hi]] = searched(wave, [1]) as [[number, number]];
    expect(lo).toBe(0);
    expect(Math.abs(hi - Math.SQRT1_2)).toBeLessThan(1e-12);
  });

  it('weak damping at small values is told from rounding: RK4 with sixth-order differences is stable down to 0', () => {
    expect(searched(lines('advection', [stencil(1, -3, -2, -1, 0, 1, 2, 3)], RK4), [1, -1])).toHaveLength(1);
  });
});

describe('weak instability', () => {
  it('is decided by the exponent, not by one sample', () => {
    const found = analyseStability(lines('advection', [stencil(1, -3, -2, -1, 0, 1, 2)], RK2));
    expect(found.verdict).toBe('weakly unstable for all nonzero values');
    expect(found.growth?.positive?.q).toBe('10');
    expect(found.growth?.negative?.q).toBe('1');
  });

  it('is not claimed for forward Euler with central differences', () => {
    const found = analyseStability(lines('advection', [central], EULER));
    expect(found.verdict).toBe('unstable for all nonzero values');
    // |g|² = 1 + lambda² sin² theta: at 0.4 each step multiplies the worst wave by sqrt(1.16).
    expect(found.growth?.positive?.at?.growthPerStep).toBeCloseTo(Math.sqrt(1.16) - 1, 12);
    expect(found.growth?.positive?.at?.stepsToTenfold).toBe(Math.ceil(Math.LN10 / Math.log(Math.sqrt(1.16))));
  });

  it('is told from zero-instability, where growth does not vanish with the step', () => {
    const found = analyseStability(lines('advection', [central], multistep(['2', '-3', '1'], ['0', '-1', '0'])));
    expect(found.verdict).toBe('unstable for all nonzero values');
    expect(found.growth?.positive?.q).toBe('0');
  });
});

describe('a newest level that vanishes for some wave', () => {
  it('at every parameter value is its own verdict', () => {
    const scheme = table('advection', [
      [1, 1, '1/2'],
      [1, -1, '1/2'],
      [0, 1, '-1/2+lambda/2'],
      [0, -1, '-1/2-lambda/2'],
    ]);
    expect(analyseStability(scheme).verdict).toBe('degenerate newest level');
  });

  it('at one value only leaves the rest: implicit upwind is stable at or below −1 and from 0 on', () => {
    const scheme = table('advection', [
      [1, 0, '1+lambda'],
      [1, -1, '-lambda'],
      [0, 0, '-1'],
    ]);
    expect(analyseStability(scheme).intervals.map(({ lo, hi }) => [lo, hi])).toEqual([
      [null, '-1'],
      ['0', null],
    ]);
  });
});

describe('systems', () => {
  const staggered = schemeFrom(STAGGERED_2D);
  if (staggered.form !== 'system') throw new Error('not a system');

  it('divide their stationary vortical mode out of the characteristic polynomial exactly', () => {
    const { scalar, stationaryRoots } = systemCharacteristic(staggered);
    expect(stationaryRoots).toBe(1);
    expect(scalar.terms.every((t) => t.offset.every((o) => o.den === 1n))).toBe(true);
  });

  it('keep semisimple double eigenvalues 1 whole: power-bounded at theta = 0', () => {
    const found = systemEigenvalues(staggered, [0.5], [0, 0], 3)!;
    found.re.forEach((re, k) => expect(Math.hypot(re - 1, found.im[k]!)).toBeLessThan(1e-14));
    expect(isPowerBounded(amplificationMatrix(staggered, [0.5], [0, 0])!)).toBe(true);
  });

  it('are bounded by sqrt(2)/2 with a defective eigenvalue at the bound', () => {
    const [interval] = analyseStability(staggered).intervals;
    expect(interval).toMatchObject({ lo: '0', hiExact: 'sqrt(2)/2', hiIncluded: false });
    expect(interval!.hiBehaviour!.why).toContain('grows linearly');
  });
});

describe('damping of the principal root', () => {
  it.each([
    [
      'Lax-Wendroff',
      table('advection', [
        [1, 0, '1'],
        [0, 0, 'lambda^2-1'],
        [0, -1, '-lambda^2/2-lambda/2'],
        [0, 1, '-lambda^2/2+lambda/2'],
      ]),
      4,
    ],
    ['RK4 on Schrodinger', lines('schrodinger', [stencil(2, -1, 0, 1)], RK4), 12],
    ['RK2 with fifth-order upwind, which grows', lines('advection', [stencil(1, -3, -2, -1, 0, 1, 2)], RK2), -4],
    ['Crank-Nicolson, which does neither', lines('advection', [central], CRANK_NICOLSON), null],
  ] as const)('%s: order %s', (_, scheme, order) => {
    if (scheme.form !== 'scalar') throw new Error('not scalar');
    expect(principalDampingOrder(scheme, [rational(1, 3)])).toBe(order);
  });

  it('is exact at the shift, where the modulus is 1', () => {
    const upwind = table('advection', [
      [1, 0, '1'],
      [0, 0, 'lambda-1'],
      [0, -1, '-lambda'],
    ]);
    if (upwind.form !== 'scalar') throw new Error('not scalar');
    expect(principalDampingOrder(upwind, [ONE])).toBeNull();
  });
});

describe('the time budget', () => {
  it('ends the analysis with "not decided" instead of hanging', () => {
    const started = performance.now();
    const found = analyseStability(
      lines('diffusion-3d', [stencil(2, -1, 0, 1), stencil(2, -1, 0, 1), stencil(2, -1, 0, 1)], RK4),
      {
        timeLimitMs: 1,
      },
    );
    expect(found.verdict).toBe('not decided within the time budget');
    expect(performance.now() - started).toBeLessThan(2000);
  });

  it('heeds cancellation', () => {
    const found = analyseStability(table('advection-2d', LAX_WENDROFF_2D), {
      timeLimitMs: 60_000,
      isCancelled: () => true,
    });
    expect(found.verdict).toBe('not decided within the time budget');
  });
});
