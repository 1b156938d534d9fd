/** A line of the readings of a sheet: what it is, its value, what it means and how it was obtained. */
import type { MathRun } from './reading-texts';

export interface Reading {
  readonly term: string;
  readonly value: string | readonly MathRun[];
  /** Plain sentence parts; symbols such as λ stand as letters. */
  readonly how: string;
  /** "exact", "certified bracket, …", "numeric, to …", "counted"; absent where `how` says it. */
  readonly obtained?: string;
}

const NUMBERS = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'];
/** "two", "12" */
export const countWord = (count: number) => NUMBERS[count] ?? String(count);
/** "one step", "two steps" */
export const counted = (count: number, noun: string) => `${countWord(count)} ${noun}${count === 1 ? '' : 's'}`;
export const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);
