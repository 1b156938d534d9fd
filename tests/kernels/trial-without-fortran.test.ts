/** A machine that has no Fortran compiler: the page says so, and nothing is vetted on half a trial. */
import { afterAll, beforeAll, expect, it } from 'vitest';
import { BUILD_FLAGS } from '@/lib/codegen/compile-flags';
import { Definition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { runTrial } from '@/lib/trials/run-trial';

const { compiler } = BUILD_FLAGS.fortran;
beforeAll(() => void Object.assign(BUILD_FLAGS.fortran, { compiler: 'gfortran-that-is-not-there' }));
afterAll(() => void Object.assign(BUILD_FLAGS.fortran, { compiler }));

it('says "not run" for each finding of the missing language, and fails', { timeout: 300_000 }, async () => {
  const definition = Definition.parse({
    kind: 'stencil',
    derivative: 1,
    offsets: ['-1', '0', '1'],
    weights: ['-1/2', '0', '1/2'],
  });
  const { facts } = analyseDefinition(definition);
  const result = await runTrial({
    callNumber: 'ST 901',
    slug: 'trial-without-fortran',
    title: 'Central difference',
    revision: 1,
    definition,
    facts: facts!,
    references: [],
  });
  expect(result.state).toBe('failed');
  expect(result.note).toBe('This revision cannot be vetted: Fortran was not run here.');
  const outcomes = (language: string | null) =>
    new Set(result.findings.filter((finding) => finding.language === language).map(({ outcome }) => outcome));
  expect(outcomes('fortran')).toEqual(new Set(['not-run']));
  expect(outcomes(null)).toEqual(new Set(['not-run']));
  // A stencil has no margin.
  expect(outcomes('c')).toEqual(new Set(['passed', 'not-applicable']));
  expect(result.toolchain.map(({ language }) => language)).toEqual(['c', 'python']);
  expect(result.findings.find(({ language }) => language === 'fortran')?.how).toMatch(/gfortran-that-is-not-there/);
});
