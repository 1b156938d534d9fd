/** Phase angles as parts of π, with the waves they stand for. */
import { decimalText } from './reading-texts';

const PARTS: readonly (readonly [number, string])[] = [
  [0, '0'],
  [1 / 6, 'π/6'],
  [1 / 4, 'π/4'],
  [1 / 3, 'π/3'],
  [1 / 2, 'π/2'],
  [2 / 3, '2π/3'],
  [3 / 4, '3π/4'],
  [5 / 6, '5π/6'],
  [1, 'π'],
];

/** "π/2", or "0.631π" where no simple part fits within 10⁻⁶. */
export function angleText(theta: number): string {
  const part = theta / Math.PI;
  return PARTS.find(([value]) => Math.abs(value - part) < 1e-6)?.[1] ?? `${decimalText(part, 3)}π`;
}

/** "waves of four points (θ = π/2)"; "the longest waves (θ → 0)". */
export function waveText(theta: number): string {
  if (Math.abs(theta) < 1e-9) return 'the longest waves (θ → 0)';
  const points = (2 * Math.PI) / theta;
  const words: Readonly<Record<number, string>> = {
    2: 'two',
    3: 'three',
    4: 'four',
    6: 'six',
    8: 'eight',
    12: 'twelve',
  };
  const whole = Math.round(points);
  const count = Math.abs(points - whole) < 1e-6 && words[whole] ? words[whole] : decimalText(points, 3);
  return `waves of ${count} points (θ = ${angleText(theta)})`;
}
