/** Instructions of a C kernel a point and step, by callgrind: free of noise, the same in every run. */
import { spawnSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { formatTasks } from '@/lib/codegen/driver-text';
import { buildKernel, PERIODIC, randomField } from './build-kernel';
import { kernelInput, type KernelCase } from './kernel-cases';

const N = 640;

/** Case, parameter, kept levels, and the most instructions that are accepted. */
export const INSTRUCTION_GOALS = [
  ['leapfrog2', 0.7, 2, 2.5],
  ['leapfrog4', 0.45, 2, 4],
  ['heat', 0.4, 1, 3],
  ['wave', 0.9, 2, 3],
  ['laxWendroff', 0.8, 1, 3],
  ['rk4c4', 1.3, 1, 17],
] as const satisfies readonly (readonly [KernelCase, number, number, number])[];

/**
 * What 200 more steps over 640 points cost, so that start and end cancel.
 * @throws {Error} with valgrind's last words where it cannot run the program
 */
export function instructionsPerPoint(name: KernelCase, parameter: number, levels: number): number {
  const built = buildKernel(kernelInput(name), 'c', PERIODIC, 'countable');
  const fields = Array.from({ length: levels }, (_, k) => randomField(N, k + 1));
  const count = (steps: number) => {
    const tasks = formatTasks([{ kind: 'march', id: 'm', n: N, steps, parameters: [parameter], levels: fields }]);
    writeFileSync(path.join(built.folder, 'counted'), tasks);
    const { stderr, status } = spawnSync(
      'valgrind',
      ['--tool=callgrind', '--callgrind-out-file=/dev/null', path.join(built.folder, 'driver'), 'counted'],
      { cwd: built.folder, encoding: 'utf8', maxBuffer: 1 << 28 },
    );
    const collected = /Collected : (\d+)/.exec(stderr ?? '');
    if (status !== 0 || !collected) throw new Error(`valgrind: ${(stderr ?? 'cannot be started').slice(-600)}`);
    return Number(collected[1]);
  };
  try {
    return (count(300) - count(100)) / (200 * N);
  } finally {
    built.remove();
  }
}
