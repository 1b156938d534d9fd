'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { currentSession } from '@/lib/auth/current-actor';
import { changePassword as changePasswordOf } from '@/lib/people/change-password';
import { changeProfile } from '@/lib/people/change-profile';
import { endOwnSession } from '@/lib/people/end-own-session';
import { PASSWORD_LENGTH } from '@/lib/people/password-rule';
import { Profile } from '@/lib/people/person-input';
import { Refusal } from '@/lib/refusal';
import { action } from '@/lib/web/action';

const profileAction = action(Profile, async (actor, input) => {
  await changeProfile(actor, input);
  revalidatePath('/', 'layout');
});
export const saveProfile = async (form: FormData) => profileAction(form);

const Text = z.string().max(PASSWORD_LENGTH.max, `accepted: at most ${PASSWORD_LENGTH.max} characters`);
const passwordAction = action(z.object({ present: Text, password: Text }), async (actor, input) => {
  const session = await currentSession();
  if (!session) throw new Refusal('not-signed-in', 'You are signed out.');
  await changePasswordOf(actor, session.sessionId, input);
  revalidatePath('/profile');
});
export const changePassword = async (form: FormData) => passwordAction(form);

const endAction = action(z.object({ sessionId: z.uuid() }), async (actor, { sessionId }) => {
  await endOwnSession(actor, sessionId);
  revalidatePath('/profile');
});
export const endSession = async (form: FormData) => endAction(form);
