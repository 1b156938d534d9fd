/** What lies on the review desk. */
import { and, asc, count, desc, eq, inArray, isNull, ne, sql } from 'drizzle-orm';
import { formatCallNumber } from '@/lib/entries/call-number';
import type { DeskItem } from '@/lib/reviews/desk-item';
import type { Database } from '../client';
import { entries } from '../schema/entries';
import { events } from '../schema/house';
import { people } from '../schema/people';
import { remarks, signatures } from '../schema/reviews';
import { revisions } from '../schema/revisions';
import { trials } from '../schema/trials';
import { type Viewer, visibleTo } from './visible-to';

/** Who and what a revision is, for those who may see it; null for all others. */
export async function findVisibleRevision(db: Database, viewer: Viewer, id: string) {
  const [row] = await db
    .select({
      id: revisions.id,
      entryId: revisions.entryId,
      slug: entries.slug,
      kind: entries.kind,
      number: revisions.number,
      title: revisions.title,
      state: revisions.state,
      verdict: revisions.verdict,
      authorId: revisions.authorId,
      changeNote: revisions.changeNote,
      submittedAt: revisions.submittedAt,
      stateSince: revisions.stateSince,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(eq(revisions.id, id), visibleTo(viewer)));
  return row ?? null;
}

/** What a revision is compared with: the one in force, or else the last one before it that was; null where it is the first. */
export async function findComparedWith(db: Database, entryId: string, number: number) {
  const [row] = await db
    .select({ id: revisions.id, number: revisions.number, state: revisions.state })
    .from(revisions)
    .where(
      and(
        eq(revisions.entryId, entryId),
        inArray(revisions.state, ['vetted', 'superseded', 'withdrawn']),
        ne(revisions.number, number),
        sql`(${revisions.state} = 'vetted' or ${revisions.number} < ${number})`,
      ),
    )
    .orderBy(
      desc(sql`${revisions.state} = 'vetted' and ${revisions.number} < ${number}`),
      desc(sql`${revisions.number} < ${number}`),
      desc(revisions.number),
    )
    .limit(1);
  return row ?? null;
}

/** In review (what has waited longest first), then what has been returned and not come back. */
export async function listDesk(db: Database, viewer: Viewer): Promise<DeskItem[]> {
  const rows = await db
    .select({
      id: revisions.id,
      letters: entries.letters,
      entryNumber: entries.number,
      number: revisions.number,
      title: revisions.title,
      state: revisions.state,
      since: revisions.stateSince,
      authorId: revisions.authorId,
      author: people.name,
      signaturesNeeded: sql<number>`(select signatures_needed from settings)`,
      latestTrial: sql<DeskItem['latestTrial']>`(select t.state from ${trials} t
        where t.revision_id = ${revisions.id} and t.revision_version = ${revisions.version}
        order by t.queued_at desc, t.id limit 1)`,
      openRemarks: sql<number>`(select count(*)::int from ${remarks} r
        where r.revision_id = ${revisions.id} and r.answers_id is null and r.settled_at is null)`,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .innerJoin(people, eq(people.id, revisions.authorId))
    .where(and(inArray(revisions.state, ['in-review', 'returned']), visibleTo(viewer)))
    .orderBy(asc(revisions.state), asc(revisions.stateSince), asc(revisions.id));
  const ids = rows.map(({ id }) => id);
  const signed =
    ids.length === 0
      ? []
      : await db
          .select({ revisionId: signatures.revisionId, personId: signatures.personId, name: people.name })
          .from(signatures)
          .innerJoin(people, eq(people.id, signatures.personId))
          .innerJoin(
            revisions,
            and(eq(revisions.id, signatures.revisionId), eq(revisions.version, signatures.revisionVersion)),
          )
          .where(inArray(signatures.revisionId, ids))
          .orderBy(asc(signatures.at));
  return rows.map(({ letters, entryNumber, since, ...row }) => ({
    ...row,
    callNumber: formatCallNumber(letters, entryNumber),
    since: since.toISOString(),
    signers: signed
      .filter(({ revisionId }) => revisionId === row.id)
      .map(({ personId, name }) => ({ id: personId, name })),
  }));
}

/** How many revisions wait for this person: in review, not theirs, and not signed by them. */
export async function countWaitingFor(db: Database, personId: string): Promise<number> {
  const [row] = await db
    .select({ n: count() })
    .from(revisions)
    .leftJoin(
      signatures,
      and(
        eq(signatures.revisionId, revisions.id),
        eq(signatures.revisionVersion, revisions.version),
        eq(signatures.personId, personId),
      ),
    )
    .where(and(eq(revisions.state, 'in-review'), ne(revisions.authorId, personId), isNull(signatures.id)));
  return row?.n ?? 0;
}

/** Every signature a revision has had, those under an earlier text too. */
export async function listAllSignatures(db: Database, revisionId: string) {
  const rows = await db
    .select({
      id: signatures.id,
      name: people.name,
      at: signatures.at,
      sentence: signatures.sentence,
      isVoid: sql<boolean>`${signatures.revisionVersion} <> ${revisions.version}`,
    })
    .from(signatures)
    .innerJoin(people, eq(people.id, signatures.personId))
    .innerJoin(revisions, eq(revisions.id, signatures.revisionId))
    .where(eq(signatures.revisionId, revisionId))
    .orderBy(asc(signatures.at));
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
}
export type GivenSignature = Awaited<ReturnType<typeof listAllSignatures>>[number];

/** What was decided last on revisions that the viewer may see, the newest first. */
export async function listDecisions(db: Database, viewer: Viewer, limit: number) {
  const rows = await db
    .select({
      id: events.id,
      kind: events.kind,
      by: people.name,
      at: events.at,
      reason: events.reason,
      revisionId: revisions.id,
      number: revisions.number,
      title: revisions.title,
      letters: entries.letters,
      entryNumber: entries.number,
    })
    .from(events)
    .innerJoin(revisions, eq(revisions.id, events.subjectId))
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .leftJoin(people, eq(people.id, events.actorId))
    .where(
      and(
        inArray(events.kind, ['revision.signed', 'revision.vetted', 'revision.returned', 'revision.withdrawn']),
        visibleTo(viewer),
      ),
    )
    .orderBy(desc(events.id))
    .limit(limit);
  return rows.map(({ letters, entryNumber, at, ...row }) => ({
    ...row,
    callNumber: formatCallNumber(letters, entryNumber),
    at: at.toISOString(),
  }));
}
export type Decision = Awaited<ReturnType<typeof listDecisions>>[number];
