/** What the builds with run-time checks are set: every public routine, on short arrays and at their smallest sizes. */
import type { DriverTask } from '@/lib/codegen/driver-protocol';
import { randomField } from './smooth-field';
import type { Subject } from './subject';

const STEPS = 3;

export function guardTasks(subject: Subject): DriverTask[] {
  const sizes = [2 * subject.halo + 5, 33];
  if (subject.kind === 'stencil')
    return sizes.map((n, k) => ({ kind: 'apply', id: `guards:${k}`, n, spacing: 0.25, values: randomField(n, k + 1) }));
  const { keptLevels, scheme } = subject;
  const parameters = [...subject.working[0]!];
  const levels = (n: number, count: number) => Array.from({ length: count }, (_, l) => randomField(n, l + 1));
  return sizes.flatMap((n, k): DriverTask[] => [
    { kind: 'march', id: `guards:march:${k}`, n, steps: STEPS, parameters, levels: levels(n, keptLevels) },
    ...(keptLevels > 1
      ? [{ kind: 'start' as const, id: `guards:start:${k}`, n, parameters, levels: levels(n, scheme.timeOrder) }]
      : []),
  ]);
}
