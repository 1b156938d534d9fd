import { describe, expect, it } from 'vitest';
import { doubleToHex, formatTasks, hexToDouble, parseAnswers } from '@/lib/codegen/driver-text';
import { generateDriver } from '@/lib/codegen/generate-driver';
import { availableLanguages, generateKernel } from '@/lib/codegen/generate-kernel';
import { KERNEL_LANGUAGES, type KernelInput } from '@/lib/codegen/kernel-request';
import { regionInequalities } from '@/lib/codegen/region';
import { checkFingerprint } from '@/lib/kernels/fingerprint';
import { CALLER, PERIODIC } from '../../kernels/build-kernel';
import { inputOf, KERNEL_CASES, kernelInput } from '../../kernels/kernel-cases';

function source(input: KernelInput, language: (typeof KERNEL_LANGUAGES)[number] = 'c', options = PERIODIC) {
  const answer = generateKernel(input, language, options);
  if (answer.kind === 'none') throw new Error(answer.reason);
  return answer.kernel.source;
}
const reason = (input: KernelInput) => {
  const answer = generateKernel(input, 'c', PERIODIC);
  return answer.kind === 'none' ? answer.reason : 'printed';
};
const central2 = { kind: 'stencil', derivative: 1, offsets: ['-1', '0', '1'], weights: null };

describe('a generated kernel', () => {
  it.each(KERNEL_LANGUAGES)('carries bound, halo and fingerprint in its first two lines in %s', (language) => {
    const [first, second] = source(kernelInput('leapfrog2'), language).split('\n');
    expect(first).toContain('AD 003 r2   |lam| <= 1; keep below   halo 1|1, periodic fill included');
    expect(second).toMatch(new RegExp(`levelbook:leapfrog-central-2/2/${language}/double,periodic:[0-9a-f]{64}`));
  });

  it('says in its header what a caller must know', () => {
    const header = source(kernelInput('leapfrog2'));
    for (const due of [
      'u_t + c u_x = 0; lam = c dt/dx',
      'u[n+1,i] = u[n-1,i] - lam*(u[n,i+1] - u[n,i-1])',
      '2 in time, 2 in space',
      'Advised working value: |lam| <= 0.9',
      'double root on the unit circle',
      'overwritten in',
      'Start-up',
      '-ffp-contract=off',
      'Von Neumann',
      'References  A reference',
      'office internal',
      'release',
    ])
      expect(header).toContain(due);
  });

  it('says loudly that a scheme is unstable or weakly unstable for every value', () => {
    expect(source(kernelInput('forwardCentral'))).toMatch(/\*{60}[\s\S]*UNSTABLE for every nonzero value[\s\S]*\*{60}/);
    expect(source(kernelInput('ab2c2')).split('\n')[0]).toContain('WEAKLY UNSTABLE for every value');
  });

  it('is the same text every time, and another one for other options', () => {
    expect(source(kernelInput('wave'))).toBe(source(kernelInput('wave')));
    expect(source(kernelInput('wave'), 'c', CALLER)).not.toBe(source(kernelInput('wave')));
  });

  it('keeps every line of Fortran within the 132 columns of the standard', () => {
    for (const name of KERNEL_CASES) {
      const lines = source(kernelInput(name), 'fortran')
        .split('\n')
        .filter((line) => !/^\s*!/.test(line));
      expect(Math.max(...lines.map((line) => line.length)), name).toBeLessThanOrEqual(132);
    }
  }, 120_000);

  it('points each note of the margin to a line that is there', () => {
    for (const name of KERNEL_CASES)
      for (const language of KERNEL_LANGUAGES) {
        const answer = generateKernel(kernelInput(name), language, PERIODIC);
        if (answer.kind === 'none') throw new Error(answer.reason);
        const lines = answer.kernel.source.split('\n').length;
        expect(answer.kernel.notes.length, `${name} ${language}`).toBeGreaterThan(0);
        expect(answer.kernel.notes.every((note) => note.line >= 1 && note.line <= lines)).toBe(true);
      }
  });

  it('knows the words of the driver it comes with', () => {
    expect(generateDriver(kernelInput('leapfrog2'), 'c', PERIODIC).fileName).toBe('driver_lb_ad003.c');
    expect(availableLanguages(kernelInput('rk4'))).toEqual(['c', 'fortran', 'python']);
  });
});

describe('a kernel that is not printed', () => {
  it.each([
    [
      'implicit',
      {
        kind: 'scheme',
        form: 'lines',
        equation: 'advection',
        space: [central2],
        time: { kind: 'multistep', alpha: ['-1', '1'], beta: ['1/2', '1/2'] },
      },
      /implicit/,
    ],
    [
      'complex',
      {
        kind: 'scheme',
        form: 'lines',
        equation: 'schrodinger',
        space: [{ kind: 'stencil', derivative: 2, offsets: ['-1', '0', '1'], weights: null }],
        time: { kind: 'multistep', alpha: ['-1', '0', '1'], beta: ['0', '2', '0'] },
      },
      /complex/,
    ],
    [
      'compact',
      {
        kind: 'stencil',
        derivative: 1,
        offsets: ['-1', '1'],
        weights: null,
        lhs: { offsets: ['-1', '0', '1'], weights: null },
      },
      /linear solve/,
    ],
    [
      'unevenly spaced',
      { kind: 'stencil', derivative: 1, offsets: ['-1', '0', '1/3'], weights: null },
      /not evenly spaced/,
    ],
    [
      'two-dimensional',
      {
        kind: 'stencil',
        dims: 2,
        operator: { xx: '1', yy: '1' },
        offsets: [
          ['0', '0'],
          ['1', '0'],
          ['-1', '0'],
          ['0', '1'],
          ['0', '-1'],
        ],
        weights: ['-4', '1', '1', '1', '1'],
      },
      /2 dimensions/,
    ],
    ['implicit in time', { kind: 'time-method', time: { kind: 'runge-kutta', A: [['1/2']], b: ['1'] } }, /implicit/],
  ])('because it is %s says so in a sentence', (_, definition, sentence) => {
    const input = inputOf('XX 001', 'Not printed', definition);
    expect(reason(input)).toMatch(sentence);
    expect(availableLanguages(input)).toEqual([]);
    expect(() => generateDriver(input, 'c', PERIODIC)).toThrow(/has no kernel/);
  });
});

describe('a fingerprint', () => {
  it('verifies the kernel it was printed with, whatever the line ends', () => {
    for (const language of KERNEL_LANGUAGES) {
      const text = source(kernelInput('laxWendroff'), language);
      expect(checkFingerprint(text)).toMatchObject({
        kind: 'unaltered',
        fingerprint: { slug: 'lax-wendroff', revision: 2, language },
      });
      expect(checkFingerprint(text.replaceAll('\n', '\r\n')).kind).toBe('unaltered');
    }
  });

  it('tells a kernel in which one sign was changed', () => {
    const text = source(kernelInput('leapfrog2'));
    const altered = text.replace('w[i] = w[i] - lam', 'w[i] = w[i] + lam');
    expect(altered).not.toBe(text);
    expect(checkFingerprint(altered).kind).toBe('altered');
    expect(checkFingerprint('int main(void) { return 0; }').kind).toBe('absent');
  });
});

describe('a region of two parameters', () => {
  it.each([
    ['lambda^2 <= 2 r <= 1', 2],
    ['lambda^2 <= lambda+2r <= 1 (lambda>=0)', 3],
    ['|lambda|+4r <= 1', 2],
    ['lambda^2 <= 2 r, any r>=0', 2],
    ['r <= 1/2, any lambda', 1],
  ])('%s is read as %i inequalities', (text, count) => {
    expect(regionInequalities(text, ['lambda', 'r'])).toHaveLength(count);
  });

  it('that is no polynomial condition is stated, not checked', () => {
    expect(regionInequalities('|lambda|^(2/3) + r <= 1', ['lambda', 'r'])).toBeNull();
  });
});

describe('the words between trial and driver', () => {
  it('carry every double by its bits', () => {
    for (const value of [0, -0, 1 / 3, -1e-310, Number.MAX_VALUE, Infinity])
      expect(Object.is(hexToDouble(doubleToHex(value)), value)).toBe(true);
    expect(doubleToHex(1)).toBe('3ff0000000000000');
    expect(hexToDouble(doubleToHex(NaN))).toBeNaN();
  });

  it('are one task after another, closed by end', () => {
    const text = formatTasks([
      { kind: 'march', id: 'a', n: 2, steps: 3, parameters: [0.5], levels: [Float64Array.of(1, 2)] },
    ]);
    expect(text).toBe('march a 2 3 3fe0000000000000\n3ff0000000000000\n4000000000000000\nend\n');
    expect(() => formatTasks([{ kind: 'pace', id: 'two words', n: 2, repeats: 1, parameters: [] }])).toThrow(
      /one word/,
    );
  });

  it('come back as levels, oldest first', () => {
    const answers = parseAnswers(
      'state a 0\n3ff0000000000000\n4000000000000000\nstate b 3\npace c 1.5e-9 2e10\n',
      () => 1,
    );
    expect(answers).toEqual([
      { kind: 'state', id: 'a', status: 0, levels: [Float64Array.of(1), Float64Array.of(2)] },
      { kind: 'state', id: 'b', status: 3, levels: [] },
      { kind: 'pace', id: 'c', secondsPerPoint: 1.5e-9, triadBytesPerSecond: 2e10 },
    ]);
    expect(() => parseAnswers('state a 0\nhello\n')).toThrow(/line 2 is no answer/);
  });
});
