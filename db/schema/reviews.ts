import { sql } from 'drizzle-orm';
import { type AnyPgColumn, check, index, integer, pgTable, text, unique, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
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
    /** "readings", "bound", "kernel", … : the list is lib/reviews/remark-part.ts. */
    part: text().notNull(),
    /** Of a remark on a line of a kernel: its language, its number from 1, and its text as it stood then. */
    language: text().$type<KernelLanguage>(),
    line: integer(),
    quote: text(),
    /** The version of the text that was read; set by a trigger. */
    revisionVersion: integer().notNull().default(0),
    text: text().notNull(),
    settledAt: moment(),
    settledById: uuid().references(() => people.id),
    createdAt: createdAt(),
  },
  (t) => [
    check('remark_says_something', sql`length(btrim(${t.text})) > 0`),
    check(
      'line_of_a_kernel',
      sql`(${t.line} is null) = (${t.language} is null) and (${t.line} is null) = (${t.quote} is null) and (${t.line} is null or (${t.part} = 'kernel' and ${t.line} >= 1))`,
    ),
    check('settled_by_someone', sql`(${t.settledAt} is null) = (${t.settledById} is null)`),
    // The same words at the same place, sent twice, are said once.
    uniqueIndex('said_once').on(
      t.revisionId,
      t.authorId,
      sql`md5(${t.part} || '|' || coalesce(${t.language}, '') || '|' || coalesce(${t.line}::text, '') || '|' || coalesce(${t.answersId}::text, '') || '|' || ${t.text})`,
    ),
    index('remarks_by_revision').on(t.revisionId, t.createdAt),
  ],
);
