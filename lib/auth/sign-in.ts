import 'server-only';
import type { Database } from '@/db/client';
import { isDatabaseAway } from '@/db/errors';
import { findPersonByEmail } from '@/db/queries/people';
import { markAttemptSucceeded, reserveAttempt } from '@/db/queries/sign-in-attempts';
import type { SessionClaim } from './actor-of-session';
import { verifyPassword } from './password';
import type { SignInFailure } from './sign-in-answer';
import { SIGN_IN_LIMIT } from './sign-in-limit';

export interface SignInTry {
  email: string;
  password: string;
  /** Network address the try comes from. */
  address: string;
}
export type SignInOutcome = { kind: 'signed-in'; claim: SessionClaim } | SignInFailure;

/** Checks an e-mail address and a password within the limit of tries. */
export async function signIn(db: Database, attempt: SignInTry, demoMode: boolean): Promise<SignInOutcome> {
  const email = attempt.email.trim().toLowerCase().slice(0, 320);
  try {
    const reserved = await reserveAttempt(db, email, attempt.address, SIGN_IN_LIMIT);
    if (!reserved.allowed) return { kind: 'too-many', waitSeconds: reserved.waitSeconds };

    const found = await findPersonByEmail(db, email);
    // The demo's password is known to everyone: outside demo mode its accounts do not exist.
    const person = found?.demo && !demoMode ? null : found;
    const matches = await verifyPassword(person?.passwordHash ?? null, attempt.password);
    if (!person || !matches) return { kind: 'no-match', triesLeft: reserved.triesLeft };

    await markAttemptSucceeded(db, reserved.attemptId);
    if (person.disabledAt) return { kind: 'closed' };
    return { kind: 'signed-in', claim: { personId: person.id, sessionVersion: person.sessionVersion } };
  } catch (error) {
    if (isDatabaseAway(error)) return { kind: 'away' };
    throw error;
  }
}
