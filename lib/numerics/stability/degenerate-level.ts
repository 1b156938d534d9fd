/** Waves at which the newest level drops out of a scheme, so that the step cannot be solved for them. */
import { coefficientsAt, type NumericScheme } from '../numeric-scheme';
import { climb, gridMaxima, POINTS_PER_PI, waveGrid, type WaveMeasure } from '../wave-grid';

/**
 * Least size of the newest level's symbol relative to the largest coefficient there, over all waves. Waves at which
 * all levels vanish together carry a common factor that cancels, and do not count.
 * @param parameters values in the order of `scheme.parameters`
 */
export function leastLead(scheme: NumericScheme, parameters: readonly number[]): number {
  const coefficients = coefficientsAt(scheme, parameters);
  const smallness: WaveMeasure = ({ re, im }) => {
    let most = 0;
    for (let k = 0; k <= scheme.degree; k++) most = Math.max(most, Math.hypot(re[k]!, im[k]!));
    const lead = Math.hypot(re[scheme.degree]!, im[scheme.degree]!);
    return most < 1e-9 ? -1 : -lead / most;
  };
  const grid = waveGrid(scheme, POINTS_PER_PI[scheme.dims]);
  const starts = gridMaxima(scheme, coefficients, grid, smallness, 3);
  return Math.min(...starts.map((s) => -climb(scheme, coefficients, smallness, s.theta, grid.step, 1e-12).value));
}
