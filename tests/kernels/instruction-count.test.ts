import { spawnSync } from 'node:child_process';
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { expect, it } from 'vitest';
import { formatTasks } from '@/lib/codegen/driver-text';
import { buildKernel, PERIODIC, randomField } from './build-kernel';
import { kernelInput, type KernelCase } from './kernel-cases';

const N = 640;

/** Instructions of one step over N points, by callgrind: what more steps cost, so that all else cancels. */
function instructionsPerPoint(name: KernelCase, parameter: number, levels: number): number {
  const built = buildKernel(kernelInput(name), 'c', PERIODIC, 'countable');
  const count = (steps: number) => {
    writeFileSync(
      path.join(built.folder, 'counted'),
      formatTasks([
        {
          kind: 'march',
          id: 'm',
          n: N,
          steps,
          parameters: [parameter],
          levels: Array.from({ length: levels }, (_, k) => randomField(N, k + 1)),
        },
      ]),
    );
    const { stderr, status } = spawnSync(
      'valgrind',
      ['--tool=callgrind', '--callgrind-out-file=/dev/null', path.join(built.folder, 'driver'), 'counted'],
      { cwd: built.folder, encoding: 'utf8', maxBuffer: 1 << 28 },
    );
    const collected = /Collected : (\d+)/.exec(stderr);
    if (status !== 0 || !collected) throw new Error(`valgrind: ${stderr.slice(-600)}`);
    return Number(collected[1]);
  };
  const [few, many] = [count(100), count(300)];
  built.remove();
  return (many - few) / (200 * N);
}

it.each([
  // kernel         parameter  levels  goal
  ['leapfrog2', 0.7, 2, 2.5],
  ['leapfrog4', 0.45, 2, 4],
  ['heat', 0.4, 1, 3],
  ['wave', 0.9, 2, 3],
  ['laxWendroff', 0.8, 1, 3],
  ['rk4c4', 1.3, 1, 17],
] as const)('the C kernel of %s takes few instructions a point and step', (name, parameter, levels, goal) => {
  const counted = instructionsPerPoint(name, parameter, levels);
  expect(counted).toBeGreaterThan(0.5);
  expect(counted).toBeLessThanOrEqual(goal);
});
