import 'server-only';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { type LetterKind, goesOutAtOnce } from './letter';
import { type LetterContent, type Sender, letterContent } from './letter-content';
import { type Forms, filled, framed, joined, oneLine } from './letter-text';

const loaded = new Map<string, string>();

/** @throws {Error} naming the file where it is missing (the process must run in the project's root) */
function template(name: string): string {
  const present = loaded.get(name);
  if (present !== undefined) return present;
  const text = readFileSync(path.join(/* turbopackIgnore: true */ process.cwd(), 'templates/mail', name), 'utf8');
  loaded.set(name, text);
  return text;
}

const templates = (name: string): Forms => ({ text: template(`${name}.txt`), html: template(`${name}.html`) });
const bodyOf = ({ shape, view }: LetterContent) => filled(shape, templates(shape), view);

export interface ComposedLetter extends Forms {
  subject: string;
}

const REASON = {
  recall: 'A recall goes at once to everyone whose code uses the revision. Your profile:',
  invitation: 'You have this letter because somebody gave your address. Your profile, once you are in:',
  'password-reset': 'You have this letter because somebody gave your address. Your profile:',
  wished: 'You have letters sent at once. One a day, or none, can be chosen in your profile:',
  daily: 'You have one letter a day, after six in the morning (UTC). The other choices are in your profile:',
};
const reasonOf = (kind: LetterKind) => REASON[goesOutAtOnce(kind) ? (kind as 'recall') : 'wished'];

const withFrame = (subject: string, body: Forms, name: string, { origin, office }: Sender, reason: string) => ({
  subject: oneLine(subject),
  ...framed(
    templates('frame'),
    {
      name: oneLine(name),
      office: office ? `Levelbook of ${office}` : 'Levelbook',
      reason,
      profileUrl: `${origin}/profile`,
    },
    body,
  ),
});

/**
 * @param name   of its reader
 * @param secret of the link that it carries, where its kind has one
 * @throws {z.ZodError} where the payload is not that of its kind
 */
export function composeLetter(
  { kind, payload }: { kind: LetterKind; payload: unknown },
  name: string,
  sender: Sender,
  secret: string | null = null,
): ComposedLetter {
  const content = letterContent(kind, payload, sender, secret);
  return withFrame(content.subject, bodyOf(content), name, sender, reasonOf(kind));
}

/** One letter with everything that waited for it, in the order it was written; at least one. */
export function composeDailyLetter(contents: readonly LetterContent[], name: string, sender: Sender): ComposedLetter {
  const subject = contents.length === 1 ? contents[0]!.subject : `${contents.length} letters of the day in one`;
  return withFrame(subject, joined(templates('daily'), contents.map(bodyOf)), name, sender, REASON.daily);
}
