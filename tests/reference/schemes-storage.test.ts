/** Levels, arrays, registers and orders of the time method of schemes from the literature. */
import { describe, expect, it } from 'vitest';
import { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { schemeStructure } from '@/lib/facts/scheme-facts';
import { differences, referenceValues } from '../support/reference-values';

interface Case {
  name: string;
  source: string;
  definition: unknown;
  storage: unknown;
  levels?: number;
  rootsPerWave: number;
  computationalModes?: number;
  timeMethod?: unknown;
}

describe.each(referenceValues<Case[]>('scheme-storage.json'))(
  '$name ($source)',
  ({ name: _, source: __, definition, ...due }) => {
    it('keeps the arrays and has the roots of the reference', () => {
      const read = SchemeDefinition.parse(definition);
      const { scheme } = canonicalScheme(read);
      expect(differences(due, schemeStructure(read, scheme!))).toEqual([]);
    });
  },
);
