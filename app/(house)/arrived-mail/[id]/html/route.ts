import { db } from '@/db/client';
import { findCaughtLetter } from '@/db/queries/caught-letters';
import { env } from '@/lib/env';
import { includesRole } from '@/lib/people/role';
import { Refusal } from '@/lib/refusal';
import { route } from '@/lib/web/route';

/** A caught letter as its reader would see it; no script of it runs, and nothing is fetched for it. */
export const GET = route<{ id: string }>(async ({ actor, params }) => {
  if (!includesRole(actor.role, 'administrator'))
    throw new Refusal('not-allowed', 'Only an administrator reads caught letters.');
  const id = Number(params.id);
  const isKnown = env().LEVELBOOK_MAIL_CATCHER && Number.isSafeInteger(id) && id > 0;
  const letter = isKnown ? await findCaughtLetter(db, id) : null;
  if (!letter) throw new Refusal('not-found', 'There is no such letter.');
  return new Response(letter.html, {
    headers: {
      'Content-Type': 'text/html; charset=utf-8',
      'Content-Security-Policy':
        "sandbox allow-top-navigation-by-user-activation; default-src 'none'; style-src 'unsafe-inline'",
      'Cache-Control': 'no-store',
    },
  });
});
