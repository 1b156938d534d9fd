import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { endLinks } from '@/db/queries/links';
import { findAccount, setPassword } from '@/db/queries/people';
import { endSessions } from '@/db/queries/sessions';
import { markAttemptSucceeded, reserveAttempt } from '@/db/queries/sign-in-attempts';
import { hashPassword, verifyPassword } from '@/lib/auth/password';
import { Refusal } from '@/lib/refusal';
import type { Actor } from './actor';
import { passwordObstacle } from './password-rule';
import { PRESENT_PASSWORD_LIMIT, tooManyTries } from './reset-limit';
import { DEMO_KEEPS_PASSWORD } from './redeem-link';

/**
 * Sets another password for the actor, who gives the present one. Their other sessions end, this one stays.
 * @throws {Refusal} invalid with the field at fault; too-many after five wrong present passwords
 */
export async function changePassword(
  actor: Actor,
  sessionId: string,
  { present, password }: { present: string; password: string },
): Promise<void> {
  const account = await findAccount(db, actor.id);
  if (!account) throw new Refusal('not-found', 'There is no such person.');
  if (account.demo) throw new Refusal('not-allowed', DEMO_KEEPS_PASSWORD);
  const obstacle = passwordObstacle(password, account);
  if (obstacle) throw new Refusal('invalid', obstacle, { password: obstacle });

  const key = `password of ${actor.id}`;
  const reserved = await reserveAttempt(db, key, key, PRESENT_PASSWORD_LIMIT);
  if (!reserved.allowed) throw new Refusal('too-many', tooManyTries(reserved.waitSeconds));
  if (!(await verifyPassword(account.passwordHash, present))) {
    const sentence = 'This is not your present password.';
    throw new Refusal('invalid', sentence, { present: sentence });
  }
  await markAttemptSucceeded(db, reserved.attemptId);

  const passwordHash = await hashPassword(password);
  await db.transaction(async (tx) => {
    await setPassword(tx, actor.id, passwordHash);
    await endSessions(tx, actor.id, sessionId);
    await endLinks(tx, actor.id);
    await insertEvent(tx, { kind: 'person.password-changed', actorId: actor.id, subjectId: actor.id });
  });
}
