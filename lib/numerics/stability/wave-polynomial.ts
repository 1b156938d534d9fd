/**
 * A one-dimensional, one-parameter scalar scheme applied to the wave w = e^(iθ): the polynomial
 *
 *     P(z; w, p) = Σ_k a_k(w, p) z^k,   a_k = Σ coefficient · w^wave · p^power
 *
 * over the Gaussian integers, oldest level first. Roots |z| ≤ 1 for all |w| = 1 mean stability.
 */
import type { ScalarScheme } from '../canonical-scheme';
import {
  exactQuotient,
  gcd as commonPolynomial,
  type IntegerPolynomial,
  trimmed,
  withoutRoot,
} from '../integer-polynomial';
import { add, compare, gcd, mul, type Rational, rational, sub, ZERO } from '../rational';

export interface GaussianInteger {
  readonly re: bigint;
  readonly im: bigint;
}

export interface WaveTerm extends GaussianInteger {
  /** Exponent of w. */
  readonly wave: number;
  /** Exponent of the parameter. */
  readonly power: number;
}

export interface WavePolynomial {
  /** a_0 … a_m; the newest and the oldest are not identically zero. */
  readonly levels: readonly (readonly WaveTerm[])[];
  /** Largest exponent of w over all terms; the smallest is 0. */
  readonly span: number;
  readonly parameterDegree: number;
  /** All coefficients are real: waves θ and −θ behave alike. */
  readonly real: boolean;
  readonly timeOrder: 1 | 2;
}

export const rootCount = (wave: WavePolynomial) => wave.levels.length - 1;

/** The polynomial of a scheme, or a sentence saying why this scheme has none of this kind. */
export function wavePolynomial(scheme: ScalarScheme): WavePolynomial | string {
  if (scheme.dims !== 1) return 'Exact bounds are computed in one dimension.';
  if (scheme.parameters.length !== 1) return 'Exact bounds are computed for one parameter.';
  const terms = scheme.terms.filter((term) => term.coefficient.length > 0);
  const first = terms[0];
  if (!first) return 'The scheme has no terms.';

  let common = 1n;
  for (const { coefficient } of terms)
    for (const { re, im } of coefficient)
      for (const den of [re.den, im.den]) common = (common / gcd(common, den)) * den;

  const oldest = terms.reduce((low, { level }) => (compare(level, low) < 0 ? level : low), first.level);
  const twist = staggering(terms, oldest, first);
  if (!twist)
    return 'Exact bounds are computed for whole levels, and for offsets that differ by whole grid spacings within each level and are staggered evenly from level to level.';
  const levels: WaveTerm[][] = [];
  for (const { level, offset, coefficient } of terms) {
    const at = Number(sub(level, oldest).num);
    // z stands for z e^(i twist θ): staggered levels come onto one grid, and no modulus changes.
    const shift = sub(sub(offset[0]!, first.offset[0]!), mul(twist, sub(level, first.level)));
    while (levels.length <= at) levels.push([]);
    for (const { powers, re, im } of coefficient)
      levels[at]!.push({
        wave: Number(shift.num),
        power: powers[0]!,
        re: re.num * (common / re.den),
        im: im.num * (common / im.den),
      });
  }
  return normalized(withoutCommonWaves(levels), scheme.timeOrder);
}

/**
 * How far the grid moves from level to level, in grid spacings: the least s for which offset − s · level is the same
 * up to whole spacings for all terms; null where levels are not whole or there is no such s.
 */
function staggering(terms: ScalarScheme['terms'], oldest: Rational, first: ScalarScheme['terms'][number]) {
  const steps = terms.map(({ level, offset }) => ({
    levels: sub(level, first.level),
    shift: sub(offset[0]!, first.offset[0]!),
  }));
  if (sub(first.level, oldest).den !== 1n || steps.some(({ levels }) => levels.den !== 1n)) return null;
  const other = steps.find(({ levels }) => levels.num !== 0n);
  if (!other) return ZERO;
  const height = other.levels.num < 0n ? -other.levels.num : other.levels.num;
  for (let whole = 0n; whole < height; whole++) {
    const sum = add(other.shift, rational(whole));
    const twist = mul(sum, rational(1n, other.levels.num));
    if (steps.every(({ levels, shift }) => sub(shift, mul(twist, levels)).den === 1n))
      return sub(twist, rational(floorOf(twist)));
  }
  return null;
}

const floorOf = ({ num, den }: Rational) => (num >= 0n ? num / den : -((-num + den - 1n) / den));

/**
 * Without a factor in w that all coefficients share: for its waves the scheme says nothing at all, for the others it
 * cancels. Looked for in real schemes only.
 */
function withoutCommonWaves(levels: readonly (readonly WaveTerm[])[]): readonly (readonly WaveTerm[])[] {
  const all = levels.flat();
  if (all.some((term) => term.im !== 0n)) return levels;
  const lowest = Math.min(...all.map((term) => term.wave));
  const rows = levels.map((terms) => {
    const byPower = new Map<number, bigint[]>();
    for (const { power, wave, re } of terms) {
      const row = byPower.get(power) ?? byPower.set(power, []).get(power)!;
      while (row.length <= wave - lowest) row.push(0n);
      row[wave - lowest]! += re;
    }
    return [...byPower].map(([power, row]) => ({ power, row: trimmed(row) }));
  });
  let common: IntegerPolynomial = [];
  for (const { row } of rows.flat()) common = commonPolynomial(common, row);
  const [factor] = withoutRoot(common, 0n);
  if (factor.length <= 1) return levels;
  return rows.map((each) =>
    each.flatMap(({ power, row }) =>
      (exactQuotient(row, factor) ?? []).flatMap((re, wave) => (re === 0n ? [] : [{ power, wave, re, im: 0n }])),
    ),
  );
}

/** Common powers of w and of the parameter, and common integer factors, taken out. */
export function normalized(levels: readonly (readonly WaveTerm[])[], timeOrder: 1 | 2): WavePolynomial {
  const all = levels.flat();
  const lowest = Math.min(...all.map((term) => term.wave));
  const span = Math.max(...all.map((term) => term.wave)) - lowest;
  const power = Math.min(...all.map((term) => term.power));
  let common = 0n;
  for (const { re, im } of all) common = gcd(gcd(common, re), im);
  return {
    levels: levels.map((terms) =>
      terms.map((term) => ({
        wave: term.wave - lowest,
        power: term.power - power,
        re: term.re / common,
        im: term.im / common,
      })),
    ),
    span,
    parameterDegree: Math.max(...all.map((term) => term.power)) - power,
    real: all.every((term) => term.im === 0n),
    timeOrder,
  };
}

/** The polynomial at one rational value num/den of the parameter: no parameter is left in it. */
export function atParameter(wave: WavePolynomial, num: bigint, den: bigint): WavePolynomial | null {
  const levels = wave.levels.map((terms) => {
    const byWave = new Map<number, { re: bigint; im: bigint }>();
    for (const term of terms) {
      const factor = num ** BigInt(term.power) * den ** BigInt(wave.parameterDegree - term.power);
      const sum = byWave.get(term.wave) ?? { re: 0n, im: 0n };
      byWave.set(term.wave, { re: sum.re + term.re * factor, im: sum.im + term.im * factor });
    }
    return [...byWave]
      .filter(([, { re, im }]) => re !== 0n || im !== 0n)
      .map(([exponent, value]) => ({ wave: exponent, power: 0, ...value }));
  });
  if (levels.every((terms) => terms.length === 0)) return null;
  return normalized(levels, wave.timeOrder);
}

/**
 * a_0 … a_m at p = num/den and w = (a + ib)/(a − ib), that is θ = 2 atan(b/a): Gaussian integers up to one
 * common positive factor and one common factor of modulus 1.
 */
export function atWave(
  wave: WavePolynomial,
  parameter: { readonly num: bigint; readonly den: bigint },
  a: bigint,
  b: bigint,
): GaussianInteger[] {
  // w^k ∝ (a + ib)^k (a − ib)^(span − k)
  const up = gaussianPowers(a, b, wave.span);
  const down = gaussianPowers(a, -b, wave.span);
  const waves = up.map((u, k) => product(u, down[wave.span - k]!));
  const powers: bigint[] = [];
  for (let k = 0; k <= wave.parameterDegree; k++)
    powers.push(parameter.num ** BigInt(k) * parameter.den ** BigInt(wave.parameterDegree - k));
  return wave.levels.map((terms) => {
    let [re, im] = [0n, 0n];
    for (const term of terms) {
      const w = waves[term.wave]!;
      const factor = powers[term.power]!;
      re += factor * (term.re * w.re - term.im * w.im);
      im += factor * (term.re * w.im + term.im * w.re);
    }
    return { re, im };
  });
}

export const product = (a: GaussianInteger, b: GaussianInteger): GaussianInteger => ({
  re: a.re * b.re - a.im * b.im,
  im: a.re * b.im + a.im * b.re,
});

function gaussianPowers(a: bigint, b: bigint, count: number): GaussianInteger[] {
  const powers: GaussianInteger[] = [{ re: 1n, im: 0n }];
  for (let k = 0; k < count; k++) powers.push(product(powers[k]!, { re: a, im: b }));
  return powers;
}

/** Coefficients a_0 … a_m at a wave θ, as [re, im] doubles. */
export type SampledLevels = (theta: number) => [number, number][];

/** The polynomial in double precision: first the parameter, then the wave. Beyond the range of a double all is scaled down together. */
export function sampled(wave: WavePolynomial): (parameter: number) => SampledLevels {
  const largest = wave.levels.flat().reduce((bits, { re, im }) => Math.max(bits, bitLength(re), bitLength(im)), 0);
  const shift = BigInt(Math.max(0, largest - 900));
  const terms = wave.levels.flatMap((each, level) =>
    each.map((term) => ({ ...term, level, re: Number(term.re >> shift), im: Number(term.im >> shift) })),
  );
  const size = wave.span + 1;
  return (parameter) => {
    const re = new Float64Array(wave.levels.length * size);
    const im = new Float64Array(wave.levels.length * size);
    for (const term of terms) {
      const factor = parameter ** term.power;
      re[term.level * size + term.wave]! += term.re * factor;
      im[term.level * size + term.wave]! += term.im * factor;
    }
    return (theta) => {
      const [c, s] = [Math.cos(theta), Math.sin(theta)];
      return wave.levels.map((_, level): [number, number] => {
        let [x, y] = [0, 0];
        for (let k = (level + 1) * size - 1; k >= level * size; k--)
          [x, y] = [x * c - y * s + re[k]!, x * s + y * c + im[k]!];
        return [x, y];
      });
    };
  };
}

const bitLength = (a: bigint) => (a < 0n ? -a : a).toString(2).length;
