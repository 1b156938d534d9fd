/** Staggered velocity–pressure systems p, v in one to three dimensions, written out from their difference weights. */
import type { z } from 'zod';
import type { Definition } from '@/lib/entries/definition';

const AXES = ['x', 'y', 'z'] as const;
const EQUATION = { 1: 'wave', 2: 'wave-2d', 3: 'wave-3d' } as const;

/** Weights of the staggered first derivative at ±1/2, ±3/2 …, in the order of the offsets. */
const WEIGHTS = {
  2: [
    ['-1', '-1/2'],
    ['1', '1/2'],
  ],
  4: [
    ['1/24', '-3/2'],
    ['-9/8', '-1/2'],
    ['9/8', '1/2'],
    ['-1/24', '3/2'],
  ],
} as const;

const SHIFTED: Readonly<Record<string, string>> = { '-3/2': '-1', '-1/2': '0', '1/2': '1', '3/2': '2' };

/** @param order of the differences in space */
export function staggered(dims: 1 | 2 | 3, order: 2 | 4): z.input<typeof Definition> {
  const axes = AXES.slice(0, dims);
  const at = (axis: number, component: string) => {
    const offset = axes.map((_, k) => (k === axis ? component : '0'));
    return dims === 1 ? offset[0]! : offset;
  };
  const origin = at(0, '0');
  const pressure = [
    { unknown: 'p', level: '1', offset: origin, coefficient: '1' },
    { unknown: 'p', level: '0', offset: origin, coefficient: '-1' },
    ...axes.flatMap((axis, k) =>
      WEIGHTS[order].map(([weight, offset]) => ({
        unknown: `v${axis}`,
        level: '1/2',
        offset: at(k, offset),
        coefficient: `lambda*(${weight})`,
      })),
    ),
  ];
  const velocities = axes.map((axis, k) => ({
    terms: [
      { unknown: `v${axis}`, level: '1/2', offset: at(k, '1/2'), coefficient: '1' },
      { unknown: `v${axis}`, level: '-1/2', offset: at(k, '1/2'), coefficient: '-1' },
      ...WEIGHTS[order].map(([weight, offset]) => ({
        unknown: 'p',
        level: '0',
        offset: at(k, SHIFTED[offset]!),
        coefficient: `lambda*(${weight})`,
      })),
    ],
  }));
  return {
    kind: 'scheme',
    equation: EQUATION[dims],
    form: 'system',
    unknowns: ['p', ...axes.map((axis) => `v${axis}`)],
    equations: [{ terms: pressure }, ...velocities],
  };
}
