import { and, eq } from 'drizzle-orm';
import type { KernelInput } from '@/lib/codegen/kernel-request';
import { formatCallNumber } from '@/lib/entries/call-number';
import { referenceLine } from '@/lib/entries/reference-line';
import type { RevisionState } from '@/lib/entries/revision-state';
import type { Database } from '../client';
import { entries } from '../schema/entries';
import { revisions } from '../schema/revisions';
import { type Viewer, visibleTo } from './visible-to';

export interface KernelSubject {
  revisionId: string;
  state: RevisionState;
  /** null where the definition has no facts, and so no kernel. */
  input: KernelInput | null;
}

const columns = {
  revisionId: revisions.id,
  state: revisions.state,
  letters: entries.letters,
  number: entries.number,
  slug: entries.slug,
  title: revisions.title,
  revision: revisions.number,
  definition: revisions.definition,
  facts: revisions.facts,
  references: revisions.references,
};
const from = (db: Database) =>
  db.select(columns).from(revisions).innerJoin(entries, eq(entries.id, revisions.entryId)).$dynamic();
type Row = Awaited<ReturnType<typeof from>>[number];

function subjectOf({ revisionId, state, letters, number, facts, references, ...rest }: Row): KernelSubject {
  const input = facts && {
    ...rest,
    facts,
    callNumber: formatCallNumber(letters, number),
    references: references.map(referenceLine),
  };
  return { revisionId, state, input };
}

/** All that a kernel of this revision depends on; null where the viewer may not see it or it does not exist. */
export async function findKernelSubject(db: Database, viewer: Viewer, slug: string, revision: number) {
  const [row] = await from(db).where(and(eq(entries.slug, slug), eq(revisions.number, revision), visibleTo(viewer)));
  return row ? subjectOf(row) : null;
}

/** The same for the house itself, which tries revisions in any state. */
export async function findKernelSubjectById(db: Database, revisionId: string) {
  const [row] = await from(db).where(eq(revisions.id, revisionId));
  return row ? subjectOf(row) : null;
}
