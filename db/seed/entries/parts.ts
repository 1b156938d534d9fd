/** Building blocks of the demo's definitions: stencils and time methods that many entries share. */
import type { Definition } from '@/lib/entries/definition';
import type { Equation } from '@/lib/numerics/equation';

type Stencil = Extract<Definition, { kind: 'stencil' }>;
type Time = Extract<Definition, { kind: 'time-method' }>['time'];

/** A stencil on whole offsets from `left` to `right`, weights derived. */
export const between = (derivative: number, left: number, right: number): Stencil => ({
  kind: 'stencil',
  dims: 1,
  derivative,
  offsets: Array.from({ length: right - left + 1 }, (_, k) => String(left + k)),
  weights: null,
});
export const central = (derivative: number, half: number) => between(derivative, -half, half);
export const onOffsets = (derivative: number, offsets: string[]): Stencil => ({
  kind: 'stencil',
  dims: 1,
  derivative,
  offsets,
  weights: null,
});

export const rungeKutta = (A: string[][], b: string[], c: string[]): Time => ({ kind: 'runge-kutta', A, b, c });
export const multistep = (alpha: string[], beta: string[]): Time => ({ kind: 'multistep', alpha, beta });

export const TIME = {
  forwardEuler: multistep(['-1', '1'], ['1', '0']),
  backwardEuler: multistep(['-1', '1'], ['0', '1']),
  trapezoidal: multistep(['-1', '1'], ['1/2', '1/2']),
  leapfrog: multistep(['-1', '0', '1'], ['0', '2', '0']),
  ab2: multistep(['0', '-1', '1'], ['-1/2', '3/2', '0']),
  ab3: multistep(['0', '0', '-1', '1'], ['5/12', '-4/3', '23/12', '0']),
  ab4: multistep(['0', '0', '0', '-1', '1'], ['-9/24', '37/24', '-59/24', '55/24', '0']),
  bdf2: multistep(['1/2', '-2', '3/2'], ['0', '0', '1']),
  midpoint2: rungeKutta(
    [
      ['0', '0'],
      ['1/2', '0'],
    ],
    ['0', '1'],
    ['0', '1/2'],
  ),
  heun2: rungeKutta(
    [
      ['0', '0'],
      ['1', '0'],
    ],
    ['1/2', '1/2'],
    ['0', '1'],
  ),
  heun3: rungeKutta(
    [
      ['0', '0', '0'],
      ['1/3', '0', '0'],
      ['0', '2/3', '0'],
    ],
    ['1/4', '0', '3/4'],
    ['0', '1/3', '2/3'],
  ),
  kutta3: rungeKutta(
    [
      ['0', '0', '0'],
      ['1/2', '0', '0'],
      ['-1', '2', '0'],
    ],
    ['1/6', '2/3', '1/6'],
    ['0', '1/2', '1'],
  ),
  ssp3: rungeKutta(
    [
      ['0', '0', '0'],
      ['1', '0', '0'],
      ['1/4', '1/4', '0'],
    ],
    ['1/6', '1/6', '2/3'],
    ['0', '1', '1/2'],
  ),
  threeStage: rungeKutta(
    [
      ['0', '0', '0'],
      ['1/3', '0', '0'],
      ['0', '1/2', '0'],
    ],
    ['0', '0', '1'],
    ['0', '1/3', '1/2'],
  ),
  williamson3: rungeKutta(
    [
      ['0', '0', '0'],
      ['1/3', '0', '0'],
      ['-3/16', '15/16', '0'],
    ],
    ['1/6', '3/10', '8/15'],
    ['0', '1/3', '3/4'],
  ),
  rk4: rungeKutta(
    [
      ['0', '0', '0', '0'],
      ['1/2', '0', '0', '0'],
      ['0', '1/2', '0', '0'],
      ['0', '0', '1', '0'],
    ],
    ['1/6', '1/3', '1/3', '1/6'],
    ['0', '1/2', '1/2', '1'],
  ),
  rk38: rungeKutta(
    [
      ['0', '0', '0', '0'],
      ['1/3', '0', '0', '0'],
      ['-1/3', '1', '0', '0'],
      ['1', '-1', '1', '0'],
    ],
    ['1/8', '3/8', '3/8', '1/8'],
    ['0', '1/3', '2/3', '1'],
  ),
} as const satisfies Record<string, Time>;

export const lines = (equation: Equation, space: Stencil | Stencil[], time: Time): Definition => ({
  kind: 'scheme',
  equation,
  form: 'lines',
  space: Array.isArray(space) ? space : [space],
  time,
});

/** [level, offset, coefficient] rows of a one-dimensional table. */
export const table = (equation: Equation, rows: readonly (readonly [number, number, string])[]): Definition => ({
  kind: 'scheme',
  equation,
  form: 'table',
  terms: rows.map(([level, offset, coefficient]) => ({ level: String(level), offset: String(offset), coefficient })),
});

/** The same in two or three dimensions. */
export const gridTable = (
  equation: Equation,
  rows: readonly (readonly [number, readonly number[], string])[],
): Definition => ({
  kind: 'scheme',
  equation,
  form: 'table',
  terms: rows.map(([level, offset, coefficient]) => ({
    level: String(level),
    offset: offset.map(String),
    coefficient,
  })),
});

export const timeMethod = (time: Time): Definition => ({ kind: 'time-method', time });
