import { sql } from 'drizzle-orm';
import { type AnyPgColumn, check, index, integer, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { REVIEW_POINTS } from '@/lib/reviews/review-list';
import { createdAt, id, moment } from './columns';
import { people } from './people';
import { revisions } from './revisions';

const everyPoint = sql.raw(`array[${REVIEW_POINTS.map((point) => `'${point}'`).join(', ')}]::text[]`);

/** A maintainer's word for one state of the text; a trigger refuses the author's and stamps the version. */
export const signatures = pgTable(
  'signatures',
  {
    id: id(),
    revisionId: uuid()
      .notNull()
      .references(() => revisions.id),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    /** The revision's version that was signed; set by a trigger. A later version makes the signature void. */
    revisionVersion: integer().notNull().default(0),
    points: text().array().notNull(),
    sentence: text().notNull(),
    at: createdAt(),
  },
  (t) => [
    unique('one_signature_per_person').on(t.revisionId, t.personId, t.revisionVersion),
    check('every_point_is_ticked', sql`${t.points} @> ${everyPoint}`),
    check('signature_has_a_sentence', sql`length(btrim(${t.sentence})) > 0`),
  ],
);

/** A remark on a part of the sheet, an answer to one, and whether it is settled. */
export const remarks = pgTable(
  'remarks',
  {
    id: id(),
    revisionId: uuid()
      .notNull()
      .references(() => revisions.id),
    authorId: uuid()
      .notNull()
      .references(() => people.id),
    answersId: uuid().references((): AnyPgColumn => remarks.id),
    /** "readings", "bound", "kernel", … : the sheet's own names of its parts. */
    part: text().notNull(),
    text: text().notNull(),
    settledAt: moment(),
    settledById: uuid().references(() => people.id),
    createdAt: createdAt(),
  },
  (t) => [
    check('remark_says_something', sql`length(btrim(${t.text})) > 0`),
    check('settled_by_someone', sql`(${t.settledAt} is null) = (${t.settledById} is null)`),
    index('remarks_by_revision').on(t.revisionId, t.createdAt),
  ],
);
