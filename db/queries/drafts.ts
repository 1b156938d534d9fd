import { and, asc, desc, eq, inArray, ne, sql } from 'drizzle-orm';
import { formatCallNumber } from '@/lib/entries/call-number';
import type { Definition } from '@/lib/entries/definition';
import type { DraftContent } from '@/lib/entries/draft-content';
import type { Database } from '../client';
import { entries } from '../schema/entries';
import { people } from '../schema/people';
import { revisions } from '../schema/revisions';
import { type Viewer, visibleTo } from './visible-to';

const place = {
  letters: entries.letters,
  entryNumber: entries.number,
  slug: entries.slug,
  equation: entries.equation,
  kind: entries.kind,
};

/** What an author has on the table: drafts, what is in review and what came back; last touched first. */
export async function listOwnDrafts(db: Database, authorId: string) {
  const rows = await db
    .select({
      id: revisions.id,
      number: revisions.number,
      title: revisions.title,
      state: revisions.state,
      stateReason: revisions.stateReason,
      verdict: revisions.verdict,
      summary: revisions.summary,
      updatedAt: revisions.updatedAt,
      ...place,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(eq(revisions.authorId, authorId), inArray(revisions.state, ['draft', 'returned', 'in-review'])))
    .orderBy(desc(revisions.updatedAt));
  return rows.map(({ letters, entryNumber, updatedAt, ...row }) => ({
    ...row,
    callNumber: formatCallNumber(letters, entryNumber),
    updatedAt: updatedAt.toISOString(),
  }));
}
export type OwnDraft = Awaited<ReturnType<typeof listOwnDrafts>>[number];

/** A revision as its author edits it, whatever its state; null where the viewer may not see it. */
export async function findDraft(db: Database, viewer: Viewer, id: string) {
  const [row] = await db
    .select({
      id: revisions.id,
      number: revisions.number,
      version: revisions.version,
      state: revisions.state,
      stateReason: revisions.stateReason,
      authorId: revisions.authorId,
      author: people.name,
      updatedAt: revisions.updatedAt,
      title: revisions.title,
      gist: revisions.gist,
      synonyms: revisions.synonyms,
      definition: revisions.definition,
      notes: revisions.notes,
      references: revisions.references,
      changeNote: revisions.changeNote,
      ...place,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .innerJoin(people, eq(people.id, revisions.authorId))
    .where(and(eq(revisions.id, id), visibleTo(viewer)));
  if (!row) return null;
  const { title, gist, synonyms, definition, notes, references, changeNote, letters, entryNumber, updatedAt, ...rest } =
    row;
  const content: DraftContent = { title, gist, synonyms, definition, notes, references, changeNote };
  return { ...rest, callNumber: formatCallNumber(letters, entryNumber), updatedAt: updatedAt.toISOString(), content };
}
export type Draft = NonNullable<Awaited<ReturnType<typeof findDraft>>>;

/** An entry to begin from: its revision in force, or else the newest that the viewer may see. */
export async function findDraftSource(db: Database, viewer: Viewer, slug: string) {
  const [row] = await db
    .select({ id: revisions.id })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(eq(entries.slug, slug), visibleTo(viewer)))
    .orderBy(desc(sql`${revisions.state} = 'vetted'`), desc(revisions.number))
    .limit(1);
  return row ? findDraft(db, viewer, row.id) : null;
}

/** Entries in force, for the lists to begin from and to build on. */
export async function listVettedEntries(db: Database) {
  const rows = await db
    .select({
      title: revisions.title,
      revision: revisions.number,
      letters: entries.letters,
      entryNumber: entries.number,
      slug: entries.slug,
      kind: entries.kind,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(eq(revisions.state, 'vetted'))
    .orderBy(asc(entries.letters), asc(entries.number));
  return rows.map(({ letters, entryNumber, ...row }) => ({
    ...row,
    callNumber: formatCallNumber(letters, entryNumber),
  }));
}
export type VettedEntry = Awaited<ReturnType<typeof listVettedEntries>>[number];

/** A stencil or time method of the book, with its definition, to be built into a scheme. */
export interface BuildingBlock {
  callNumber: string;
  title: string;
  revision: number;
  definition: Definition;
}

export async function listBuildingBlocks(db: Database): Promise<BuildingBlock[]> {
  const rows = await db
    .select({
      title: revisions.title,
      revision: revisions.number,
      letters: entries.letters,
      entryNumber: entries.number,
      definition: revisions.definition,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(eq(revisions.state, 'vetted'), ne(entries.kind, 'scheme')))
    .orderBy(asc(entries.letters), asc(entries.number));
  return rows.map(({ letters, entryNumber, ...row }) => ({
    ...row,
    callNumber: formatCallNumber(letters, entryNumber),
  }));
}
