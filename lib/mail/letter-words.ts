import type { LetterKind, LetterState, LetterWish } from './letter';

export const LETTER_KIND_WORDS: Readonly<Record<LetterKind, string>> = {
  submitted: 'submission',
  returned: 'return',
  vetted: 'vetting',
  remark: 'remark',
  recall: 'recall',
  invitation: 'invitation',
  'password-reset': 'new password',
};

export const LETTER_STATE_WORDS: Readonly<Record<LetterState, string>> = {
  waiting: 'waiting',
  sent: 'sent',
  'given-up': 'given up',
  'kept-back': 'kept back',
};

export const LETTER_WISH_WORDS: Readonly<Record<LetterWish, string>> = {
  'at-once': 'at once',
  daily: 'one a day',
  none: 'none',
};

/** What a letter is about, as far as its payload says. */
export function letterSubject(payload: Readonly<Record<string, unknown>>): string {
  const { title, number } = payload;
  return typeof title === 'string' ? `${title}${typeof number === 'number' ? `, revision ${number}` : ''}` : '';
}
