/** What a new draft begins with: the least that has a meaning, to be changed at once. */
import { CONVENTIONS, EQUATIONS, type Equation } from '@/lib/numerics/equation';
import type { Definition, StencilDefinition } from './definition';

export const BLANKS = ['table', 'lines', 'stencil', 'time-method', 'system'] as const;
export type Blank = (typeof BLANKS)[number];

export const BLANK_NAMES = {
  table: 'Scheme: points and weights',
  lines: 'Scheme: stencil and time method',
  system: 'Scheme: system, by JSON',
  stencil: 'Stencil',
  'time-method': 'Time method',
} as const satisfies Record<Blank, string>;

/** Equations of which a system can be made: waves as two first-order fields. */
export const SYSTEM_EQUATIONS = EQUATIONS.filter((equation) => CONVENTIONS[equation].timeOrder === 2);

const zeroOffset = (dims: number) => (dims === 1 ? '0' : Array<string>(dims).fill('0'));

function blankTable(equation: Equation): Definition {
  const { dims, timeOrder } = CONVENTIONS[equation];
  const offset = zeroOffset(dims);
  const past =
    timeOrder === 1
      ? [{ level: '0', offset, coefficient: '-1' }]
      : [
          { level: '0', offset, coefficient: '-2' },
          { level: '-1', offset, coefficient: '1' },
        ];
  return { kind: 'scheme', form: 'table', equation, terms: [{ level: '1', offset, coefficient: '1' }, ...past] };
}

const central = (derivative: number): StencilDefinition => {
  const half = Math.ceil(derivative / 2);
  return {
    kind: 'stencil',
    dims: 1,
    derivative,
    offsets: Array.from({ length: 2 * half + 1 }, (_, k) => String(k - half)),
    weights: null,
  };
};

/** Staggered velocity and pressure by leapfrog: p at whole, v at half places and levels. */
const blankSystem = (equation: Equation): Definition => {
  const axes = ['x', 'y', 'z'].slice(0, CONVENTIONS[equation].dims);
  const at = (axis: number, by: string) => (axes.length === 1 ? by : axes.map((_, k) => (k === axis ? by : '0')));
  const velocity = (k: number) => (axes.length === 1 ? 'v' : `v${axes[k]}`);
  return {
    kind: 'scheme',
    form: 'system',
    equation,
    unknowns: [...axes.map((_, k) => velocity(k)), 'p'],
    equations: [
      ...axes.map((_, k) => ({
        terms: [
          { unknown: velocity(k), level: '1/2', offset: at(k, '1/2'), coefficient: '1' },
          { unknown: velocity(k), level: '-1/2', offset: at(k, '1/2'), coefficient: '-1' },
          { unknown: 'p', level: '0', offset: at(k, '1'), coefficient: 'lambda' },
          { unknown: 'p', level: '0', offset: at(k, '0'), coefficient: '-lambda' },
        ],
      })),
      {
        terms: [
          { unknown: 'p', level: '1', offset: at(0, '0'), coefficient: '1' },
          { unknown: 'p', level: '0', offset: at(0, '0'), coefficient: '-1' },
          ...axes.flatMap((_, k) => [
            { unknown: velocity(k), level: '1/2', offset: at(k, '1/2'), coefficient: 'lambda' },
            { unknown: velocity(k), level: '1/2', offset: at(k, '-1/2'), coefficient: '-lambda' },
          ]),
        ],
      },
    ],
  };
};

/** @param equation for schemes; systems fall back to the wave equation where theirs is of first order in time */
export function blankDefinition(blank: Blank, equation: Equation): Definition {
  switch (blank) {
    case 'table':
      return blankTable(equation);
    case 'lines': {
      const { operators, timeOrder } = CONVENTIONS[equation];
      return {
        kind: 'scheme',
        form: 'lines',
        equation,
        space: operators.map(central),
        time:
          timeOrder === 1
            ? { kind: 'runge-kutta', A: [['0']], b: ['1'] }
            : { kind: 'multistep', alpha: ['1', '-2', '1'], beta: ['0', '1', '0'] },
      };
    }
    case 'stencil':
      return central(1);
    case 'time-method':
      return { kind: 'time-method', time: { kind: 'runge-kutta', A: [['0']], b: ['1'] } };
    case 'system':
      return blankSystem(SYSTEM_EQUATIONS.includes(equation) ? equation : 'wave');
  }
}
