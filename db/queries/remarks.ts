import { and, eq } from 'drizzle-orm';
import type { Database } from '../client';
import { remarks } from '../schema/reviews';
import { insertEvent } from './house';

export interface NewRemark {
  revisionId: string;
  authorId: string;
  part: string;
  text: string;
}

/** A remark with its line in the ledger. The same words by the same person on the same part are kept once. */
export async function insertRemark(db: Database, remark: NewRemark) {
  const { revisionId, authorId, part, text } = remark;
  await db.transaction(async (tx) => {
    const same = and(
      eq(remarks.revisionId, revisionId),
      eq(remarks.authorId, authorId),
      eq(remarks.part, part),
      eq(remarks.text, text),
    );
    const present = await tx.select({ id: remarks.id }).from(remarks).where(same);
    if (present.length > 0) return;
    await tx.insert(remarks).values(remark);
    await insertEvent(tx, { kind: 'remark.written', actorId: authorId, subjectId: revisionId, data: { part } });
  });
}
