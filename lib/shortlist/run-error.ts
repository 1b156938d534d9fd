/**
 * The error of a run from the exact amplification factor: what a wave of N points has gained or lost against
 * the true solution after a given time. Nothing here uses the leading error term.
 */
import { CONVENTIONS, type Equation } from '@/lib/numerics/equation';
import { equationNumbersAt, exactExponent } from '@/lib/numerics/exact-wave';
import { polynomialAt, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { trackPrincipalRoot } from '@/lib/numerics/principal-root';
import { polynomialRoots } from '@/lib/numerics/roots';

/** How long a run lasts is counted in periods of the wave, or in e-foldings where the equation only decays. */
export const decays = (equation: Equation) => equation.startsWith('diffusion') || equation === 'hyperdiffusion';

/** Unit vectors of the waves that are asked in each number of dimensions: along the grid and across it. */
export const DIRECTIONS: Readonly<Record<1 | 2 | 3, readonly (readonly number[])[]>> = {
  1: [[1]],
  2: [
    [1, 0],
    [Math.SQRT1_2, Math.SQRT1_2],
  ],
  3: [
    [1, 0, 0],
    [Math.SQRT1_2, Math.SQRT1_2, 0],
    [1 / Math.sqrt(3), 1 / Math.sqrt(3), 1 / Math.sqrt(3)],
  ],
};

export interface RunError {
  /** |numerical / exact − 1| of the wave's complex amplitude at the end of the run. */
  readonly total: number;
  /** Phase behind (negative) or ahead of the true wave, radians. */
  readonly phase: number;
  /** Numerical over exact amplitude. */
  readonly amplitude: number;
  readonly steps: number;
}

const LOST: RunError = { total: Infinity, phase: 0, amplitude: 0, steps: Infinity };

interface Factor {
  readonly re: number;
  readonly im: number;
  readonly argument: number;
}

/** From this many points a wave on, a root much nearer to the exact factor than any other is the principal one. */
const TOLD_AT_ONCE = 12;
const MUCH_NEARER = 0.02;

/**
 * The amplification factor of the principal root at one wave. Tracking it from long waves costs tens of polynomials;
 * it is left for the few waves at which nearness does not settle which root is meant.
 */
function principalFactor(
  scheme: NumericScheme,
  parameters: readonly number[],
  direction: readonly number[],
  t: number,
  [logGain, turn]: readonly [number, number],
): Factor | null {
  const [re, im] = [Math.exp(logGain) * Math.cos(turn), Math.exp(logGain) * Math.sin(turn)];
  const theta = direction.map((component) => component * t);
  if (scheme.degree === 1 || t <= (2 * Math.PI) / TOLD_AT_ONCE) {
    const roots = polynomialRoots(polynomialAt(scheme, parameters, theta));
    const order = Array.from(roots.re, (x, k) => ({ k, away: Math.hypot(x - re, roots.im[k]! - im) })).sort(
      (a, b) => a.away - b.away,
    );
    const [own, other] = order;
    if (own && (!other || own.away < MUCH_NEARER * other.away)) {
      const argument = Math.atan2(roots.im[own.k]!, roots.re[own.k]!);
      const turns = Math.round((turn - argument) / (2 * Math.PI));
      return { re: roots.re[own.k]!, im: roots.im[own.k]!, argument: argument + turns * 2 * Math.PI };
    }
  }
  const tracked = trackPrincipalRoot(scheme, parameters, direction, [t])[0];
  return tracked && tracked.index >= 0 ? tracked : null;
}

/**
 * @param parameter       common value of the scheme's parameters, not 0
 * @param pointsPerWave   N ≥ 2, along the wave's own direction
 * @param duration        periods, or e-foldings for equations that only decay; > 0
 * @returns the error of the principal root in one direction; infinite where that root cannot be told
 */
export function runErrorAlong(
  scheme: NumericScheme,
  parameter: number,
  pointsPerWave: number,
  duration: number,
  direction: readonly number[],
): RunError {
  const parameters = scheme.parameters.map(() => parameter);
  const t = (2 * Math.PI) / pointsPerWave;
  const theta = direction.map((component) => component * t);
  const [re, im] = exactExponent(scheme.equation, equationNumbersAt(scheme, parameters), theta);
  const perStep = decays(scheme.equation) ? Math.abs(re) : Math.abs(im) / (2 * Math.PI);
  if (!(perStep > 0)) return LOST;
  const steps = duration / perStep;
  const tracked = principalFactor(scheme, parameters, direction, t, [re, im]);
  if (!tracked) return LOST;
  const modulus = Math.hypot(tracked.re, tracked.im);
  if (modulus === 0) return { total: 1, phase: 0, amplitude: 0, steps };
  const logGain = steps * (Math.log(modulus) - re);
  const phase = steps * (tracked.argument - im);
  const amplitude = Math.exp(Math.min(logGain, 700));
  const total = Math.hypot(amplitude * Math.cos(phase) - 1, amplitude * Math.sin(phase));
  return { total, phase: im === 0 ? phase : Math.sign(im) * phase, amplitude, steps };
}

/** The worst of the directions of the scheme's dimensions. */
export function runError(scheme: NumericScheme, parameter: number, pointsPerWave: number, duration: number): RunError {
  let worst: RunError | null = null;
  for (const direction of DIRECTIONS[CONVENTIONS[scheme.equation].dims]) {
    const error = runErrorAlong(scheme, parameter, pointsPerWave, duration, direction);
    if (!worst || error.total > worst.total) worst = error;
  }
  return worst!;
}
