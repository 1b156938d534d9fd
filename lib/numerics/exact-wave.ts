/** The exact solution's exponent sigma over one step for the wave e^(i theta j): u(t + dt) = e^sigma u(t). */
import type { Equation } from './equation';
import { CONVENTIONS } from './equation';
import type { NumericScheme } from './numeric-scheme';

/**
 * @param value  value of one of the equation's own numbers by name
 * @param theta  one angle per dimension, radians
 * @returns [re, im] of sigma; for u_tt equations the wave that travels towards growing x
 */
export function exactExponent(
  equation: Equation,
  value: (name: string) => number,
  theta: readonly number[],
): [number, number] {
  const x = theta[0]!;
  switch (equation) {
    case 'advection':
      return [0, -value('lambda') * x];
    case 'diffusion':
      return [-value('r') * x * x, 0];
    case 'advection-diffusion':
      return [-value('r') * x * x, -value('lambda') * x];
    case 'schrodinger':
      return [0, -value('sigma') * x * x];
    case 'airy':
      return [0, value('mu') * x ** 3];
    case 'hyperdiffusion':
      return [-value('q') * x ** 4, 0];
    case 'wave':
    case 'wave-2d':
    case 'wave-3d':
      return [0, -value('lambda') * Math.hypot(...theta)];
    case 'advection-2d':
      return [0, -(value('lambda_x') * x + value('lambda_y') * theta[1]!)];
    case 'diffusion-2d':
    case 'diffusion-3d':
      return [-CONVENTIONS[equation].parameters.reduce((sum, name, d) => sum + value(name) * theta[d]! ** 2, 0), 0];
  }
}

/** Values of the equation's own numbers by name, at values of the scheme's parameters. */
export function equationNumbersAt(scheme: NumericScheme, parameters: readonly number[]): (name: string) => number {
  const values = new Map(
    Object.entries(scheme.numbers).map(([name, monomials]) => [
      name,
      monomials.reduce(
        (sum, m) => sum + m.re * m.powers.reduce((product, e, k) => product * parameters[k]! ** e, 1),
        0,
      ),
    ]),
  );
  return (name) => values.get(name) ?? 0;
}
