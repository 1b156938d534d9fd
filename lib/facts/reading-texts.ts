/** How readings are put into words and signs; pure text, no layout. */
import type { FactsSummary } from './facts-summary';

/** A piece of a mathematical reading: upright digits and signs, or italic letters. */
export interface MathRun {
  readonly text: string;
  readonly italic: boolean;
}

const SYMBOLS: Readonly<Record<string, string>> = {
  lambda: 'λ',
  sigma: 'σ',
  mu: 'μ',
  theta: 'θ',
  kappa: 'κ',
  nu: 'ν',
  gamma: 'γ',
};
const SUBSCRIPTS: Readonly<Record<string, string>> = { x: 'ₓ', y: 'ᵧ', z: '𝓏' };

/** "lambda" → "λ", "lambda_x" → "λₓ", "r" → "r". */
export function symbolText(parameter: string): string {
  const [name = '', index] = parameter.split('_');
  const letter = SYMBOLS[name] ?? name;
  return index === undefined ? letter : `${letter}${SUBSCRIPTS[index] ?? `_${index}`}`;
}

/** Names of numbers within a sentence as letters, powers raised: "lambda^2 <= 2 r" → "λ² <= 2 r". */
export const withSymbols = (sentence: string) =>
  sentence
    .replace(/\b(?:lambda|sigma|mu|theta|kappa|r|q)(?:_[xyz])?(?![a-z_])/g, (name) => symbolText(name))
    .replace(/\^(\d)(?!\d)/g, (_, digit: string) => raised(digit));

/** Signs as set in the book: U+2212 minus. */
export const signed = (text: string) => text.replace(/-/g, '−');

/** A decimal for reading: four significant figures, without trailing zeros. */
export function decimalText(value: number, figures = 4): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e5 || size < 1e-4) {
    const [mantissa = '', exponent = '0'] = value.toExponential(Math.max(0, figures - 2)).split('e');
    return `${signed(String(Number(mantissa)))} × 10${raised(String(Number(exponent)))}`;
  }
  return signed(String(Number(value.toPrecision(figures))));
}

const RAISED: Readonly<Record<string, string>> = {
  '-': '⁻',
  '0': '⁰',
  '1': '¹',
  '2': '²',
  '3': '³',
  '4': '⁴',
  '5': '⁵',
  '6': '⁶',
  '7': '⁷',
  '8': '⁸',
  '9': '⁹',
};
export const raised = (digits: string) => [...digits].map((digit) => RAISED[digit] ?? digit).join('');

/** A closed form where it is short ("1", "1/2", "√3/2"), else the decimal. */
export function limitText(value: number, exact: string | null): string {
  if (exact === null || exact.length > 11 || !/^[-\d/()*+sqrt ]+$/.test(exact)) return decimalText(value);
  const pretty = exact.replace(/sqrt\((\d+)\)/g, '√$1').replace(/\*/g, '');
  return pretty.length > 6 || /[()+]/.test(pretty) ? decimalText(value) : signed(pretty);
}

const upright = (text: string): MathRun => ({ text, italic: false });
const italic = (text: string): MathRun => ({ text, italic: true });

type Bound = FactsSummary['bounds'][number];

function isMirrored({ lo, hi }: Bound): boolean {
  return lo !== null && hi !== null && hi > 0 && Math.abs(lo + hi) <= 1e-12 * hi;
}

function intervalRuns(bound: Bound, symbol: string): MathRun[] {
  const { lo, hi } = bound;
  if (lo === null && hi === null) return [upright('every '), italic(symbol)];
  if (isMirrored(bound)) return [upright('|'), italic(symbol), upright(`| ≤ ${limitText(hi!, bound.hiExact)}`)];
  if (hi === null) return [italic(symbol), upright(` ≥ ${limitText(lo!, bound.loExact)}`)];
  if (lo === null) return [italic(symbol), upright(` ≤ ${limitText(hi, bound.hiExact)}`)];
  return [upright(`${limitText(lo, bound.loExact)} ≤ `), italic(symbol), upright(` ≤ ${limitText(hi, bound.hiExact)}`)];
}

/**
 * The bound as a line of the catalog shows it: "|λ| ≤ 1", "0 ≤ r ≤ 1/2", "no limit", "no λ ≠ 0".
 * A bound is the |g| ≤ 1 condition; what happens at its end is said beside it.
 */
export function boundRuns(summary: Pick<FactsSummary, 'bounds' | 'parameter' | 'verdict'>): MathRun[] {
  const { bounds, parameter, verdict } = summary;
  if (verdict === 'two-parameter region') return [upright('a region')];
  if (parameter === null || verdict === null) return [upright('none')];
  const symbol = symbolText(parameter);
  if (verdict === 'unconditionally stable') return [upright('no limit')];
  if (verdict.includes('unstable')) return [upright('no '), italic(symbol), upright(' ≠ 0')];
  if (bounds.length === 0) return [upright('not decided')];
  return bounds.flatMap((bound, k) =>
    k === 0 ? intervalRuns(bound, symbol) : [upright(' or '), ...intervalRuns(bound, symbol)],
  );
}

/** The same as plain text, for labels and exports. */
export const boundText = (summary: Pick<FactsSummary, 'bounds' | 'parameter' | 'verdict'>) =>
  boundRuns(summary)
    .map((run) => run.text)
    .join('');

/** The largest magnitude up to which a scheme may be run, for staffs and sliders; null where there is no end, 0 where never stable. */
export function largestStable(summary: Pick<FactsSummary, 'bounds' | 'verdict'>): number | null {
  if (summary.verdict?.includes('unstable')) return 0;
  const ends = summary.bounds.map((bound) => bound.hi);
  if (ends.some((end) => end === null)) return null;
  return ends.length === 0 ? 0 : Math.max(...ends.map((end) => end ?? 0), 0);
}
