/** A coefficient table as the sketch edits it: sites with weights, the newest level on the left of the equals sign. */
import type { TableScheme } from '@/lib/entries/definition';
import { negatedExpression } from '@/lib/entries/negated-expression';
import { newestLevel } from '@/lib/entries/scheme-formula';
import { parseRational, toNumber } from '@/lib/numerics/rational';

export interface Site {
  /** 1 is the level being computed. */
  readonly level: number;
  /** One component per dimension. */
  readonly offset: readonly number[];
  /** Coefficient on the newest level, its negative on the others: as the formula is written. */
  readonly weight: string;
  /** Place of its term in the definition. */
  readonly index: number;
}

type Term = TableScheme['terms'][number];

const numberOf = (text: string): number => {
  try {
    return toNumber(parseRational(text));
  } catch {
    return Number.NaN;
  }
};
const offsetOf = ({ offset }: Term) => (Array.isArray(offset) ? offset : [offset]).map(numberOf);
const rationalText = (value: number) => (Number.isInteger(value) ? String(value) : `${value * 2}/2`);

export const siteKey = (level: number, offset: readonly number[]) => `${level}:${offset.join(',')}`;

/** Sites as the sketch is read: newest level first, then from left to right. Terms that cannot be placed are left out. */
export function sitesOf({ terms }: TableScheme): Site[] {
  const shift = terms.every(({ level }) => Number.isFinite(numberOf(level))) ? newestLevel(terms) - 1 : 0;
  return terms
    .map((term, index) => {
      const level = numberOf(term.level) - shift;
      return {
        level,
        offset: offsetOf(term),
        weight: level === 1 ? term.coefficient : negatedExpression(term.coefficient),
        index,
      };
    })
    .filter(({ level, offset }) => Number.isFinite(level) && offset.every(Number.isFinite))
    .sort((a, b) => b.level - a.level || b.offset.reduce((order, x, k) => order || (a.offset[k] ?? 0) - x, 0));
}

/** The table with a new weight at one of its sites. */
export function withWeight(definition: TableScheme, site: Site, weight: string): TableScheme {
  const coefficient = site.level === 1 ? weight : negatedExpression(weight);
  return {
    ...definition,
    terms: definition.terms.map((term, k) => (k === site.index ? { ...term, coefficient } : term)),
  };
}

/** The table with a site read that was not, or let go that was. The computed point stays. */
export function withSiteTurned(definition: TableScheme, level: number, offset: readonly number[]): TableScheme {
  const sites = sitesOf(definition);
  const present = sites.find((site) => siteKey(site.level, site.offset) === siteKey(level, offset));
  if (present) {
    if (isComputed(level, offset)) return definition;
    return { ...definition, terms: definition.terms.filter((_, k) => k !== present.index) };
  }
  const shift = newestLevel(definition.terms) - 1;
  const texts = offset.map(rationalText);
  return {
    ...definition,
    terms: [
      ...definition.terms,
      {
        level: rationalText(level + shift),
        offset: texts.length === 1 ? (texts[0] ?? '0') : texts,
        coefficient: isComputed(level, offset) ? '1' : '0',
      },
    ],
  };
}

export const isComputed = (level: number, offset: readonly number[]) => level === 1 && offset.every((by) => by === 0);

const half = (size: number) => (Number.isInteger(size) ? String(size) : `${Math.floor(size) || ''}½`);
const step = (letter: string, by: number) =>
  by === 0 ? letter : `${letter} ${by > 0 ? '+' : '−'} ${half(Math.abs(by))}`;
const AXES = ['i', 'j', 'k'];

/** "n − 1, i + 1" */
export const siteName = (level: number, offset: readonly number[]) =>
  [step('n', level), ...offset.map((by, axis) => step(AXES[axis] ?? 'i', by))].join(', ');

/** "n minus 1, i plus 1", for the voice. */
export const spokenSite = (level: number, offset: readonly number[]) =>
  siteName(level, offset)
    .replaceAll('−', 'minus')
    .replaceAll('+', 'plus')
    .replace(/(\d)½/g, '$1 and a half')
    .replace('½', 'a half');

/** As it is set beside a point: "−(1 − 2λ)". */
export const prettyWeight = (text: string) =>
  text
    .replace(/\*\*/g, '^')
    .replace(/\blambda\b/g, 'λ')
    .replace(/\blambda_([xyz])\b/g, 'λ$1')
    .replace(/\bsigma\b/g, 'σ')
    .replace(/\bmu\b/g, 'μ')
    .replace(/\^2\b/g, '²')
    .replace(/\^3\b/g, '³')
    .replace(/\^4\b/g, '⁴')
    .replace(/(?<=[\w)²³⁴λσμ])\*(?=[\wλσμ(])/g, '')
    .replace(/-/g, '−');
