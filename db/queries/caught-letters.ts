/** What the local mail catcher was given. */
import { and, desc, eq, lt, sql } from 'drizzle-orm';
import type { Database } from '../client';
import { caughtLetters } from '../schema/house';

const KEPT = 500;

/** Keeps a letter, and the latest 500 only. */
export async function insertCaughtLetter(db: Database, row: Omit<typeof caughtLetters.$inferInsert, 'id'>) {
  await db.insert(caughtLetters).values(row);
  await db
    .delete(caughtLetters)
    .where(
      lt(
        caughtLetters.id,
        sql`(select min(id) from (select id from caught_letters order by id desc limit ${KEPT}) kept)`,
      ),
    );
}

/** The latest first. @param before id of the last one of the page before */
export async function listCaughtLetters(
  db: Database,
  { recipient, before }: { recipient: string | null; before: number | null },
  limit: number,
) {
  return db
    .select({
      id: caughtLetters.id,
      recipient: caughtLetters.recipient,
      subject: caughtLetters.subject,
      arrivedAt: caughtLetters.arrivedAt,
    })
    .from(caughtLetters)
    .where(
      and(
        recipient ? eq(caughtLetters.recipient, recipient.trim().toLowerCase()) : undefined,
        before === null ? undefined : lt(caughtLetters.id, before),
      ),
    )
    .orderBy(desc(caughtLetters.id))
    .limit(limit);
}

export async function findCaughtLetter(db: Database, id: number) {
  const [row] = await db
    .select({
      id: caughtLetters.id,
      sender: caughtLetters.sender,
      recipient: caughtLetters.recipient,
      subject: caughtLetters.subject,
      text: caughtLetters.text,
      html: caughtLetters.html,
      arrivedAt: caughtLetters.arrivedAt,
    })
    .from(caughtLetters)
    .where(eq(caughtLetters.id, id));
  return row ?? null;
}
