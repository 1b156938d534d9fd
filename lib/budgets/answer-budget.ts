import 'server-only';
import { setImmediate } from 'node:timers/promises';
import type { CandidateRow } from '@/db/queries/candidates';
import { BoundedMap } from '@/lib/shortlist/bounded-map';
import { numericOf } from '@/lib/shortlist/numeric-of';
import { quickestRun, subjectOf } from './other-ways';
import type { Run, RunCosting, Subject, Tolerance } from './run';

export interface OtherWay {
  readonly row: CandidateRow;
  readonly subject: Subject;
  readonly costing: RunCosting;
}

const quickest = new BoundedMap<string, RunCosting | null>(5_000);
const OFFERED = ['vetted', 'in-review'];
const SHOWN_MAX = 5;

/**
 * The same run with every scheme for its equation, quickest first; the scheme of the run itself at its best step is among
 * them. Computed once a process for each revision and run; between schemes other requests have their turn.
 */
export async function otherWays(
  rows: readonly CandidateRow[],
  own: CandidateRow,
  run: Run,
  tolerance: Tolerance,
): Promise<OtherWay[]> {
  const ways: OtherWay[] = [];
  for (const row of rows) {
    if (row.equation !== own.equation || (row !== own && !OFFERED.includes(row.state))) continue;
    const numeric = numericOf(row);
    const subject = numeric && subjectOf({ numeric, facts: row.facts });
    if (!subject) continue;
    const key = `${row.revisionId}:${row.version}:${JSON.stringify([run, tolerance])}`;
    let costing = quickest.get(key);
    if (costing === undefined) {
      await setImmediate();
      costing = quickest.set(key, quickestRun(run, subject, tolerance));
    }
    if (costing) ways.push({ row, subject, costing });
  }
  ways.sort((a, b) => a.costing.seconds - b.costing.seconds);
  const shown = ways.slice(0, SHOWN_MAX);
  const ownWay = ways.find(({ row }) => row === own);
  return ownWay && !shown.includes(ownWay) ? [...shown.slice(0, -1), ownWay] : shown;
}
