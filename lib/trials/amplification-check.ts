/** Single waves marched by the kernel against the factors that the definition gives them. */
import type { ApplyTask, MarchTask } from '@/lib/codegen/driver-protocol';
import { toNumber } from '@/lib/numerics/rational';
import {
  minus,
  modulus,
  over,
  powerOf,
  sampleScheme,
  separation,
  times,
  type Angle,
  type Complex,
} from './characteristic';
import { notApplicable, outcomeOf, short, stateOf, type Check } from './check';
import { anglesOf, pointsOf, sized } from './grid';
import type { MarchSubject, StencilSubject } from './subject';

const POINTS = 48;
/** Long, middling and short waves; neither the mean nor the shortest one, whose phase a grid cannot show. */
const WAVES = [1, 5, 12, 18, 23] as const;
/** In several dimensions: along each axis, and across the grid, short and long. */
const GRIDS: Readonly<Record<1 | 2 | 3, { grid: readonly number[]; waves: readonly (readonly number[])[] }>> = {
  1: { grid: [POINTS], waves: WAVES.map((count) => [count]) },
  2: {
    grid: [16, 12],
    waves: [
      [1, 0],
      [0, 1],
      [3, 2],
      [5, -4],
      [7, 5],
    ],
  },
  3: {
    grid: [12, 10, 8],
    waves: [
      [1, 0, 0],
      [0, 1, 0],
      [0, 0, 1],
      [2, -1, 1],
      [5, 4, -3],
    ],
  },
};
const PHASE = 0.4;
const STEPS_MAX = 16;
/** Roundings of a step feed the other roots of a wave, and a double root halves the digits of its factor. */
const LIMIT = 1e-10;
/** Below this distance between two roots their values in double precision say too little. */
const SEPARATION_MIN = 1e-3;

/** Angle of the wave at every point of the grid, x running fastest. */
function anglesAt(theta: Angle, grid: readonly number[]): Float64Array {
  const steps = typeof theta === 'number' ? [theta] : theta;
  return Float64Array.from({ length: pointsOf(grid) }, (_, at) => {
    let rest = at;
    return grid.reduce((angle, n, axis) => {
      const place = rest % n;
      rest = Math.floor(rest / n);
      return angle + steps[axis]! * place;
    }, PHASE);
  });
}

const waveAt = (theta: Angle, factor: Complex, grid: readonly number[]): Float64Array =>
  anglesAt(theta, grid).map((angle) => factor[0] * Math.cos(angle) - factor[1] * Math.sin(angle));

/** Complex amplitude of one wave in a real field, its starting phase taken off. */
function amplitude(values: Float64Array, theta: Angle, grid: readonly number[]): Complex {
  const angles = anglesAt(theta, grid);
  let re = 0;
  let im = 0;
  values.forEach((value, j) => {
    re += value * Math.cos(angles[j]!);
    im -= value * Math.sin(angles[j]!);
  });
  return [(2 * re) / values.length, (2 * im) / values.length];
}

/** As many steps as leave the wave well above the roundings of itself and of the other roots. */
function stepsFor(root: Complex, largest: number): number {
  const size = modulus(root);
  let steps = STEPS_MAX;
  while (steps > 1 && (size ** steps < 1e-2 || (largest / size) ** steps > 1e2)) steps--;
  return steps;
}

export function amplificationCheck(subject: MarchSubject): Check {
  const { grid, waves } = GRIDS[subject.scheme.dims];
  const cases = subject.working.flatMap((parameters, p) => {
    const sampled = sampleScheme(subject.scheme, parameters);
    return waves.flatMap((counts) => {
      const theta = anglesOf(counts, grid);
      const roots = sampled.roots(theta);
      if (separation(roots) < SEPARATION_MIN) return [];
      const largest = Math.max(...roots.map(modulus));
      return roots
        .filter((root) => modulus(root) > 1e-2 * largest && modulus(root) > 1e-3)
        .map((root, k) => ({
          id: `amplification:${p}:${counts.join(',')}:${k}`,
          parameters,
          theta,
          root,
          steps: stepsFor(root, largest),
        }));
    });
  });
  if (cases.length === 0)
    return notApplicable('amplification', 'No wave of the test grid keeps an amplitude worth measuring.');
  return {
    name: 'amplification',
    tasks: cases.map(({ id, parameters, theta, root, steps }): MarchTask => ({
      kind: 'march',
      id,
      ...sized(grid),
      steps,
      parameters: [...parameters],
      // Seeded with the powers of one root, the kernel must go on with that root alone.
      levels: Array.from({ length: subject.keptLevels }, (_, l) => waveAt(theta, powerOf(root, l), grid)),
    })),
    judge: (answers) => {
      const rows = cases.map(({ id, parameters, theta, root, steps }) => {
        const last = amplitude(stateOf(answers, id).at(-1)!, theta, grid);
        const due = powerOf(root, subject.keptLevels - 1 + steps);
        const ratio = over(last, due);
        const error = modulus(minus(ratio, [1, 0])) / steps;
        // The factor a step as measured: the due one, turned and stretched by the steps-th root of the ratio.
        const size = modulus(ratio) ** (1 / steps);
        const turn = Math.atan2(ratio[1], ratio[0]) / steps;
        const measured = times(root, [size * Math.cos(turn), size * Math.sin(turn)]);
        return { parameters, theta, steps, computed: root, measured, error: Number.isFinite(error) ? error : null };
      });
      const worst = rows.reduce((largest, row) => Math.max(largest, row.error ?? Infinity), 0);
      return {
        outcome: outcomeOf(worst <= LIMIT),
        measured: short(worst),
        target: `<= ${short(LIMIT)}`,
        how: `${rows.length} single waves, every root of each, marched up to ${STEPS_MAX} steps; largest relative difference a step of the complex factor, growth and phase together, from the computed one.`,
        data: { waves: rows },
      };
    },
  };
}

/** The same for a stencil: what it makes of a wave against its symbol. */
export function symbolCheck(subject: StencilSubject): Check {
  const spacing = 0.3;
  const cases = WAVES.map((count) => {
    const theta = (2 * Math.PI * count) / POINTS;
    const sum = subject.weights.reduce<Complex>(
      (total, weight, k) => {
        const w = toNumber(weight);
        const angle = theta * subject.offsets[k]!;
        return [total[0] + w * Math.cos(angle), total[1] + w * Math.sin(angle)];
      },
      [0, 0],
    );
    const scale = spacing ** -subject.derivative;
    return { id: `amplification:${count}`, theta, due: [sum[0] * scale, sum[1] * scale] as Complex, scale };
  });
  const size = subject.weights.reduce((total, weight) => total + Math.abs(toNumber(weight)), 0);
  return {
    name: 'amplification',
    tasks: cases.map(({ id, theta }): ApplyTask => ({
      kind: 'apply',
      id,
      n: POINTS,
      spacing,
      values: waveAt(theta, [1, 0], [POINTS]),
    })),
    judge: (answers) => {
      const rows = cases.map(({ id, theta, due, scale }) => {
        const measured = amplitude(stateOf(answers, id).at(-1)!, theta, [POINTS]);
        const error = modulus(minus(measured, due)) / (scale * size);
        return { theta, computed: due, measured, error: Number.isFinite(error) ? error : null };
      });
      const worst = rows.reduce((largest, row) => Math.max(largest, row.error ?? Infinity), 0);
      return {
        outcome: outcomeOf(worst <= 1e-13),
        measured: short(worst),
        target: '<= 1.0e-13',
        how: `${rows.length} single waves; largest difference of the complex response from the modified wavenumber that the weights give, relative to the sum of their magnitudes.`,
        data: { waves: rows },
      };
    },
  };
}
