/** The stable range of a scheme as a kernel states and checks it. */
import type { SchemeFacts } from '@/lib/facts/facts';
import type { RationalFunction } from '@/lib/numerics/rational-function';
import { parseRational, toNumber, type Rational } from '@/lib/numerics/rational';
import { coefficientSource } from './coefficient';
import { parameterName } from './kernel-plan';
import { regionInequalities, type Inequality } from './region';

/** One end of a stable interval. */
export interface BoundEnd {
  readonly value: number;
  /** Shortest decimal that reads back as `value`: what every language compares with. */
  readonly decimal: string;
  /** For readers: "1/2", "sqrt(3)/2 = 0.866025". */
  readonly text: string;
  /** Whether the scheme stays power-bounded at the end itself. */
  readonly included: boolean;
  readonly why: string | null;
}

export interface BoundPiece {
  readonly lo: BoundEnd | null;
  readonly hi: BoundEnd | null;
}

export type Bound =
  | { readonly kind: 'pieces'; readonly name: string; readonly pieces: readonly BoundPiece[] }
  | { readonly kind: 'always' }
  | { readonly kind: 'never'; readonly sentence: string }
  /** Several parameters; `inequalities` is null where the region has no closed form that could be checked. */
  | {
      readonly kind: 'region';
      readonly text: string;
      readonly symbols: readonly string[];
      readonly inequalities: readonly Inequality[] | null;
    }
  | { readonly kind: 'unknown'; readonly sentence: string };

function asRational(text: string | null): Rational | null {
  if (text === null) return null;
  try {
    return parseRational(
      text.replace(/^-?\((.*)\)$/, (whole, inner: string) => (whole.startsWith('-') ? `-${inner}` : inner)),
    );
  } catch {
    return null;
  }
}

const withPoint = (text: string) => (/[.e]/.test(text) ? text : `${text}.0`);

function endOf(
  decimal: string | null,
  exact: string | null,
  included: boolean | null,
  why: string | null,
): BoundEnd | null {
  if (decimal === null) return null;
  const rational = asRational(exact) ?? asRational(decimal);
  const value = rational ? toNumber(rational) : Number(decimal);
  const short = String(Number(value.toPrecision(6)));
  const closed = asRational(exact);
  const text = exact === null ? short : closed ? exact.replace(/[()]/g, '') : `${exact} = ${short}`;
  return { value, decimal: withPoint(String(value)), text, included: included ?? true, why };
}

/** A region in closed form, as text and as conditions, together with the signs that the equation itself asks for. */
function regionOf(region: string | null, symbols: readonly string[], nonNegative: readonly string[]): Bound {
  const signs = nonNegative.map((symbol) => `${symbol} >= 0`);
  const text = region === null ? null : [region, ...signs].join(', ');
  return {
    kind: 'region',
    text:
      text?.replaceAll('lambda', 'lam').replace(/\s*([<>]=|\+)\s*/g, ' $1 ') ??
      'stable region: see the map on the sheet',
    symbols: symbols.map(parameterName),
    inequalities: text === null ? null : regionInequalities(text, symbols),
  };
}

/**
 * The verdict of the facts as pieces to check, in ascending order.
 * @param symbols     parameters of the scheme
 * @param nonNegative those whose negative values make the equation ill-posed, where the region does not say so
 */
export function boundOf(facts: SchemeFacts, symbols: readonly string[], nonNegative: readonly string[] = []): Bound {
  const { stability } = facts;
  if (stability.kind === 'two-parameter') return regionOf(stability.region, symbols, nonNegative);
  switch (stability.verdict) {
    case 'unstable for all nonzero values':
      return { kind: 'never', sentence: 'UNSTABLE for every nonzero value of the parameter: do not march with it.' };
    case 'weakly unstable for all nonzero values':
      return {
        kind: 'never',
        sentence:
          'WEAKLY UNSTABLE for every nonzero value of the parameter: errors grow slowly without end; short runs only.',
      };
    case 'degenerate newest level':
    case 'not decided within the time budget':
      return { kind: 'unknown', sentence: `Stability: ${stability.verdict}.` };
    default:
  }
  // Analysed along equal values of several parameters: only the closed form speaks of each.
  if (stability.parameter !== null && !symbols.includes(stability.parameter))
    return regionOf(stability.region, symbols, nonNegative);
  const pieces: BoundPiece[] = stability.intervals.map((interval) => ({
    lo: endOf(interval.lo, interval.loExact, interval.loIncluded, interval.loBehaviour?.why ?? null),
    hi: endOf(interval.hi, interval.hiExact, interval.hiIncluded, interval.hiBehaviour?.why ?? null),
  }));
  for (const point of stability.isolatedStablePoints) {
    const end = endOf(point, point, true, null);
    const inside = pieces.some(
      (p) => end && (p.lo?.value ?? -Infinity) <= end.value && end.value <= (p.hi?.value ?? Infinity),
    );
    if (end && !inside && end.value !== 0) pieces.push({ lo: end, hi: end });
  }
  const everywhere = pieces.every((p) => !p.lo && !p.hi);
  if (everywhere && (pieces.length > 0 || stability.verdict === 'unconditionally stable')) return { kind: 'always' };
  if (pieces.length === 0) return { kind: 'unknown', sentence: 'No stable range is known.' };
  pieces.sort((a, b) => (a.lo?.value ?? -Infinity) - (b.lo?.value ?? -Infinity));
  return { kind: 'pieces', name: parameterName(stability.parameter ?? 'lambda'), pieces };
}

/** Long closed forms give way to their decimals. */
const shortly = ({ text }: BoundEnd) => (text.length > 22 ? text.replace(/^.* = /, '') : text);

function pieceText(name: string, { lo, hi }: BoundPiece): string {
  const keep = hi && !hi.included ? '; keep below' : '';
  if (lo && hi) {
    if (lo.value === hi.value) return `${name} = ${shortly(hi)}`;
    if (lo.value === -hi.value) return `|${name}| <= ${shortly(hi)}${keep}`;
    return `${shortly(lo)} <= ${name} <= ${shortly(hi)}${keep}`;
  }
  if (hi) return `${name} <= ${shortly(hi)}${keep}`;
  return lo ? `every ${name} >= ${shortly(lo)}` : `every ${name}`;
}

/** "|lam| <= 1; keep below": the words of the first line. */
export function boundText(bound: Bound): string {
  switch (bound.kind) {
    case 'pieces':
      return bound.pieces.map((piece) => pieceText(bound.name, piece)).join(' or ');
    case 'always':
      return 'stable for every value';
    case 'never':
      return bound.sentence.startsWith('WEAKLY') ? 'WEAKLY UNSTABLE for every value' : 'UNSTABLE for every value';
    case 'region':
      return bound.text;
    case 'unknown':
      return 'no stable range known';
  }
}

/** Nine tenths of the bound, cut to three figures, or null where there is no bound. */
export function advisedText(bound: Bound): string | null {
  if (bound.kind !== 'pieces') return null;
  const piece = [...bound.pieces].reverse().find((p) => p.lo?.value !== p.hi?.value);
  if (!piece) return null;
  const end = piece.hi && piece.hi.value > 0 ? piece.hi : piece.lo;
  if (!end || end.value === 0) return null;
  const work = 0.9 * Math.abs(end.value);
  const unit = 10 ** (Math.floor(Math.log10(work)) - 2);
  const cut = Number((Math.floor(work / unit + 1e-9) * unit).toPrecision(3));
  const both = piece.lo && piece.hi && piece.lo.value === -piece.hi.value;
  const advised = both
    ? `|${bound.name}| <= ${cut}`
    : end === piece.hi
      ? `${bound.name} <= ${cut}`
      : `${bound.name} >= ${-cut}`;
  return `${advised} (nine tenths of the bound)`;
}

/** Ends of the pieces as a condition, in a language's own words; null where nothing is to be checked. */
export function boundCondition(
  bound: Bound,
  words: {
    readonly and: string;
    readonly or: string;
    readonly decimal: (text: string) => string;
    readonly literal: (value: Rational) => string;
  },
): string | null {
  if (bound.kind === 'region')
    return (
      bound.inequalities
        ?.map(({ left, right }) => {
          const side = (value: RationalFunction) => coefficientSource(value, bound.symbols, words.literal);
          return `${side(left)} <= ${side(right)}`;
        })
        .join(` ${words.and} `) ?? null
    );
  if (bound.kind !== 'pieces') return null;
  const parts = bound.pieces.map(({ lo, hi }) => {
    const ends = [
      ...(lo ? [`${bound.name} >= ${words.decimal(lo.decimal)}`] : []),
      ...(hi ? [`${bound.name} <= ${words.decimal(hi.decimal)}`] : []),
    ];
    const both = ends.join(` ${words.and} `);
    return ends.length > 1 && bound.pieces.length > 1 ? `(${both})` : both;
  });
  return parts.join(` ${words.or} `);
}
