/**
 * All that is said about the stability of a scheme: the road is chosen by its form (exact where one dimension and one
 * parameter remain, numeric with exact ends on lines of waves elsewhere), then growth, cuts and regions are added.
 */
import type { CanonicalScheme } from '../canonical-scheme';
import { CONVENTIONS } from '../equation';
import { growthAsymptotics, type GrowthAsymptotics } from '../growth';
import { characteristicOf, compileScheme } from '../numeric-scheme';
import { constant, variable, zero } from '../polynomial';
import { parseRational } from '../rational';
import { alongLine, withParameters } from '../restricted-scheme';
import { amplificationMatrix, isPowerBounded } from '../system-matrix';
import { leastLead } from './degenerate-level';
import { knownRegion, type DirectionBound } from './known-regions';
import { numericStability } from './numeric-stability';
import { provenIntervals } from './proven-stability';
import type {
  EndBehaviour,
  StabilityLoss,
  StabilityMethod,
  StabilityOutcome,
  StabilityResult,
  StabilityVerdict,
  StableInterval,
  WorkBudget,
} from './stability-result';

export interface StabilityAnalysis {
  kind: 'one-parameter' | 'two-parameter';
  parameter: string | null;
  /** Range searched where the method is numeric. */
  examined: [number, number] | null;
  verdict: StabilityVerdict;
  intervals: StableInterval[];
  isolatedStablePoints: string[];
  growth: { positive: GrowthAsymptotics | null; negative: GrowthAsymptotics | null } | null;
  lostAt: StabilityLoss | null;
  region: string | null;
  cuts: { fixed: Record<string, string>; intervals: [string | null, string | null][]; method: StabilityMethod }[];
  /** Advection with diffusion only. */
  lambdaLimitAtR?: LambdaLimit[];
  singleDirection: { parameter: string; lo: string | null; hi: string | null; method: StabilityMethod }[];
  method: StabilityMethod;
  note: string | null;
}
/** Stable speeds at one diffusion number, as decimals. */
export interface LambdaLimit {
  r: string;
  /** Within the range examined; an end null where the interval goes on beyond it. */
  intervalsLambda: [number | null, number | null][];
  examined: [number, number];
  /** End of the interval that holds 0; null where it has none. */
  lambdaMaxExact: number | null;
  lambdaMaxClosedForm: string | null;
}

const DEFAULT_BUDGET: WorkBudget = { timeLimitMs: 20_000 };
/** Growth beyond this exponent counts as weak: a plain time step refinement dt ~ dx^(4/3) or so holds it. */
const WEAK_BEYOND = 2;
/** Values of the second number at which two-parameter regions are cut. */
const CUTS = ['1/20', '1/8', '1/4', '2/5', '1/2', '1', '3'];
const NUMERIC_RANGE = 1e5;

const DEFECTIVE = '||G^n|| grows linearly (or faster) at this wave: defective unit eigenvalue';
const SEMISIMPLE = '||G^n|| bounded (multiple unit eigenvalues, if any, are semisimple)';

function remaining(budget: WorkBudget, started: number): WorkBudget {
  return { ...budget, timeLimitMs: Math.max(0, budget.timeLimitMs - (performance.now() - started)) };
}

/** Signs of the parameter that mean something: diffusivities, and speeds that enter squared or as a size, are not negative. */
function sidesOf(scheme: CanonicalScheme): (1 | -1)[] {
  const { nonNegative, timeOrder, dims } = CONVENTIONS[scheme.equation];
  const isSize = timeOrder === 2 && (scheme.form === 'system' || dims > 1);
  const isDiffusive = nonNegative.length > 0 && scheme.equation !== 'advection-diffusion';
  const isDiffusionNumber = nonNegative.includes(scheme.parameters[0] ?? '');
  return isSize || isDiffusive || isDiffusionNumber ? [1] : [1, -1];
}

/** Keeps what lies at nonnegative values. */
function nonNegativePart(result: StabilityResult): StabilityResult {
  const intervals = result.intervals.flatMap((interval): StableInterval[] => {
    const hi = interval.hi === null ? Infinity : Number(interval.hi);
    const lo = interval.lo === null ? -Infinity : Number(interval.lo);
    if (hi <= 0) return [];
    if (lo >= 0) return [interval];
    return [{ ...interval, lo: '0', loExact: '0', loIncluded: true, loBehaviour: null, loMinimalPolynomial: null }];
  });
  const everywhere = intervals.length === 1 && intervals[0]!.lo === '0' && intervals[0]!.hi === null;
  const { lostAt } = result;
  return {
    ...result,
    intervals,
    verdict: everywhere
      ? 'unconditionally stable'
      : intervals.length === 0 && result.verdict === 'conditionally stable'
        ? 'unstable for all nonzero values'
        : result.verdict,
    isolatedStablePoints: result.isolatedStablePoints.filter((p) => !p.startsWith('-')),
    lostAt: lostAt && lostAt.parameter < 0 ? { ...lostAt, parameter: -lostAt.parameter } : lostAt,
  };
}

/** A system's ends are judged by its amplification matrix: semisimple multiple eigenvalues do no harm. */
function withMatrixBehaviour(scheme: CanonicalScheme, result: StabilityResult): StabilityResult {
  if (scheme.form !== 'system') return result;
  const judged = (text: string | null, behaviour: EndBehaviour | null): EndBehaviour | null => {
    if (text === null || behaviour === null) return behaviour;
    const waves = behaviour.theta?.length ? behaviour.theta : [Math.PI, Math.PI / 2];
    const defective = waves.filter((theta) => {
      const matrix = amplificationMatrix(scheme, [Number(text)], [theta]);
      return !matrix || !isPowerBounded(matrix);
    });
    return defective.length > 0
      ? { stableAtLimit: false, why: DEFECTIVE, theta: defective }
      : { stableAtLimit: true, why: SEMISIMPLE };
  };
  return {
    ...result,
    intervals: result.intervals.map((interval) => {
      const loBehaviour = judged(interval.lo, interval.loBehaviour);
      const hiBehaviour = judged(interval.hi, interval.hiBehaviour);
      return {
        ...interval,
        loBehaviour,
        hiBehaviour,
        loIncluded: loBehaviour ? loBehaviour.stableAtLimit : interval.loIncluded,
        hiIncluded: hiBehaviour ? hiBehaviour.stableAtLimit : interval.hiIncluded,
      };
    }),
  };
}

/** Direction in which all offsets of a scheme lie, where it depends on one component of the wave only. */
function onlyDirection(scheme: CanonicalScheme): number | null {
  const { scalar } = characteristicOf(scheme);
  const moving = Array.from({ length: scheme.dims }, (_, d) => d).filter((d) =>
    scalar.terms.some((t) => t.offset[d]!.num !== 0n),
  );
  return moving.length === 1 ? moving[0]! : null;
}

/** Stable sets of a scheme of one parameter by the strongest road that reaches an answer. */
function oneParameter(scheme: CanonicalScheme, budget: WorkBudget): StabilityOutcome {
  const started = performance.now();
  const { scalar } = characteristicOf(scheme);
  const sides = sidesOf(scheme);
  const direction = onlyDirection(scheme);
  if (direction !== null) {
    const unit = Array.from({ length: scheme.dims }, (_, d) => (d === direction ? 1n : 0n));
    const line =
      scheme.dims === 1
        ? scalar
        : alongLine(
            scalar,
            unit,
            unit.map(() => 0 as const),
          );
    const multipleRoots = scheme.form === 'system' ? 'allowed' : 'growth';
    const outcome = line
      ? provenIntervals(line, { ...budget, timeLimitMs: budget.timeLimitMs * 0.6 }, multipleRoots)
      : null;
    if (outcome?.kind === 'decided') {
      const judged = withMatrixBehaviour(scheme, outcome.result);
      return { kind: 'decided', result: sides.length === 1 ? nonNegativePart(judged) : judged };
    }
  }
  return numericStability(scheme, scalar, sides, remaining(budget, started));
}

const UNDECIDED: StabilityResult = {
  verdict: 'not decided within the time budget',
  intervals: [],
  isolatedStablePoints: [],
  lostAt: null,
  method: 'numeric',
  note: null,
};

function growthOf(scheme: CanonicalScheme, sides: readonly (1 | -1)[]): StabilityAnalysis['growth'] {
  const numeric = compileScheme(scheme);
  const { scalar } = characteristicOf(scheme);
  const on = (side: 1 | -1): GrowthAsymptotics | null =>
    sides.includes(side) ? growthAsymptotics(numeric, side, scalar) : null;
  const positive = on(1);
  const negative = on(-1);
  return positive || negative ? { positive, negative } : null;
}

const quotient = (text: string) => {
  const [num, den] = text.split('/');
  return Number(num) / Number(den ?? 1);
};

/** Values without meaning for any scheme, at which a newest level that is always degenerate shows. */
const GENERIC_VALUES = [0.372, 1.413, 2.718];

/** Whether the step cannot be solved for some wave whatever the parameter is. */
function isAlwaysDegenerate(scheme: CanonicalScheme): boolean {
  const numeric = compileScheme(scheme);
  return GENERIC_VALUES.every((value) => leastLead(numeric, [value]) < 1e-9);
}

function assembled(scheme: CanonicalScheme, found: StabilityResult, left: WorkBudget): StabilityAnalysis {
  const sides = sidesOf(scheme);
  const result: StabilityResult =
    found.verdict === 'unstable for all nonzero values' && isAlwaysDegenerate(scheme)
      ? { ...found, verdict: 'degenerate newest level', lostAt: null }
      : found;
  const unstable = result.verdict === 'unstable for all nonzero values';
  const isTimeLeft = left.timeLimitMs > 0 && !left.isCancelled?.();
  const growth = unstable && isTimeLeft ? growthOf(scheme, sides) : null;
  const weakest = growth?.positive ?? growth?.negative ?? null;
  const isWeak = weakest !== null && quotient(weakest.q) > WEAK_BEYOND;
  return {
    kind: 'one-parameter',
    parameter: scheme.parameters[0] ?? null,
    examined: result.method === 'numeric' ? [sides.includes(-1) ? -NUMERIC_RANGE : 0, NUMERIC_RANGE] : null,
    verdict: isWeak ? 'weakly unstable for all nonzero values' : result.verdict,
    intervals: result.intervals,
    isolatedStablePoints: result.isolatedStablePoints,
    growth,
    lostAt: result.lostAt,
    region: null,
    cuts: [],
    singleDirection: [],
    method: result.method,
    note: unstable && !isTimeLeft ? 'The growth was not examined within the time budget.' : result.note,
  };
}

const decided = (outcome: StabilityOutcome): StabilityResult =>
  outcome.kind === 'decided' ? outcome.result : { ...UNDECIDED, note: outcome.why };

/** The interval that begins or contains 0, or else the first. */
const mainInterval = (intervals: readonly StableInterval[]) =>
  intervals.find((i) => (i.lo === null || Number(i.lo) <= 0) && (i.hi === null || Number(i.hi) >= 0)) ?? intervals[0];

function singleDirections(
  scheme: CanonicalScheme,
  budget: WorkBudget,
): { listed: StabilityAnalysis['singleDirection']; bounds: DirectionBound[] } {
  const listed: StabilityAnalysis['singleDirection'] = [];
  const bounds: DirectionBound[] = [];
  scheme.parameters.forEach((name, k) => {
    const alone = withParameters(
      scheme,
      [name],
      scheme.parameters.map((_, j) => (j === k ? variable(1, 0) : zero)),
    );
    const { intervals, verdict, method } = decided(
      oneParameter(alone, { ...budget, timeLimitMs: budget.timeLimitMs / 6 }),
    );
    if (verdict === 'not decided within the time budget') return;
    const main = mainInterval(intervals);
    listed.push({
      parameter: name,
      lo: main ? (main.loExact ?? main.lo) : '0',
      hi: main ? (main.hiExact ?? main.hi) : '0',
      method,
    });
    bounds.push({
      name,
      lo: main ? (main.lo === null ? null : Number(main.lo)) : 0,
      hi: main ? (main.hi === null ? null : Number(main.hi)) : 0,
      hiText: main ? (main.hiExact ?? main.hi) : '0',
    });
  });
  return { listed, bounds };
}

/** Several dimensions: the bound with all numbers equal, bounds along single directions, the general condition. */
function equalParameters(scheme: CanonicalScheme, budget: WorkBudget): StabilityAnalysis {
  const started = performance.now();
  const common = CONVENTIONS[scheme.equation].common ?? 'p';
  const equal = withParameters(
    scheme,
    [common],
    scheme.parameters.map(() => variable(1, 0)),
  );
  const result = decided(oneParameter(equal, { ...budget, timeLimitMs: budget.timeLimitMs * 0.6 }));
  const analysis = assembled(equal, result, remaining(budget, started));
  const { listed, bounds } = singleDirections(scheme, remaining(budget, started));
  const { scalar } = characteristicOf(scheme);
  const left = remaining(budget, started);
  const until = performance.now() + left.timeLimitMs;
  const region =
    bounds.length === scheme.parameters.length && bounds.every((b) => b.hi !== 0)
      ? knownRegion(scalar, bounds, () => performance.now() > until || (budget.isCancelled?.() ?? false))
      : null;
  return {
    ...analysis,
    singleDirection: listed,
    region: region?.text ?? null,
    note: [analysis.note, `${common} is the common value of ${scheme.parameters.join(', ')}.`]
      .filter(Boolean)
      .join(' '),
  };
}

const STRENGTH: readonly StabilityMethod[] = ['exact', 'certified', 'numeric'];
/** Several answers together are as strong as the weakest of them. */
const weakestOf = (methods: readonly StabilityMethod[]): StabilityMethod =>
  STRENGTH.findLast((method) => methods.includes(method)) ?? 'numeric';

/** Range of speeds in which limits at fixed diffusion numbers are listed. */
const LAMBDA_EXAMINED: [number, number] = [0, 8];

function lambdaLimit(r: string, intervals: readonly StableInterval[]): LambdaLimit {
  const [from, to] = LAMBDA_EXAMINED;
  const inside = intervals.filter(
    ({ lo, hi }) => (hi === null || Number(hi) >= from) && (lo === null || Number(lo) <= to),
  );
  const main = inside.find(({ lo }) => lo === null || Number(lo) <= 0);
  return {
    r,
    intervalsLambda: inside.map(({ lo, hi }) => [
      lo === null ? null : Math.max(from, Number(lo)),
      hi === null || Number(hi) > to ? null : Number(hi),
    ]),
    examined: [from, to],
    lambdaMaxExact: main?.hi ? Number(main.hi) : null,
    lambdaMaxClosedForm: main?.hiExact ?? null,
  };
}

/** Advection with diffusion: intervals of the first number at chosen values of the second, and the region if known. */
function twoParameters(scheme: CanonicalScheme, budget: WorkBudget): StabilityAnalysis {
  const started = performance.now();
  const [first, second] = scheme.parameters as [string, string];
  let isComplete = true;
  const limits: LambdaLimit[] = [];
  const cuts = CUTS.flatMap((value) => {
    const cut = withParameters(scheme, [first], [variable(1, 0), constant(1, parseRational(value))]);
    const outcome = oneParameter(cut, {
      ...budget,
      timeLimitMs: Math.min(remaining(budget, started).timeLimitMs, budget.timeLimitMs / 8),
    });
    if (outcome.kind !== 'decided') {
      isComplete = false;
      return [];
    }
    if (second === 'r') limits.push(lambdaLimit(value, outcome.result.intervals));
    const intervals = outcome.result.intervals.map((i): [string | null, string | null] => [
      i.loExact ?? i.lo,
      i.hiExact ?? i.hi,
    ]);
    return [{ fixed: { [second]: value }, intervals, method: outcome.result.method }];
  });
  const { scalar } = characteristicOf(scheme);
  const until = performance.now() + remaining(budget, started).timeLimitMs;
  const region = knownRegion(scalar, [], () => performance.now() > until || (budget.isCancelled?.() ?? false));
  return {
    kind: 'two-parameter',
    parameter: null,
    examined: null,
    verdict: cuts.length === 0 && !region ? 'not decided within the time budget' : 'two-parameter region',
    intervals: [],
    isolatedStablePoints: [],
    growth: null,
    lostAt: null,
    region: region?.text ?? null,
    cuts,
    ...(limits.length > 0 && { lambdaLimitAtR: limits }),
    singleDirection: [],
    method: weakestOf(cuts.map((cut) => cut.method)),
    note: isComplete ? null : 'Some cuts were not decided within the time budget.',
  };
}

/**
 * @param scheme canonical scheme with at least one parameter
 * @param budget time for all of it; what does not fit is said to be undecided, never guessed
 */
export function analyseStability(scheme: CanonicalScheme, budget: WorkBudget = DEFAULT_BUDGET): StabilityAnalysis {
  const started = performance.now();
  if (scheme.parameters.length === 1) {
    const result = decided(oneParameter(scheme, budget));
    return assembled(scheme, result, remaining(budget, started));
  }
  if (scheme.equation === 'advection-diffusion' && scheme.parameters.length === 2) return twoParameters(scheme, budget);
  return equalParameters(scheme, budget);
}
