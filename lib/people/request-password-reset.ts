import 'server-only';
import { setTimeout } from 'node:timers/promises';
import { db } from '@/db/client';
import { insertLetters } from '@/db/queries/house';
import { findPersonByEmail } from '@/db/queries/people';
import { reserveAttempt } from '@/db/queries/sign-in-attempts';
import { Refusal } from '@/lib/refusal';
import { RESET_LIMIT, tooManyTries } from './reset-limit';

/** Every answer takes this long at least, so that its time does not tell which addresses have accounts. */
const ANSWER_MS = 250;

/**
 * Writes a letter with a link to choose a new password, where the address has an open account; says nothing of
 * whether it has. Somebody who never took up an invitation gets none: an administrator sends that again.
 * @param address network address that asks
 * @throws {Refusal} too-many, the same for every address
 */
export async function requestPasswordReset(email: string, address: string): Promise<void> {
  await Promise.all([setTimeout(ANSWER_MS), ask(email, address)]);
}

async function ask(email: string, address: string): Promise<void> {
  // A prefix keeps these apart from tries to sign in: asking for a new password locks nobody out.
  const reserved = await reserveAttempt(db, `reset ${email}`, `reset ${address}`, RESET_LIMIT);
  if (!reserved.allowed) throw new Refusal('too-many', tooManyTries(reserved.waitSeconds));
  const person = await findPersonByEmail(db, email);
  if (!person?.passwordHash || person.disabledAt) return;
  await insertLetters(db, 'password-reset', [person.id], {});
}
