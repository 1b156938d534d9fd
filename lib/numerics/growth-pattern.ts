/**
 * Which coefficients of ln|z| are exactly zero, where z(p, t) is a simple root about p = 0 and a wave: the series is
 * computed modulo three primes with a square root of −1. A coefficient that is not 0 modulo a prime is not 0; one that
 * is 0 modulo all three (78 bits together) counts as 0.
 */
import type { ScalarScheme } from './canonical-scheme';
import { type PrimeField, primeField } from './prime-field';
import { compare, sub, type Rational } from './rational';

/** The wave expanded about: theta = 0 or pi with the distance t in grid spacings, or any wave held fixed (no t). */
export type PatternBase = 'zero' | 'pi' | 'any wave';

export interface PatternSize {
  /** Powers 0 … jMax of p and 0 … kMax of t. */
  readonly jMax: number;
  readonly kMax: number;
}

const PRIMES = 3;
/** A wave of the field that stands for any: w = u², so that half offsets have a value too. */
const PLACE = 1_234_577;

type Series = readonly number[];

class Truncated {
  readonly width: number;
  constructor(
    readonly field: PrimeField,
    readonly size: PatternSize,
  ) {
    this.width = size.kMax + 1;
  }

  zero(): number[] {
    return new Array<number>((this.size.jMax + 1) * this.width).fill(0);
  }

  multiply(a: Series, b: Series): number[] {
    const { field, width, size } = this;
    const out = this.zero();
    a.forEach((x, at) => {
      if (x === 0) return;
      const k = at % width;
      const j = (at - k) / width;
      for (let m = 0; j + m <= size.jMax; m++)
        for (let n = 0; k + n <= size.kMax; n++) {
          const y = b[m * width + n]!;
          const to = (j + m) * width + k + n;
          if (y !== 0) out[to] = field.add(out[to]!, field.mul(x, y));
        }
    });
    return out;
  }

  addScaled(a: Series, b: Series, factor: number): number[] {
    return a.map((x, k) => this.field.add(x, this.field.mul(b[k]!, factor)));
  }
}

/** A rational in the field, or null where its denominator is 0 there. */
function residue(field: PrimeField, { num, den }: Rational): number | null {
  const below = field.reduce(den);
  return below === 0 ? null : field.mul(field.reduce(num), field.inverse(below));
}

/** Coefficients of z^0 … z^m as series; `unit` is the square root of −1 that stands for i. */
function coefficientSeries(
  series: Truncated,
  scheme: ScalarScheme,
  base: PatternBase,
  unit: number,
  half: number,
): number[][] | null {
  const { field, size, width } = series;
  const oldest = scheme.terms.reduce((low, t) => (compare(t.level, low) < 0 ? t.level : low), scheme.terms[0]!.level);
  const out: number[][] = [];
  for (const { level, offset, coefficient } of scheme.terms) {
    const height = sub(level, oldest);
    const [place] = offset;
    if (height.den !== 1n || !place || place.den > 2n) return null;
    while (out.length <= Number(height.num)) out.push(series.zero());
    const row = out[Number(height.num)]!;
    const halves = Number((place.num * 2n) / place.den);
    const root = base === 'any wave' ? half : base === 'pi' ? unit : 1;
    const phase = field.power(halves < 0 ? field.inverse(root) : root, Math.abs(halves));
    const along = residue(field, place)!;
    for (const { powers, re, im } of coefficient) {
      const j = powers[0]!;
      const [real, imaginary] = [residue(field, re), residue(field, im)];
      if (real === null || imaginary === null) return null;
      if (j > size.jMax) continue;
      let value = field.mul(field.add(real, field.mul(unit, imaginary)), phase);
      for (let k = 0; k <= size.kMax; k++) {
        row[j * width + k] = field.add(row[j * width + k]!, value);
        value = field.mul(value, field.mul(field.mul(unit, along), field.inverse(k + 1)));
      }
    }
  }
  return out;
}

/** ln(z / z0) of the root that is z0 at p = t = 0; null where z0 is not a simple root in the field. */
function rootLogarithm(series: Truncated, levels: readonly Series[], z0: number): number[] | null {
  const { field, size } = series;
  let slope = 0;
  let power = 1;
  for (let k = 1; k < levels.length; k++) {
    slope = field.add(slope, field.mul(field.mul(k, levels[k]![0]!), power));
    power = field.mul(power, z0);
  }
  if (slope === 0) return null;
  const step = field.sub(0, field.inverse(slope));
  let z = series.zero();
  z[0] = z0;
  // Each pass settles one more total order.
  for (let pass = 0; pass <= size.jMax + size.kMax; pass++) {
    let value = [...levels.at(-1)!];
    for (let k = levels.length - 2; k >= 0; k--) value = series.addScaled(series.multiply(value, z), levels[k]!, 1);
    if (pass === 0 && value[0] !== 0) return null;
    z = series.addScaled(z, value, step);
  }
  const inverse = field.inverse(z0);
  const u = z.map((x) => field.mul(x, inverse));
  u[0] = 0;
  let out = series.zero();
  let uPower: Series = u;
  for (let n = 1; n <= size.jMax + size.kMax; n++) {
    const reciprocal = field.inverse(n);
    out = series.addScaled(out, uPower, n % 2 === 1 ? reciprocal : field.sub(0, reciprocal));
    uPower = series.multiply(uPower, u);
  }
  return out;
}

/**
 * @param scheme one dimension, one parameter
 * @param quarter the root at p = 0 and the base wave is i^quarter
 * @returns true at j * (kMax + 1) + k where the coefficient of p^j t^k in ln|z| is 0; null where the root is not
 *   simple or not i^quarter there, or an offset is no multiple of 1/2
 */
export function vanishingPattern(
  scheme: ScalarScheme,
  base: PatternBase,
  quarter: number,
  size: PatternSize,
): boolean[] | null {
  let vanishes: boolean[] | null = null;
  for (let k = 0; k < PRIMES; k++) {
    const field = primeField(k);
    const series = new Truncated(field, size);
    const minus = field.sub(0, field.imaginary);
    const halfBack = field.inverse(PLACE);
    const sides = (
      [
        [field.imaginary, PLACE],
        [minus, halfBack],
      ] as const
    ).map(([unit, half]) => {
      const levels = coefficientSeries(series, scheme, base, unit, half);
      return levels && rootLogarithm(series, levels, field.power(unit, quarter));
    });
    const [here, mirror] = sides;
    if (!here || !mirror) return null;
    const sum = here.map((x, at) => field.add(x, mirror[at]!) === 0);
    vanishes = vanishes ? vanishes.map((was, at) => was && sum[at]!) : sum;
  }
  return vanishes;
}
