import { and, asc, desc, eq, inArray, sql } from 'drizzle-orm';
import type { Definition } from '@/lib/entries/definition';
import { formatCallNumber } from '@/lib/entries/call-number';
import type { RevisionState } from '@/lib/entries/revision-state';
import type { SchemeFacts } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import type { Equation } from '@/lib/numerics/equation';
import type { Database } from '../client';
import { entries } from '../schema/entries';
import { revisions } from '../schema/revisions';
import { type Viewer, visibleTo } from './visible-to';

/** A scheme as the choosing pages read it: enough to compute with, and to name it. */
export interface CandidateRow {
  revisionId: string;
  version: number;
  slug: string;
  callNumber: string;
  equation: Equation;
  title: string;
  gist: string;
  revision: number;
  state: RevisionState;
  languages: string[];
  definition: Definition;
  facts: SchemeFacts;
  summary: FactsSummary;
}

/**
 * Schemes for these equations, by call number: of each entry the revision in force, or else the newest that the
 * viewer may see.
 */
export async function listCandidates(
  db: Database,
  viewer: Viewer,
  equations: readonly Equation[],
): Promise<CandidateRow[]> {
  const rows = await db
    .selectDistinctOn([entries.letters, entries.number], {
      revisionId: revisions.id,
      version: revisions.version,
      slug: entries.slug,
      letters: entries.letters,
      number: entries.number,
      equation: entries.equation,
      title: revisions.title,
      gist: revisions.gist,
      revision: revisions.number,
      state: revisions.state,
      languages: revisions.kernelLanguages,
      definition: revisions.definition,
      facts: revisions.facts,
      summary: revisions.summary,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(
      and(
        visibleTo(viewer),
        eq(entries.kind, 'scheme'),
        inArray(entries.equation, [...equations]),
        sql`${revisions.facts} is not null`,
      ),
    )
    .orderBy(
      asc(entries.letters),
      asc(entries.number),
      desc(sql`${revisions.state} = 'vetted'`),
      desc(revisions.number),
    );
  return rows.flatMap(({ letters, number, equation, facts, summary, ...row }) =>
    equation && summary && facts?.kind === 'scheme'
      ? [{ ...row, callNumber: formatCallNumber(letters, number), equation, facts, summary }]
      : [],
  );
}
