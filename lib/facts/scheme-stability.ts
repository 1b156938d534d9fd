/** Stability and dissipation of a scheme in the shape of facts, and the parameter values that represent it. */
import type { Budget } from '@/lib/numerics/budget';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { schemeDissipation } from '@/lib/numerics/dissipation';
import { formatRational, parseRational, rational, toNumber, type Rational } from '@/lib/numerics/rational';
import { withParameters } from '@/lib/numerics/restricted-scheme';
import { analyseStability } from '@/lib/numerics/stability/analyse-stability';
import type { WorkBudget } from '@/lib/numerics/stability/stability-result';
import type { DissipationFacts, StabilityFacts } from './facts';

const DENOMINATOR_LIMIT = 40;
/** Without a limit of its own, an analysis ends here. */
const LONGEST_MS = 60_000;
const PLACEHOLDER = 'unused';

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

/** A stable pair [lambda, r] on one of the cuts, half way to its end; null without one. */
export function stablePair({ lambdaLimitAtR = [] }: StabilityFacts): Rational[] | null {
  const stretches = lambdaLimitAtR.flatMap(({ r, intervalsLambda }) =>
    intervalsLambda.map(([lo, hi]) => ({ r: parseRational(r), lo: Math.max(0, lo ?? 0), hi })),
  );
  const usable = stretches.filter(({ lo, hi }) => hi === null || hi > lo);
  const chosen = usable.find(({ r }) => toNumber(r) >= 0.25) ?? usable.at(-1);
  if (!chosen) return null;
  const { r, lo, hi } = chosen;
  return [nearbyFraction(hi === null ? lo + 0.5 : (lo + hi) / 2), r];
}

/**
 * Half the bound of the interval that reaches furthest from 0, as a simple fraction; ten where there is no bound and
 * one half where nothing is stable. Two fifths where half the bound is an exact shift, and for waves in several
 * dimensions. All parameters share one value, but for advection with diffusion.
 */
export function representativeValues(
  scheme: CanonicalScheme,
  stability: StabilityFacts,
  special: readonly { readonly value: string; readonly order: number | null }[],
): Rational[] {
  const isTransport = CONVENTIONS[scheme.equation].nonNegative.length === 0;
  const large = isTransport ? 10 : scheme.dims === 1 ? 30 : 20;
  const isRadial = scheme.timeOrder === 2 && scheme.dims > 1;
  const share = (value: Rational) => scheme.parameters.map(() => value);
  const pair = stability.kind === 'two-parameter' ? stablePair(stability) : null;
  if (pair) return pair;
  const [first] = stability.intervals.filter((i) => i.hi === null || Number(i.hi) > 0).concat(stability.intervals);
  if (!first) return share(rational(1, 2));
  const [lo, hi] = [numberOf(first.lo), numberOf(first.hi)];
  if (hi === null && (lo === null || lo <= 0)) return share(rational(large));
  if (hi !== null && hi > 0) {
    const middle = lo !== null && lo > 0 ? (lo + hi) / 2 : hi / 2;
    const isSpecial = special.some(
      ({ value, order }) => order === null && value === formatRational(nearbyFraction(middle)),
    );
    return share(nearbyFraction(isSpecial || isRadial ? 0.8 * middle : middle));
  }
  if (lo === null) return share(rational(isTransport ? -large : large));
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

/** With all numbers fixed, a number that the scheme does not use stands for the line on which the analysis works. */
function fixedStability(scheme: CanonicalScheme, budget: WorkBudget): StabilityFacts {
  const { verdict, lostAt, method, note } = analyseStability(withParameters(scheme, [PLACEHOLDER], []), budget);
  const fixed = 'All numbers are fixed: the verdict holds for these values.';
  return { ...undecided(scheme, [note, fixed].filter(Boolean).join(' ')), verdict, lostAt, method };
}

export function schemeStability(scheme: CanonicalScheme, budget: Budget): StabilityFacts {
  if (budget.isCancelled()) return undecided(scheme, 'The analysis was cancelled.');
  const work: WorkBudget = { timeLimitMs: Math.min(LONGEST_MS, budget.remainingMs()), isCancelled: budget.isCancelled };
  if (work.timeLimitMs <= 0) return undecided(scheme, 'The time given to the analysis was over.');
  return scheme.parameters.length === 0 ? fixedStability(scheme, work) : analyseStability(scheme, work);
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
