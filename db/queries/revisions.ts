import { type SQL, and, asc, desc, eq, isNull, ne, sql } from 'drizzle-orm';
import type { RevisionState } from '@/lib/entries/revision-state';
import type { Database } from '../client';
import { adoptions } from '../schema/adoptions';
import { entries } from '../schema/entries';
import { people } from '../schema/people';
import { signatures } from '../schema/reviews';
import { revisions } from '../schema/revisions';
import { trials } from '../schema/trials';

export type NewEntry = Pick<typeof entries.$inferInsert, 'letters' | 'number' | 'slug' | 'kind' | 'equation'>;
/** All of a revision that its author brings and the engine adds. */
export type RevisionContent = Pick<
  typeof revisions.$inferInsert,
  | 'title'
  | 'gist'
  | 'synonyms'
  | 'definition'
  | 'notes'
  | 'references'
  | 'changeNote'
  | 'verdict'
  | 'facts'
  | 'summary'
  | 'problems'
  | 'engineVersion'
  | 'kernelLanguages'
>;

/** The next figures free under these letters. Two who ask at once get the same; the constraint lets one of them have it. */
export async function nextCallNumber(db: Database, letters: NewEntry['letters']): Promise<number> {
  const [row] = await db
    .select({ next: sql<number>`coalesce(max(${entries.number}), 0) + 1` })
    .from(entries)
    .where(eq(entries.letters, letters));
  return Number(row?.next ?? 1);
}

export async function insertEntry(db: Database, entry: NewEntry) {
  const [row] = await db.insert(entries).values(entry).returning({ id: entries.id });
  if (!row) throw new Error('insertEntry: the inserted row did not come back');
  return row.id;
}

export async function findEntry(db: Database, slug: string) {
  const [row] = await db
    .select({
      id: entries.id,
      letters: entries.letters,
      number: entries.number,
      slug: entries.slug,
      kind: entries.kind,
    })
    .from(entries)
    .where(eq(entries.slug, slug));
  return row ?? null;
}

/** A new draft of an entry, numbered after its last revision. */
export async function insertRevision(db: Database, entryId: string, authorId: string, content: RevisionContent) {
  const [row] = await db
    .insert(revisions)
    .values({
      ...content,
      entryId,
      authorId,
      number: sql`(select coalesce(max(number), 0) + 1 from revisions where entry_id = ${entryId})`,
    })
    .returning({ id: revisions.id, number: revisions.number });
  if (!row) throw new Error('insertRevision: the inserted row did not come back');
  return row;
}

/**
 * New text for a draft or returned revision that still has the version the writer started from.
 * @returns the new version, or null where it has moved on meanwhile
 */
export async function saveContent(db: Database, id: string, version: number, content: RevisionContent) {
  const [row] = await db
    .update(revisions)
    .set(content)
    .where(and(eq(revisions.id, id), eq(revisions.version, version), sql`${revisions.state} in ('draft', 'returned')`))
    .returning({ version: revisions.version });
  return row?.version ?? null;
}

export interface Move {
  from: RevisionState;
  to: RevisionState;
  reason?: string;
  replacedById?: string | null;
  /** The version that was looked at, where the text matters to the move. */
  version?: number;
}

/** Moves a revision that is still in `from`; false where somebody moved it first. */
export async function moveRevision(db: Database, id: string, move: Move): Promise<boolean> {
  const still: SQL[] = [eq(revisions.id, id), eq(revisions.state, move.from)];
  if (move.version !== undefined) still.push(eq(revisions.version, move.version));
  const moved = await db
    .update(revisions)
    .set({
      state: move.to,
      stateReason: move.reason ?? null,
      ...(move.to === 'vetted' && { vettedAt: sql`now()` }),
      ...(move.replacedById !== undefined && { replacedById: move.replacedById }),
    })
    .where(and(...still))
    .returning({ id: revisions.id });
  return moved.length === 1;
}

/** The revision in force, locked until the transaction ends, so that two successors do not both supersede it. */
export async function lockVettedRevision(tx: Database, entryId: string) {
  const [row] = await tx
    .select({ id: revisions.id, number: revisions.number })
    .from(revisions)
    .where(and(eq(revisions.entryId, entryId), eq(revisions.state, 'vetted')))
    .for('update');
  return row ?? null;
}

/** Keeps a revision as it is until the transaction ends: nobody else decides on it or changes its text. */
export async function lockReview(tx: Database, id: string): Promise<void> {
  await tx.select({ id: revisions.id }).from(revisions).where(eq(revisions.id, id)).for('update');
}

/** What the rules of lib/reviews ask, with trial and signatures of the present text. */
export async function findReview(db: Database, id: string) {
  const [row] = await db
    .select({
      id: revisions.id,
      entryId: revisions.entryId,
      number: revisions.number,
      version: revisions.version,
      state: revisions.state,
      authorId: revisions.authorId,
      title: revisions.title,
      verdict: revisions.verdict,
      notes: revisions.notes,
      referenceCount: sql<number>`jsonb_array_length(${revisions.references})`,
      slug: entries.slug,
      letters: entries.letters,
      entryNumber: entries.number,
      signaturesNeeded: sql<number>`(select signatures_needed from settings)`,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(eq(revisions.id, id));
  if (!row) return null;
  const signers = await db
    .select({ id: signatures.personId })
    .from(signatures)
    .where(and(eq(signatures.revisionId, id), eq(signatures.revisionVersion, row.version)));
  const [trial] = await db
    .select({ state: trials.state })
    .from(trials)
    .where(and(eq(trials.revisionId, id), eq(trials.revisionVersion, row.version)))
    .orderBy(desc(trials.queuedAt), asc(trials.id))
    .limit(1);
  return { ...row, signerIds: signers.map((signer) => signer.id), latestTrial: trial?.state ?? null };
}

export async function insertSignature(
  db: Database,
  signature: { revisionId: string; personId: string; points: string[]; sentence: string },
) {
  await db.insert(signatures).values(signature);
}

/** Those whose codes use a revision now. */
export async function listAdopters(db: Database, revisionId: string) {
  return db
    .select({ personId: adoptions.personId, code: adoptions.code })
    .from(adoptions)
    .where(and(eq(adoptions.revisionId, revisionId), isNull(adoptions.endedAt)));
}

/** Everybody who may sign, but one. */
export async function listMaintainerIds(db: Database, exceptId: string) {
  const rows = await db
    .select({ id: people.id })
    .from(people)
    .where(
      and(sql`${people.role} in ('maintainer', 'administrator')`, isNull(people.disabledAt), ne(people.id, exceptId)),
    );
  return rows.map(({ id }) => id);
}

/** The revision of an entry that a reader would be sent to: the one in force, or else the newest. */
export async function findRevisionToUse(db: Database, slug: string) {
  const [row] = await db
    .select({ id: revisions.id, entryId: revisions.entryId, number: revisions.number })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(eq(entries.slug, slug))
    .orderBy(desc(sql`${revisions.state} = 'vetted'`), desc(revisions.number))
    .limit(1);
  return row ?? null;
}
