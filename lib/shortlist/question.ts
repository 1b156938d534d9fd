/** The question of the shortlist as it stands in an address: texts as typed, what they mean, and what is wrong with them. */
import type { Text } from './number-text';
import { readNumber } from './number-text';
import { OFFERS, RANKINGS, Requirement, SHORTLIST_EQUATIONS } from './requirement';

export const QUESTION_FIELDS = Object.keys(Requirement.shape) as (keyof Requirement)[];

export interface Question {
  /** What is asked, defaults in the place of what is missing or wrong. */
  readonly asked: Requirement;
  /** As typed, for the fields. */
  readonly texts: Readonly<Record<keyof Requirement, string>>;
  /** Field to sentence; the question is not answered while there is one. */
  readonly faults: Readonly<Partial<Record<keyof Requirement, string>>>;
  /** Field to sentence: read, but perhaps not as meant. */
  readonly hints: Readonly<Partial<Record<keyof Requirement, string>>>;
}

const PART = 'Accepted: a part of the bound between 0.001 and 1, such as 0.8.';

function partOfBound(text: Text): number | string {
  const value = text.unit === '%' ? text.value / 100 : text.value;
  if (text.unit !== '' && text.unit !== '%') return `“${text.unit}” is not a part of the bound. ${PART}`;
  if (value <= 0) return `${text.value} of the bound moves nothing. ${PART}`;
  if (value > 100) return `${text.value} looks like a speed in m/s. ${PART}`;
  if (value > 1)
    return `${text.value} is past the bound, where every scheme grows. ${PART} ${value / 100} may be meant.`;
  return value < 0.001 ? `${text.value} of the bound is too slow to choose by. ${PART}` : value;
}

function errorPercent(text: Text): number | string {
  const accepted = 'Accepted: an error between 0.000001 % and 100 %, such as 5 %.';
  if (text.unit !== '' && text.unit !== '%') return `“${text.unit}” is not a part of the wave. ${accepted}`;
  if (text.value === 0) return `No grid has an error of zero. ${accepted}`;
  if (text.value < 0) return `An error cannot be negative. ${accepted}`;
  if (text.value > 100) return `At ${text.value} % nothing is left of the wave. ${accepted}`;
  return text.value < 1e-6 ? `${text.value} % is less than rounding leaves of a long run. ${accepted}` : text.value;
}

function duration(text: Text): number | string {
  const accepted = 'Accepted: between 0.01 and 1 000 000 wavelengths (for diffusion, e-foldings), such as 20.';
  if (text.unit !== '' && !/^(wave|wavelength|e-folding|period)s?$/.test(text.unit))
    return `“${text.unit}” is a unit of its own; the distance is counted in wavelengths here. ${accepted}`;
  if (text.value <= 0) return `A run goes some way. ${accepted}`;
  if (text.value > 1e6) return `${text.value} looks like a distance in metres. ${accepted}`;
  return text.value < 0.01
    ? `${text.value} of a wavelength is too short to tell schemes apart. ${accepted}`
    : text.value;
}

const NUMBER_FIELDS = { errorPercent, duration, slowest: partOfBound, fastest: partOfBound } as const;
const EXPECTED: Readonly<Record<keyof typeof NUMBER_FIELDS, string>> = {
  errorPercent: 'a number of per cent, such as 5 %',
  duration: 'a number of wavelengths, such as 20',
  slowest: 'a part of the bound, such as 0.3',
  fastest: 'a part of the bound, such as 0.8',
};

const CHOICES = {
  equation: SHORTLIST_EQUATIONS,
  dims: ['1', '2', '3'],
  orderAtLeast: ['0', '2', '4'],
  arraysAtMost: ['0', '1', '2', '3', '4', '5', '6', '7', '8', '9'],
  haloAtMost: Array.from({ length: 17 }, (_, k) => String(k)),
  bothSigns: ['yes', 'no'],
  coupling: ['explicit', 'any'],
  damping: ['any', 'none'],
  language: ['any', 'c', 'fortran', 'python'],
  offer: OFFERS,
  rank: RANKINGS,
} as const satisfies Record<Exclude<keyof Requirement, keyof typeof NUMBER_FIELDS>, readonly string[]>;

const DEFAULTS = Requirement.parse({});

/** @param valueOf the value of a name in the address, undefined where it is absent */
export function readQuestion(valueOf: (name: string) => string | undefined): Question {
  const faults: Partial<Record<keyof Requirement, string>> = {};
  const hints: Partial<Record<keyof Requirement, string>> = {};
  const asked: Record<string, unknown> = {};
  const texts = {} as Record<keyof Requirement, string>;

  for (const [name, read] of Object.entries(NUMBER_FIELDS) as [keyof typeof NUMBER_FIELDS, typeof duration][]) {
    const given = valueOf(name);
    texts[name] = given ?? String(DEFAULTS[name]);
    if (given === undefined) continue;
    const text = readNumber(given);
    const value = text === null ? missing(given, EXPECTED[name]) : read(text);
    if (typeof value === 'string') faults[name] = value;
    else asked[name] = value;
  }
  for (const [name, values] of Object.entries(CHOICES) as [keyof typeof CHOICES, readonly string[]][]) {
    const given = valueOf(name);
    texts[name] = given ?? String(DEFAULTS[name]);
    if (given === undefined) continue;
    if (values.includes(given)) asked[name] = given;
    else {
      faults[name] = `“${given}” is not a choice here. Accepted: ${values.join(', ')}.`;
      texts[name] = String(DEFAULTS[name]);
    }
  }
  const parsed = Requirement.safeParse(asked);
  if (!parsed.success && !faults.slowest)
    faults.slowest = 'The slowest speed is faster than the fastest. Accepted: slowest at most as fast as the fastest.';
  const requirement = parsed.success
    ? parsed.data
    : Requirement.parse({ ...asked, slowest: undefined, fastest: undefined });
  if (!faults.errorPercent && requirement.errorPercent < 0.1 && !(valueOf('errorPercent') ?? '').includes('%'))
    hints.errorPercent = `Read as ${requirement.errorPercent} per cent; as a part of one it would be ${requirement.errorPercent * 100} %.`;
  return { asked: requirement, texts, faults, hints };
}

const missing = (given: string, expected: string) =>
  given.trim() === ''
    ? `Nothing is given. Accepted: ${expected}.`
    : `“${given}” is not a number. Accepted: ${expected}.`;

/** The whole question as the query of an address, with some of it changed. */
export function questionQuery(asked: Requirement, change: Partial<Record<keyof Requirement, string>> = {}): string {
  const query = new URLSearchParams();
  for (const name of QUESTION_FIELDS) query.set(name, change[name] ?? String(asked[name]));
  return query.toString();
}
