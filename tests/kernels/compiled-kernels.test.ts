import { spawnSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { DriverTask } from '@/lib/codegen/driver-protocol';
import { KERNEL_LANGUAGES, type KernelLanguage } from '@/lib/codegen/kernel-request';
import { buildKernel, CALLER, PERIODIC, randomField, type BuiltKernel } from './build-kernel';
import { exactApplication, exactStep } from './exact-evaluation';
import { kernelInput, type KernelCase } from './kernel-cases';
import { textbookForm } from './textbook-form';

/** Case, parameters inside the stable range where there is one, kept levels. */
const MARCHED: [KernelCase, number[], number][] = [
  ['leapfrog2', [0.7], 2],
  ['leapfrog4', [-0.45], 2],
  ['upwind', [0.6], 1],
  ['laxWendroff', [-0.8], 1],
  ['forwardCentral', [0.01], 1],
  ['heat', [0.4], 1],
  ['duFortFrankel', [1.7], 2],
  ['wave', [0.9], 2],
  ['rk4c4', [1.3], 1],
  ['ssp3c2', [0.8], 1],
  ['ab2c2', [0.05], 2],
  ['ab3c2', [0.3], 3],
  ['upwindBiased3', [0.7], 1],
  ['airy', [0.3], 2],
  ['advectionDiffusion', [0.3, 0.2], 1],
];
const METHODS: [KernelCase, number[], number][] = [
  ['rk4', [0.9], 1],
  ['ab3', [0.3, 0.05], 3],
  ['leapfrogMethod', [0.5], 2],
];
const STENCILS: KernelCase[] = ['firstCentral4', 'firstStaggered4', 'secondOneSided'];
const ALL = [...MARCHED.map(([name]) => name), ...METHODS.map(([name]) => name), ...STENCILS];
const N = 53;

const fields = (count: number) => Array.from({ length: count }, (_, k) => randomField(N, k + 1));
const built = new Map<string, BuiltKernel>();
const kernel = (name: KernelCase, language: KernelLanguage) => built.get(`${name} ${language}`)!;
const march = (steps: number, parameters: number[], levels: number): DriverTask => ({
  kind: 'march',
  id: 'march',
  n: N,
  steps,
  parameters,
  levels: fields(levels),
});

// Warnings are errors here, in C, Fortran and Python alike: a case that is in the map was built without one.
beforeAll(() => {
  for (const name of ALL)
    for (const language of KERNEL_LANGUAGES) built.set(`${name} ${language}`, buildKernel(kernelInput(name), language));
}, 600_000);
afterAll(() => built.forEach((b) => b.remove()));

describe('a generated kernel', () => {
  it.each(MARCHED)('of %s makes one step as exact arithmetic does', (name, parameters, levels) => {
    const { values, sizes } = exactStep(kernelInput(name), parameters, fields(levels));
    const [newest] = kernel(name, 'c')
      .levels(march(1, parameters, levels))
      .slice(-1);
    const worst = Math.max(...values.map((v, i) => Math.abs(v - newest![i]!) / Math.max(sizes[i]!, 1e-300)));
    // Stages and coefficients round a few times more than the terms of the expanded table do.
    expect(worst).toBeLessThan(16 * Number.EPSILON);
  });

  it.each(STENCILS)('of %s gives the approximation as exact arithmetic does', (name) => {
    const u = randomField(N, 9);
    const { values, sizes } = exactApplication(kernelInput(name), 0.37, u);
    const [d] = kernel(name, 'c').levels({ kind: 'apply', id: 'a', n: N, spacing: 0.37, values: u });
    const worst = Math.max(...values.map((v, i) => Math.abs(v - d![i]!) / sizes[i]!));
    expect(worst).toBeLessThan(4 * Number.EPSILON);
  });

  it.each([...MARCHED, ...METHODS])(
    'of %s agrees bit for bit in three languages over 1000 steps',
    (name, parameters, levels) => {
      const [c, fortran, python] = KERNEL_LANGUAGES.map((l) => kernel(name, l).levels(march(1000, parameters, levels)));
      expect(c!.flatMap((u) => [...u]).some((v) => Math.abs(v) > 1e-9)).toBe(true);
      expect(fortran).toEqual(c);
      expect(python).toEqual(c);
    },
  );

  it.each(STENCILS)('of %s agrees bit for bit in three languages', (name) => {
    const task: DriverTask = { kind: 'apply', id: 'a', n: N, spacing: 0.37, values: randomField(N, 5) };
    const [c, fortran, python] = KERNEL_LANGUAGES.map((l) => kernel(name, l).levels(task));
    expect(fortran).toEqual(c);
    expect(python).toEqual(c);
  });

  it.each(MARCHED)('of %s marches like the textbook form with np.roll', (name, parameters, levels) => {
    const { python } = textbookForm(kernelInput(name));
    const b = kernel(name, 'python');
    writeFileSync(path.join(b.folder, 'oracle.py'), python);
    const script = `import sys, json; sys.path.insert(0, '.'); import numpy as np; from oracle import textbook
levels = textbook(40, [np.array(u) for u in json.load(sys.stdin)], ${parameters.join(', ')}); print(json.dumps(levels[-1].tolist()))`;
    const { stdout, stderr } = spawnSync('/usr/bin/python3', ['-c', script], {
      cwd: b.folder,
      encoding: 'utf8',
      input: JSON.stringify(fields(levels).map((u) => [...u])),
    });
    expect(stderr).toBe('');
    const oracle = JSON.parse(stdout) as number[];
    const newest = b.levels(march(40, parameters, levels)).at(-1)!;
    const size = Math.max(1, ...oracle.map(Math.abs));
    expect(Math.max(...oracle.map((v, i) => Math.abs(v - newest[i]!))) / size).toBeLessThan(1e-12);
  });

  it.each(MARCHED)('of %s gives the same by its run routine as step by step', (name, parameters, levels) => {
    if (name === 'forwardCentral')
      expect(kernelInput(name).facts).toMatchObject({ stability: { verdict: 'unstable for all nonzero values' } });
    for (const language of KERNEL_LANGUAGES) {
      const b = kernel(name, language);
      const stepped = b.levels(march(7, parameters, levels));
      expect(b.levels({ ...march(7, parameters, levels), kind: 'run' } as DriverTask)).toEqual(stepped);
    }
  });

  it('with ghost cells filled by the caller builds without a warning and gives the same bits', () => {
    for (const [name, parameters, levels] of [MARCHED[0]!, MARCHED[8]!])
      for (const language of KERNEL_LANGUAGES) {
        const b = buildKernel(kernelInput(name), language, CALLER);
        const answer = b.levels(march(20, parameters, levels));
        b.remove();
        expect(answer).toEqual(kernel(name, language).levels(march(20, parameters, levels)));
      }
  });

  it('reads and writes inside its arrays, by the sanitizers of C and the run-time checks of Fortran', () => {
    for (const [name, parameters, levels] of [...MARCHED.slice(0, 2), MARCHED[8]!, METHODS[1]!])
      for (const language of ['c', 'fortran'] as const) {
        const b = buildKernel(kernelInput(name), language, PERIODIC, 'checked');
        const answer = b.levels(march(5, parameters, levels));
        b.remove();
        expect(answer).toEqual(kernel(name, language).levels(march(5, parameters, levels)));
      }
  });
});

describe('bad arguments', () => {
  const status = (name: KernelCase, language: KernelLanguage, task: DriverTask) => {
    const [answer] = kernel(name, language).run([task]);
    return answer?.kind === 'state' ? answer.status : undefined;
  };
  const task = (
    n: number,
    parameters: number[],
    levels: number,
    kind: 'march' | 'run' = 'run',
    steps = 3,
  ): DriverTask =>
    ({
      kind,
      id: 'bad',
      n,
      steps,
      parameters,
      levels: Array.from({ length: levels }, () => randomField(n, 3)),
    }) as DriverTask;

  it.each(KERNEL_LANGUAGES)(
    'answer with their status in %s: n below the halo 1, no finite number 2, outside the bound 3',
    (language) => {
      expect(status('leapfrog4', language, task(1, [0.4], 2))).toBe(1);
      expect(status('leapfrog4', language, task(8, [0.4], 2, 'run', -1))).toBe(1);
      expect(status('leapfrog2', language, task(8, [NaN], 2))).toBe(2);
      expect(status('leapfrog2', language, task(8, [Infinity], 2))).toBe(2);
      expect(status('leapfrog2', language, task(8, [1.0000001], 2))).toBe(3);
      expect(status('leapfrog2', language, task(8, [-1.0000001], 2))).toBe(3);
      expect(status('leapfrog2', language, task(8, [1], 2))).toBe(0);
      expect(status('duFortFrankel', language, task(8, [-0.5], 2))).toBe(2);
      expect(status('duFortFrankel', language, task(8, [-0.1], 2))).toBe(3);
      expect(status('advectionDiffusion', language, task(8, [0.3, 0.6], 1))).toBe(3);
      expect(status('advectionDiffusion', language, task(8, [0.9, 0.4], 1))).toBe(3);
      expect(status('advectionDiffusion', language, task(8, [0.8, NaN], 1))).toBe(2);
      expect(status('upwindBiased3', language, task(8, [2], 1))).toBe(0);
      expect(status('upwindBiased3', language, task(8, [1.5], 1))).toBe(3);
      expect(status('forwardCentral', language, task(8, [5], 1))).toBe(0);
      expect(
        status('firstCentral4', language, { kind: 'apply', id: 'a', n: 1, spacing: 1, values: randomField(1, 1) }),
      ).toBe(1);
      expect(
        status('firstCentral4', language, { kind: 'apply', id: 'a', n: 9, spacing: 0, values: randomField(9, 1) }),
      ).toBe(2);
      expect(status('rk4', language, task(8, [NaN], 1))).toBe(2);
    },
  );

  it.each(KERNEL_LANGUAGES)('outside the bound are told by march in %s, which goes on all the same', (language) => {
    const [answer] = kernel('leapfrog2', language).run([task(8, [1.2], 2, 'march')]);
    expect(answer).toMatchObject({ kind: 'state', status: 3 });
    expect(answer?.kind === 'state' && answer.levels.length).toBe(2);
  });

  it.each(KERNEL_LANGUAGES)('that are no task end the driver of %s with a sentence that names the line', (language) => {
    for (const [text, sentence] of [
      ['march a 8\nend\n', /line 1/],
      ['march a 8 1 3fe0000000000000\n3fe00000000000zz\n', /line 2.*16 hexadecimal digits/],
      ['turn a 8\nend\n', /line 1.*unknown task/],
      ['march a 2 1 3fe0000000000000\n3fe0000000000000\n', /ends before 'end'/],
      ['', /ends before 'end'/],
    ] as const) {
      const run = kernel('leapfrog2', language).runText(text);
      expect(run.status).not.toBe(0);
      expect(run.stderr).toMatch(sentence);
    }
  });

  it('are refused by Python with ValueError: shapes, types, overlap and a state with NaN', () => {
    const script = `
import numpy as np, lb_ad003 as k
def refused(act):
    try:
        act()
    except ValueError as error:
        return str(error)
    raise SystemExit('accepted')
u, w = np.zeros(k.length(8)), np.zeros(k.length(8))
print(refused(lambda: k.Step([u], 0.5)))
print(refused(lambda: k.Step([u, w[:-1]], 0.5)))
print(refused(lambda: k.Step([u, w.astype('f')], 0.5)))
print(refused(lambda: k.Step([u, u], 0.5)))
print(refused(lambda: k.Step([np.zeros(20)[::2], w], 0.5)))
u[3] = float('nan')
print(refused(lambda: k.check_state(u)))
`;
    const { folder } = kernel('leapfrog2', 'python');
    const { stdout, stderr } = spawnSync('/usr/bin/python3', ['-c', script], { cwd: folder, encoding: 'utf8' });
    expect(stderr).toBe('');
    expect(stdout.trim().split('\n')).toEqual([
      expect.stringContaining('1 arrays given'),
      expect.stringContaining('shapes differ'),
      expect.stringContaining('float64'),
      expect.stringContaining('overlap'),
      expect.stringContaining('contiguous'),
      expect.stringContaining('NaN'),
    ]);
  });

  it('that are null pointers or a state with NaN are answered by C with 4 and 5', () => {
    const { folder } = kernel('leapfrog2', 'c');
    writeFileSync(
      path.join(folder, 'null.c'),
      `#include "lb_ad003.c"
#include <stdio.h>
int main(void)
{
    double u[10] = {0}, w[10] = {0}, work[10];
    double *level[2] = {u, w}, *none[2] = {u, NULL};
    printf("%d %d %d ", lb_ad003_run(1, 8, 0.5, NULL), lb_ad003_run(1, 8, 0.5, none), lb_ad003_start(8, 0.5, level, NULL));
    u[4] = NAN;
    printf("%d %d %d\\n", lb_ad003_check_state(8, u), lb_ad003_check_state(8, NULL), lb_ad003_start(8, 0.5, level, work));
    return 0;
}
`,
    );
    const compiled = spawnSync('gcc', ['-std=c11', '-O1', 'null.c', '-o', 'null', '-lm'], {
      cwd: folder,
      encoding: 'utf8',
    });
    expect(compiled.stderr).toBe('');
    expect(spawnSync(path.join(folder, 'null'), [], { encoding: 'utf8' }).stdout).toBe('4 4 4 5 4 0\n');
  });
});

describe('a start-up routine', () => {
  /** Largest error at a fixed time on n points, started from the initial data alone. */
  function error(
    name: KernelCase,
    n: number,
    parameter: number,
    levels: number,
    exact: (x: number, t: number) => number,
    slope?: (x: number) => number,
  ) {
    const second = name === 'wave';
    const diffusive = name === 'duFortFrankel';
    const dx = (2 * Math.PI) / n;
    const dt = diffusive ? parameter * dx * dx : parameter * dx;
    const field = (f: (x: number) => number) => Float64Array.from({ length: n }, (_, i) => f(i * dx));
    const b = kernel(name, 'c');
    const initial = [field((x) => exact(x, 0)), ...(second && slope ? [field((x) => dt * slope(x))] : [])];
    const started = b.levels({ kind: 'start', id: 's', n, parameters: [parameter], levels: initial });
    expect(started).toHaveLength(levels);
    const total = diffusive ? (n * n) / 64 : n / 4;
    const steps = total - (levels - 1);
    const newest = b.levels({ kind: 'march', id: 'm', n, steps, parameters: [parameter], levels: started }).at(-1)!;
    const time = total * dt;
    return Math.max(...newest.map((v, i) => Math.abs(v - exact(i * dx, time))));
  }

  it.each([
    // scheme             levels  parameter  order
    ['leapfrog2', 2, 0.5, 2],
    ['leapfrog4', 2, 0.5, 2],
    ['ab2c2', 2, 0.1, 2],
    ['ab3c2', 3, 0.3, 2],
  ] as const)('keeps the order of %s with %i levels', (name, levels, parameter, order) => {
    const wave = (x: number, t: number) => Math.exp(Math.sin(x - t));
    const [coarse, fine] = [64, 128].map((n) => error(name, n, parameter, levels, wave));
    expect(Math.log2(coarse! / fine!)).toBeGreaterThan(order - 0.1);
  });

  it('keeps the order of DuFort-Frankel at fixed r', () => {
    const heat = (x: number, t: number) => Math.exp(-t) * Math.sin(x);
    const [coarse, fine] = [64, 128].map((n) => error('duFortFrankel', n, 0.4, 2, heat));
    expect(Math.log2(coarse! / fine!)).toBeGreaterThan(1.9);
  });

  it('keeps the order of the wave equation from u and dt u_t', () => {
    const wave = (x: number, t: number) => Math.exp(Math.sin(x - t));
    const slope = (x: number) => -Math.cos(x) * Math.exp(Math.sin(x));
    const [coarse, fine] = [64, 128].map((n) => error('wave', n, 0.5, 2, wave, slope));
    expect(Math.log2(coarse! / fine!)).toBeGreaterThan(1.9);
  });

  it.each([
    // method             levels  order
    ['ab3', 3, 3],
    ['leapfrogMethod', 2, 2],
  ] as const)('keeps the order of the time method %s with %i levels', (name, levels, order) => {
    const n = 16;
    const theta = (2 * Math.PI) / n;
    const b = kernel(name, 'c');
    const errors = [64, 128].map((steps) => {
      const lambda = 4 / steps;
      const initial = Float64Array.from({ length: n }, (_, i) => Math.sin(theta * i));
      const started = b.levels({ kind: 'start', id: 's', n, parameters: [lambda], levels: [initial] });
      const newest = b
        .levels({ kind: 'march', id: 'm', n, steps: steps - (levels - 1), parameters: [lambda], levels: started })
        .at(-1)!;
      // u' = -lambda sin(theta) i u for the mode exp(i theta j): the sine is carried along by 4 sin(theta).
      return Math.max(...newest.map((v, i) => Math.abs(v - Math.sin(theta * i - 4 * Math.sin(theta)))));
    });
    expect(Math.log2(errors[0]! / errors[1]!)).toBeGreaterThan(order - 0.15);
  });
});
