/** What part of the ledger is asked for: address bar ↔ filter. */
import { z } from 'zod';
import { EVENT_KINDS } from './event';

/** The nouns that the ledger tells of: "revision", "person", … */
export const EVENT_NOUNS = [...new Set(EVENT_KINDS.map((kind) => kind.split('.')[0]!))];

const DAY = 'accepted: a day such as 2026-11-30';
const Day = z.iso.date(DAY);
const WHAT: readonly string[] = [...EVENT_NOUNS, ...EVENT_KINDS];

const FIELDS = {
  /** Id of a person, or "house" where the house itself acted. */
  who: z
    .string()
    .refine((text) => text === 'house' || z.uuid().safeParse(text).success, 'accepted: somebody of this house'),
  /** A noun or a kind. */
  what: z.string().refine((text) => WHAT.includes(text), 'accepted: one of the list'),
  /** Address of an entry. */
  about: z.string().regex(/^[a-z0-9-]{1,80}$/, 'accepted: the address of an entry, such as leapfrog-central-2'),
  /** Words of the reason. */
  why: z.string().max(200, 'accepted: at most 200 characters'),
  from: Day,
  /** This day included. */
  to: Day,
  /** Id of the last event of the page before. */
  before: z.coerce.number('accepted: the number of an event').int().positive(),
} as const;

export type LedgerFilter = { [K in keyof typeof FIELDS]?: z.output<(typeof FIELDS)[K]> };
export const FILTER_NAMES = Object.keys(FIELDS) as (keyof typeof FIELDS)[];
export const FILTER_TITLE: Readonly<Record<keyof typeof FIELDS, string>> = {
  who: 'Who',
  what: 'What',
  about: 'About',
  why: 'Why',
  from: 'From',
  to: 'To',
  before: 'Before',
};

/** Reads a query; what cannot be read is left out, and told of in a sentence each. */
export function readLedgerFilter(query: (name: string) => string | null | undefined) {
  const filter: Record<string, unknown> = {};
  const problems: string[] = [];
  for (const name of FILTER_NAMES) {
    const text = query(name)?.trim();
    if (!text) continue;
    const parsed = FIELDS[name].safeParse(text);
    if (parsed.success) filter[name] = parsed.data;
    else problems.push(`${FILTER_TITLE[name]}: ${parsed.error.issues[0]?.message ?? 'cannot be read'}.`);
  }
  return { filter: filter as LedgerFilter, problems };
}

/** The query of a filter, with changes; `null` takes a condition away. */
export function ledgerQuery(
  filter: LedgerFilter,
  changes: { [K in keyof LedgerFilter]?: LedgerFilter[K] | null } = {},
) {
  const query = new URLSearchParams();
  for (const name of FILTER_NAMES) {
    const value = name in changes ? changes[name] : filter[name];
    if (value !== undefined && value !== null) query.set(name, String(value));
  }
  const text = query.toString();
  return text && `?${text}`;
}
