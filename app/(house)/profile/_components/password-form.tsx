'use client';

import { ActionForm } from '@/components/ui/action-form';
import { Field } from '@/components/ui/field';
import { PASSWORD_LENGTH } from '@/lib/people/password-rule';
import { changePassword } from '../actions';

export const PasswordForm = () => (
  <ActionForm
    act={changePassword}
    submit="Change the password"
    busy="Changing"
    look="plain"
    done={() => 'Changed. Your other sessions have ended.'}
    empties
    label="Password"
  >
    <Field
      label="Present password"
      name="present"
      type="password"
      autoComplete="current-password"
      maxLength={PASSWORD_LENGTH.max}
      required
    />
    <Field
      label="New password"
      name="password"
      type="password"
      autoComplete="new-password"
      maxLength={PASSWORD_LENGTH.max}
      hint={`At least ${PASSWORD_LENGTH.min} characters; a few words in a row do well.`}
      required
    />
  </ActionForm>
);
