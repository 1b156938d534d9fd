/** Parameter values at which the leading error term vanishes and the order rises. */
import type { ScalarScheme } from './canonical-scheme';
import { CONVENTIONS } from './equation';
import { equationNumbers } from './equation-terms';
import type { ResidualSeries } from './modified-equation';
import { commonFactor, exactQuotient, monic } from './polynomial-division';
import { isZero, type Polynomial } from './polynomial';
import {
  add,
  formatRational,
  gcd,
  isZero as isZeroQ,
  mul,
  neg,
  ONE,
  power,
  rational,
  sign,
  sub,
  ZERO,
  type Rational,
} from './rational';

export interface SpecialValue {
  parameter: string;
  /** Exact: "1/6", "sqrt(10)/5". */
  value: string;
  /** Order at that value; null: the scheme reproduces the solution exactly. */
  order: number | null;
}

/** The coefficient polynomials in the one parameter, one for each power product of X, Y, Z and for both parts. */
function inParameter(a: Polynomial): Polynomial[] {
  const groups = new Map<string, Polynomial[number][]>();
  for (const m of a)
    for (const [part, value] of [
      ['re', m.re],
      ['im', m.im],
    ] as const) {
      if (isZeroQ(value)) continue;
      const key = `${part}|${m.powers.slice(1).join()}`;
      groups.set(key, [...(groups.get(key) ?? []), { powers: [m.powers[0]!], re: value, im: ZERO }]);
    }
  return [...groups.values()];
}

const coefficientsOf = (a: Polynomial): Rational[] => {
  const list = new Array<Rational>(a[a.length - 1]!.powers[0]! + 1).fill(ZERO);
  for (const m of a) list[m.powers[0]!] = m.re;
  return list;
};
const fromCoefficients = (list: readonly Rational[]): Polynomial =>
  list.flatMap((re, k) => (isZeroQ(re) ? [] : [{ powers: [k], re, im: ZERO }]));

function divisors(n: bigint): bigint[] {
  const found: bigint[] = [];
  for (let d = 1n; d * d <= n && d < 2048n; d++) if (n % d === 0n) found.push(d, n / d);
  return [...new Set(found)];
}

interface Factor {
  readonly polynomial: Polynomial;
  readonly values: { readonly text: string; readonly size: number; readonly rational: Rational | null }[];
}

const valueAt = (list: readonly Rational[], x: Rational) => list.reduceRight((sum, c) => add(mul(sum, x), c), ZERO);

/** n = square² · free with free square-free as far as small primes go. */
function splitSquare(n: bigint): { square: bigint; free: bigint } {
  let [square, free] = [1n, n];
  for (let d = 2n; d * d <= free && d < 1000n; d++)
    while (free % (d * d) === 0n) {
      free /= d * d;
      square *= d;
    }
  return { square, free };
}

/** Real roots of a x² + b x + c with integers, irrational. */
function quadraticRoots(c: bigint, b: bigint, a: bigint): Factor['values'] {
  const discriminant = b * b - 4n * a * c;
  if (discriminant <= 0n) return [];
  const { square, free } = splitSquare(discriminant);
  const bottom = a < 0n ? -2n * a : 2n * a;
  const middle = a < 0n ? b : -b;
  const common = gcd(gcd(middle, square), bottom);
  const [m, s, q] = [middle / common, square / common, bottom / common];
  const radical = s === 1n ? `sqrt(${free})` : `${s}*sqrt(${free})`;
  return [1, -1].map((side) => {
    const head = m === 0n ? `${side < 0 ? '-' : ''}${radical}` : `${m} ${side < 0 ? '-' : '+'} ${radical}`;
    const text = q === 1n ? head : m === 0n ? `${head}/${q}` : `(${head})/${q}`;
    return { text, size: (Number(m) + side * Number(s) * Math.sqrt(Number(free))) / Number(q), rational: null };
  });
}

/** Factors with recognisable real roots: linear ones, and a quadratic or biquadratic remainder. */
function recognisedFactors(a: Polynomial): Factor[] {
  let list = coefficientsOf(a);
  while (list.length > 1 && isZeroQ(list[0]!)) list = list.slice(1);
  let den = 1n;
  for (const c of list) den = (den / gcd(den, c.den)) * c.den;
  const whole = list.map((c) => (c.num * den) / c.den);
  const size = (n: bigint) => (n < 0n ? -n : n);
  const factors: Factor[] = [];
  let rest = fromCoefficients(list);
  for (const q of divisors(size(whole[whole.length - 1]!)))
    for (const p of divisors(size(whole[0]!)))
      for (const root of [rational(p, q), rational(-p, q)]) {
        if (root.den !== q || !isZeroQ(valueAt(list, root))) continue;
        const polynomial = fromCoefficients([neg(root), ONE]);
        factors.push({
          polynomial,
          values: [{ text: formatRational(root), size: Number(root.num) / Number(root.den), rational: root }],
        });
        for (let next = exactQuotient(rest, polynomial); next; next = exactQuotient(rest, polynomial)) rest = next;
      }
  const remaining = coefficientsOf(rest);
  const last = remaining[remaining.length - 1]!;
  const integers = remaining.map((c) => (c.num * den * last.den) / c.den);
  if (integers.length === 3)
    factors.push({ polynomial: rest, values: quadraticRoots(integers[0]!, integers[1]!, integers[2]!) });
  if (integers.length === 5 && integers[1] === 0n && integers[3] === 0n) {
    const disc = integers[2]! ** 2n - 4n * integers[0]! * integers[4]!;
    if (disc < 0n) return factors;
    const { square, free } = splitSquare(disc);
    if (free !== 1n) return factors;
    for (const s of [square, -square]) {
      const squareOfRoot = rational(-integers[2]! + s, 2n * integers[4]!);
      if (sign(squareOfRoot) > 0)
        factors.push({
          polynomial: fromCoefficients([neg(squareOfRoot), ZERO, ONE]),
          values: quadraticRoots(-squareOfRoot.num, 0n, squareOfRoot.den),
        });
    }
  }
  return factors;
}

/** Exact reproduction: at this value all exponentials e^((offset − level·number)·X) cancel. Transport, and waves in one dimension. */
function isExactShift(scheme: ScalarScheme, value: Rational): boolean {
  const numbers = equationNumbers(scheme);
  const at = (a: Polynomial) => a.reduce((sum, m) => add(sum, mul(m.re, power(value, m.powers[0]!))), ZERO);
  const names = { advection: ['lambda'], wave: ['lambda'], 'advection-2d': ['lambda_x', 'lambda_y'] } as const;
  const isTransport =
    scheme.equation === 'advection' || scheme.equation === 'wave' || scheme.equation === 'advection-2d';
  if (!isTransport) return false;
  const speed = names[scheme.equation as keyof typeof names].map((name) => at(numbers.get(name)!));
  const directions = scheme.equation === 'wave' ? [speed, speed.map(neg)] : [speed];
  return directions.every((direction) => {
    const balance = new Map<string, Rational>();
    for (const { level, offset, coefficient } of scheme.terms) {
      const key = offset.map((o, axis) => formatRational(sub(o, mul(level, direction[axis]!)))).join();
      balance.set(key, add(balance.get(key) ?? ZERO, at(coefficient)));
    }
    return [...balance.values()].every(isZeroQ);
  });
}

/**
 * @param degree lowest degree of the residual
 * @param order  the order that belongs to it; each further degree is one order more
 */
export function specialValues(
  scheme: ScalarScheme,
  series: ResidualSeries,
  degree: number,
  order: number,
): SpecialValue[] {
  const parameter = scheme.parameters[0];
  if (scheme.parameters.length !== 1 || parameter === undefined) return [];
  const leading = inParameter(series.part(degree));
  const factor = commonFactor(leading, 1);
  if (factor.length < 2) return [];
  const normal = inParameter(series.normal)[0] ?? [];
  const isPositive = CONVENTIONS[scheme.equation].nonNegative.length > 0;
  const found: (SpecialValue & { size: number })[] = [];
  for (const { polynomial, values } of recognisedFactors(monic(factor))) {
    if (exactQuotient(normal, polynomial)) continue;
    for (const { text, size, rational: exact } of values) {
      if (isPositive && size < 0) continue;
      let rise = 1;
      const stays = (k: number) =>
        inParameter(series.part(k)).every((a) => isZero(a) || exactQuotient(a, polynomial) !== null);
      if (exact && isExactShift(scheme, exact)) found.push({ parameter, value: text, order: null, size });
      else {
        while (rise < 8 && stays(degree + rise)) rise++;
        found.push({ parameter, value: text, order: order + rise, size });
      }
    }
  }
  return found
    .sort((a, b) => a.size - b.size)
    .map(({ parameter: name, value, order: risen }) => ({ parameter: name, value, order: risen }));
}
