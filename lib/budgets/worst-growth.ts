/** How much the worst wave grows in a step. */
import { polynomialAt, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { polynomialRoots } from '@/lib/numerics/roots';

const SAMPLES = 96;

/** Directions in which the worst wave is looked for: along each axis, and all diagonals towards (π, π, …). */
function directions(dims: number): number[][] {
  return Array.from({ length: 2 ** dims - 1 }, (_, k) => Array.from({ length: dims }, (_, d) => ((k + 1) >> d) & 1));
}

/**
 * @param parameter common value of the parameters
 * @returns the largest modulus of any root over θ in 0 … π along axes and diagonals
 */
export function worstGrowth(scheme: NumericScheme, parameter: number): number {
  const parameters = scheme.parameters.map(() => parameter);
  let worst = 0;
  for (const direction of directions(scheme.dims))
    for (let k = 1; k <= SAMPLES; k++) {
      const theta = direction.map((d) => (d * k * Math.PI) / SAMPLES);
      const roots = polynomialRoots(polynomialAt(scheme, parameters, theta));
      for (let j = 0; j < roots.re.length; j++) worst = Math.max(worst, Math.hypot(roots.re[j]!, roots.im[j]!));
    }
  return worst;
}
