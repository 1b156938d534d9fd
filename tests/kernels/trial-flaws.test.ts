/** The whole trial on kernels that were spoilt on the way: each flaw is found by the finding that is about it. */
import { beforeAll, describe, expect, it } from 'vitest';
import type { KernelInput } from '@/lib/codegen/kernel-request';
import type { Definition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { sandboxMode } from '@/lib/sandbox/run-command';
import type { LanguageSources } from '@/lib/trials/run-language';
import { runTrial, type TrialResult } from '@/lib/trials/run-trial';
import { FINDING_NAMES, TRIAL_LANGUAGES, type TrialLanguage } from '@/lib/trials/trial';

const LONG_MS = 300_000;

const LEAPFROG: Definition = {
  kind: 'scheme',
  form: 'table',
  equation: 'advection',
  terms: [
    { level: '1', offset: '0', coefficient: '1' },
    { level: '-1', offset: '0', coefficient: '-1' },
    { level: '0', offset: '1', coefficient: 'lambda' },
    { level: '0', offset: '-1', coefficient: '-lambda' },
  ],
};

function inputFor(definition: Definition): KernelInput {
  const { facts } = analyseDefinition(definition);
  if (!facts) throw new Error('the test definition has no facts');
  return {
    callNumber: 'AD 901',
    slug: 'trial-flaws',
    title: 'Leapfrog with central differences',
    revision: 1,
    definition,
    facts,
    references: ['R. D. Richtmyer, K. W. Morton (1967)'],
  };
}

/** Replaces in the kernel's text, and fails the test where there is nothing to replace. */
function replaceIn(sources: LanguageSources, pattern: RegExp, replacement: string): LanguageSources {
  const source = sources.kernel.source.replace(pattern, replacement);
  if (source === sources.kernel.source) throw new Error(`nothing in ${sources.kernel.fileName} matches ${pattern}`);
  return { ...sources, kernel: { ...sources.kernel, source } };
}

type Spoil = (language: TrialLanguage, sources: LanguageSources) => LanguageSources;

function outcomeOf({ findings }: TrialResult, name: string, language: TrialLanguage | null) {
  return findings.find((finding) => finding.name === name && finding.language === language)?.outcome;
}

beforeAll(async () => {
  expect(await sandboxMode()).not.toBe('unavailable');
}, LONG_MS);

describe('the trial of a leapfrog scheme', () => {
  const input = inputFor(LEAPFROG);
  const tryWith = (spoil?: Spoil) => runTrial(input, spoil ? { sourcesOf: spoil } : {});

  it('passes every finding in every language, with versions and flags', { timeout: LONG_MS }, async () => {
    const told: string[] = [];
    const result = await runTrial(input, {
      onProgress: async ({ done, total, label }) => void told.push(`${done}/${total} ${label}`),
    });
    const lost = result.findings.filter(({ outcome }) => outcome !== 'passed');
    expect(lost.map(({ name, language, measured, target }) => ({ name, language, measured, target }))).toEqual([]);
    expect(result.state).toBe('passed');
    for (const name of FINDING_NAMES)
      expect(result.findings.filter((finding) => finding.name === name)).toHaveLength(name === 'agreement' ? 1 : 3);
    expect(result.toolchain.map(({ language }) => language)).toEqual([...TRIAL_LANGUAGES]);
    for (const { version, flags } of result.toolchain) {
      expect(version).toMatch(/\d+\.\d+/);
      expect(flags).not.toBe('');
    }
    expect(told).toHaveLength(7);
    expect(told[0]).toBe('0/7 C, built and marched');
  });

  it(
    'finds one flipped sign by exact step, amplification, refinement and agreement',
    { timeout: LONG_MS },
    async () => {
      const result = await tryWith((language, sources) =>
        // u[i + 1] - u[i - 1] becomes a sum.
        language === 'c' ? replaceIn(sources, /(u\[i \+ 1\]) - (u\[i - 1\])/, '$1 + $2') : sources,
      );
      expect(result.state).toBe('failed');
      for (const name of ['exact-step', 'amplification', 'refinement', 'margin'])
        expect([name, outcomeOf(result, name, 'c')]).toEqual([name, 'failed']);
      for (const name of ['clean-build', 'guards'])
        expect([name, outcomeOf(result, name, 'c')]).toEqual([name, 'passed']);
      expect(outcomeOf(result, 'exact-step', 'fortran')).toBe('passed');
      expect(outcomeOf(result, 'agreement', null)).toBe('failed');
    },
  );

  it('finds a wrong bound by the margin, and by it alone', { timeout: LONG_MS }, async () => {
    const result = await tryWith((language, sources) =>
      language === 'c' ? replaceIn(sources, /lam <= 1\.0/, 'lam <= 1.5') : sources,
    );
    const failed = result.findings.filter(({ outcome }) => outcome === 'failed');
    expect(failed.map(({ name, language }) => [name, language])).toEqual([['margin', 'c']]);
    expect(failed[0]!.measured).toBe('the kernel takes a value outside the bound');
  });

  it('finds a bound that the facts have wrong by the margin', { timeout: LONG_MS }, async () => {
    const { facts } = input;
    if (facts.kind !== 'scheme') throw new Error('the facts are those of a scheme');
    const wider = { lo: '-1.2', hi: '1.2', loExact: '-6/5', hiExact: '6/5' };
    const intervals = facts.stability.intervals.map((interval) => ({ ...interval, ...wider }));
    const wrong = { ...input, facts: { ...facts, stability: { ...facts.stability, intervals } } };
    const result = await runTrial(wrong);
    expect(TRIAL_LANGUAGES.map((language) => outcomeOf(result, 'margin', language))).toEqual([
      'failed',
      'failed',
      'failed',
    ]);
    expect(outcomeOf(result, 'exact-step', 'c')).toBe('passed');
  });

  it('finds a read outside the halo by the guards', { timeout: LONG_MS }, async () => {
    const result = await tryWith((language, sources) => {
      // The last point reads one beyond its neighbour, times nothing: the numbers stay right.
      if (language === 'c')
        return replaceIn(sources, /u\[i \+ 1\] - u\[i - 1\]/, '(u[i + 1] + 0.0 * u[i + 2]) - u[i - 1]');
      if (language === 'fortran')
        return replaceIn(sources, /u\(i\+1\) - u\(i-1\)/, '(u(i+1) + 0.0_wp*u(i+2)) - u(i-1)');
      return sources;
    });
    expect(outcomeOf(result, 'guards', 'c')).toBe('failed');
    expect(outcomeOf(result, 'guards', 'fortran')).toBe('failed');
    expect(outcomeOf(result, 'guards', 'python')).toBe('passed');
    const report = result.findings.find(({ name, language }) => name === 'guards' && language === 'c')!;
    expect(report.measured).toMatch(/AddressSanitizer: heap-buffer-overflow/);
  });

  it('finds a warning by the clean build, and still measures the rest', { timeout: LONG_MS }, async () => {
    const result = await tryWith((language, sources) =>
      language === 'c' ? replaceIn(sources, /$/, '\nstatic int unused_function(void) { return 1; }\n') : sources,
    );
    const failed = result.findings.filter(({ outcome }) => outcome === 'failed');
    expect(failed.map(({ name, language, measured }) => [name, language, measured])).toEqual([
      ['clean-build', 'c', '1 warning'],
    ]);
  });

  it('says of a kernel that does not compile that it does not', { timeout: LONG_MS }, async () => {
    const result = await tryWith((language, sources) =>
      language === 'c' ? replaceIn(sources, /$/, '\nthis is not C\n') : sources,
    );
    expect(result.findings.find(({ name, language }) => name === 'clean-build' && language === 'c')?.measured).toBe(
      'does not compile',
    );
    expect(outcomeOf(result, 'exact-step', 'c')).toBe('failed');
    expect(outcomeOf(result, 'agreement', null)).toBe('failed');
    expect(outcomeOf(result, 'exact-step', 'python')).toBe('passed');
  });

  it('stops at once when it is called off', { timeout: LONG_MS }, async () => {
    const caller = new AbortController();
    setTimeout(() => caller.abort(new Error('called off')), 300);
    await expect(runTrial(input, { signal: caller.signal })).rejects.toThrow('called off');
  });
});

it('refuses a definition without a kernel, with the reason', { timeout: LONG_MS }, async () => {
  const implicit: Definition = {
    kind: 'scheme',
    form: 'table',
    equation: 'diffusion',
    terms: [
      { level: '1', offset: '0', coefficient: '1+2*r' },
      { level: '1', offset: '1', coefficient: '-r' },
      { level: '1', offset: '-1', coefficient: '-r' },
      { level: '0', offset: '0', coefficient: '-1' },
    ],
  };
  const result = await runTrial(inputFor(implicit));
  expect(result).toMatchObject({ state: 'refused', findings: [] });
  expect(result.note).toMatch(/implicit/);
});
