'use client';

import { ActionForm } from '@/components/ui/action-form';
import { Choice, Field } from '@/components/ui/field';
import { ROLES } from '@/lib/people/role';
import { invitePerson } from '../actions';

const WORDS = Object.fromEntries(ROLES.map((role) => [role, role]));

/** Invites somebody by a letter with a link. */
export const InviteForm = () => (
  <ActionForm
    act={invitePerson}
    submit="Send the invitation"
    busy="Sending"
    done={({ email }) => `The letter to ${email} is on its way.`}
    empties
    label="Invite somebody"
    className="form inrow"
  >
    <Field label="Name" name="name" autoComplete="off" maxLength={120} required />
    <Field label="E-mail address" name="email" type="email" autoComplete="off" maxLength={254} required />
    <Choice label="Role" name="role" words={WORDS} defaultValue="reader" />
  </ActionForm>
);
