/** A number as people type it, with its unit if it has one. */

export interface Text {
  readonly value: number;
  /** "%", "m/s"; "" where there is none. */
  readonly unit: string;
}

const FORM = /^([+-]?(?:\d+(?:\.\d*)?|\.\d+)(?:e[+-]?\d+)?)\s*(.*)$/i;

/**
 * Accepts "5", "5 %", "0,3", "1 500 m/s", "1e-6", "−2" and "6.4·10^-3".
 * @returns null where no number stands at the start, or it is not finite
 */
export function readNumber(text: string): Text | null {
  const plain = text
    .trim()
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/(\d)[\s\u00a0\u202f'](?=\d{3}(?!\d))/g, '$1')
    .replace(/(\d),(\d)/, '$1.$2')
    .replace(/\s*[·×*]\s*10\s*\^?\s*(-?\d+)/, 'e$1');
  const found = FORM.exec(plain);
  if (!found) return null;
  const value = Number(found[1]);
  return Number.isFinite(value) ? { value, unit: found[2]!.trim() } : null;
}
