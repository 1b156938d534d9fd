/** Whether all roots stay in the unit disc for every wave at one rational value of the parameter: decided exactly. */
import { atInner } from '../bivariate-polynomial';
import { type IntegerPolynomial, multiply, squareFreePart } from '../integer-polynomial';
import { halved, isolateRealRoots, type RootBracket } from '../real-roots';
import { compare, type Rational, rational } from '../rational';
import { integerSquareRoot, simplestBetween } from '../simple-rational';
import type { CurveComponents } from './critical-values';
import { rootPosition } from './schur-cohn';
import { atWave, type WavePolynomial } from './wave-polynomial';

/** The wave θ = 2 atan(b/a), exact. */
export interface RationalWave {
  readonly a: bigint;
  readonly b: bigint;
}

export type ParameterDecision =
  | { readonly stable: true }
  /** Some root outside the circle at this wave, exactly. */
  | { readonly stable: false; readonly reason: 'outside'; readonly witness: RationalWave }
  /** Multiple roots on the circle for a whole band of waves. */
  | { readonly stable: false; readonly reason: 'multiple'; readonly witness: RationalWave };

export const thetaOf = ({ a, b }: RationalWave) => 2 * Math.atan2(Number(b), Number(a));

/** Waves looked at first: most unstable values are told by one of them. */
const QUICK: readonly (readonly [bigint, bigint])[] = [
  [0n, 1n],
  [1n, 1n],
  [2n, 1n],
  [1n, 2n],
  [4n, 1n],
  [1n, 4n],
  [1n, 0n],
  [12n, 1n],
  [1n, 12n],
];

/** Real roots, in the wave variable, of all components of the curve at this parameter, ascending and disjoint. */
function specialWaves(
  curve: CurveComponents,
  parameter: Rational,
  check: () => void,
): [IntegerPolynomial, RootBracket[]] {
  let all: IntegerPolynomial = [1n];
  for (const component of curve.mixed) all = multiply(all, atInner(component, parameter.num, parameter.den));
  for (const wave of curve.waves) all = multiply(all, wave);
  const f = squareFreePart(all);
  return [f, isolateRealRoots(f, curve.variable === 'cosine' ? [-1n, 1n] : undefined, check)];
}

/** A wave whose cosine lies strictly between two rationals of [−1, 1]. */
function waveBetween(lo: Rational, hi: Rational): RationalWave {
  const inside = (x: Rational) => {
    const [aa, bb] = [x.den * x.den, x.num * x.num];
    const cosine = rational(aa - bb, aa + bb);
    return compare(lo, cosine) < 0 && compare(cosine, hi) < 0;
  };
  const tangent = (c: Rational) => Math.sqrt(Number(c.den - c.num) / Number(c.den + c.num));
  const [left, right] = [tangent(hi), tangent(lo)];
  if (right - left > 1e-9 && left < 1e9) {
    const upper = Number.isFinite(right) ? right : 4 * left + 4;
    const margin = (upper - left) / 8;
    const scale = 2 ** 60;
    const exact = (x: number) => rational(BigInt(Math.round(x * scale)), BigInt(scale));
    const x = simplestBetween(exact(left + margin), exact(upper - margin));
    if (inside(x)) return { a: x.den, b: x.num };
  }
  const middle = rational(lo.num * hi.den + hi.num * lo.den, 2n * lo.den * hi.den);
  const [up, down] = [middle.den - middle.num, middle.den + middle.num];
  for (let shift = 8n; ; shift *= 2n) {
    const x = rational(integerSquareRoot((up * down) << (2n * shift)), down << shift);
    if (inside(x)) return { a: x.den, b: x.num };
  }
}

/** One wave in each gap between neighbouring special waves. */
function gapWaves(curve: CurveComponents, parameter: Rational, check: () => void): RationalWave[] {
  const [f, found] = specialWaves(curve, parameter, check);
  const roots = [...found];
  const gaps: [Rational | null, Rational | null][] = [];
  const lowest = curve.variable === 'cosine' ? rational(-1n) : null;
  const highest = curve.variable === 'cosine' ? rational(1n) : null;
  for (let k = 0; k <= roots.length; k++) {
    const [before, after] = [roots[k - 1], roots[k]];
    if (before && after) {
      let [left, right] = [before, after];
      while (left.hi * right.den >= right.lo * left.den) {
        left = halved(f, left);
        right = halved(f, right);
      }
      roots[k] = right;
      gaps.push([rational(left.hi, left.den), rational(right.lo, right.den)]);
    } else if (after) gaps.push([lowest, endOfGap(f, after, -1)]);
    else if (before) gaps.push([endOfGap(f, before, 1), highest]);
    else gaps.push([lowest, highest]);
  }
  return gaps.flatMap(([lo, hi]) => {
    if (curve.variable === 'tangent') {
      const x =
        lo && hi
          ? simplestBetween(lo, hi)
          : lo
            ? rational(lo.num / lo.den + 2n)
            : hi
              ? rational(hi.num / hi.den - 2n)
              : rational(1n);
      return [{ a: x.den, b: x.num }];
    }
    if (compare(lo!, hi!) >= 0) return [];
    const wave = waveBetween(lo!, hi!);
    return [wave, { a: wave.a, b: -wave.b }];
  });
}

/** The end of a bracket on one side, moved off −1 and 1 where the root is not there itself. */
function endOfGap(f: IntegerPolynomial, root: RootBracket, side: -1 | 1): Rational {
  let bracket = root;
  const end = () => rational(side < 0 ? bracket.lo : bracket.hi, bracket.den);
  while (bracket.lo < bracket.hi && compare(end(), rational(side)) === 0) bracket = halved(f, bracket);
  return end();
}

/**
 * @param curve components of the crossing curve of the scheme
 * @param check called between steps; may throw to stop
 */
export function decideAt(
  wave: WavePolynomial,
  curve: CurveComponents,
  parameter: Rational,
  check: () => void = () => undefined,
): ParameterDecision {
  for (const [a, b] of QUICK) {
    const both = wave.real || b === 0n || a === 0n ? [b] : [b, -b];
    for (const side of both)
      if (rootPosition(atWave(wave, parameter, a, side)) === 'outside')
        return { stable: false, reason: 'outside', witness: { a, b: side } };
  }
  let multiple: RationalWave | null = null;
  for (const witness of gapWaves(curve, parameter, check)) {
    if (wave.real && witness.b < 0n) continue;
    check();
    const position = rootPosition(atWave(wave, parameter, witness.a, witness.b));
    if (position === 'outside') return { stable: false, reason: 'outside', witness };
    if (position === 'multiple on circle') multiple = witness;
  }
  return multiple ? { stable: false, reason: 'multiple', witness: multiple } : { stable: true };
}
