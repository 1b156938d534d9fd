/** Remarks on revisions, their answers, and whether they are settled. */
import { and, asc, eq, isNotNull, isNull, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
import type { Remark } from '@/lib/reviews/remark';
import type { Database } from '../client';
import { entries } from '../schema/entries';
import { people } from '../schema/people';
import { remarks } from '../schema/reviews';
import { revisions } from '../schema/revisions';
import { insertEvent } from './house';
import { type Viewer, visibleTo } from './visible-to';

export interface NewRemark {
  revisionId: string;
  authorId: string;
  part: string;
  text: string;
  answersId?: string;
  at?: { language: KernelLanguage; line: number; quote: string } | null;
}

/**
 * A remark or an answer with its line in the ledger. The same words by the same person at the same place are
 * kept once, also where they come twice at the same moment.
 * @returns the id of the new remark, or null where it had been said
 */
export async function insertRemark(db: Database, { at, ...remark }: NewRemark): Promise<string | null> {
  return db.transaction(async (tx) => {
    const [row] = await tx
      .insert(remarks)
      .values({ ...remark, ...at })
      .onConflictDoNothing()
      .returning({ id: remarks.id });
    if (!row) return null;
    await insertEvent(tx, {
      kind: remark.answersId ? 'remark.answered' : 'remark.written',
      actorId: remark.authorId,
      subjectId: remark.revisionId,
      data: { part: remark.part, remarkId: row.id, ...(at && { language: at.language, line: at.line }) },
    });
    return row.id;
  });
}

/** All remarks on a revision, the oldest first. */
export async function listRemarks(db: Database, revisionId: string): Promise<Remark[]> {
  const settler = alias(people, 'settler');
  const rows = await db
    .select({
      id: remarks.id,
      authorId: remarks.authorId,
      author: people.name,
      role: people.role,
      at: remarks.createdAt,
      answersId: remarks.answersId,
      part: remarks.part,
      language: remarks.language,
      line: remarks.line,
      quote: remarks.quote,
      version: remarks.revisionVersion,
      text: remarks.text,
      settledAt: remarks.settledAt,
      settledBy: settler.name,
    })
    .from(remarks)
    .innerJoin(people, eq(people.id, remarks.authorId))
    .leftJoin(settler, eq(settler.id, remarks.settledById))
    .where(eq(remarks.revisionId, revisionId))
    .orderBy(asc(remarks.createdAt), asc(remarks.id));
  return rows.map((row) => ({ ...row, at: row.at.toISOString(), settledAt: row.settledAt?.toISOString() ?? null }));
}

/** The thread that a remark opens, with what its revision's letters say; null where the viewer may not see it. */
export async function findThread(db: Database, viewer: Viewer, id: string) {
  const [row] = await db
    .select({
      id: remarks.id,
      answersId: remarks.answersId,
      part: remarks.part,
      remarkAuthorId: remarks.authorId,
      settledAt: remarks.settledAt,
      revisionId: revisions.id,
      revisionAuthorId: revisions.authorId,
      number: revisions.number,
      title: revisions.title,
      slug: entries.slug,
    })
    .from(remarks)
    .innerJoin(revisions, eq(revisions.id, remarks.revisionId))
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(eq(remarks.id, id), visibleTo(viewer)));
  return row ?? null;
}

/** Everyone who has said something in a thread. */
export async function listThreadAuthorIds(db: Database, threadId: string): Promise<string[]> {
  const rows = await db
    .selectDistinct({ id: remarks.authorId })
    .from(remarks)
    .where(or(eq(remarks.id, threadId), eq(remarks.answersId, threadId)));
  return rows.map(({ id }) => id);
}

/** Settles an open thread; false where it was settled before. */
export async function settleThread(tx: Database, id: string, byId: string): Promise<boolean> {
  const moved = await tx
    .update(remarks)
    .set({ settledAt: sql`now()`, settledById: byId })
    .where(and(eq(remarks.id, id), isNull(remarks.answersId), isNull(remarks.settledAt)))
    .returning({ id: remarks.id });
  return moved.length === 1;
}

/** Opens a settled thread again; false where it was open. */
export async function reopenThread(tx: Database, id: string): Promise<boolean> {
  const moved = await tx
    .update(remarks)
    .set({ settledAt: null, settledById: null })
    .where(and(eq(remarks.id, id), isNotNull(remarks.settledAt)))
    .returning({ id: remarks.id });
  return moved.length === 1;
}
