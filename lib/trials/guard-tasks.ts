/** What the builds with run-time checks are set: every public routine, on short arrays and at their smallest sizes. */
import type { DriverTask } from '@/lib/codegen/driver-protocol';
import { pointsOf, sized } from './grid';
import { randomField } from './smooth-field';
import type { Subject } from './subject';

const STEPS = 3;

export function guardTasks(subject: Subject): DriverTask[] {
  const sizes = [2 * subject.halo + 5, 33];
  if (subject.kind === 'stencil')
    return sizes.map((n, k) => ({ kind: 'apply', id: `guards:${k}`, n, spacing: 0.25, values: randomField(n, k + 1) }));
  const { keptLevels, scheme, halo } = subject;
  const smallest = 2 * halo + 5;
  const grids: number[][] =
    scheme.dims === 1
      ? sizes.map((n) => [n])
      : [
          [smallest, smallest + 1, smallest + 2].slice(0, scheme.dims),
          [2 * smallest, smallest + 2, smallest].slice(0, scheme.dims),
        ];
  const parameters = [...subject.working[0]!];
  const levels = (grid: readonly number[], count: number) =>
    Array.from({ length: count }, (_, l) => randomField(pointsOf(grid), l + 1));
  return grids.flatMap((grid, k): DriverTask[] => [
    {
      kind: 'march',
      id: `guards:march:${k}`,
      ...sized(grid),
      steps: STEPS,
      parameters,
      levels: levels(grid, keptLevels),
    },
    ...(keptLevels > 1
      ? [
          {
            kind: 'start' as const,
            id: `guards:start:${k}`,
            ...sized(grid),
            parameters,
            levels: levels(grid, scheme.timeOrder),
          },
        ]
      : []),
  ]);
}
