import { and, asc, count, eq } from 'drizzle-orm';
import type { AttachmentView } from '@/lib/attachments/attachment';
import type { Database } from '../client';
import { attachments } from '../schema/attachments';
import { people } from '../schema/people';
import { revisions } from '../schema/revisions';
import { type Viewer, visibleTo } from './visible-to';

export type NewAttachment = Pick<
  typeof attachments.$inferInsert,
  'revisionId' | 'name' | 'type' | 'size' | 'sha256' | 'bytes' | 'addedById'
>;

/** Without their bytes, oldest first. */
export async function listAttachments(db: Database, revisionId: string): Promise<AttachmentView[]> {
  const rows = await db
    .select({
      id: attachments.id,
      name: attachments.name,
      type: attachments.type,
      bytes: attachments.size,
      sha256: attachments.sha256,
      by: people.name,
      at: attachments.createdAt,
    })
    .from(attachments)
    .innerJoin(people, eq(people.id, attachments.addedById))
    .where(eq(attachments.revisionId, revisionId))
    .orderBy(asc(attachments.createdAt), asc(attachments.id));
  return rows.map((row) => ({ ...row, at: row.at.toISOString() }));
}

export async function countAttachments(db: Database, revisionId: string): Promise<number> {
  const [row] = await db.select({ n: count() }).from(attachments).where(eq(attachments.revisionId, revisionId));
  return row?.n ?? 0;
}

export async function insertAttachment(db: Database, attachment: NewAttachment): Promise<string> {
  const [row] = await db.insert(attachments).values(attachment).returning({ id: attachments.id });
  if (!row) throw new Error('insertAttachment: the inserted row did not come back');
  return row.id;
}

/** With its bytes, for a viewer who may see its revision. */
export async function findAttachment(db: Database, viewer: Viewer, id: string) {
  const [row] = await db
    .select({
      name: attachments.name,
      type: attachments.type,
      sha256: attachments.sha256,
      bytes: attachments.bytes,
    })
    .from(attachments)
    .innerJoin(revisions, eq(revisions.id, attachments.revisionId))
    .where(and(eq(attachments.id, id), visibleTo(viewer)));
  return row ?? null;
}

export async function findAttachmentOwner(db: Database, id: string) {
  const [row] = await db
    .select({
      revisionId: revisions.id,
      authorId: revisions.authorId,
      state: revisions.state,
      name: attachments.name,
    })
    .from(attachments)
    .innerJoin(revisions, eq(revisions.id, attachments.revisionId))
    .where(eq(attachments.id, id));
  return row ?? null;
}

/** False where it is gone already. */
export async function deleteAttachment(db: Database, id: string): Promise<boolean> {
  const gone = await db.delete(attachments).where(eq(attachments.id, id)).returning({ id: attachments.id });
  return gone.length === 1;
}
