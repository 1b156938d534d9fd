import { boolean, jsonb, pgTable, uuid } from 'drizzle-orm/pg-core';
import type { StoredDemoPlan } from '@/lib/reviews/demo-plan';
import { revisions } from './revisions';

/** What shall become of each revision of the demo; empty where there is no demo. */
export const demoPlans = pgTable('demo_plans', {
  revisionId: uuid()
    .primaryKey()
    .references(() => revisions.id, { onDelete: 'cascade' }),
  plan: jsonb().$type<StoredDemoPlan>().notNull(),
  /** Submitted, or left as it is by plan: the seed does not touch it again. */
  placed: boolean().notNull().default(false),
  /** Signed, vetted, returned or withdrawn as planned. */
  done: boolean().notNull().default(false),
});
