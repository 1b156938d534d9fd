/** What a budget says in words: times, drifts, and how much of the machine it takes. */
import type { RunCosting, Tolerance } from './run';

/** "30.0°", "5.0 %" */
export function shareText({ error, drift }: Pick<RunCosting, 'error' | 'drift'>, { kind }: Tolerance): string {
  const value = kind === 'angle' ? drift : error * 100;
  if (!Number.isFinite(value)) return 'lost';
  const text =
    value >= 100 ? value.toFixed(0) : value >= 0.1 ? value.toFixed(1) : Number(value.toPrecision(2)).toString();
  return kind === 'angle' ? `${text}°` : `${text} %`;
}

export const toleranceText = ({ kind, value }: Tolerance) =>
  kind === 'angle' ? `${Number(value.toPrecision(3))}°` : `${Number((value * 100).toPrecision(3))} %`;

/** "÷ 2", "× 8", "as before": how a number changes from one grid to the next. */
export function factorText(before: number, after: number): string {
  if (!Number.isFinite(before) || !Number.isFinite(after) || before === 0 || after === 0) return '–';
  const ratio = after / before;
  if (Math.abs(ratio - 1) < 0.005) return 'as before';
  const size = ratio > 1 ? ratio : 1 / ratio;
  const near = Math.round(size);
  const text = Math.abs(size - near) < 0.02 * near ? String(near) : size.toPrecision(size < 10 ? 2 : 3);
  return `${ratio > 1 ? '×' : '÷'} ${text}`;
}
