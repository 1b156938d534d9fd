/** The outbox: which letters are due, who takes them up, and what became of them. */
import { and, asc, count, desc, eq, inArray, lte, notInArray, sql } from 'drizzle-orm';
import { LETTER_KINDS, type LetterKind, type LetterState, goesOutAtOnce } from '@/lib/mail/letter';
import type { Database } from '../client';
import { letters } from '../schema/house';
import { people } from '../schema/people';

/** PostgreSQL tells of new letters here. */
export const LETTER_WAITING = 'letter_waiting';

const AT_ONCE = LETTER_KINDS.filter(goesOutAtOnce);
const due = and(eq(letters.state, 'waiting'), lte(letters.nextAt, sql`now()`));
const isDaily = and(eq(people.letterWish, 'daily'), notInArray(letters.kind, AT_ONCE));
/** The morning that has passed last: daily letters bring what was written before it. */
const LAST_MORNING = sql`(date_trunc('day', (now() at time zone 'UTC') - interval '6 hours') + interval '6 hours') at time zone 'UTC'`;
const dailyIsDue = and(due, isDaily, sql`${letters.createdAt} < ${LAST_MORNING}`);

export interface ClaimedLetter {
  id: string;
  kind: LetterKind;
  payload: Record<string, unknown>;
  /** Tries so far, this one included. */
  attempts: number;
  /** The letter was written this many seconds ago. */
  ageSeconds: number;
}

const claimed = {
  id: letters.id,
  kind: letters.kind,
  payload: letters.payload,
  attempts: letters.attempts,
  ageSeconds: sql<number>`extract(epoch from now() - ${letters.createdAt})::float8`,
};

/** Puts aside what nobody is to have: no letters wished, no open account, a demo account outside demo mode. */
export async function keepBackLetters(db: Database, demoMode: boolean): Promise<void> {
  await db
    .update(letters)
    .set({
      state: 'kept-back',
      lastError: sql`case when ${people.letterWish} = 'none' and ${people.disabledAt} is null
        then 'Its reader wants no letters.' else 'Its reader has no open account.' end`,
    })
    .from(people)
    .where(
      and(
        eq(people.id, letters.recipientId),
        due,
        sql`(${people.disabledAt} is not null or (${people.demo} and not ${demoMode})
          or (${people.letterWish} = 'none' and ${notInArray(letters.kind, AT_ONCE)}))`,
      ),
    );
}

export async function areLettersDue(db: Database): Promise<boolean> {
  const rows = await db
    .select({ id: letters.id })
    .from(letters)
    .innerJoin(people, eq(people.id, letters.recipientId))
    .where(and(due, sql`(not (${isDaily}) or (${dailyIsDue}))`))
    .limit(1);
  return rows.length > 0;
}

/**
 * Takes up the letter that has waited longest. Until `leaseSeconds` have passed no other worker sees it; should
 * this one be lost, the letter is then due again.
 */
export async function claimLetter(db: Database, leaseSeconds: number) {
  const next = db
    .select({ id: letters.id })
    .from(letters)
    .innerJoin(people, eq(people.id, letters.recipientId))
    .where(and(due, sql`not (${isDaily})`))
    .orderBy(asc(letters.nextAt), asc(letters.createdAt))
    .limit(1)
    .for('update', { of: letters, skipLocked: true });
  const [letter] = await db
    .update(letters)
    .set(leased(leaseSeconds))
    .where(eq(letters.id, sql`(${next})`))
    .returning({ ...claimed, recipientId: letters.recipientId });
  return letter ?? null;
}

/** Takes up all that is to go into one person's daily letter, once a morning has passed since it was written. */
export async function claimDailyLetters(db: Database, leaseSeconds: number) {
  return db.transaction(async (tx) => {
    // The lock on the person keeps a day's letters together where two workers look at once.
    const [person] = await tx
      .select({ id: people.id })
      .from(people)
      .where(
        and(
          eq(people.letterWish, 'daily'),
          sql`exists (select from ${letters} where ${letters.recipientId} = ${people.id} and ${dailyIsDue})`,
        ),
      )
      .limit(1)
      .for('no key update', { skipLocked: true });
    if (!person) return null;
    const rows = await tx
      .update(letters)
      .set(leased(leaseSeconds))
      .where(and(eq(letters.recipientId, person.id), due, notInArray(letters.kind, AT_ONCE)))
      .returning({ ...claimed, createdAt: letters.createdAt });
    rows.sort((a, b) => a.createdAt.getTime() - b.createdAt.getTime());
    return rows.length > 0 ? { recipientId: person.id, letters: rows } : null;
  });
}

const leased = (seconds: number) => ({
  attempts: sql`${letters.attempts} + 1`,
  nextAt: sql`now() + make_interval(secs => ${seconds})`,
});

const waitingAmong = (ids: readonly string[]) => and(inArray(letters.id, [...ids]), eq(letters.state, 'waiting'));

export async function markLettersSent(db: Database, ids: readonly string[]): Promise<void> {
  await db
    .update(letters)
    .set({ state: 'sent', sentAt: sql`now()`, lastError: null })
    .where(waitingAmong(ids));
}

export async function postponeLetters(db: Database, ids: readonly string[], seconds: number, error: string) {
  await db
    .update(letters)
    .set({ nextAt: sql`now() + make_interval(secs => ${seconds})`, lastError: error })
    .where(waitingAmong(ids));
}

export async function giveUpLetters(db: Database, ids: readonly string[], error: string): Promise<void> {
  await db.update(letters).set({ state: 'given-up', lastError: error }).where(waitingAmong(ids));
}

/** Given-up letters wait again, with all their tries; without `id`, all of them. @returns how many */
export async function sendLettersAgain(tx: Database, id: string | null): Promise<number> {
  const rows = await tx
    .update(letters)
    .set({ state: 'waiting', attempts: 0, nextAt: sql`now()` })
    .where(and(eq(letters.state, 'given-up'), id === null ? undefined : eq(letters.id, id)))
    .returning({ id: letters.id });
  if (rows.length > 0) await tx.execute(sql`select pg_notify(${LETTER_WAITING}, '')`);
  return rows.length;
}

export async function countLetters(db: Database): Promise<Readonly<Record<LetterState, number>>> {
  const rows = await db.select({ state: letters.state, n: count() }).from(letters).groupBy(letters.state);
  const counts = { waiting: 0, sent: 0, 'given-up': 0, 'kept-back': 0 };
  for (const { state, n } of rows) counts[state] = n;
  return counts;
}

/**
 * The latest letters first; never their content's secrets, which are not in the outbox.
 * @param before id of the last letter of the page before
 */
export async function listLetters(db: Database, state: LetterState | null, before: string | null, limit: number) {
  return db
    .select({
      id: letters.id,
      kind: letters.kind,
      payload: letters.payload,
      state: letters.state,
      attempts: letters.attempts,
      nextAt: letters.nextAt,
      lastError: letters.lastError,
      sentAt: letters.sentAt,
      createdAt: letters.createdAt,
      recipient: people.name,
      email: people.email,
      wish: people.letterWish,
    })
    .from(letters)
    .innerJoin(people, eq(people.id, letters.recipientId))
    .where(
      and(
        state ? eq(letters.state, state) : undefined,
        // Compared within the database: its moments are finer than JavaScript's.
        before
          ? sql`(${letters.createdAt}, ${letters.id}) < (select created_at, id from letters where id = ${before})`
          : undefined,
      ),
    )
    .orderBy(desc(letters.createdAt), desc(letters.id))
    .limit(limit);
}
export type ListedLetter = Awaited<ReturnType<typeof listLetters>>[number];
