/** The whole trial of a kernel in the plane, and of the same kernel with one neighbour taken from the wrong row. */
import { describe, expect, it } from 'vitest';
import { runTrial } from '@/lib/trials/run-trial';
import { kernelInput } from './kernel-cases';

const LONG_MS = 300_000;

describe('the trial of a kernel in the plane', () => {
  it('passes every finding in every language', { timeout: LONG_MS }, async () => {
    const { state, findings } = await runTrial(kernelInput('donorCell'));
    expect(findings.filter(({ outcome }) => outcome !== 'passed')).toEqual([]);
    expect(state).toBe('passed');
  });

  it('finds a neighbour on the wrong side in C', { timeout: LONG_MS }, async () => {
    const { state, findings } = await runTrial(kernelInput('donorCell'), {
      sourcesOf: (language, sources) => {
        if (language !== 'c') return sources;
        const source = sources.kernel.source.replace('u[i - row]', 'u[i - 1]');
        expect(source).not.toBe(sources.kernel.source);
        return { ...sources, kernel: { ...sources.kernel, source } };
      },
    });
    expect(state).toBe('failed');
    const failed = findings.filter(({ outcome }) => outcome === 'failed');
    expect(failed).toContainEqual(expect.objectContaining({ name: 'exact-step', language: 'c' }));
    expect(failed).toContainEqual(expect.objectContaining({ name: 'amplification', language: 'c' }));
    expect(failed).toContainEqual(expect.objectContaining({ name: 'agreement', language: null }));
    expect(failed.some(({ language }) => language === 'fortran' || language === 'python')).toBe(false);
  });
});
