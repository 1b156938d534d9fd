import type { EventKind } from './event';

/** What somebody did, to be read after their name and before what it was done to. */
export const EVENT_WORDS: Readonly<Record<EventKind, string>> = {
  'draft.created': 'began',
  'draft.saved': 'saved',
  'attachment.added': 'attached a file to',
  'attachment.removed': 'took a file from',
  'revision.submitted': 'submitted',
  'revision.taken-back': 'took back',
  'revision.signed': 'signed',
  'revision.returned': 'returned',
  'revision.vetted': 'vetted',
  'revision.superseded': 'superseded',
  'revision.withdrawn': 'withdrew',
  'trial.queued': 'asked for a trial of',
  'trial.finished': 'finished a trial of',
  'adoption.recorded': 'recorded the use of',
  'remark.written': 'remarked on',
  'remark.answered': 'answered a remark on',
  'remark.settled': 'settled a remark on',
  'remark.reopened': 'reopened a remark on',
  'person.added': 'added',
  'person.invited': 'invited',
  'person.joined': 'took up the invitation of',
  'person.renamed': 'renamed',
  'person.role-changed': 'changed the role of',
  'person.disabled': 'closed the account of',
  'person.opened': 'opened the account of',
  'person.password-changed': 'changed the password of',
  'person.password-reset': 'set a new password for',
  'person.signed-out-everywhere': 'ended every session of',
  'letter.sent-again': 'sent letters again',
  'demo.filled': 'filled the book with the demo',
};

/** Words for any kind, one of a later version of the book too. */
export const eventWords = (kind: string): string =>
  Object.hasOwn(EVENT_WORDS, kind) ? EVENT_WORDS[kind as EventKind] : kind.replace('.', ': ');

/** The same where somebody did it to their own account, whose name is not said twice. */
export const ownEventWords = (kind: string): string => eventWords(kind).replace(/ (of|for)$/, '');

/** The particulars of an event in a few words: "from reader to maintainer". */
export function eventDetail(data: Readonly<Record<string, unknown>>): string {
  const parts: string[] = [];
  const text = (key: string) => {
    const value = data[key];
    return typeof value === 'string' || typeof value === 'number' ? String(value) : null;
  };
  if (text('from') && text('to')) parts.push(`from ${text('from')} to ${text('to')}`);
  if (text('role')) parts.push(`as ${text('role')}`);
  if (text('code')) parts.push(`in ${text('code')}`);
  if (text('part')) parts.push(`at ${text('part')}`);
  if (text('state')) parts.push(String(text('state')));
  if (text('count')) parts.push(`${text('count')} of them`);
  return parts.join(', ');
}
