import { sql } from 'drizzle-orm';
import { check, integer, pgEnum, pgTable, text, unique } from 'drizzle-orm/pg-core';
import { CALL_LETTERS, ENTRY_KINDS } from '@/lib/entries/entry';
import { EQUATIONS } from '@/lib/numerics/equation';
import { createdAt, id } from './columns';

export const entryKind = pgEnum('entry_kind', ENTRY_KINDS);
export const equation = pgEnum('equation', EQUATIONS);
export const callLetters = pgEnum('call_letters', CALL_LETTERS);

/** What stays the same through all revisions: call number, address, kind, equation. All else is the revision's. */
export const entries = pgTable(
  'entries',
  {
    id: id(),
    letters: callLetters().notNull(),
    /** 3 in AD 003. */
    number: integer().notNull(),
    slug: text().notNull(),
    kind: entryKind().notNull(),
    equation: equation(),
    createdAt: createdAt(),
  },
  (t) => [
    unique('one_call_number_per_entry').on(t.letters, t.number),
    unique('one_address_per_entry').on(t.slug),
    check('call_number_has_up_to_four_figures', sql`${t.number} between 1 and 9999`),
    check('slug_is_an_address', sql`${t.slug} ~ '^[a-z0-9]+(-[a-z0-9]+)*$' and length(${t.slug}) <= 80`),
    check('only_schemes_have_an_equation', sql`(${t.kind} = 'scheme') = (${t.equation} is not null)`),
  ],
);
