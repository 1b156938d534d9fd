/**
 * Exact stability bounds of a scalar scheme in one dimension with one parameter and any number of levels.
 *
 * The plane of wave and parameter is cut by the crossing curve; the parameter line is cut at the curve's critical
 * values; in each gap one rational value is decided for all waves by the reduction of Schur, Cohn and Miller at one
 * wave per cell. Ends are therefore algebraic numbers, and no wave is missed, however low.
 */
import type { AlgebraicNumber } from '../algebraic-number';
import type { ScalarScheme } from '../canonical-scheme';
import { CONVENTIONS } from '../equation';
import { formatRational, toNumber } from '../rational';
import { closedForm } from './closed-form';
import { behaviourAt, worstWave } from './limit-behaviour';
import { isolatedStableValues } from './isolated-values';
import { type Gap, type MultipleRoots, surveyGaps, type Survey } from './gap-survey';
import type {
  EndBehaviour,
  InteriorDefect,
  StabilityLoss,
  StabilityOutcome,
  StabilityResult,
  StableInterval,
  WorkBudget,
} from './stability-result';
import { rootCount, type WavePolynomial, wavePolynomial } from './wave-polynomial';
import { wavenumberMultiple } from './wavenumber-multiple';
import { WorkLimitReached, workMeter } from './work-meter';

const DIGITS = 20;

export const DOUBLE_ROOT = 'double root on the unit circle: growth linear in n for that wave';
export const TWO_LEVEL = 'two-level scalar scheme: |g|<=1 suffices';
export const SIMPLE_ROOTS = 'all roots on the unit circle are simple at the limit';
export const UNSOLVABLE = 'the coefficient of the newest level vanishes for that wave: the step cannot be solved there';

interface Context {
  readonly wave: WavePolynomial;
  readonly survey: Survey;
  readonly symbol: string;
  readonly multipleRoots: MultipleRoots;
  readonly check: () => void;
}

const isZeroValue = (value: AlgebraicNumber) => value.compareRational({ num: 0n, den: 1n }) === 0;
const magnitudes = (thetas: readonly number[]) =>
  [...new Set(thetas.map((theta) => Math.abs(theta)))].sort((a, b) => a - b);

function endBehaviour({ wave, survey, check }: Context, value: AlgebraicNumber): EndBehaviour {
  const isAlwaysSolvable = survey.curve.factors.every(({ kind }) => kind !== 'lead');
  if (rootCount(wave) === 1 && isAlwaysSolvable) return { stableAtLimit: true, why: TWO_LEVEL };
  const behaviour = behaviourAt(wave, survey.parts, value, check);
  if (behaviour.unsolvable.length > 0)
    return { stableAtLimit: false, why: UNSOLVABLE, theta: magnitudes(behaviour.unsolvable) };
  if (rootCount(wave) === 1) return { stableAtLimit: true, why: TWO_LEVEL };
  if (behaviour.multiple.length > 0)
    return { stableAtLimit: false, why: DOUBLE_ROOT, theta: magnitudes(behaviour.multiple) };
  return { stableAtLimit: true, why: SIMPLE_ROOTS };
}

interface End {
  text: string | null;
  included: boolean | null;
  exact: string | null;
  minimalPolynomial: string | null;
  behaviour: EndBehaviour | null;
}
const NO_END: End = { text: null, included: null, exact: null, minimalPolynomial: null, behaviour: null };

function endAt(context: Context, value: AlgebraicNumber): End {
  const behaviour = endBehaviour(context, value);
  if (isZeroValue(value))
    return { text: '0', included: behaviour.stableAtLimit, exact: '0', minimalPolynomial: null, behaviour: null };
  const form = closedForm(value, context.symbol, context.check);
  return {
    text: value.toDecimal(DIGITS),
    included: behaviour.stableAtLimit,
    exact: form.text ?? wavenumberMultiple(context.wave, value),
    minimalPolynomial: form.minimalPolynomial,
    behaviour,
  };
}

function interiorDefects(context: Context, inside: readonly AlgebraicNumber[]): InteriorDefect[] {
  return inside.flatMap((value) => {
    if (isZeroValue(value)) return [];
    const behaviour = endBehaviour(context, value);
    const isHarmless = context.multipleRoots === 'allowed' && behaviour.why === DOUBLE_ROOT;
    return behaviour.stableAtLimit || isHarmless
      ? []
      : (behaviour.theta ?? []).map((theta) => ({ at: value.toDecimal(DIGITS), theta, why: behaviour.why }));
  });
}

/** Index ranges [from, to] of neighbouring stable gaps. */
function stableRuns(gaps: readonly Gap[]): [number, number][] {
  const runs: [number, number][] = [];
  gaps.forEach(({ verdict }, k) => {
    if (!verdict.stable) return;
    const last = runs.at(-1);
    if (last?.[1] === k - 1) last[1] = k;
    else runs.push([k, k]);
  });
  return runs;
}

function intervalOf(context: Context, [from, to]: [number, number]): StableInterval {
  const { values } = context.survey;
  const [low, high] = [values[from - 1], values[to]];
  const lo = low ? endAt(context, low) : NO_END;
  const hi = high ? endAt(context, high) : NO_END;
  const defects = interiorDefects(context, values.slice(from, to));
  return {
    lo: lo.text,
    hi: hi.text,
    loIncluded: lo.included,
    hiIncluded: hi.included,
    loExact: lo.exact,
    hiExact: hi.exact,
    loMinimalPolynomial: lo.minimalPolynomial,
    hiMinimalPolynomial: hi.minimalPolynomial,
    loBehaviour: lo.behaviour,
    hiBehaviour: hi.behaviour,
    ...(defects.length > 0 && { interiorDefects: defects }),
    method: 'exact',
    tolerance: null,
  };
}

/** The worst wave 1 % outside the bound nearest to 0, or at a small value where none is stable. */
function lossOf({ wave, survey }: Context): StabilityLoss | null {
  const { values, gaps } = survey;
  let best: number | null = null;
  values.forEach((value, k) => {
    const at = value.toNumber();
    if (at === 0) return;
    const [below, above] = [gaps[k]!.verdict, gaps[k + 1]!.verdict];
    if (below.stable === above.stable) return;
    // Never past the next critical value, where things may be stable again.
    const neighbour = values[above.stable ? k - 1 : k + 1];
    const step = (above.stable ? -1 : 1) * 0.01 * Math.abs(at);
    const outside =
      neighbour && Math.abs(neighbour.toNumber() - at) < 2 * Math.abs(step)
        ? (at + neighbour.toNumber()) / 2
        : at + step;
    if (best === null || Math.abs(outside) <= Math.abs(best) * (1 + 1e-9)) best = outside;
  });
  if (best === null) {
    const zero = values.findIndex(isZeroValue);
    const gap = [gaps[zero + 1], survey.side === 'both' ? gaps[zero] : undefined].find(
      (each) => each && !each.verdict.stable,
    );
    if (!gap) return null;
    const sample = toNumber(gap.sample);
    best = Math.sign(sample) * Math.min(Math.abs(sample), 0.4);
  }
  const { theta, modulus } = worstWave(wave, best);
  return Number.isFinite(modulus) ? { parameter: best, theta: [theta], modulus } : null;
}

function resultOf(context: Context): StabilityResult {
  const { survey, wave } = context;
  const { gaps } = survey;
  const relevant = survey.side === 'both' ? gaps : gaps.slice(1);
  const intervals = stableRuns(gaps).map((run) => intervalOf(context, run));
  const isolated = isolatedStableValues(wave, survey, context.check);
  const unsolvable = relevant.every(({ verdict }) => !verdict.stable && verdict.reason === 'unsolvable');
  const linear = relevant.find(({ verdict }) => !verdict.stable && verdict.reason === 'multiple');
  const everywhere = relevant.every(({ verdict }) => verdict.stable);
  return {
    verdict: everywhere
      ? 'unconditionally stable'
      : unsolvable
        ? 'degenerate newest level'
        : intervals.length === 0 && isolated.length === 0
          ? 'unstable for all nonzero values'
          : 'conditionally stable',
    intervals,
    isolatedStablePoints: isolated,
    lostAt: everywhere ? null : lossOf(context),
    method: 'exact',
    note: linear
      ? `Around ${formatRational(linear.sample)} all roots satisfy |z| <= 1, but a multiple root stands on the unit circle: growth linear in n.`
      : null,
  };
}

/** Whether negative values of the scheme's parameter make its equation ill-posed. */
export const sideOf = (scheme: ScalarScheme): 'both' | 'non-negative' =>
  CONVENTIONS[scheme.equation].nonNegative.includes(scheme.parameters[0] ?? '') ? 'non-negative' : 'both';

/**
 * All stable intervals with algebraic ends, isolated stable values and the behaviour at each end.
 * One dimension, one parameter; any number of levels, real or complex coefficients.
 * @param multipleRoots 'allowed' where the scheme is the characteristic polynomial of a system: ends are then called
 *        open for multiple unit roots, but gaps are not called unstable for them
 */
export function exactIntervals(
  scheme: ScalarScheme,
  budget: WorkBudget,
  multipleRoots: MultipleRoots = 'growth',
): StabilityOutcome {
  const wave = wavePolynomial(scheme);
  if (typeof wave === 'string') return { kind: 'unsupported', why: wave };
  if (rootCount(wave) < 1) return { kind: 'unsupported', why: 'The scheme has one time level only.' };
  const check = workMeter(budget);
  try {
    const survey = surveyGaps(wave, sideOf(scheme), check, multipleRoots);
    return { kind: 'decided', result: resultOf({ wave, survey, symbol: scheme.parameters[0]!, multipleRoots, check }) };
  } catch (error) {
    if (error instanceof WorkLimitReached) return { kind: 'work-limit', why: error.message };
    throw error;
  }
}
