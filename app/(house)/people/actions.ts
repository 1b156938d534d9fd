'use server';

import { revalidatePath } from 'next/cache';
import { z } from 'zod';
import { changeRole as changeRoleOf } from '@/lib/people/change-role';
import { closeAccount, openAccount } from '@/lib/people/close-account';
import { invite, inviteAgain } from '@/lib/people/invite';
import { Closing, Invitation, Opening, RoleChange } from '@/lib/people/person-input';
import { action } from '@/lib/web/action';

const shown = () => revalidatePath('/people');

const inviteAction = action(Invitation, async (actor, input) => {
  await invite(actor, input);
  shown();
  return { email: input.email };
});
export const invitePerson = async (form: FormData) => inviteAction(form);

const againAction = action(z.object({ personId: z.uuid() }), async (actor, { personId }) => {
  await inviteAgain(actor, personId);
  shown();
});
export const invitePersonAgain = async (form: FormData) => againAction(form);

const roleAction = action(RoleChange, async (actor, input) => {
  await changeRoleOf(actor, input);
  shown();
});
export const changeRole = async (form: FormData) => roleAction(form);

const closeAction = action(Closing, async (actor, { personId, reason }) => {
  await closeAccount(actor, personId, reason);
  shown();
});
export const closePerson = async (form: FormData) => closeAction(form);

const openAction = action(Opening, async (actor, { personId, reason }) => {
  await openAccount(actor, personId, reason);
  shown();
});
export const openPerson = async (form: FormData) => openAction(form);
