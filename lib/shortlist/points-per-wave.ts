/** The fewest points a wavelength that keep the error of a run within a tolerance. */
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { runError } from './run-error';

/** Beyond this many points a wavelength no run is worth proposing. */
export const POINTS_MAX = 4e6;
const POINTS_MIN = 2;

/** Parameter values asked between the slowest and the fastest speed: the ends and the middle. */
const speedsBetween = (slowest: number, fastest: number) =>
  slowest === fastest ? [fastest] : [slowest, (slowest + fastest) / 2, fastest];

/**
 * The largest error over the speeds that share the grid and the step.
 * @param slowest, fastest parameter values (CFL numbers) of the slowest and fastest speed, 0 < slowest ≤ fastest
 */
export function worstError(
  scheme: NumericScheme,
  slowest: number,
  fastest: number,
  pointsPerWave: number,
  duration: number,
): number {
  return Math.max(
    ...speedsBetween(slowest, fastest).map((parameter) => runError(scheme, parameter, pointsPerWave, duration).total),
  );
}

/**
 * The fewest points a wavelength for which `holds` is true, and stays true on the finer grids tried (by doublings).
 * @returns null where even `POINTS_MAX` does not hold
 */
export function fewestPoints(holds: (pointsPerWave: number) => boolean): number | null {
  let enough = 8;
  while (!(holds(enough) && holds(enough * 2) && holds(enough * 1.5))) {
    enough *= 2;
    if (enough > POINTS_MAX) return null;
  }
  let tooFew = enough / 2;
  while (tooFew >= POINTS_MIN && holds(tooFew) && holds(tooFew * 1.5)) {
    enough = tooFew;
    tooFew /= 2;
  }
  if (tooFew < POINTS_MIN) return POINTS_MIN;
  while (enough / tooFew > 1.0005) {
    const middle = Math.sqrt(enough * tooFew);
    if (holds(middle)) enough = middle;
    else tooFew = middle;
  }
  return enough;
}

/** @param tolerance error allowed, part of the wave, > 0 */
export const pointsPerWave = (
  scheme: NumericScheme,
  slowest: number,
  fastest: number,
  tolerance: number,
  duration: number,
): number | null => fewestPoints((n) => worstError(scheme, slowest, fastest, n, duration) <= tolerance);
