import { sql } from 'drizzle-orm';
import { bigint, boolean, check, index, integer, jsonb, pgEnum, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { LETTER_KINDS, LETTER_STATES } from '@/lib/mail/letter';
import { createdAt, id, moment } from './columns';
import { people } from './people';

/** The ledger: who, what, when, why. It only grows; triggers refuse UPDATE, DELETE and TRUNCATE. */
export const events = pgTable(
  'events',
  {
    id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    /** "revision.vetted"; the list is lib/ledger/event.ts. */
    kind: text().notNull(),
    /** null where the house itself acted. */
    actorId: uuid().references(() => people.id),
    /** Id of the revision, person, trial or adoption that it is about. */
    subjectId: uuid(),
    at: moment().notNull().defaultNow(),
    reason: text(),
    data: jsonb().$type<Record<string, unknown>>().notNull().default({}),
  },
  (t) => [
    index('events_by_subject').on(t.subjectId, t.id),
    index('events_by_actor').on(t.actorId, t.id),
    index('events_by_kind').on(t.kind, t.id),
  ],
);

export const letterKind = pgEnum('letter_kind', LETTER_KINDS);
export const letterState = pgEnum('letter_state', LETTER_STATES);

/** The outbox: written with the change it tells of, sent by the worker, tried again until it is given up. */
export const letters = pgTable(
  'letters',
  {
    id: id(),
    kind: letterKind().notNull(),
    recipientId: uuid()
      .notNull()
      .references(() => people.id),
    payload: jsonb().$type<Record<string, unknown>>().notNull(),
    state: letterState().notNull().default('waiting'),
    attempts: integer().notNull().default(0),
    nextAt: moment().notNull().defaultNow(),
    lastError: text(),
    sentAt: moment(),
    createdAt: createdAt(),
  },
  (t) => [
    check('sent_means_dated', sql`(${t.state} = 'sent') = (${t.sentAt} is not null)`),
    index('letters_to_send')
      .on(t.nextAt)
      .where(sql`${t.state} = 'waiting'`),
    index('letters_by_age').on(t.createdAt, t.id),
    index('letters_by_recipient').on(t.recipientId),
  ],
);

/** What the local mail catcher was given, where the house has no mail server; the page "Arrived mail" shows it. */
export const caughtLetters = pgTable(
  'caught_letters',
  {
    id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    sender: text().notNull(),
    recipient: text().notNull(),
    subject: text().notNull(),
    text: text().notNull(),
    html: text().notNull(),
    arrivedAt: createdAt(),
  },
  (t) => [index('caught_letters_by_recipient').on(t.recipient, t.id)],
);

/** One row: what the house has decided for itself. */
export const settings = pgTable(
  'settings',
  {
    onlyRow: boolean().primaryKey().default(true),
    signaturesNeeded: integer().notNull().default(2),
  },
  (t) => [
    check('settings_have_one_row', sql`${t.onlyRow}`),
    check('somebody_signs', sql`${t.signaturesNeeded} between 1 and 9`),
  ],
);
