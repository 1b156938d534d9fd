/** Reading the ledger. It is written by `insertEvent` (house.ts), with the change that it tells of. */
import { type SQL, and, asc, desc, eq, gte, ilike, isNull, like, lt, or, sql } from 'drizzle-orm';
import { alias } from 'drizzle-orm/pg-core';
import type { LedgerFilter } from '@/lib/ledger/ledger-filter';
import type { Database } from '../client';
import { entries } from '../schema/entries';
import { events } from '../schema/house';
import { people } from '../schema/people';
import { revisions } from '../schema/revisions';

const actors = alias(people, 'actors');
const subjects = alias(people, 'subjects');

function conditions({ who, what, about, why, from, to, before }: LedgerFilter): SQL | undefined {
  return and(
    before === undefined ? undefined : lt(events.id, before),
    who === 'house' ? isNull(events.actorId) : undefined,
    who && who !== 'house' ? or(eq(events.actorId, who), eq(events.subjectId, who)) : undefined,
    what ? (what.includes('.') ? eq(events.kind, what) : like(events.kind, `${what}.%`)) : undefined,
    about ? eq(entries.slug, about) : undefined,
    why ? ilike(events.reason, `%${why.replace(/[\\%_]/g, '\\$&')}%`) : undefined,
    from ? gte(events.at, sql`${from}::date at time zone 'UTC'`) : undefined,
    to ? lt(events.at, sql`(${to}::date + 1) at time zone 'UTC'`) : undefined,
  );
}

/**
 * The latest events first. Events are numbered as they come, so that a page goes on from the last number of the
 * one before whatever is written meanwhile.
 */
export async function listEvents(db: Database, filter: LedgerFilter, limit: number) {
  const rows = await db
    .select({
      id: events.id,
      kind: events.kind,
      at: events.at,
      reason: events.reason,
      data: events.data,
      actorId: events.actorId,
      actor: actors.name,
      subjectId: events.subjectId,
      revision: { number: revisions.number, title: revisions.title },
      slug: entries.slug,
      person: { name: subjects.name, email: subjects.email },
    })
    .from(events)
    .leftJoin(actors, eq(actors.id, events.actorId))
    .leftJoin(revisions, eq(revisions.id, events.subjectId))
    .leftJoin(entries, eq(entries.id, revisions.entryId))
    .leftJoin(subjects, eq(subjects.id, events.subjectId))
    .where(conditions(filter))
    .orderBy(desc(events.id))
    .limit(limit);
  return rows.map(({ revision, slug, ...event }) => ({
    ...event,
    revision: revision && slug !== null ? { ...revision, slug } : null,
  }));
}
export type ListedEvent = Awaited<ReturnType<typeof listEvents>>[number];

/** Everyone whom the ledger can be asked about, by name. */
export async function listNames(db: Database) {
  return db.select({ id: people.id, name: people.name }).from(people).orderBy(asc(people.name), asc(people.id));
}
