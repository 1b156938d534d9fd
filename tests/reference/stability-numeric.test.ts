import { describe, expect, it } from 'vitest';
import { parseRational, toNumber } from '@/lib/numerics/rational';
import { analyseStability } from '@/lib/numerics/stability/analyse-stability';
import { stabilityTest } from '@/lib/numerics/stability/numeric-intervals';
import { characteristicOf } from '@/lib/numerics/numeric-scheme';
import { CASES, schemeFrom, type AmplificationCase } from './amplification-case';

const needsMoreThanOneExactLine = ({ definition, stability }: AmplificationCase) => {
  const { form, equation } = definition as { form: string; equation: string };
  return form === 'system' || /[23]d$/.test(equation) || stability.kind === 'two-parameter';
};

function expectIntervals(found: ReturnType<typeof analyseStability>, expected: AmplificationCase['stability']): void {
  expect(found.intervals).toHaveLength(expected.intervals!.length);
  expected.intervals!.forEach((reference, k) => {
    const interval = found.intervals[k]!;
    for (const side of ['lo', 'hi'] as const) {
      const value = reference[side];
      if (value === null) {
        expect(interval[side]).toBeNull();
        continue;
      }
      expect(Math.abs(Number(interval[side]) - Number(value))).toBeLessThan(
        reference[`${side}HasClosedForm`] ? 1e-12 : 1e-9,
      );
      if (reference[`${side}Included`] !== undefined)
        expect(interval[`${side}Included`]).toBe(reference[`${side}Included`]);
      const behaviour = interval[`${side}Behaviour`];
      if (reference[`${side}Why`]) expect(behaviour?.why).toBe(reference[`${side}Why`]);
      const [theta] = reference[`${side}Theta`] ?? [];
      if (theta !== undefined) expect(behaviour!.theta!.some((x) => Math.abs(x - theta) < 1e-4)).toBe(true);
    }
  });
}

describe('bounds of systems, of several dimensions and of two parameters agree with independent values', () => {
  it.each(CASES.filter(needsMoreThanOneExactLine).map((c) => [c.title, c] as const))(
    '%s',
    { timeout: 60_000 },
    (_, { definition, stability }) => {
      const found = analyseStability(schemeFrom(definition));
      expect(found.verdict).toBe(stability.verdict);
      if (stability.intervals) expectIntervals(found, stability);
      if (stability.region) expect(found.region).toBe(stability.region);
      for (const [r, lambdaMax] of Object.entries(stability.lambdaMaxAtR ?? {})) {
        const cut = found.cuts.find((c) => c.fixed.r === r)!;
        // Ends of cuts are closed forms; the square roots among them are compared by what they bound.
        const isStableAt = stabilityTest(characteristicOf(schemeFrom(definition)).scalar);
        expect(cut.intervals).toHaveLength(1);
        expect(isStableAt([lambdaMax * (1 - 1e-6), toNumber(parseRational(r))])).toBe(true);
        expect(isStableAt([lambdaMax * (1 + 1e-6), toNumber(parseRational(r))])).toBe(false);
      }
    },
  );

  it.each(CASES.filter((c) => c.stability.points).map((c) => [c.title, c] as const))(
    '%s: stable and unstable points of the parameter plane are told apart',
    (_, { definition, stability }) => {
      const scheme = schemeFrom(definition);
      const isStableAt = stabilityTest(characteristicOf(scheme).scalar);
      for (const { parameters, stable } of stability.points!) {
        const values = scheme.parameters.map((name) => toNumber(parseRational(parameters[name]!)));
        expect([parameters, isStableAt(values)]).toEqual([parameters, stable]);
      }
    },
  );
});

describe('growth decides whether an unstable scheme is weakly so', () => {
  it.each(CASES.filter((c) => c.growth).map((c) => [c.title, c] as const))(
    '%s',
    { timeout: 30_000 },
    (_, { definition, stability }) => {
      const found = analyseStability(schemeFrom(definition));
      expect(found.verdict).toBe(stability.verdict);
      expect(found.intervals).toEqual([]);
      expect(found.growth?.positive?.at?.growthPerStep).toBeGreaterThan(0);
    },
  );
});
