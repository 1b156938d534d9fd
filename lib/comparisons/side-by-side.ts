/** Entries in one frame: their readings in rows, those that differ marked; their curves on the same axes. */
import type { SheetView } from '@/lib/entries/entry';
import { entryReadings } from '@/lib/facts/entry-readings';
import type { MathRun } from '@/lib/facts/reading-texts';
import { schemeCurves } from '@/lib/numerics/curves';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { largestAdmissible } from '@/lib/shortlist/candidate';

export const PLACES = 4;
/** Part of the bound at which curves are set beside each other. */
const PART = 0.75;
const SAMPLES = 129;
export const POSITIONS = Array.from({ length: SAMPLES }, (_, k) => (k * Math.PI) / (SAMPLES - 1));

export type Value = string | readonly MathRun[];
export interface ComparedRow {
  readonly term: string;
  /** One per entry; null where the entry has no such reading. */
  readonly values: readonly (Value | null)[];
  readonly differs: boolean;
}

export const plainText = (value: Value | null): string =>
  value === null ? '–' : typeof value === 'string' ? value : value.map(({ text }) => text).join('');

export function comparedRow(term: string, values: readonly (Value | null)[]): ComparedRow {
  return { term, values, differs: new Set(values.map(plainText)).size > 1 };
}

/** The readings of the sheets, one row for each term that any of them has, in the order of the sheet. */
export function comparedReadings(sheets: readonly SheetView[]): ComparedRow[] {
  const readings = sheets.map(({ facts, summary }) => entryReadings(facts, summary, null));
  const terms: string[] = [];
  for (const own of readings)
    own.forEach(({ term }, k) => {
      if (terms.includes(term)) return;
      const before = own[k - 1]?.term;
      terms.splice(before === undefined ? 0 : terms.indexOf(before) + 1, 0, term);
    });
  return terms.map((term) =>
    comparedRow(
      term,
      readings.map((own) => own.find((reading) => reading.term === term)?.value ?? null),
    ),
  );
}

/** Findings of the latest trials: passed, failed, or not run, by name. */
export function comparedFindings(
  sheets: readonly SheetView[],
  titles: Readonly<Record<string, string>>,
): ComparedRow[] {
  const outcomes = sheets.map(({ latestTrial }) => {
    const worst = new Map<string, string>();
    for (const { name, outcome } of latestTrial?.findings ?? [])
      if (worst.get(name) !== 'failed') worst.set(name, outcome);
    return worst;
  });
  return Object.entries(titles)
    .filter(([name]) => outcomes.some((own) => own.has(name)))
    .map(([name, title]) =>
      comparedRow(
        title,
        outcomes.map((own) => OUTCOME_WORDS[own.get(name) ?? ''] ?? 'not run'),
      ),
    );
}

const OUTCOME_WORDS: Readonly<Record<string, string>> = {
  passed: 'holds',
  failed: 'fails',
  'not-run': 'not run',
  'not-applicable': 'does not apply',
};

export interface ComparedCurves {
  readonly callNumber: string;
  /** Value of the parameter; where there is no bound, the part itself. */
  readonly at: number;
  readonly modulus: readonly (number | null)[];
  /** Phase speed, or decay where the equation only decays, over the true one. */
  readonly rate: readonly (number | null)[];
}

/** @returns null where no step is stable: a curve there would be of a run nobody makes */
export function comparedCurves({ callNumber, facts }: SheetView, numeric: NumericScheme): ComparedCurves | null {
  if (facts?.kind !== 'scheme') return null;
  const bound = largestAdmissible(facts);
  if (bound === null) return null;
  const at = (Number.isFinite(bound) ? bound : 1) * PART;
  const points = schemeCurves(
    numeric,
    numeric.parameters.map(() => at),
    Array.from({ length: numeric.dims }, () => 1),
    POSITIONS,
  );
  return {
    callNumber,
    at,
    modulus: points.map(({ modulus }) => modulus),
    rate: points.map(({ phaseSpeed, decayRate }) => phaseSpeed ?? decayRate),
  };
}
