import { sql } from 'drizzle-orm';
import { check, pgTable, text, unique, uuid } from 'drizzle-orm/pg-core';
import { createdAt, id } from './columns';
import { people } from './people';

/** Runs whose budget a person wants to find again; the question is the query of its address. */
export const budgetCases = pgTable(
  'budget_cases',
  {
    id: id(),
    personId: uuid()
      .notNull()
      .references(() => people.id),
    name: text().notNull(),
    question: text().notNull(),
    createdAt: createdAt(),
  },
  (t) => [
    unique('one_case_per_name').on(t.personId, t.name),
    check('case_has_a_name', sql`length(${t.name}) between 1 and 80`),
    check('case_has_a_question', sql`length(${t.question}) between 1 and 2000`),
  ],
);
