import { sql } from 'drizzle-orm';
import { boolean, check, index, integer, bigint, pgEnum, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { ROLES } from '@/lib/people/role';
import { createdAt, id, moment } from './columns';

export const personRole = pgEnum('person_role', ROLES);

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
