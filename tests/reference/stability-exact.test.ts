import { describe, expect, it } from 'vitest';
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { certifiedIntervals } from '@/lib/numerics/stability/certified-stability';
import { exactIntervals } from '@/lib/numerics/stability/exact-stability';
import type { StabilityResult } from '@/lib/numerics/stability/stability-result';
import { BOUNDS, type BoundCase } from './values/stability-bounds';

function schemeOf({ definition, name }: BoundCase): ScalarScheme {
  const { scheme, problems } = canonicalScheme(SchemeDefinition.parse(definition));
  if (scheme?.form !== 'scalar') throw new Error(`${name}: ${problems.map(({ message }) => message).join(' ')}`);
  return scheme;
}

function exactOf(each: BoundCase): StabilityResult {
  const outcome = exactIntervals(schemeOf(each), { timeLimitMs: 20_000 });
  if (outcome.kind !== 'decided') throw new Error(`${each.name}: ${outcome.why}`);
  return outcome.result;
}

const isEnd = (text: string | null): text is string => text !== null && text !== '0';

describe('exact bounds agree with the literature', () => {
  it.each(BOUNDS.map((each) => [each.name, each] as const))('%s', { timeout: 30_000 }, (_, each) => {
    const result = exactOf(each);
    expect(result.verdict).toBe(each.verdict);
    expect(result.method).toBe('exact');
    expect(result.isolatedStablePoints).toEqual(each.isolated ?? []);
    expect(result.intervals).toHaveLength(each.intervals.length);
    each.intervals.forEach(([lo, hi], k) => {
      const found = result.intervals[k]!;
      for (const [expected, actual] of [
        [lo, found.lo],
        [hi, found.hi],
      ] as const) {
        if (expected === null) expect(actual).toBeNull();
        else expect(Math.abs(Number(actual) - Number(expected))).toBeLessThanOrEqual(1e-12);
      }
      const ends = [
        [found.lo, found.loIncluded, found.loBehaviour],
        [found.hi, found.hiIncluded, found.hiBehaviour],
      ] as const;
      for (const [text, included, behaviour] of ends) {
        if (!isEnd(text) || each.closed === undefined) continue;
        expect(included).toBe(each.closed);
        if (each.theta !== undefined) expect(behaviour?.theta?.[0]).toBeCloseTo(each.theta, 7);
      }
      if (each.exact !== undefined && isEnd(hi)) expect(found.hiExact).toBe(each.exact);
    });
  });
});

describe('what is said at an end', () => {
  const named = (name: string) => exactOf(BOUNDS.find((each) => each.name === name)!);

  it('calls the end of leapfrog open, for its double root there', () => {
    const [interval] = named('leapfrog of order (2, 2)').intervals;
    expect(interval!.hiBehaviour).toEqual({
      stableAtLimit: false,
      why: 'double root on the unit circle: growth linear in n for that wave',
      theta: [expect.closeTo(Math.PI / 2, 10)],
    });
  });

  it('calls the end of Adams-Bashforth closed, for its roots there are simple', () => {
    const [interval] = named('third-order Adams-Bashforth with central differences').intervals;
    expect(interval!.hiBehaviour?.why).toBe('all roots on the unit circle are simple at the limit');
  });

  it('gives the minimal polynomial where no closed form is recognised', () => {
    expect(named('four-stage Runge-Kutta for diffusion').intervals[0]!.hiMinimalPolynomial).toBe(
      '8*r**3 - 8*r**2 + 6*r - 3',
    );
    const fourth = named('leapfrog of order (2, 4)').intervals[0]!;
    expect(fourth.hiExact).toBe('sqrt((32*sqrt(6) - 12)/125)');
    expect(fourth.hiMinimalPolynomial).toBe('125*lambda**4 + 24*lambda**2 - 48');
  });

  it('names the wave and the growth just outside the bound', () => {
    const { lostAt } = named('forward Euler for diffusion');
    expect(lostAt!.parameter).toBeCloseTo(0.505, 12);
    expect(lostAt!.theta[0]).toBeCloseTo(Math.PI, 6);
    expect(lostAt!.modulus).toBeCloseTo(1.02, 9);
  });
});

describe('certified brackets', () => {
  it.each([
    'two-stage Runge-Kutta with third-order upwind differences: a low band that sampling overlooks',
    'two-stage Runge-Kutta with fifth-order upwind differences: unstable however small the step',
    'leapfrog of order (2, 4)',
    'backward Euler with upwind differences',
  ])('hold the exact bounds: %s', { timeout: 60_000 }, (name) => {
    const each = BOUNDS.find((one) => one.name === name)!;
    const outcome = certifiedIntervals(schemeOf(each), { timeLimitMs: 50_000 });
    if (outcome.kind !== 'decided') throw new Error(outcome.why);
    const exact = exactOf(each);
    expect(outcome.result.verdict).toBe(exact.verdict);
    expect(outcome.result.intervals).toHaveLength(exact.intervals.length);
    outcome.result.intervals.forEach((interval, k) => {
      for (const end of ['lo', 'hi'] as const) {
        const [found, wanted] = [interval[end], exact.intervals[k]![end]];
        if (wanted === null || found === null) expect(found).toBe(wanted);
        else expect(Math.abs(Number(found) - Number(wanted))).toBeLessThanOrEqual(2e-10);
      }
      expect(interval.hiIncluded).toBe(exact.intervals[k]!.hiIncluded);
      expect(Number(interval.tolerance ?? 0)).toBeLessThanOrEqual(1e-9);
    });
  });
});
