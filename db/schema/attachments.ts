import { sql } from 'drizzle-orm';
import { check, customType, index, integer, pgEnum, pgTable, text, uuid } from 'drizzle-orm/pg-core';
import { ATTACHMENT_TYPES } from '@/lib/attachments/attachment';
import { createdAt, id } from './columns';
import { people } from './people';
import { revisions } from './revisions';

export const attachmentType = pgEnum('attachment_type', ATTACHMENT_TYPES);

const bytea = customType<{ data: Buffer }>({ dataType: () => 'bytea' });

/** Files of a revision, with their bytes. They come and go with the draft; `attachments_are_frozen` keeps them after that. */
export const attachments = pgTable(
  'attachments',
  {
    id: id(),
    revisionId: uuid()
      .notNull()
      .references(() => revisions.id),
    name: text().notNull(),
    type: attachmentType().notNull(),
    size: integer().notNull(),
    /** Hexadecimal, of the bytes. */
    sha256: text().notNull(),
    bytes: bytea().notNull(),
    addedById: uuid()
      .notNull()
      .references(() => people.id),
    createdAt: createdAt(),
  },
  (t) => [
    index('attachments_by_revision').on(t.revisionId, t.createdAt),
    check('attachment_has_a_name', sql`length(${t.name}) between 1 and 120`),
    check('attachment_is_at_most_10_mb', sql`${t.size} between 1 and 10485760 and length(${t.bytes}) = ${t.size}`),
  ],
);
