import { describe, expect, it } from 'vitest';
import type { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { Equation } from '@/lib/numerics/equation';
import { compileScheme } from '@/lib/numerics/numeric-scheme';
import { marchPulse, pulseTravel } from '@/lib/numerics/pulse';

const compiled = (equation: Equation, rows: [string, string, string][]) => {
  const definition: SchemeDefinition = {
    kind: 'scheme',
    form: 'table',
    equation,
    terms: rows.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
  };
  const { scheme } = canonicalScheme(definition);
  if (!scheme) throw new Error('no scheme');
  return compileScheme(scheme);
};
const UPWIND = compiled('advection', [
  ['1', '0', '1'],
  ['0', '-1', '-lambda'],
  ['0', '0', '-1 + lambda'],
]);
const largest = (values: readonly (number | null)[]) => Math.max(...values.map((value) => value ?? Infinity));

/** Upwind marched cell by cell, the plain way. */
function upwindByCells(start: readonly number[], lambda: number, steps: number): number[] {
  let u = [...start];
  for (let n = 0; n < steps; n++)
    u = u.map((value, i) => (1 - lambda) * value + lambda * u[(i - 1 + u.length) % u.length]!);
  return u;
}

describe('a pulse', () => {
  it('stands in the middle at the end of its travel, at full height', () => {
    const { exact } = marchPulse(UPWIND, [0.35]);
    expect(exact.indexOf(largest(exact))).toBe(48);
    expect(largest(exact)).toBeCloseTo(1, 6);
    expect(pulseTravel(UPWIND, [0.35], 480)).toBeCloseTo(168, 10);
  });

  it('is carried exactly where the scheme is exact: upwind at λ = 1', () => {
    const { exact, computed } = marchPulse(UPWIND, [1], { steps: 100 });
    computed.forEach((value, cell) => expect(value).toBeCloseTo(exact[cell]!, 10));
  });

  it('is what marching cell by cell gives', () => {
    const { exact: start } = marchPulse(UPWIND, [0.5], { steps: 0 });
    const { computed } = marchPulse(UPWIND, [0.5], { steps: 48 });
    // 24 cells of travel: the march by cells began in the middle, this one that much before it.
    const marched = upwindByCells(start, 0.5, 48);
    computed.forEach((value, cell) => expect(value).toBeCloseTo(marched[(cell + 24) % 96]!, 9));
  });

  it('grows beyond every scale past the bound', () => {
    const { computed } = marchPulse(UPWIND, [1.3]);
    expect(computed.some((value) => value === null)).toBe(true);
  });

  it('keeps its sum and widens by diffusion, implicit as well as explicit', () => {
    const implicit = compiled('diffusion', [
      ['1', '0', '1 + 2*r'],
      ['1', '-1', '-r'],
      ['1', '1', '-r'],
      ['0', '0', '-1'],
    ]);
    const { exact, computed } = marchPulse(implicit, [0.5], { steps: 48 });
    const sum = (values: readonly (number | null)[]) => values.reduce<number>((all, value) => all + (value ?? 0), 0);
    expect(sum(computed)).toBeCloseTo(sum(exact), 9);
    expect(largest(exact)).toBeLessThan(0.5);
    expect(largest(computed)).toBeCloseTo(largest(exact), 2);
    // A Gaussian of variance s² + 2 r n after n steps keeps its area.
    expect(largest(exact)).toBeCloseTo(2.5 / Math.sqrt(2.5 ** 2 + 2 * 0.5 * 48), 4);
  });
});
