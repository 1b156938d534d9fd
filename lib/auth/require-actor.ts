import 'server-only';
import { headers } from 'next/headers';
import { redirect } from 'next/navigation';
import type { Actor } from '@/lib/people/actor';
import { type Role, includesRole } from '@/lib/people/role';
import { Refusal } from '@/lib/refusal';
import { safeCallbackUrl } from './callback-url';
import { currentActor } from './current-actor';

/**
 * For pages: the actor, or a redirect to sign-in that comes back here.
 * Actions and handlers do not use it: their frames (lib/web) answer instead of redirecting.
 * @throws {Refusal} with digest 'not-allowed', for the error page, where the role does not include `minRole`
 */
export async function requireActor(minRole: Role = 'reader'): Promise<Actor> {
  const actor = await currentActor();
  if (!actor) {
    const here = safeCallbackUrl((await headers()).get('x-path'));
    redirect(here === '/' ? '/sign-in' : `/sign-in?callbackUrl=${encodeURIComponent(here)}`);
  }
  if (!includesRole(actor.role, minRole))
    throw Object.assign(new Refusal('not-allowed', `This page is for the role ${minRole} and those above it.`), {
      digest: 'not-allowed',
    });
  return actor;
}
