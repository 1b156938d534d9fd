import { describe, expect, it } from 'vitest';
import { Definition } from '@/lib/entries/definition';
import { ruleLatex } from '@/lib/facts/rule-latex';

const table = (...terms: [number, number, string][]) =>
  Definition.parse({
    kind: 'scheme',
    form: 'table',
    equation: 'advection',
    terms: terms.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
  });

describe('the rule of a definition as a formula', () => {
  it('puts the common factor of leapfrog before the bracket', () => {
    const leapfrog = table([1, 0, '1'], [-1, 0, '-1'], [0, 1, 'lambda'], [0, -1, '-lambda']);
    expect(ruleLatex(leapfrog)).toEqual([
      'u_{i}^{n+1} = u_{i}^{n-1} - \\lambda\\left(u_{i+1}^{n} - u_{i-1}^{n}\\right)',
    ]);
  });

  it('writes Lax–Wendroff by powers of lambda', () => {
    const laxWendroff = table(
      [1, 0, '1'],
      [0, 0, 'lambda^2-1'],
      [0, -1, '-lambda/2-lambda^2/2'],
      [0, 1, 'lambda/2-lambda^2/2'],
    );
    expect(ruleLatex(laxWendroff)[0]).toContain('\\tfrac{\\lambda^{2}}{2}\\left(u_{i+1}^{n} - 2\\,u_{i}^{n}');
  });

  it('brings the weights of a difference over one denominator', () => {
    const stencil = Definition.parse({ kind: 'stencil', derivative: 1, offsets: [-2, -1, 0, 1, 2] });
    expect(ruleLatex(stencil)[0]).toContain(
      '\\frac{-u_{i+2} + 8\\,u_{i+1} - 8\\,u_{i-1} + u_{i-2}}{12\\,\\mathrm{\\Delta} x}',
    );
  });

  it('has no formula for a definition that does not hold', () => {
    expect(ruleLatex(table([1, 0, '1'], [0, 0, 'bogus']))).toEqual([]);
  });
});
