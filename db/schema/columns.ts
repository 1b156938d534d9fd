/** Columns that several tables share. */
import { sql } from 'drizzle-orm';
import { timestamp, uuid } from 'drizzle-orm/pg-core';

export const id = () =>
  uuid()
    .primaryKey()
    .default(sql`gen_random_uuid()`);

/** A moment with its time zone; JavaScript Date in and out. */
export const moment = () => timestamp({ withTimezone: true });

export const createdAt = () => moment().notNull().defaultNow();
