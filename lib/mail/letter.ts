/** What letters the house writes, and where they stand in the outbox. */
export const LETTER_KINDS = [
  'submitted',
  'returned',
  'vetted',
  'remark',
  'recall',
  'invitation',
  'password-reset',
] as const;
export type LetterKind = (typeof LETTER_KINDS)[number];

export const LETTER_STATES = ['waiting', 'sent', 'given-up'] as const;
export type LetterState = (typeof LETTER_STATES)[number];
