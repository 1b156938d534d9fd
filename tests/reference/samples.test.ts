import { describe, expect, it } from 'vitest';
import { sampleRoots } from '@/lib/numerics/samples';
import { CASES, schemeFrom } from './amplification-case';

/** Largest distance after pairing each expected root with the nearest one left. */
function distanceAsSets(expected: readonly [number, number][], found: readonly [number, number][]): number {
  const left = [...found];
  let worst = 0;
  for (const [re, im] of expected) {
    const distances = left.map(([x, y]) => Math.hypot(x - re, y - im));
    const nearest = distances.indexOf(Math.min(...distances));
    worst = Math.max(worst, distances[nearest]! / Math.max(1, Math.hypot(re, im)));
    left.splice(nearest, 1);
  }
  return worst;
}

const nearlyCoincide = (roots: readonly [number, number][]) =>
  roots.some((a, i) => roots.some((b, j) => i < j && Math.hypot(a[0] - b[0], a[1] - b[1]) < 1e-4));

describe('roots, phase and decay agree with independent values', () => {
  it.each(CASES.filter((c) => c.samples.length > 0).map((c) => [c.title, c] as const))('%s', (_, reference) => {
    const found = sampleRoots(schemeFrom(reference.definition), reference.samples);
    reference.samples.forEach((expected, k) => {
      const sample = found[k]!;
      // Coinciding roots are known to the square root of the rounding only.
      const tolerance = nearlyCoincide(expected.roots) ? 1e-7 : 1e-12;
      expect(sample.roots).toHaveLength(expected.roots.length);
      expect(distanceAsSets(expected.roots, sample.roots)).toBeLessThan(tolerance);
      expect(Math.abs(sample.maxModulus - expected.maxModulus)).toBeLessThan(tolerance);
      expect(sample.principalRoot === null).toBe(expected.principalRoot === undefined);
      if (expected.principalRoot)
        expect(distanceAsSets([expected.principalRoot], [sample.principalRoot!])).toBeLessThan(tolerance);
      if (expected.relativePhaseSpeed !== undefined)
        expect(sample.relativePhaseSpeed).toBeCloseTo(expected.relativePhaseSpeed, tolerance > 1e-10 ? 6 : 10);
      if (expected.relativeDecayRate !== undefined)
        expect(sample.relativeDecayRate).toBeCloseTo(expected.relativeDecayRate, 10);
    });
  });
});
