import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { DriverTask } from '@/lib/codegen/driver-protocol';
import { KERNEL_LANGUAGES, type KernelLanguage } from '@/lib/codegen/kernel-request';
import { buildKernel, CALLER, PERIODIC, randomField, type BuiltKernel } from './build-kernel';
import { exactStep } from './exact-evaluation';
import { kernelInput, type KernelCase } from './kernel-cases';

/** Case, parameters inside the stable range, kept levels, grid. */
const MARCHED: [KernelCase, number[], number, number[]][] = [
  ['heat2d', [0.2, 0.15], 1, [11, 7]],
  ['heat3d', [0.1, 0.2, 0.15], 1, [6, 5, 4]],
  ['wave2d', [0.6], 2, [11, 7]],
  ['wave2d4', [0.5], 2, [9, 8]],
  ['wave3d', [0.5], 2, [6, 5, 4]],
  ['wave3d4', [0.4], 2, [5, 4, 6]],
  ['donorCell', [0.4, 0.3], 1, [11, 7]],
  ['cornerTransport', [0.7, 0.6], 1, [11, 7]],
  ['leapfrog2d', [0.4, -0.5], 2, [11, 7]],
];

const points = (grid: readonly number[]) => grid.reduce((product, n) => product * n, 1);
const fields = (grid: readonly number[], count: number) =>
  Array.from({ length: count }, (_, k) => randomField(points(grid), k + 1));
const built = new Map<string, BuiltKernel>();
const kernel = (name: KernelCase, language: KernelLanguage) => built.get(`${name} ${language}`)!;
const march = (steps: number, parameters: number[], levels: number, grid: number[], kind = 'march'): DriverTask =>
  ({ kind, id: 'm', n: points(grid), grid, steps, parameters, levels: fields(grid, levels) }) as DriverTask;

// Warnings are errors: a case that is in the map was built without one.
beforeAll(() => {
  for (const [name] of MARCHED)
    for (const language of KERNEL_LANGUAGES) built.set(`${name} ${language}`, buildKernel(kernelInput(name), language));
}, 600_000);
afterAll(() => built.forEach((b) => b.remove()));

describe('a kernel on a grid', () => {
  it.each(MARCHED)('of %s makes one step as exact arithmetic does', (name, parameters, levels, grid) => {
    const { values, sizes } = exactStep(kernelInput(name), parameters, fields(grid, levels), grid);
    const newest = kernel(name, 'c')
      .levels(march(1, parameters, levels, grid))
      .at(-1)!;
    const worst = Math.max(...values.map((v, i) => Math.abs(v - newest[i]!) / sizes[i]!));
    expect(worst).toBeLessThan(8 * Number.EPSILON);
  });

  it.each(MARCHED)(
    'of %s agrees bit for bit in three languages over 1000 steps, and its run routine with them',
    (name, parameters, levels, grid) => {
      const task = march(1000, parameters, levels, grid);
      const [c, fortran, python] = KERNEL_LANGUAGES.map((l) => kernel(name, l).levels(task));
      expect(c!.flatMap((u) => [...u]).some((v) => Math.abs(v) > 1e-9)).toBe(true);
      expect(fortran).toEqual(c);
      expect(python).toEqual(c);
      for (const l of KERNEL_LANGUAGES)
        expect(kernel(name, l).levels(march(1000, parameters, levels, grid, 'run'))).toEqual(c);
    },
  );

  it.each(MARCHED.filter(([, , levels]) => levels > 1))(
    'of %s makes its second level alike in three languages',
    (name, parameters, levels, grid) => {
      const given = kernelInput(name).callNumber.startsWith('WA') ? 2 : 1;
      const task = {
        kind: 'start',
        id: 's',
        n: points(grid),
        grid,
        parameters,
        levels: fields(grid, given),
      } as DriverTask;
      const [c, fortran, python] = KERNEL_LANGUAGES.map((l) => kernel(name, l).levels(task));
      expect(c).toHaveLength(levels);
      expect(fortran).toEqual(c);
      expect(python).toEqual(c);
    },
  );

  it('with ghost cells filled by the caller builds without a warning and gives the same bits', () => {
    for (const [name, parameters, levels, grid] of [MARCHED[0]!, MARCHED[5]!])
      for (const language of KERNEL_LANGUAGES) {
        const b = buildKernel(kernelInput(name), language, CALLER);
        const answer = b.levels(march(20, parameters, levels, grid));
        b.remove();
        expect(answer).toEqual(kernel(name, language).levels(march(20, parameters, levels, grid)));
      }
  });

  it('reads and writes inside its arrays, by the sanitizers of C and the run-time checks of Fortran', () => {
    for (const [name, parameters, levels, grid] of [MARCHED[5]!, MARCHED[7]!])
      for (const language of ['c', 'fortran'] as const) {
        const b = buildKernel(kernelInput(name), language, PERIODIC, 'checked');
        const answer = b.levels(march(5, parameters, levels, grid));
        b.remove();
        expect(answer).toEqual(kernel(name, language).levels(march(5, parameters, levels, grid)));
      }
  });

  it.each(KERNEL_LANGUAGES)('refuses in %s a side below the halo, a NaN, and values outside the region', (language) => {
    const status = (name: KernelCase, parameters: number[], levels: number, grid: number[]) => {
      const [answer] = kernel(name, language).run([march(1, parameters, levels, grid, 'run')]);
      return answer?.kind === 'state' ? answer.status : undefined;
    };
    expect(status('wave2d4', [0.4], 2, [1, 9])).toBe(1);
    expect(status('wave2d4', [0.4], 2, [9, 1])).toBe(1);
    expect(status('heat2d', [NaN, 0.1], 1, [5, 4])).toBe(2);
    expect(status('heat2d', [0.3, 0.25], 1, [5, 4])).toBe(3);
    expect(status('heat2d', [-0.5, 0.5], 1, [5, 4])).toBe(3);
    expect(status('cornerTransport', [1.01, 0.2], 1, [5, 4])).toBe(3);
    expect(status('leapfrog2d', [0.6, -0.5], 2, [5, 4])).toBe(3);
    expect(status('leapfrog2d', [0.4, -0.5], 2, [5, 4])).toBe(0);
  });
});
