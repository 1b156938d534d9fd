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

/** `kept-back`: written, and not sent because its reader wants none or has no open account. */
export const LETTER_STATES = ['waiting', 'sent', 'given-up', 'kept-back'] as const;
export type LetterState = (typeof LETTER_STATES)[number];

export const LETTER_WISHES = ['at-once', 'daily', 'none'] as const;
/** When a person wants letters; those of `goesOutAtOnce` do not ask. */
export type LetterWish = (typeof LETTER_WISHES)[number];

const AT_ONCE: readonly LetterKind[] = ['recall', 'invitation', 'password-reset'];
/** A recall may not wait, and the other two were asked for. */
export const goesOutAtOnce = (kind: LetterKind) => AT_ONCE.includes(kind);
