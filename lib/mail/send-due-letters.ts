import 'server-only';
import type { Database } from '@/db/client';
import {
  type ClaimedLetter,
  claimDailyLetters,
  claimLetter,
  giveUpLetters,
  keepBackLetters,
  markLettersSent,
  postponeLetters,
} from '@/db/queries/letters';
import { insertLink } from '@/db/queries/links';
import { findPerson } from '@/db/queries/people';
import { LINK_HOURS, type LinkPurpose } from '@/lib/people/link';
import { hashOfSecret, newSecret } from '@/lib/people/link-secret';
import { type ComposedLetter, composeDailyLetter, composeLetter } from './compose-letter';
import type { Delivery, Post } from './deliver';
import { type Sender, letterContent } from './letter-content';
import { RESET_AGE_MOST_SECONDS, pauseAfter } from './retry';

/** Longer than any delivery may take; a letter of a worker that was lost is due again after it. */
const LEASE_SECONDS = 180;

export interface Round {
  sender: Sender;
  post: Post;
  demoMode: boolean;
  /** No further letter is taken up once it says so. */
  isOver: () => boolean;
}

/**
 * Sends what is due, one letter at a time, until nothing is left, the round is over, or the mail server is away.
 * Any number of workers may do so at once: each letter is taken up by one of them.
 * @returns number of letters that went out; a daily letter counts as one
 */
export async function sendDueLetters(db: Database, round: Round): Promise<number> {
  await keepBackLetters(db, round.demoMode);
  let sent = 0;
  while (!round.isOver()) {
    const outcome = (await sendNext(db, round)) ?? (await sendNextDaily(db, round));
    if (!outcome || outcome.kind === 'away') break;
    if (outcome.kind === 'accepted') sent++;
  }
  return sent;
}

async function sendNext(db: Database, { post, sender }: Round): Promise<Delivery | null> {
  const letter = await claimLetter(db, LEASE_SECONDS);
  if (!letter) return null;
  if (letter.kind === 'password-reset' && letter.ageSeconds > RESET_AGE_MOST_SECONDS)
    return settle(db, [letter], {
      kind: 'refused',
      reason: 'It waited for longer than a day and was of no use any more.',
    });
  const person = await personOf(db, letter.recipientId);
  let composed: ComposedLetter;
  try {
    composed = composeLetter(letter, person.name, sender, await secretFor(db, letter.kind, person.id));
  } catch (error) {
    return settle(db, [letter], unreadable(error));
  }
  return settle(db, [letter], await post.deliver(composed, person, messageId(letter.id, sender)));
}

async function sendNextDaily(db: Database, { post, sender }: Round): Promise<Delivery | null> {
  const claimed = await claimDailyLetters(db, LEASE_SECONDS);
  if (!claimed) return null;
  const person = await personOf(db, claimed.recipientId);
  const readable = [];
  const contents = [];
  for (const letter of claimed.letters)
    try {
      contents.push(letterContent(letter.kind, letter.payload, sender));
      readable.push(letter);
    } catch (error) {
      await settle(db, [letter], unreadable(error));
    }
  const [first] = readable;
  if (!first) return { kind: 'refused', reason: 'None of the letters of the day can be read.' };
  const composed = composeDailyLetter(contents, person.name, sender);
  return settle(db, readable, await post.deliver(composed, person, messageId(first.id, sender)));
}

async function personOf(db: Database, id: string) {
  const person = await findPerson(db, id);
  if (!person) throw new Error(`sendDueLetters: person ${id} is not in the database`);
  return person;
}

/** The secret is made as the letter goes out: none ever lies in the outbox. */
async function secretFor(db: Database, kind: ClaimedLetter['kind'], personId: string): Promise<string | null> {
  if (kind !== 'invitation' && kind !== 'password-reset') return null;
  const purpose: LinkPurpose = kind;
  const secret = newSecret();
  await insertLink(db, { purpose, personId, hash: hashOfSecret(secret), hours: LINK_HOURS[purpose] });
  return secret;
}

const unreadable = (error: unknown): Delivery => ({
  kind: 'refused',
  reason: `It could not be written: ${error instanceof Error ? error.message.slice(0, 300) : String(error)}`,
});

/** The same at every try, so that a mail system that was given a letter twice can tell. */
const messageId = (id: string, { origin }: Sender) => `<${id}@${new URL(origin).hostname}>`;

/** Writes down what became of letters that were sent together. */
async function settle(db: Database, letters: readonly ClaimedLetter[], delivery: Delivery): Promise<Delivery> {
  const ids = letters.map(({ id }) => id);
  if (delivery.kind === 'accepted') await markLettersSent(db, ids);
  else {
    const tries = Math.min(...letters.map(({ attempts }) => attempts));
    const pause = delivery.kind === 'refused' ? null : pauseAfter(tries);
    if (pause === null) await giveUpLetters(db, ids, delivery.reason);
    else await postponeLetters(db, ids, pause, delivery.reason);
  }
  return delivery;
}
