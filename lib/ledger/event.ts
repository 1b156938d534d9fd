/** What the ledger tells of: noun, full stop, what became of it. */
export const EVENT_KINDS = [
  'draft.created',
  'draft.saved',
  'revision.submitted',
  'revision.taken-back',
  'revision.signed',
  'revision.returned',
  'revision.vetted',
  'revision.superseded',
  'revision.withdrawn',
  'trial.queued',
  'trial.finished',
  'adoption.recorded',
  'remark.written',
  'person.added',
  'person.signed-out-everywhere',
  'person.role-changed',
  'person.disabled',
  'demo.filled',
] as const;
export type EventKind = (typeof EVENT_KINDS)[number];
