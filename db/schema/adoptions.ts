import { sql } from 'drizzle-orm';
import { check, index, pgTable, text, uniqueIndex, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id, moment } from './columns';
import { people } from './people';
import { revisions } from './revisions';

/** A record that a code uses a kernel of a revision. */
export const adoptions = pgTable(
  'adoptions',
  {
    id: id(),
    /** The code that uses it: "Saltings". */
    code: text().notNull(),
    /** "tides, inner estuary" */
    purpose: text().notNull(),
    revisionId: uuid()
      .notNull()
      .references(() => revisions.id),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    /** When the adopter took note of a recall. */
    acknowledgedAt: moment(),
    /** When the code stopped using it. */
    endedAt: moment(),
    createdAt: createdAt(),
  },
  (t) => [
    uniqueIndex('one_running_adoption_per_code')
      .on(t.code, t.revisionId)
      .where(sql`${t.endedAt} is null`),
    check('adoption_names_a_code', sql`length(btrim(${t.code})) > 0`),
    index('adoptions_by_revision').on(t.revisionId),
    index('adoptions_by_person').on(t.personId),
  ],
);
