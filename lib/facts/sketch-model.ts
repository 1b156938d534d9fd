/** What the large sketch of a sheet shows, worked out from the canonical scheme and its facts. */
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { coefficientText } from '@/lib/numerics/coefficient-text';
import { constant, neg as negate, type Polynomial } from '@/lib/numerics/polynomial';
import { ONE, toNumber } from '@/lib/numerics/rational';
import type { SchemeFacts, StencilFacts } from './facts';
import { signed, symbolText } from './reading-texts';

export interface SketchSite {
  /** 1 is the level being computed. */
  readonly level: number;
  readonly offset: readonly number[];
  readonly role: 'computed' | 'coupled' | 'known';
  /** Beside the point; null where it would be too long to read there. */
  readonly weight: string | null;
}

export interface SketchModel {
  readonly dims: 1 | 2 | 3;
  /** Newest first. */
  readonly levels: readonly { readonly level: number; readonly label: string; readonly array: string | null }[];
  readonly sites: readonly SketchSite[];
  readonly halo: readonly [number, number];
  /** The array of the oldest level is written again as the newest. */
  readonly reused: boolean;
  readonly stages: number;
  /** Level of the unread site where the levels can part; null where there is no second mode. */
  readonly partsAt: number | null;
  /** Explicit transport: slope of the path of the signal, offset a level, and the parameter it belongs to. */
  readonly path: { readonly symbol: string; readonly value: number } | null;
  readonly sentence: string;
}

const WEIGHT_LENGTH = 9;

export function levelLabel(level: number): string {
  if (level === 0) return 'n';
  const size = Math.abs(level);
  const text = Number.isInteger(size) ? String(size) : `${Math.floor(size) || ''}½`;
  return `n ${level > 0 ? '+' : '−'} ${text}`;
}

const short = (text: string) => (text.length <= WEIGHT_LENGTH ? text : null);

function weightText(
  coefficient: Polynomial,
  newest: Polynomial | undefined,
  symbols: readonly string[],
): string | null {
  const isOne =
    newest?.length === 1 && newest[0]!.powers.every((power) => power === 0) && newest[0]!.re.num === newest[0]!.re.den;
  return isOne ? short(coefficientText(negate(coefficient), symbols)) : null;
}

const ARRAYS = 'ABCDEFGH';

/** Array letters, oldest level first in the alphabet; the newest takes the oldest's where it is written in place. */
function arraysOf(levels: readonly number[], inPlace: boolean): (string | null)[] {
  const older = levels.slice(1);
  const letters = older.map((_, k) => ARRAYS[older.length - 1 - k] ?? null);
  return [inPlace ? (letters.at(-1) ?? null) : (ARRAYS[older.length] ?? null), ...letters];
}

function spokenOffset(offset: number): string {
  if (offset === 0) return 'i';
  return `i ${offset > 0 ? 'plus' : 'minus'} ${Math.abs(offset)}`;
}

function sentenceOf(
  sites: readonly SketchSite[],
  levels: readonly { level: number; label: string }[],
  reused: boolean,
): string {
  const read = levels
    .filter(({ level }) => level !== 1)
    .map(({ level, label }) => {
      const at = sites
        .filter((site) => site.role === 'known' && site.level === level)
        .map((site) => (site.offset.length === 1 ? spokenOffset(site.offset[0]!) : `(${site.offset.join(', ')})`));
      return at.length === 0
        ? null
        : `from ${at.join(', ')} at level ${label.replace('−', 'minus').replace('+', 'plus')}`;
    })
    .filter((part) => part !== null);
  const together = sites.some((site) => site.role === 'coupled') ? ', solved together with its neighbours' : '';
  return `The point at level n plus 1 is computed ${read.join(', and ')}${together}.${reused ? ' The new level overwrites the oldest.' : ''}`;
}

/** @param at value of the first parameter at which the path of the signal is drawn */
export function schemeSketch(scheme: ScalarScheme, facts: SchemeFacts, at: number | null, stages: number): SketchModel {
  const symbols = scheme.parameters.map(symbolText);
  const newestTerm = scheme.terms.find((term) => toNumber(term.level) === 1 && term.offset.every((o) => o.num === 0n));
  const one = constant(scheme.parameters.length, ONE);
  const sites = scheme.terms.map((term): SketchSite => {
    const level = toNumber(term.level);
    const offset = term.offset.map(toNumber);
    const role = level !== 1 ? 'known' : offset.every((o) => o === 0) ? 'computed' : 'coupled';
    return {
      level,
      offset,
      role,
      weight:
        role === 'known' && stages <= 1 ? weightText(term.coefficient, newestTerm?.coefficient ?? one, symbols) : null,
    };
  });
  const numbers = [...new Set(sites.map((site) => site.level))];
  const span = Array.from({ length: 2 - Math.min(...numbers, 0) }, (_, k) => 1 - k);
  const levelNumbers = numbers.every(Number.isInteger) ? span : numbers.sort((a, b) => b - a);
  const reused =
    facts.storage.explicit &&
    facts.storage.arraysOnePerLevel !== null &&
    facts.storage.arraysInPlace < facts.storage.arraysOnePerLevel;
  const arrays = arraysOf(levelNumbers, reused);
  const levels = levelNumbers.map((level, k) => ({ level, label: levelLabel(level), array: arrays[k] ?? null }));
  const middle = levelNumbers.find(
    (level) =>
      level < 1 &&
      level > Math.min(...levelNumbers) &&
      !sites.some((site) => site.level === level && site.offset.every((o) => o === 0)),
  );
  const transports =
    scheme.dims === 1 &&
    facts.storage.explicit &&
    at !== null &&
    (scheme.equation === 'advection' || scheme.equation === 'wave');
  return {
    dims: scheme.dims,
    levels,
    sites,
    halo: facts.halo[0] ?? [0, 0],
    reused,
    stages,
    partsAt: facts.computationalModes > 0 && facts.storage.explicit && middle !== undefined ? middle : null,
    path: transports ? { symbol: symbols[0]!, value: at } : null,
    sentence: sentenceOf(sites, levels, reused),
  };
}

/** A stencil on its one level: the bubble is the point of evaluation. */
export function stencilSketch(
  dims: 1 | 2 | 3,
  offsets: readonly (readonly number[])[],
  facts: StencilFacts,
): SketchModel {
  const known = offsets.flatMap((offset, k): SketchSite[] => {
    const weight = facts.weights[k] ?? '0';
    return weight === '0' ? [] : [{ level: 0, offset, role: 'known', weight: short(signed(weight)) }];
  });
  const [left, right] = (Array.isArray(facts.halo[0]) ? facts.halo[0] : facts.halo) as [number, number];
  const origin = offsets[0]?.map(() => 0) ?? [0];
  return {
    dims,
    levels: [
      { level: 1, label: 'result', array: null },
      { level: 0, label: 'data', array: null },
    ],
    sites: [{ level: 1, offset: origin, role: 'computed', weight: null }, ...known],
    halo: [left, right],
    reused: false,
    stages: 0,
    partsAt: null,
    path: null,
    sentence: `The value at i is computed from ${known.length} points at offsets ${known.map((site) => (site.offset.length === 1 ? String(site.offset[0]) : `(${site.offset.join(', ')})`)).join(', ')}.`,
  };
}
