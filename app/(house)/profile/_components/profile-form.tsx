'use client';

import { ActionForm } from '@/components/ui/action-form';
import { Choice, Field } from '@/components/ui/field';
import type { LetterWish } from '@/lib/mail/letter';
import { LETTER_WISH_WORDS } from '@/lib/mail/letter-words';
import { saveProfile } from '../actions';

export const ProfileForm = ({ name, letterWish }: { name: string; letterWish: LetterWish }) => (
  <ActionForm act={saveProfile} submit="Save" busy="Saving" done={() => 'Saved.'} label="Name and letters">
    <Field label="Name" name="name" defaultValue={name} autoComplete="name" maxLength={120} required />
    <Choice
      label="Letters"
      name="letterWish"
      words={LETTER_WISH_WORDS}
      defaultValue={letterWish}
      hint="One a day comes after six in the morning (UTC). Recalls of what your code uses always come at once."
    />
  </ActionForm>
);
