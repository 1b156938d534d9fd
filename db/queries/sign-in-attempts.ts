import { and, eq, lt, or, sql } from 'drizzle-orm';
import type { Database } from '../client';
import { signInAttempts } from '../schema/people';

export interface SignInLimit {
  perEmail: number;
  perAddress: number;
  windowSeconds: number;
}

export type ReservedAttempt =
  | { allowed: true; attemptId: number; /** After this one, should it fail. */ triesLeft: number }
  | { allowed: false; waitSeconds: number };

/**
 * Reserves one try before the password is looked at: tries that come at once, to one instance or several,
 * are counted one after the other. A try counts as failed until `markAttemptSucceeded`.
 */
export async function reserveAttempt(db: Database, email: string, address: string, limit: SignInLimit) {
  return db.transaction(async (tx): Promise<ReservedAttempt> => {
    // E-mail first, then address, in every process: two locks in one order cannot wait for each other.
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${'sign-in e-mail ' + email}, 0))`);
    await tx.execute(sql`select pg_advisory_xact_lock(hashtextextended(${'sign-in address ' + address}, 0))`);
    const ofEmail = await readFailures(tx, eq(signInAttempts.email, email), limit, limit.perEmail, true);
    const ofAddress = await readFailures(tx, eq(signInAttempts.address, address), limit, limit.perAddress, false);
    const waitSeconds = Math.max(ofEmail.waitSeconds, ofAddress.waitSeconds);
    if (waitSeconds > 0) return { allowed: false, waitSeconds };

    await tx
      .delete(signInAttempts)
      .where(
        and(
          or(eq(signInAttempts.email, email), eq(signInAttempts.address, address)),
          lt(signInAttempts.at, sql`now() - interval '1 day'`),
        ),
      );
    const [attempt] = await tx.insert(signInAttempts).values({ email, address }).returning({ id: signInAttempts.id });
    if (!attempt) throw new Error('reserveAttempt: the inserted row did not come back');
    const triesLeft = Math.min(limit.perEmail - ofEmail.count, limit.perAddress - ofAddress.count) - 1;
    return { allowed: true, attemptId: attempt.id, triesLeft };
  });
}

/** Failures within the window, and the seconds until the one that fills the limit is forgotten (0: not full). */
async function readFailures(
  db: Database,
  whose: ReturnType<typeof eq>,
  { windowSeconds }: SignInLimit,
  most: number,
  sinceSuccess: boolean,
) {
  const window = sql`make_interval(secs => ${windowSeconds})`;
  const lastSuccess = sinceSuccess
    ? sql`(select max(${signInAttempts.at}) from ${signInAttempts} where ${whose} and ${signInAttempts.succeeded})`
    : sql`null::timestamptz`;
  // clock_timestamp: now() stands still within a transaction, and this one may have waited for its turn.
  const { rows } = await db.execute<{ count: number; wait: number }>(sql`
    select count(*)::int as count,
      coalesce(ceil(extract(epoch from
        (array_agg(at order by at desc))[${most}::int] + ${window} - clock_timestamp())), 0)::int as wait
    from ${signInAttempts}
    where ${whose} and not ${signInAttempts.succeeded}
      and ${signInAttempts.at} > greatest(clock_timestamp() - ${window}, ${lastSuccess})`);
  const row = rows[0] ?? { count: 0, wait: 0 };
  return { count: row.count, waitSeconds: row.count >= most ? Math.max(1, row.wait) : 0 };
}

export async function markAttemptSucceeded(db: Database, attemptId: number) {
  await db
    .update(signInAttempts)
    .set({ succeeded: true, at: sql`clock_timestamp()` })
    .where(eq(signInAttempts.id, attemptId));
}
