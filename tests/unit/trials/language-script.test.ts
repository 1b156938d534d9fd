import { describe, expect, it } from 'vitest';
import { languageScript, readScript } from '@/lib/trials/language-script';

describe('the output of a build and run', () => {
  it('is told apart into version, build, log, answers and the status of the driver', () => {
    const output = [
      '@@version gcc 12.2.0',
      '@@build warnings',
      '@@log k.c:1:1: warning: something',
      '@@answers',
      'state a 0',
      '3ff0000000000000',
      '',
      '@@exit 0',
      '@@more',
      '@@answers',
      'state b 0',
      '@@exit 139',
    ].join('\n');
    expect(readScript(output)).toEqual({
      absent: null,
      version: 'gcc 12.2.0',
      build: 'warnings',
      log: 'k.c:1:1: warning: something',
      answers: 'state a 0\n3ff0000000000000\n\nstate b 0',
      crashed: 139,
    });
  });

  it('says that a language is missing', () => {
    expect(readScript('@@absent gfortran is not installed\n').absent).toBe('gfortran is not installed');
  });

  it('keeps the last build, where the link fails after a clean kernel', () => {
    expect(readScript('@@build clean\n@@build broken\n').build).toBe('broken');
  });
});

describe('the script of a language', () => {
  const files = { kernel: 'k.c', driver: 'driver.c' };

  it('builds the kernel with warnings as errors, and again without where that fails', () => {
    const script = languageScript('c', files, { checked: false, followUp: false });
    expect(script).toMatch(/gcc .*-ffp-contract=off.* k\.c .*-Werror/);
    expect(script).toMatch(/elif gcc .* k\.c -w/);
  });

  it('asks for more tasks only where there are some', () => {
    expect(languageScript('c', files, { checked: false, followUp: false })).not.toContain('@@more');
    expect(languageScript('c', files, { checked: false, followUp: true })).toContain('@@more');
  });
});
