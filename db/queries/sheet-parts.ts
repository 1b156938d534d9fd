/** What a sheet shows beside its revision: earlier revisions, signatures, uses, remarks, what replaced it. */
import { and, asc, desc, eq, inArray, isNull } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import { formatCallNumber } from '@/lib/entries/call-number';
import type { RevisionLine, SheetView } from '@/lib/entries/entry';
import type { Database } from '../client';
import { adoptions } from '../schema/adoptions';
import { entries } from '../schema/entries';
import { people } from '../schema/people';
import { signatures } from '../schema/reviews';
import { revisions } from '../schema/revisions';
import { type Viewer, visibleTo } from './visible-to';

type VisibleRevision = Awaited<ReturnType<typeof listVisibleRevisions>>[number];
type Signed = Awaited<ReturnType<typeof listSignatures>>;

export function revisionLine(line: VisibleRevision, signed: Signed): RevisionLine {
  const signers = signed.filter((one) => one.revisionId === line.id && one.revisionVersion === line.version);
  return {
    number: line.number,
    state: line.state,
    since: line.stateSince.toISOString(),
    note: line.changeNote,
    people: signers.length > 0 ? signers.map(({ name }) => name) : [line.author],
    engineVersion: line.engineVersion,
  };
}

/** Newest first. */
export async function listVisibleRevisions(db: Database, viewer: Viewer, slug: string) {
  return db
    .select({
      id: revisions.id,
      number: revisions.number,
      version: revisions.version,
      state: revisions.state,
      stateSince: revisions.stateSince,
      changeNote: revisions.changeNote,
      engineVersion: revisions.engineVersion,
      author: people.name,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .innerJoin(people, eq(people.id, revisions.authorId))
    .where(and(eq(entries.slug, slug), visibleTo(viewer)))
    .orderBy(desc(revisions.number));
}

export async function listSignatures(db: Database, revisionIds: string[]) {
  return db
    .select({
      revisionId: signatures.revisionId,
      revisionVersion: signatures.revisionVersion,
      name: people.name,
      at: signatures.at,
      sentence: signatures.sentence,
    })
    .from(signatures)
    .innerJoin(people, eq(people.id, signatures.personId))
    .where(inArray(signatures.revisionId, revisionIds))
    .orderBy(asc(signatures.at));
}

export async function listUses(db: Database, entryId: string) {
  return db
    .select({ code: adoptions.code, purpose: adoptions.purpose, revision: revisions.number })
    .from(adoptions)
    .innerJoin(revisions, eq(revisions.id, adoptions.revisionId))
    .where(and(eq(revisions.entryId, entryId), isNull(adoptions.endedAt)))
    .orderBy(asc(adoptions.code), desc(revisions.number));
}

export async function findReplacement(db: Database, revisionId: string): Promise<SheetView['replacement']> {
  const replacing = alias(revisions, 'replacing');
  const [row] = await db
    .select({
      slug: entries.slug,
      letters: entries.letters,
      number: entries.number,
      title: replacing.title,
      revision: replacing.number,
    })
    .from(replacing)
    .innerJoin(entries, eq(entries.id, replacing.entryId))
    .where(eq(replacing.id, revisionId));
  if (!row) return null;
  const { letters, number, ...rest } = row;
  return { ...rest, callNumber: formatCallNumber(letters, number) };
}
