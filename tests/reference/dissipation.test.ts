import { describe, expect, it } from 'vitest';
import { schemeDissipation } from '@/lib/numerics/dissipation';
import { parseRational } from '@/lib/numerics/rational';
import { CASES, schemeFrom } from './amplification-case';

describe('dissipation agrees with independent values', () => {
  it.each(CASES.flatMap((c) => (c.dissipation ? [[c.title, c, c.dissipation] as const] : [])))(
    '%s',
    (_, { definition }, { at, maxModulusForThetaGt02, ...expected }) => {
      const scheme = schemeFrom(definition);
      const values = scheme.parameters.map((name) => parseRational(at[name] ?? Object.values(at)[0]!));
      const found = schemeDissipation(scheme, values);
      expect(found).toMatchObject(expected);
      expect(Math.abs(found.maxModulusForThetaGt02! - maxModulusForThetaGt02)).toBeLessThan(1e-11);
    },
  );
});
