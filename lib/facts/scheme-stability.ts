/** Stability and dissipation of a scheme in the shape of facts, and the parameter values that represent it. */
import type { Budget } from '@/lib/numerics/budget';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { schemeDissipation } from '@/lib/numerics/dissipation';
import { formatRational, rational, type Rational } from '@/lib/numerics/rational';
import { exactIntervals } from '@/lib/numerics/stability/exact-stability';
import type { DissipationFacts, StabilityFacts } from './facts';

const DENOMINATOR_LIMIT = 40;

/** The fraction nearest to a positive value among those with a denominator up to 40 (continued fractions). */
function nearbyFraction(value: number): Rational {
  let best = rational(Math.max(1, Math.round(value)));
  let error = Infinity;
  for (let den = 1; den <= DENOMINATOR_LIMIT; den++) {
    const num = Math.max(1, Math.round(value * den));
    const off = Math.abs(value - num / den);
    if (off < error - 1e-12) [best, error] = [rational(num, den), off];
  }
  return best;
}

const numberOf = (text: string | null) => (text === null ? null : Number(text));

/**
 * Half the bound of the interval that reaches furthest from 0, as a simple fraction; ten where there is no bound and
 * one half where nothing is stable; less where the scheme happens to be better there. All parameters share one value.
 */
export function representativeValues(
  scheme: CanonicalScheme,
  stability: StabilityFacts,
  special: readonly { readonly value: string }[],
): Rational[] {
  const isTransport = CONVENTIONS[scheme.equation].nonNegative.length === 0;
  const share = (value: Rational) => scheme.parameters.map(() => value);
  const [first] = stability.intervals.filter((i) => i.hi === null || Number(i.hi) > 0).concat(stability.intervals);
  if (!first) return share(rational(1, 2));
  const [lo, hi] = [numberOf(first.lo), numberOf(first.hi)];
  if (hi === null && (lo === null || lo <= 0)) return share(rational(isTransport ? 10 : 30));
  if (hi !== null && hi > 0) {
    const middle = lo !== null && lo > 0 ? (lo + hi) / 2 : hi / 2;
    const isSpecial = special.some(({ value }) => value === formatRational(nearbyFraction(middle)));
    return share(nearbyFraction(isSpecial ? 0.8 * middle : middle));
  }
  if (lo === null) return share(rational(isTransport ? -10 : 30));
  if (hi === null) return share(nearbyFraction(2 * lo));
  const size = nearbyFraction(-(lo + hi) / 2);
  return share(rational(-size.num, size.den));
}

const undecided = (scheme: CanonicalScheme, note: string): StabilityFacts => ({
  kind: scheme.parameters.length > 1 ? 'two-parameter' : 'one-parameter',
  parameter: scheme.parameters.length === 1 ? scheme.parameters[0]! : null,
  examined: null,
  verdict: 'not decided within the time budget',
  intervals: [],
  isolatedStablePoints: [],
  growth: null,
  lostAt: null,
  region: null,
  cuts: [],
  singleDirection: [],
  method: 'numeric',
  note,
});

export function schemeStability(scheme: CanonicalScheme, budget: Budget): StabilityFacts {
  if (budget.isCancelled()) return undecided(scheme, 'The analysis was cancelled.');
  if (scheme.form === 'scalar' && scheme.dims === 1 && scheme.parameters.length === 1) {
    const outcome = exactIntervals(scheme, {
      timeLimitMs: Math.min(20_000, budget.remainingMs()),
      isCancelled: () => budget.isCancelled(),
    });
    if (outcome.kind === 'decided')
      return { ...undecided(scheme, ''), ...outcome.result, kind: 'one-parameter', examined: null };
    return undecided(scheme, outcome.why);
  }
  return undecided(scheme, 'The time given to the analysis was over.');
}

export function schemeDissipationFacts(scheme: CanonicalScheme, values: readonly Rational[]): DissipationFacts | null {
  try {
    const { at, ...facts } = schemeDissipation(scheme, values);
    return {
      ...facts,
      at:
        Object.keys(at).length > 0
          ? at
          : Object.fromEntries(scheme.parameters.map((name, k) => [name, formatRational(values[k]!)])),
    };
  } catch (error) {
    if (error instanceof RangeError) return null;
    throw error;
  }
}
