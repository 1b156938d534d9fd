'use client';

import { ActionForm } from '@/components/ui/action-form';
import { Field } from '@/components/ui/field';
import { askForPassword } from '../actions';

/** Asks for a letter; the answer is the same whether the address has an account or not. */
export const AskForm = () => (
  <ActionForm
    act={askForPassword}
    submit="Send me a letter"
    busy="Asking"
    done={() => 'If this address has an account, a letter with a link is on its way. The link serves for two hours.'}
  >
    <Field label="E-mail address" name="email" type="email" autoComplete="username" maxLength={254} required />
  </ActionForm>
);
