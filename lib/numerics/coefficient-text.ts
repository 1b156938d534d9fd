/** Coefficients as a reader sees them beside a point of a sketch: "λ", "−λ", "1", "λ²/2 + λ/2". */
import { formatRational, rational, type Rational } from './rational';
import type { Polynomial } from './polynomial';

const RAISED = ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'];
const superscript = (k: number) => [...String(k)].map((digit) => RAISED[Number(digit)]).join('');

function factorText(size: Rational, letters: string): string {
  if (letters === '') return formatRational(size);
  const num = size.num === 1n ? '' : String(size.num);
  return `${num}${letters}${size.den === 1n ? '' : `/${size.den}`}`;
}

/**
 * @param coefficient real polynomial; an imaginary part is written with i
 * @param symbols     the letter of each parameter, in the order of the powers
 */
export function coefficientText(coefficient: Polynomial, symbols: readonly string[]): string {
  if (coefficient.length === 0) return '0';
  const degree = (powers: readonly number[]) => powers.reduce((sum, power) => sum + power, 0);
  const parts = [...coefficient]
    .sort((a, b) => degree(b.powers) - degree(a.powers))
    .flatMap(({ powers, re, im }) => {
      const letters = powers
        .map((power, k) => (power === 0 ? '' : `${symbols[k]}${power === 1 ? '' : superscript(power)}`))
        .join('');
      return [
        { value: re, letters },
        { value: im, letters: `i${letters}` },
      ].filter(({ value }) => value.num !== 0n);
    });
  return parts
    .map(({ value, letters }, k) => {
      const text = factorText(rational(value.num < 0n ? -value.num : value.num, value.den), letters);
      if (k === 0) return value.num < 0n ? `−${text}` : text;
      return value.num < 0n ? ` − ${text}` : ` + ${text}`;
    })
    .join('');
}
