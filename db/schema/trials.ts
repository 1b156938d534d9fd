import { index, integer, jsonb, pgEnum, pgTable, smallint, text, unique, uuid } from 'drizzle-orm/pg-core';
import { FINDING_NAMES, FINDING_OUTCOMES, TRIAL_LANGUAGES, TRIAL_STATES, type TrialView } from '@/lib/trials/trial';
import { id, moment } from './columns';
import { people } from './people';
import { revisions } from './revisions';

export const trialState = pgEnum('trial_state', TRIAL_STATES);
export const findingName = pgEnum('finding_name', FINDING_NAMES);
export const findingOutcome = pgEnum('finding_outcome', FINDING_OUTCOMES);
export const trialLanguage = pgEnum('trial_language', TRIAL_LANGUAGES);

/** One compile-and-run of a revision's kernels against its facts. */
export const trials = pgTable(
  'trials',
  {
    id: id(),
    revisionId: uuid()
      .notNull()
      .references(() => revisions.id, { onDelete: 'cascade' }),
    /** The revision's version when the trial was queued; set by a trigger. It counts for that text only. */
    revisionVersion: integer().notNull().default(0),
    state: trialState().notNull().default('waiting'),
    queuedById: uuid()
      .notNull()
      .references(() => people.id),
    queuedAt: moment().notNull().defaultNow(),
    /** Higher is taken up first: what somebody waits for, before what the house tries for itself. */
    priority: smallint().notNull().default(0),
    startedAt: moment(),
    finishedAt: moment(),
    progress: jsonb().$type<TrialView['progress']>().notNull().default({ done: 0, total: 0, label: 'waiting' }),
    /** One sentence where it was refused or could not run. */
    note: text(),
    toolchain: jsonb().$type<TrialView['toolchain']>().notNull().default([]),
    generatorRelease: text().notNull().default(''),
    /** What the compiled kernels printed, by language; kept until the findings are drawn from it. */
    answers: jsonb().$type<Record<string, unknown>>(),
  },
  (t) => [index('trials_by_revision').on(t.revisionId, t.queuedAt), index('trials_by_state').on(t.state, t.queuedAt)],
);

export const findings = pgTable(
  'findings',
  {
    id: id(),
    trialId: uuid()
      .notNull()
      .references(() => trials.id, { onDelete: 'cascade' }),
    name: findingName().notNull(),
    /** null where the finding is about all languages together. */
    language: trialLanguage(),
    outcome: findingOutcome().notNull(),
    measured: text().notNull(),
    target: text().notNull(),
    how: text().notNull(),
    data: jsonb().$type<Record<string, unknown>>(),
  },
  (t) => [unique('one_finding_per_name_and_language').on(t.trialId, t.name, t.language).nullsNotDistinct()],
);

/** Worker processes that have been seen, for the page that says whether anyone serves the queue. */
export const workers = pgTable('workers', {
  id: text().primaryKey(),
  seenAt: moment().notNull().defaultNow(),
  sandboxMode: text(),
  toolchain: jsonb().$type<TrialView['toolchain']>().notNull().default([]),
});
