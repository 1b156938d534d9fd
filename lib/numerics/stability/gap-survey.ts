/** The real line of one parameter cut at its critical values, and each gap decided at one short rational. */
import { AlgebraicNumber } from '../algebraic-number';
import { atInner } from '../bivariate-polynomial';
import { squareFreePart } from '../integer-polynomial';
import { isolateRealRoots } from '../real-roots';
import { type Rational, rational, toNumber } from '../rational';
import { simplestBetween } from '../simple-rational';
import { type CurveComponents, components, criticalPolynomials, criticalValues } from './critical-values';
import { type CrossingCurve, crossingCurve } from './crossing-curve';
import { behaviourAt } from './limit-behaviour';
import { decideAt, thetaOf } from './parameter-decision';
import { rootCount, type WavePolynomial } from './wave-polynomial';

export type GapVerdict =
  | { readonly stable: true }
  | { readonly stable: false; readonly reason: 'outside' | 'multiple' | 'unsolvable'; readonly theta: number };

/**
 * What multiple roots on the unit circle mean: 'growth' for one scalar scheme; 'allowed' for the characteristic
 * polynomial of a system, whose amplification matrix alone tells whether they are semisimple.
 */
export type MultipleRoots = 'growth' | 'allowed';

export interface Gap {
  readonly sample: Rational;
  readonly verdict: GapVerdict;
}

export interface Survey {
  readonly curve: CrossingCurve;
  readonly parts: CurveComponents;
  /** Ascending; 0 is always among them. */
  readonly values: readonly AlgebraicNumber[];
  /**
   * gaps[k] lies below values[k], gaps[k + 1] above it. Where negative values mean nothing, gaps[0] stands for them
   * and counts as unstable.
   */
  readonly gaps: readonly Gap[];
  readonly side: 'both' | 'non-negative';
}

/** Waves for which the newest level cannot be solved for at this parameter, or at all where `parameter` is null. */
export function unsolvableWaves(curve: CrossingCurve, parameter: Rational | null, check: () => void): number[] {
  const lead = curve.factors.find(({ kind }) => kind === 'lead');
  if (!lead || !parameter) return [];
  const f = atInner(lead.polynomial, parameter.num, parameter.den);
  if (f.length <= 1) return [];
  const roots = isolateRealRoots(squareFreePart(f), curve.variable === 'cosine' ? [-1n, 1n] : undefined, check);
  return roots.map(({ lo, hi, den }) => {
    const middle = toNumber(rational(lo + hi, 2n * den));
    return curve.variable === 'cosine' ? Math.acos(Math.max(-1, Math.min(1, middle))) : 2 * Math.atan(middle);
  });
}

export function decideGap(
  wave: WavePolynomial,
  curve: CrossingCurve,
  parts: CurveComponents,
  sample: Rational,
  check: () => void,
  multipleRoots: MultipleRoots = 'growth',
): GapVerdict {
  const decision = decideAt(wave, parts, sample, check);
  if (!decision.stable && (decision.reason === 'outside' || multipleRoots === 'growth'))
    return { stable: false, reason: decision.reason, theta: thetaOf(decision.witness) };
  const unsolvable = unsolvableWaves(curve, sample, check);
  if (unsolvable.length > 0) return { stable: false, reason: 'unsolvable', theta: unsolvable[0]! };
  if (rootCount(wave) > 1 && multipleRoots === 'growth') {
    const { multiple } = behaviourAt(wave, parts, AlgebraicNumber.ofRational(sample), check);
    if (multiple.length > 0) return { stable: false, reason: 'multiple', theta: multiple[0]! };
  }
  return { stable: true };
}

function samplesOfGaps(values: readonly AlgebraicNumber[]): Rational[] {
  const first = values[0]!.refine(2);
  const samples = [rational(first.lo.num / first.lo.den - 2n)];
  for (let k = 1; k < values.length; k++) {
    const [left, right] = [values[k - 1]!, values[k]!];
    for (let bits = 4; left.hi.num * right.lo.den >= right.lo.num * left.hi.den; bits += 4) {
      left.refine(bits);
      right.refine(bits);
    }
    samples.push(simplestBetween(left.hi, right.lo));
  }
  const last = values.at(-1)!.refine(2);
  samples.push(rational(last.hi.num / last.hi.den + 2n));
  return samples;
}

/**
 * @param side 'non-negative' where negative values of the parameter mean nothing
 * @param check called between steps; may throw to stop
 */
export function surveyGaps(
  wave: WavePolynomial,
  side: 'both' | 'non-negative',
  check: () => void,
  multipleRoots: MultipleRoots = 'growth',
): Survey {
  const curve = crossingCurve(wave, check);
  const parts = components(curve, check);
  const values = criticalValues(criticalPolynomials(parts, check), side, check);
  const gaps = samplesOfGaps(values).map((sample, k): Gap => {
    if (k === 0 && side === 'non-negative') return { sample, verdict: { stable: false, reason: 'outside', theta: 0 } };
    return { sample, verdict: decideGap(wave, curve, parts, sample, check, multipleRoots) };
  });
  return { curve, parts, values, gaps, side };
}
