/** What a letter says: its payload in the outbox → the values for its template. */
import { z } from 'zod';
import type { View } from '@/lib/codegen/kernel-source';
import { LINK_HOURS, type LinkPurpose } from '@/lib/people/link';
import type { LetterKind } from './letter';

/** The house that writes: the address people type, without a slash at its end, and its name where it has one. */
export interface Sender {
  origin: string;
  office: string | null;
}

/** Name of a pair of templates in templates/mail. */
export const LETTER_SHAPES = [
  'submitted',
  'returned',
  'vetted',
  'remark',
  'superseded',
  'withdrawn',
  'invitation',
  'password-reset',
] as const;
export type LetterShape = (typeof LETTER_SHAPES)[number];

export interface LetterContent {
  shape: LetterShape;
  subject: string;
  /** Where the letter leads. */
  url: string;
  /** The values of the templates' holes, as they are: whoever fills HTML escapes them. */
  view: View;
}

const Revision = z.object({ revisionId: z.uuid(), slug: z.string(), number: z.number(), title: z.string() });
const Decision = Revision.extend({ sentence: z.string() });
const Codes = z.array(z.string()).default([]);

const PAYLOADS = {
  submitted: Revision.extend({ author: z.string() }),
  returned: Decision,
  vetted: Decision,
  remark: Revision.extend({ author: z.string(), part: z.string(), text: z.string() }),
  recall: z.discriminatedUnion('kind', [
    Decision.extend({ kind: z.literal('superseded'), replacedByNumber: z.number(), codes: Codes }),
    Decision.extend({ kind: z.literal('withdrawn'), useInstead: z.string().nullish(), codes: Codes }),
  ]),
  invitation: z.object({ by: z.string(), role: z.string() }),
  'password-reset': z.object({}),
} satisfies Record<LetterKind, z.ZodType>;

const codesText = (codes: readonly string[]) =>
  codes.length > 0 ? [...new Set(codes)].sort().join(', ') : 'your code';
const hoursText = (hours: number) => (hours % 24 === 0 ? `${hours / 24} days` : `${hours} hours`);

/**
 * @param secret of a link made for this letter; needed by those that carry one
 * @throws {z.ZodError} where the payload is not that of its kind
 */
export function letterContent(
  kind: LetterKind,
  payload: unknown,
  { origin, office }: Sender,
  secret: string | null = null,
): LetterContent {
  const link = (place: string, purpose: LinkPurpose) => {
    if (secret === null) throw new RangeError(`letterContent: a letter of kind ${purpose} needs a secret`);
    return { url: `${origin}/${place}/${secret}`, lasts: hoursText(LINK_HOURS[purpose]) };
  };
  const house = office ? `the Levelbook of ${office}` : 'Levelbook';

  switch (kind) {
    case 'submitted': {
      const { revisionId, number, title, author } = PAYLOADS.submitted.parse(payload);
      const url = `${origin}/reviews/${revisionId}`;
      return {
        shape: 'submitted',
        subject: `To review: ${title}, revision ${number}`,
        url,
        view: { title, number: String(number), author, url },
      };
    }
    case 'returned': {
      const { revisionId, number, title, sentence } = PAYLOADS.returned.parse(payload);
      const url = `${origin}/drafts/${revisionId}`;
      return {
        shape: 'returned',
        subject: `Returned: ${title}, revision ${number}`,
        url,
        view: { title, number: String(number), sentence, url },
      };
    }
    case 'vetted': {
      const { slug, number, title, sentence } = PAYLOADS.vetted.parse(payload);
      const url = `${origin}/sheets/${slug}/${number}`;
      return {
        shape: 'vetted',
        subject: `Vetted: ${title}, revision ${number}`,
        url,
        view: { title, number: String(number), sentence, url },
      };
    }
    case 'remark': {
      const { slug, number, title, author, part, text } = PAYLOADS.remark.parse(payload);
      const url = `${origin}/sheets/${slug}/${number}#remarks`;
      return {
        shape: 'remark',
        subject: `Remark on ${title}, revision ${number}`,
        url,
        view: { title, number: String(number), author, part, text, url },
      };
    }
    case 'recall':
      return recallContent(PAYLOADS.recall.parse(payload), origin);
    case 'invitation': {
      const { by, role } = PAYLOADS.invitation.parse(payload);
      const { url, lasts } = link('invitation', 'invitation');
      return {
        shape: 'invitation',
        subject: `${by} invites you to ${house}`,
        url,
        view: { by, house, role: `${/^[aeiou]/.test(role) ? 'an' : 'a'} ${role}`, url, lasts },
      };
    }
    case 'password-reset': {
      PAYLOADS['password-reset'].parse(payload);
      const { url, lasts } = link('reset', 'password-reset');
      return { shape: 'password-reset', subject: 'A new password for Levelbook', url, view: { url, lasts } };
    }
  }
}

function recallContent(recall: z.output<(typeof PAYLOADS)['recall']>, origin: string): LetterContent {
  const { slug, number, title, sentence } = recall;
  const url = `${origin}/sheets/${slug}/${number}`;
  const common = { title, number: String(number), codes: codesText(recall.codes), sentence, url };
  if (recall.kind === 'superseded')
    return {
      shape: 'superseded',
      subject: `Recall: ${title}, revision ${number} is superseded`,
      url,
      view: {
        ...common,
        next: String(recall.replacedByNumber),
        nextUrl: `${origin}/sheets/${slug}/${recall.replacedByNumber}`,
      },
    };
  return {
    shape: 'withdrawn',
    subject: `Recall: ${title}, revision ${number} is withdrawn`,
    url,
    view: { ...common, instead: recall.useInstead ? [{ insteadUrl: `${origin}/sheets/${recall.useInstead}` }] : [] },
  };
}
