import 'server-only';
import { setImmediate } from 'node:timers/promises';
import { db } from '@/db/client';
import { type CandidateRow, listCandidates } from '@/db/queries/candidates';
import type { Actor } from '@/lib/people/actor';
import { BoundedMap } from './bounded-map';
import type { RunCost } from './candidate';
import { numericOf } from './numeric-of';
import { equationOf, type Requirement } from './requirement';
import { type Candidate, type Measured, measure, rank, type Shortlist } from './shortlist';

/** Cheapest runs by revision and by what they depend on. */
const costs = new BoundedMap<string, RunCost | null>(20_000);

/** Candidates of the book, with the sketch that stands beside them. */
export type BookCandidate = Candidate & Pick<CandidateRow, 'summary' | 'revision'>;

export type ShortlistAnswer = { readonly known: false } | { readonly known: true; readonly list: Shortlist };

/**
 * Ranks every scheme that the reader may see. A cost is computed once a process for each revision and question; between
 * candidates other requests have their turn.
 */
export async function answerShortlist(actor: Actor, asked: Requirement): Promise<ShortlistAnswer> {
  const equation = equationOf(asked);
  if (!equation) return { known: false };
  const rows = await listCandidates(db, actor, [equation]);
  const measured: Measured[] = [];
  for (const row of rows) {
    const numeric = numericOf(row);
    if (!numeric) continue;
    const candidate: BookCandidate = { ...row, numeric };
    const key = [
      row.revisionId,
      row.version,
      asked.errorPercent,
      asked.duration,
      asked.slowest,
      asked.fastest,
      asked.rank,
    ].join(':');
    const known = costs.get(key);
    if (known !== undefined) {
      measured.push({ candidate, cost: known });
      continue;
    }
    await setImmediate();
    const fresh = measure(candidate, asked);
    costs.set(key, fresh.cost);
    measured.push(fresh);
  }
  return { known: true, list: rank(measured, asked) };
}
