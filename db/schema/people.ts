import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, bigint, pgEnum, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { LETTER_WISHES } from '@/lib/mail/letter';
import { LINK_PURPOSES } from '@/lib/people/link';
import { ROLES } from '@/lib/people/role';
import { createdAt, id, moment } from './columns';

export const personRole = pgEnum('person_role', ROLES);
export const letterWish = pgEnum('letter_wish', LETTER_WISHES);
export const linkPurpose = pgEnum('link_purpose', LINK_PURPOSES);

export const people = pgTable(
  'people',
  {
    id: id(),
    name: text().notNull(),
    /** Always in lower case, so that one address is one person. */
    email: text().notNull(),
    role: personRole().notNull().default('reader'),
    /** argon2id; null until an invitation is taken up. */
    passwordHash: text(),
    /** Part of every session; raising it ends them all. */
    sessionVersion: integer().notNull().default(1),
    disabledAt: moment(),
    letterWish: letterWish().notNull().default('at-once'),
    /** Made by the demo; the sign-in page shows such accounts in demo mode. */
    demo: boolean().notNull().default(false),
    createdAt: createdAt(),
  },
  (t) => [
    unique('one_account_per_email').on(t.email),
    check('email_is_lower_case', sql`${t.email} = lower(${t.email}) and ${t.email} like '%_@_%'`),
    check('person_has_a_name', sql`length(btrim(${t.name})) > 0`),
  ],
);

/** Every try to sign in, so that the limit holds across instances. Written before the password is looked at. */
export const signInAttempts = pgTable(
  'sign_in_attempts',
  {
    id: bigint({ mode: 'number' }).primaryKey().generatedAlwaysAsIdentity(),
    email: text().notNull(),
    /** Network address as the nearest proxy reports it. */
    address: text().notNull(),
    at: moment().notNull().defaultNow(),
    succeeded: boolean().notNull().default(false),
  },
  (t) => [
    index('sign_in_attempts_by_email').on(t.email, t.at),
    index('sign_in_attempts_by_address').on(t.address, t.at),
  ],
);

/** A browser that somebody is signed in with; the cookie names the row, and counts as long as the row has not ended. */
export const sessions = pgTable(
  'sessions',
  {
    id: id(),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    /** What the browser said of itself. */
    userAgent: text().notNull(),
    /** Network address as the nearest proxy reported it at sign-in. */
    address: text().notNull(),
    /** Kept to the minute. */
    seenAt: moment().notNull().defaultNow(),
    endedAt: moment(),
    createdAt: createdAt(),
  },
  (t) => [index('sessions_by_person').on(t.personId, t.seenAt)],
);

/**
 * Links that letters carry: 32 random bytes, of which only the sha256 is kept. Made when the letter goes out, so
 * that no secret waits in the outbox.
 */
export const links = pgTable(
  'links',
  {
    id: id(),
    purpose: linkPurpose().notNull(),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    /** sha256 of the secret, hexadecimal. */
    hash: text().notNull(),
    expiresAt: moment().notNull(),
    /** Used, or put out of force by a later event. */
    endedAt: moment(),
    createdAt: createdAt(),
  },
  (t) => [
    unique('one_link_per_secret').on(t.hash),
    check('link_keeps_a_hash', sql`${t.hash} ~ '^[0-9a-f]{64}$'`),
    index('links_by_person').on(t.personId, t.purpose),
  ],
);
