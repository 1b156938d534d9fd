'use client';

import { signIn } from 'next-auth/react';
import { ActionForm, type FormAnswer } from '@/components/ui/action-form';
import { Field } from '@/components/ui/field';
import { PASSWORD_LENGTH } from '@/lib/people/password-rule';

interface ChoosePasswordFormProps {
  act: (form: FormData) => Promise<FormAnswer<{ email: string }>>;
  secret: string;
  email: string;
  submit: string;
}

/** Uses the link of a letter by a button: opening the page alone, as scanners of mail do, uses nothing up. */
export function ChoosePasswordForm({ act, secret, email, submit }: ChoosePasswordFormProps) {
  const enter = async (form: FormData) => {
    const password = String(form.get('password'));
    const answer = await signIn('credentials', { email, password, redirect: false }).catch(() => undefined);
    // A whole page load: everything that was kept for nobody is asked for anew.
    window.location.assign(answer?.ok ? '/' : '/sign-in');
  };
  return (
    <ActionForm
      act={act}
      submit={submit}
      busy="One moment"
      done={() => 'Your password is set; signing in.'}
      onDone={(_, form) => void enter(form)}
    >
      <input type="hidden" name="secret" value={secret} />
      {/* For those who keep passwords: the name that this one belongs to. */}
      <Field label="E-mail address" name="username" type="email" autoComplete="username" value={email} readOnly />
      <Field
        label="Password"
        name="password"
        type="password"
        autoComplete="new-password"
        maxLength={PASSWORD_LENGTH.max}
        hint={`At least ${PASSWORD_LENGTH.min} characters; a few words in a row do well.`}
        required
      />
    </ActionForm>
  );
}
