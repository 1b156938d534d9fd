import { sql } from 'drizzle-orm';
import {
  type AnyPgColumn,
  check,
  index,
  integer,
  jsonb,
  pgEnum,
  pgTable,
  text,
  unique,
  uniqueIndex,
  uuid,
} from 'drizzle-orm/pg-core';
import type { KernelLanguage } from '@/lib/codegen/kernel-request';
import type { Definition } from '@/lib/entries/definition';
import type { Reference } from '@/lib/entries/entry';
import { REVISION_STATES } from '@/lib/entries/revision-state';
import type { Facts, Problem } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import { createdAt, id, moment } from './columns';
import { entries } from './entries';
import { people } from './people';

export const revisionState = pgEnum('revision_state', REVISION_STATES);
export const analysisVerdict = pgEnum('analysis_verdict', ['facts', 'inconsistent', 'invalid']);

/**
 * A numbered state of an entry. Content may change in draft and returned only; what was vetted is never
 * edited or deleted. The triggers of drizzle/*_rules.sql keep both, the allowed moves, and the signatures.
 */
export const revisions = pgTable(
  'revisions',
  {
    id: id(),
    entryId: uuid()
      .notNull()
      .references(() => entries.id),
    number: integer().notNull(),
    state: revisionState().notNull().default('draft'),
    /** Sentence of the last move: why it was returned or withdrawn, or what the signers said. */
    stateReason: text(),
    /** When it reached its state; kept by a trigger. */
    stateSince: moment().notNull().defaultNow(),
    /** Raised at every change of content: the stamp that a form sends back, a trial and a signature stand for. */
    version: integer().notNull().default(1),
    authorId: uuid()
      .notNull()
      .references(() => people.id),
    title: text().notNull(),
    gist: text().notNull().default(''),
    /** Other names and people's usual wordings, for the search. */
    synonyms: text()
      .array()
      .notNull()
      .default(sql`'{}'`),
    definition: jsonb().$type<Definition>().notNull(),
    /** Markdown. */
    notes: text().notNull().default(''),
    references: jsonb().$type<Reference[]>().notNull().default([]),
    /** What changed against the revision before. */
    changeNote: text().notNull().default(''),
    verdict: analysisVerdict().notNull(),
    facts: jsonb().$type<Facts>(),
    summary: jsonb().$type<FactsSummary>(),
    problems: jsonb().$type<Problem[]>().notNull().default([]),
    engineVersion: text().notNull(),
    /** Languages of which the generator can print a kernel; not content, a later generator may know more. */
    kernelLanguages: text()
      .array()
      .$type<KernelLanguage[]>()
      .notNull()
      .default(sql`'{}'`),
    submittedAt: moment(),
    vettedAt: moment(),
    /** What stands in the place of a superseded or withdrawn revision. */
    replacedById: uuid().references((): AnyPgColumn => revisions.id),
    createdAt: createdAt(),
    updatedAt: moment().notNull().defaultNow(),
  },
  (t) => [
    unique('one_number_per_entry').on(t.entryId, t.number),
    uniqueIndex('one_vetted_revision_per_entry')
      .on(t.entryId)
      .where(sql`${t.state} = 'vetted'`),
    check('revision_number_is_positive', sql`${t.number} >= 1`),
    check('revision_has_a_title', sql`length(btrim(${t.title})) between 1 and 200`),
    check(
      'vetted_means_dated',
      sql`(${t.state} in ('vetted', 'superseded', 'withdrawn')) = (${t.vettedAt} is not null)`,
    ),
    check('vetted_means_facts', sql`${t.vettedAt} is null or (${t.facts} is not null and ${t.summary} is not null)`),
    check('superseded_names_its_replacement', sql`${t.state} <> 'superseded' or ${t.replacedById} is not null`),
    check('nothing_replaces_itself', sql`${t.replacedById} <> ${t.id}`),
    check(
      'returned_and_withdrawn_say_why',
      sql`${t.state} not in ('returned', 'withdrawn') or length(btrim(coalesce(${t.stateReason}, ''))) > 0`,
    ),
    index('revisions_by_state').on(t.state, t.stateSince),
    index('revisions_by_author').on(t.authorId, t.state),
    // The conditions that the catalog's address bar carries.
    index('published_revisions_by_verdict')
      .on(sql`(${t.summary} ->> 'verdict')`)
      .where(sql`${t.state} in ('vetted', 'superseded', 'withdrawn')`),
    index('published_revisions_by_order')
      .on(sql`((${t.summary} ->> 'orderTime')::int)`, sql`((${t.summary} ->> 'orderSpace')::int)`)
      .where(sql`${t.state} in ('vetted', 'superseded', 'withdrawn')`),
  ],
);
