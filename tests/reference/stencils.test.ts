/** Published and independently computed stencils: weights, order, error, symmetry, modified wavenumber. */
import { describe, expect, it } from 'vitest';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { differences, referenceValues } from '../support/reference-values';

interface Case {
  name: string;
  source: string;
  definition: unknown;
  verdict: string;
  code?: string;
  facts?: Record<string, unknown>;
}

describe.each(referenceValues<Case[]>('stencils.json'))('$name ($source)', ({ definition, verdict, code, facts }) => {
  const analysis = analyseDefinition(definition);

  it(`is answered with the verdict ${verdict}`, () => {
    expect(analysis.verdict).toBe(verdict);
  });

  if (code)
    it(`is refused as ${code}, with a place and a sentence`, () => {
      const problem = analysis.problems.find((p) => p.code === code);
      expect(problem?.pointer).toMatch(/^\/(offsets|weights)/);
      expect(problem?.message.length).toBeGreaterThan(20);
    });

  if (facts)
    it('has the facts of the reference', () => {
      const { modifiedWavenumber, ...exact } = facts as { modifiedWavenumber?: Record<string, unknown> };
      expect(differences(exact, analysis.facts)).toEqual([]);
      // The smallest left-hand symbol is printed with ten digits in the reference.
      const { minAbsLhsSymbol, ...wave } = modifiedWavenumber ?? {};
      expect(differences({ modifiedWavenumber: wave }, analysis.facts)).toEqual([]);
      expect(
        differences(modifiedWavenumber ? { modifiedWavenumber: { minAbsLhsSymbol } } : {}, analysis.facts, 1e-9),
      ).toEqual([]);
    });
});
