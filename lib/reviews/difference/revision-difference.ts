/** All in which two revisions of an entry differ, but their kernels: those are printed, not stored. */
import type { SheetView } from '@/lib/entries/entry';
import { referenceLine } from '@/lib/entries/reference-line';
import { entryReadings } from '@/lib/facts/entry-readings';
import { type Drawn, drawnRule } from './drawn-rule';
import { definitionRows } from './definition-rows';
import { type FindingChange, findingDifference } from './finding-difference';
import { type ReadingChange, isChangedReading, readingDifference } from './reading-difference';
import { type RowChange, isChanged, rowDifference } from './row-difference';
import { type LineChange, type Piece, lineDifference, wordDifference } from './text-difference';

/** What is asked of a revision. */
export type Side = Pick<
  SheetView,
  | 'revision'
  | 'title'
  | 'gist'
  | 'synonyms'
  | 'notes'
  | 'references'
  | 'definition'
  | 'facts'
  | 'summary'
  | 'latestTrial'
>;

export interface RevisionDifference {
  naming: { term: 'Title' | 'Gist' | 'Other names'; pieces: readonly Piece[] }[];
  rule: Drawn;
  definition: readonly RowChange[];
  readings: readonly ReadingChange[];
  findings: readonly FindingChange[];
  notes: readonly LineChange[];
  references: readonly RowChange[];
}

const isFix = (pieces: readonly Piece[]) => pieces.some(({ kind }) => kind === 'fix');
export const isChangedLine = ({ kind }: LineChange) => kind !== 'same';

/** @param was null for the first revision of an entry: everything is new, and nothing is struck */
export function revisionDifference(was: Side | null, now: Side): RevisionDifference {
  const before = was ?? now;
  const synonyms = (side: Side) => side.synonyms.join(', ');
  const references = (side: Side) =>
    side.references.map((reference) => ({ place: referenceLine(reference), value: reference.note ?? '' }));
  return {
    naming: [
      { term: 'Title', pieces: wordDifference(before.title, now.title) },
      { term: 'Gist', pieces: wordDifference(before.gist, now.gist) },
      { term: 'Other names', pieces: wordDifference(synonyms(before), synonyms(now)) },
    ],
    rule: drawnRule(before.definition, now.definition),
    definition: rowDifference(definitionRows(before.definition), definitionRows(now.definition)),
    readings: readingDifference(
      entryReadings(before.facts, before.summary, null),
      entryReadings(now.facts, now.summary, null),
    ),
    findings: was ? findingDifference(was.latestTrial?.findings ?? [], now.latestTrial?.findings ?? []) : [],
    notes: lineDifference(before.notes, now.notes),
    references: rowDifference(references(before), references(now)),
  };
}

/** Parts that differ, by their names on the sheet. */
export function changedParts(difference: RevisionDifference): string[] {
  const { naming, definition, readings, findings, notes, references } = difference;
  return [
    naming.some(({ pieces }) => isFix(pieces)) && 'name and gist',
    definition.some(isChanged) && 'definition',
    readings.some(isChangedReading) && 'readings',
    findings.length > 0 && 'findings',
    notes.some(isChangedLine) && 'notes',
    references.some(isChanged) && 'references',
  ].filter((part) => part !== false);
}
