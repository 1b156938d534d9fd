import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { endLinks, findLink, takeLink } from '@/db/queries/links';
import { raiseSessionVersion, setPassword } from '@/db/queries/people';
import { endSessions } from '@/db/queries/sessions';
import { hashPassword } from '@/lib/auth/password';
import { Refusal } from '@/lib/refusal';
import { LINK_SECRET, type LinkPurpose } from './link';
import { hashOfSecret } from './link-secret';
import { passwordObstacle } from './password-rule';

export const DEMO_KEEPS_PASSWORD = 'The passwords of the demo’s people stay the one on the sign-in page.';

export interface LinkHolder {
  name: string;
  email: string;
}

/** Whose link it is, without using it: opening the page, as scanners of mail do, costs nothing. Null where it does not serve. */
export async function readLink(purpose: LinkPurpose, secret: string): Promise<LinkHolder | null> {
  if (!LINK_SECRET.test(secret)) return null;
  const found = await findLink(db, purpose, hashOfSecret(secret));
  return found && { name: found.name, email: found.email };
}

const noLink = () =>
  new Refusal('not-found', 'This link has been used, has run out, or was followed by a later letter. Ask for another.');

/**
 * Uses a link of a letter up to set a password. Every session and every other link of the person ends. Of several
 * that come at once with one link, one is served.
 * @returns the address to sign in with
 * @throws {Refusal} not-found where the link does not serve; invalid where the password may not be
 */
export async function redeemLink(purpose: LinkPurpose, secret: string, password: string): Promise<{ email: string }> {
  const hash = LINK_SECRET.test(secret) ? hashOfSecret(secret) : null;
  const holder = hash && (await findLink(db, purpose, hash));
  if (!hash || !holder) throw noLink();
  if (holder.demo) throw new Refusal('not-allowed', DEMO_KEEPS_PASSWORD);
  const obstacle = passwordObstacle(password, holder);
  if (obstacle) throw new Refusal('invalid', obstacle, { password: obstacle });

  const passwordHash = await hashPassword(password);
  await db.transaction(async (tx) => {
    const personId = await takeLink(tx, purpose, hash);
    if (!personId || !(await setPassword(tx, personId, passwordHash))) throw noLink();
    await endLinks(tx, personId);
    await raiseSessionVersion(tx, personId);
    await endSessions(tx, personId);
    const kind = purpose === 'invitation' ? 'person.joined' : 'person.password-reset';
    await insertEvent(tx, { kind, actorId: personId, subjectId: personId });
  });
  return { email: holder.email };
}
