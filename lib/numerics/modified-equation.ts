/**
 * The residual of a scheme as a power series in X = iθ_x (and Y, Z), with polynomials in the parameters as
 * coefficients, and from it the terms that the scheme adds to its equation:
 * u_t = L u + Σ d_j (dx^j/dt) ∂^j u, where d_j is the coefficient of X^j in ln z − σ (for u_tt: dx^j/dt² and (ln z)² − σ²).
 */
import type { ScalarScheme } from './canonical-scheme';
import { equationNumbers, symbolTerms } from './equation-terms';
import { exactQuotient } from './polynomial-division';
import { add, constant, isZero, mul, neg, scale, sub, type Monomial, type Polynomial } from './polynomial';
import { divF, fromPolynomial, type RationalFunction } from './rational-function';
import { isZero as isZeroQ, mul as mulQ, neg as negQ, power, rational, ZERO, type Rational } from './rational';
import { multiIndices, taylorFactor } from './stencil-weights';

export interface ResidualSeries {
  /** Variables of the ring: the parameters, and in several dimensions X, Y, Z behind them. */
  readonly names: readonly string[];
  /** Homogeneous part of degree k of the residual. */
  part(k: number): Polynomial;
  /** N: what the residual is divided by; no X, Y, Z in it. */
  readonly normal: Polynomial;
  /** Coefficient of degree 1 of the derivative that belongs to N; null where it has no polynomial form. */
  slope(): Polynomial | null;
  readonly variables: number;
}

type Graded = readonly Polynomial[];

/** Series in one grading with memory: part k is computed from the parts below when first asked for. */
class LevelSeries {
  private readonly parts: Polynomial[] = [];

  constructor(
    readonly level: Rational,
    private readonly terms: readonly { offset: readonly Rational[]; coefficient: Polynomial }[],
    private readonly dims: number,
  ) {}

  /** Σ coefficient·(offset·X)^n/n! over the terms of this level. */
  part(n: number): Polynomial {
    const known = this.parts[n];
    if (known) return known;
    const monomials: Monomial[] = [];
    for (const { offset, coefficient } of this.terms)
      for (const powers of multiIndices(this.dims, n)) {
        const factor = taylorFactor(offset, powers);
        if (isZeroQ(factor)) continue;
        for (const m of coefficient)
          monomials.push({
            powers: this.dims === 1 ? m.powers : [...m.powers, ...powers],
            re: mulQ(m.re, factor),
            im: isZeroQ(m.im) ? ZERO : mulQ(m.im, factor),
          });
      }
    return (this.parts[n] = add(monomials, []));
  }
}

function seriesByLevel(scheme: ScalarScheme): LevelSeries[] {
  const groups = new Map<
    string,
    { level: Rational; terms: { offset: readonly Rational[]; coefficient: Polynomial }[] }
  >();
  for (const { level, offset, coefficient } of scheme.terms) {
    const key = `${level.num}/${level.den}`;
    const group = groups.get(key) ?? { level, terms: [] };
    group.terms.push({ offset, coefficient });
    groups.set(key, group);
  }
  return [...groups.values()].map(({ level, terms }) => new LevelSeries(level, terms, scheme.dims));
}

/** Powers σ^j by degree: powers(j)[k] is the part of degree k. */
class SymbolPowers {
  private readonly list: Graded[];

  constructor(
    private readonly symbol: Graded,
    one: Polynomial,
    private readonly highest: number,
  ) {
    this.list = [[one]];
  }

  part(j: number, k: number): Polynomial {
    for (let p = this.list.length; p <= j; p++) {
      const before = this.list[p - 1]!;
      const next: Polynomial[] = [];
      before.forEach((a, degree) =>
        this.symbol.forEach((b, more) => {
          if (isZero(a) || isZero(b) || degree + more > this.highest) return;
          next[degree + more] = add(next[degree + more] ?? [], mul(a, b));
        }),
      );
      this.list.push(Array.from(next, (a) => a ?? []));
    }
    return this.list[j]![k] ?? [];
  }
}

/** σ by degree, or σ² where only that is a polynomial (waves in several dimensions). */
function symbolByDegree(scheme: ScalarScheme): { symbol: Graded; squared: boolean } {
  if (scheme.timeOrder === 2 && scheme.dims === 1)
    return { symbol: [[], neg(equationNumbers(scheme).get('lambda')!)], squared: false };
  const symbol: Polynomial[] = [];
  for (const { powers, coefficient } of symbolTerms(scheme)) {
    const degree = powers.reduce((s, p) => s + p, 0);
    const lifted =
      scheme.dims === 1 ? coefficient : coefficient.map((m) => ({ ...m, powers: [...m.powers, ...powers] }));
    symbol[degree] = add(symbol[degree] ?? [], lifted);
  }
  return { symbol: Array.from(symbol, (a) => a ?? []), squared: scheme.timeOrder === 2 };
}

/**
 * @param highest largest degree that will be asked for
 * @param normal  N as a polynomial in the parameters
 */
export function residualSeries(scheme: ScalarScheme, normal: Polynomial, highest: number): ResidualSeries {
  const axes = scheme.dims === 1 ? 0 : scheme.dims;
  const variables = scheme.parameters.length + axes;
  const lift = (a: Polynomial): Polynomial =>
    axes === 0 ? a : a.map((m) => ({ ...m, powers: [...m.powers, ...new Array<number>(axes).fill(0)] }));
  const levels = seriesByLevel(scheme);
  const { symbol, squared } = symbolByDegree(scheme);
  const powers = new SymbolPowers(symbol, constant(variables, rational(1)), highest + 2);
  const lowest = Math.max(
    1,
    symbol.findIndex((a) => a.length > 0),
  );
  const factorials = [rational(1)];
  const overFactorial = (j: number): Rational => {
    for (let k = factorials.length; k <= j; k++) factorials.push(mulQ(factorials[k - 1]!, rational(1, k)));
    return factorials[j]!;
  };
  /** Degree-k part of Σ level^shift · coefficient · e^(level σ) e^(offset X); even powers of σ only where squared. */
  const weighted = (k: number, shift: number): Polynomial => {
    let sum: Polynomial = [];
    for (const series of levels)
      for (let j = 0; j * lowest <= k; j++) {
        const times = squared ? 2 * j : j;
        const factor = mulQ(power(series.level, times + shift), overFactorial(times));
        if (isZeroQ(factor)) {
          if (j > 0) break;
          continue;
        }
        for (let degree = j * lowest; degree <= k; degree++) {
          const wave = powers.part(j, degree);
          if (!isZero(wave)) sum = add(sum, scale(mul(wave, series.part(k - degree)), factor));
        }
      }
    return sum;
  };
  const slope = (): Polynomial | null => {
    if (scheme.timeOrder === 1) return weighted(1, 1);
    if (!squared) return exactQuotient(scale(weighted(2, 1), rational(1, 2)), symbol[1]!);
    return levels.reduce<Polynomial>(
      (sum, s) => add(sum, scale(s.part(1), mulQ(power(s.level, 2), rational(1, 2)))),
      [],
    );
  };
  const names = [...scheme.parameters, ...['X', 'Y', 'Z'].slice(0, axes)];
  const cache: Polynomial[] = [];
  return { names, part: (k) => (cache[k] ??= weighted(k, 0)), normal: lift(normal), slope, variables };
}

/** Whether Σ coefficient·sinh(level σ) vanishes, so that only even powers of σ matter. */
export function isTimeSymmetric(scheme: ScalarScheme): boolean {
  const balance = new Map<string, Polynomial>();
  for (const { level, offset, coefficient } of scheme.terms) {
    if (level.num === 0n) continue;
    const size = level.num < 0n ? negQ(level) : level;
    const key = `${size.num}/${size.den}|${offset.map((o) => `${o.num}/${o.den}`).join()}`;
    const before = balance.get(key) ?? [];
    balance.set(key, level.num > 0n ? add(before, coefficient) : sub(before, coefficient));
  }
  return [...balance.values()].every(isZero);
}

export interface AddedTerm {
  readonly degree: number;
  readonly coefficient: RationalFunction;
}

/** d_j at the lowest degree j, and at j + 1 (which may be zero; null where it has no polynomial form). */
export function addedTerms(series: ResidualSeries, degree: number): { leading: AddedTerm; second: AddedTerm | null } {
  const { normal, variables } = series;
  const over = (a: Polynomial) => divF(fromPolynomial(neg(a), variables), fromPolynomial(normal, variables), variables);
  const first = series.part(degree);
  const leading = { degree, coefficient: over(first) };
  const slope = series.slope();
  if (!slope) return { leading, second: null };
  const numerator = sub(mul(series.part(degree + 1), normal), mul(slope, first));
  const square = mul(normal, normal);
  return {
    leading,
    second: {
      degree: degree + 1,
      coefficient: divF(fromPolynomial(neg(numerator), variables), fromPolynomial(square, variables), variables),
    },
  };
}
