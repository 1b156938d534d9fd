/** Parameter values at which a kernel is tried, chosen from its facts. */
import type { StabilityFacts, StableInterval } from '@/lib/facts/facts';
import { parseRational, toNumber } from '@/lib/numerics/rational';
import type { BoundEnd } from './subject';

export interface ParameterChoice {
  readonly working: readonly (readonly number[])[];
  readonly stable: boolean;
  readonly ends: readonly BoundEnd[];
  readonly farInside: readonly number[] | null;
}

/** Ends nearer to 0 than this are the trivial value itself. */
const ZERO_END = 1e-9;
/** Part of the bound, or of the width of a narrow interval, by which "just inside" keeps away from an end. */
const JUST_INSIDE = 0.01;
/** Where there is no bound: a value of the size people use, and one far beyond. */
const TYPICAL = 0.7;
const FAR = 20;
/** Where nothing is stable: large enough to be what people try. */
const UNSTABLE_VALUES = [0.4, 0.1] as const;

interface Interval {
  readonly lo: number;
  readonly hi: number;
  readonly facts: StableInterval;
}

const numberOf = (text: string | null, missing: number) => (text === null ? missing : toNumber(parseDecimal(text)));
/** Facts print algebraic ends as decimals, perhaps with an exponent. */
function parseDecimal(text: string) {
  const [digits, exponent] = text.split(/e/i);
  const value = parseRational(digits!);
  const tens = Number(exponent ?? 0);
  return tens >= 0
    ? { num: value.num * 10n ** BigInt(tens), den: value.den }
    : { num: value.num, den: value.den * 10n ** BigInt(-tens) };
}

const readIntervals = (facts: StabilityFacts): Interval[] =>
  facts.intervals
    .map((interval) => ({ lo: numberOf(interval.lo, -Infinity), hi: numberOf(interval.hi, Infinity), facts: interval }))
    .filter(({ lo, hi }) => hi > lo && (Math.abs(lo) > ZERO_END || Math.abs(hi) > ZERO_END));

/** A value within (lo, hi) at this part of the way from the end nearer to 0, not at a value that is special. */
function within(lo: number, hi: number, part: number, special: readonly number[]): number {
  const near = lo >= 0 ? lo : hi <= 0 ? hi : 0;
  const far = near === lo ? hi : lo;
  const width = Number.isFinite(far) ? far - near : Math.sign(far);
  const isSpecial = (value: number) => special.some((s) => Math.abs(value - s) <= 0.02 * Math.abs(s));
  for (const shift of [0, -0.07, -0.15, 0.06]) {
    const value = near + (part + shift) * width;
    if (!isSpecial(value)) return value;
  }
  return near + part * width;
}

function endsOf({ lo, hi, facts }: Interval, parameter: string): BoundEnd[] {
  const width = hi - lo;
  const inset = (bound: number) => Math.min(JUST_INSIDE * Math.abs(bound), width / 4);
  const vector = (value: number) => [value];
  const ends: BoundEnd[] = [];
  if (Number.isFinite(hi) && Math.abs(hi) > ZERO_END)
    ends.push({ parameter, bound: hi, text: facts.hiExact ?? facts.hi!, inside: hi - inset(hi), outward: 1, vector });
  if (Number.isFinite(lo) && Math.abs(lo) > ZERO_END)
    ends.push({ parameter, bound: lo, text: facts.loExact ?? facts.lo!, inside: lo + inset(lo), outward: -1, vector });
  return ends;
}

/** Schemes with one parameter. */
export function chooseParameter(facts: StabilityFacts, special: readonly number[]): ParameterChoice {
  const parameter = facts.parameter ?? 'parameter';
  const intervals = readIntervals(facts);
  if (intervals.length === 0)
    return { working: UNSTABLE_VALUES.map((value) => [value]), stable: false, ends: [], farInside: null };
  // The side of the larger values first: a positive speed is what most people try.
  const positive = intervals.find(({ hi }) => hi > ZERO_END);
  const negative = intervals.find(({ lo }) => lo < -ZERO_END);
  const main = positive
    ? [
        within(Math.max(positive.lo, 0), positive.hi, Number.isFinite(positive.hi) ? 0.8 : TYPICAL, special),
        within(Math.max(positive.lo, 0), positive.hi, 0.35, special),
      ]
    : [];
  const mirrored = negative
    ? [within(negative.lo, Math.min(negative.hi, 0), Number.isFinite(negative.lo) ? 0.75 : TYPICAL, special)]
    : [];
  const unbounded = intervals.find(({ lo, hi }) => !Number.isFinite(lo) || !Number.isFinite(hi));
  return {
    working: [...main, ...mirrored].map((value) => [value]),
    stable: true,
    ends: intervals.flatMap((interval) => endsOf(interval, parameter)),
    farInside: unbounded ? [unbounded.hi === Infinity ? FAR : -FAR] : null,
  };
}
