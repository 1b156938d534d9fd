/** Single parameter values that are stable although their whole neighbourhood is not (exact shifts, for instance). */
import type { AlgebraicNumber } from '../algebraic-number';
import { formatRational } from '../rational';
import { components } from './critical-values';
import { crossingCurve } from './crossing-curve';
import { type Survey, unsolvableWaves } from './gap-survey';
import { behaviourAt, worstWave } from './limit-behaviour';
import { decideAt } from './parameter-decision';
import { atParameter, rootCount, type WavePolynomial } from './wave-polynomial';

const ROUNDING = 1e-9;

function isStableAt(wave: WavePolynomial, survey: Survey, value: AlgebraicNumber, check: () => void): boolean {
  // Most candidates are told by one wave with a modulus clearly above 1.
  if (worstWave(wave, value.toNumber()).modulus > 1 + ROUNDING) return false;
  const behaviour = behaviourAt(wave, survey.parts, value, check);
  if (behaviour.multiple.length > 0 || behaviour.unsolvable.length > 0) return false;
  const exact = value.exact;
  if (!exact) {
    // At an irrational value only the identical vanishing of the crossing factor proves |g| = 1 for all waves.
    return rootCount(wave) === 1 && survey.parts.parameters.some((factor) => value.isRootOf(factor));
  }
  const there = atParameter(wave, exact.num, exact.den);
  if (!there || there.levels.at(-1)!.length === 0) return false;
  const curve = crossingCurve(there, check);
  if (unsolvableWaves(curve, { num: 0n, den: 1n }, check).length > 0) return false;
  return decideAt(there, components(curve, check), { num: 0n, den: 1n }, check).stable;
}

/** Texts, exact where rational. The trivial value 0 is not counted. */
export function isolatedStableValues(wave: WavePolynomial, survey: Survey, check: () => void): string[] {
  return survey.values.flatMap((value, k) => {
    if (survey.gaps[k]!.verdict.stable || survey.gaps[k + 1]!.verdict.stable) return [];
    if (value.compareRational({ num: 0n, den: 1n }) === 0) return [];
    // A rational value is known as such only once it is asked for.
    value.toDecimal(20);
    if (!isStableAt(wave, survey, value, check)) return [];
    return [value.exact ? formatRational(value.exact) : value.toDecimal(20)];
  });
}
