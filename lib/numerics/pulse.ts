/** A pulse carried by a scheme on a periodic line, beside the exact solution; for one dimension, or along x. */
import { equationNumbersAt, exactExponent } from './exact-wave';
import { polynomialAt, type NumericScheme } from './numeric-scheme';

export interface Pulse {
  readonly steps: number;
  /** One value a cell. */
  readonly exact: readonly number[];
  /** null where the values have left every scale. */
  readonly computed: readonly (number | null)[];
}

const OVERFLOW = 1e6;

/**
 * Marches a Gaussian pulse, wave by wave: on a periodic line with constant coefficients this is the marching itself,
 * and an implicit scheme costs no more than an explicit one. The starting levels are exact.
 * @param cells even number of cells of the line
 * @param width standard deviation of the pulse, cells
 */
export function marchPulse(
  scheme: NumericScheme,
  parameters: readonly number[],
  { cells = 96, steps = 480, width = 2.5 }: { cells?: number; steps?: number; width?: number } = {},
): Pulse {
  const value = equationNumbersAt(scheme, parameters);
  const exact = new Float64Array(cells);
  const computed = new Float64Array(cells);
  // Placed so that the exact pulse ends in the middle.
  const start = cells / 2 - travelOf(scheme, value, steps);
  for (let wave = 0; wave <= cells / 2; wave++) {
    const theta = (2 * Math.PI * wave) / cells;
    const angles = Array.from({ length: scheme.dims }, (_, axis) => (axis === 0 ? theta : 0));
    const isEnd = wave === 0 || wave === cells / 2;
    const height = ((isEnd ? 1 : 2) / cells) * width * Math.sqrt(2 * Math.PI) * Math.exp(-0.5 * (theta * width) ** 2);
    const [decay, turn] = exactExponent(scheme.equation, value, angles);
    const exactAt = (level: number): [number, number] => {
      const size = Math.exp(decay * level);
      return [size * Math.cos(turn * level), size * Math.sin(turn * level)];
    };
    const [er, ei] = exactAt(steps);
    const [cr, ci] = marchWave(scheme, parameters, angles, exactAt, steps);
    for (let cell = 0; cell < cells; cell++) {
      const c = Math.cos(theta * (cell - start));
      const s = Math.sin(theta * (cell - start));
      exact[cell]! += height * (er * c - ei * s);
      computed[cell]! += height * (cr * c - ci * s);
    }
  }
  return {
    steps,
    exact: Array.from(exact),
    computed: Array.from(computed, (x) => (Math.abs(x) < OVERFLOW ? x : null)),
  };
}

/** Cells that the exact pulse travels as a whole; 0 where every wave goes its own way. */
export function pulseTravel(scheme: NumericScheme, parameters: readonly number[], steps: number): number {
  return travelOf(scheme, equationNumbersAt(scheme, parameters), steps);
}

function travelOf({ equation }: NumericScheme, value: (name: string) => number, steps: number): number {
  if (equation === 'advection-2d') return value('lambda_x') * steps;
  return equation.startsWith('advection') || equation.startsWith('wave') ? value('lambda') * steps : 0;
}

/** Value of one wave after `steps`, from the recurrence Σ P_k u^(n+k) = 0 of its amplification polynomial. */
function marchWave(
  scheme: NumericScheme,
  parameters: readonly number[],
  angles: readonly number[],
  exactAt: (level: number) => [number, number],
  steps: number,
): [number, number] {
  const { re, im } = polynomialAt(scheme, parameters, angles);
  const degree = scheme.degree;
  const lead = re[degree]! ** 2 + im[degree]! ** 2;
  if (degree === 0 || lead === 0) return [Number.NaN, Number.NaN];
  // −P_k / P_degree, so that the newest value is a plain sum.
  const fr = new Float64Array(degree);
  const fi = new Float64Array(degree);
  for (let k = 0; k < degree; k++) {
    fr[k] = -(re[k]! * re[degree]! + im[k]! * im[degree]!) / lead;
    fi[k] = -(im[k]! * re[degree]! - re[k]! * im[degree]!) / lead;
  }
  const history = Array.from({ length: degree }, (_, k) => exactAt(k));
  if (steps < degree) return history[steps]!;
  for (let n = degree; n <= steps; n++) {
    let nr = 0;
    let ni = 0;
    for (let k = 0; k < degree; k++) {
      const [ur, ui] = history[k]!;
      nr += fr[k]! * ur - fi[k]! * ui;
      ni += fr[k]! * ui + fi[k]! * ur;
    }
    history.shift();
    history.push([nr, ni]);
    if (!(Math.hypot(nr, ni) < 1e12)) return [Number.POSITIVE_INFINITY, Number.POSITIVE_INFINITY];
  }
  return history[degree - 1]!;
}
