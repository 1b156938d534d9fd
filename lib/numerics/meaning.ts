/** What the terms do that a scheme adds to its equation, in words. */
import type { AddedTerm } from './modified-equation';
import type { Equation } from './equation';
import { evaluate } from './polynomial';

const NAMES: Readonly<Record<number, string>> = {
  2: 'diffusion',
  4: 'fourth-order diffusion',
  6: 'sixth-order diffusion',
  8: 'eighth-order diffusion',
};
const TRANSPORT: ReadonlySet<Equation> = new Set(['advection', 'advection-diffusion', 'advection-2d']);
const DECAYING: ReadonlySet<Equation> = new Set(['diffusion', 'hyperdiffusion', 'diffusion-2d', 'diffusion-3d']);
const WAVES: ReadonlySet<Equation> = new Set(['wave', 'wave-2d', 'wave-3d']);

/** Value of d_j along the diagonal wave X = Y = Z = 1, real and imaginary part. */
function valueOf({ coefficient }: AddedTerm, values: readonly number[], axes: number): [number, number] {
  const point = [...values, ...new Array<number>(axes).fill(1)];
  const [a, b] = evaluate(coefficient.num, point);
  const [c, d] = evaluate(coefficient.den, point);
  const n = c * c + d * d;
  return [(a * c + b * d) / n, (b * c - a * d) / n];
}

/** d_j (iθ)^j: its real part damps or amplifies, its imaginary part shifts the phase. */
function phrase(term: AddedTerm, equation: Equation, values: readonly number[], axes: number): string | null {
  const [re, im] = valueOf(term, values, axes);
  if (!Number.isFinite(re) || !Number.isFinite(im) || (re === 0 && im === 0)) return null;
  const j = term.degree;
  if (WAVES.has(equation)) {
    // ε (iθ)^j is added to σ² = −λ²θ²: the same sign makes the waves faster.
    if (j % 2 === 1) return `adds a derivative of order ${j}, which shifts the waves`;
    return (j % 4 === 0 ? re : -re) < 0 ? 'adds dispersion: short waves run ahead' : 'adds dispersion: short waves lag';
  }
  const [damping, turning] = j % 4 === 0 ? [re, im] : j % 4 === 1 ? [-im, re] : j % 4 === 2 ? [-re, -im] : [im, -re];
  if (damping !== 0) {
    if (DECAYING.has(equation))
      return `${damping < 0 ? 'strengthens' : 'weakens'} the damping of short waves (derivative of order ${j})`;
    const name = NAMES[j] ?? `a real term of order ${j}`;
    return damping < 0
      ? `adds ${name}: short waves are damped`
      : `adds negative ${name} (antidiffusion): short waves are amplified`;
  }
  if (!TRANSPORT.has(equation) && im === 0 && re !== 0) return `adds dispersion of order ${j}`;
  const speed = values[0] ?? 0;
  const lags = turning * speed > 0;
  if (TRANSPORT.has(equation) && speed !== 0)
    return `adds dispersion: short waves ${lags ? 'lag behind' : 'run ahead'}`;
  return `adds dispersion of order ${j}`;
}

/**
 * @param values parameter values at which the signs are read
 * @param at     the same as text: "lambda = 1/2"
 */
export function meaningOf(
  added: { readonly leading: AddedTerm; readonly second: AddedTerm | null },
  equation: Equation,
  values: readonly number[],
  axes: number,
  at: string,
): string {
  const first = phrase(added.leading, equation, values, axes);
  const second = added.second && phrase(added.second, equation, values, axes);
  const place = at === '' ? '' : `At ${at} `;
  if (!first)
    return `${place}${place ? 'the' : 'The'} leading error term vanishes${second ? `; the next one ${second}` : ''}.`;
  return `${place}${place ? 'the' : 'The'} leading error term ${first}${second ? `; the next one ${second}` : ''}.`;
}
