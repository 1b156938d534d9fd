/** What a difference formula is and how good it is: consistency, order, leading error, symmetry, reach, symbol, work. */
import { trafficCost, type CostResult } from './cost';
import { cosPi, sinPi } from './exact-angle';
import { modifiedWavenumber, type ModifiedWavenumberResult } from './modified-wavenumber';
import {
  add,
  compare,
  div,
  equals,
  formatRational,
  isZero,
  mul,
  neg,
  ONE,
  rational,
  sign,
  sub,
  toNumber,
  ZERO,
  type Rational,
} from './rational';
import { multiIndices, operatorMoment, taylorFactor, type OperatorTerm } from './stencil-weights';

export interface ExactStencil {
  readonly dims: 1 | 2 | 3;
  readonly operator: readonly OperatorTerm[];
  readonly offsets: readonly (readonly Rational[])[];
  readonly weights: readonly Rational[];
  readonly lhs: { readonly offsets: readonly (readonly Rational[])[]; readonly weights: readonly Rational[] } | null;
  /** One unit in the last printed digit of each weight, 0 where it is exact. */
  readonly ulps: readonly Rational[];
  readonly lhsUlps: readonly Rational[];
}

export interface StencilResult {
  kind: 'stencil';
  weights: string[];
  lhsWeights: string[] | null;
  consistent: boolean;
  order: number | null;
  leadingError: { coefficient?: string; hPower: number; derivative?: number; terms?: Record<string, string> } | null;
  firstViolatedMoment: number | null;
  momentResidual: string | null;
  nominal: { order: number; leadingCoefficient: number | null; rule: string } | null;
  symmetry: 'symmetric' | 'antisymmetric' | 'none';
  extent: [string, string] | null;
  halo: [number, number] | [number, number][];
  points: number;
  lhsBandwidth: [string, string] | null;
  explicit: boolean;
  modifiedWavenumber: ModifiedWavenumberResult | null;
  symbolSamples: { theta: string[]; symbolRe: number; symbolIm: number }[] | null;
  cost: CostResult;
}

const NOMINAL_RULE =
  'residual k counts as zero when |residual_k| <= sum ulp_j |x_j|^k/k! on both sides, ulp_j being one unit in the last printed digit of weight j; fractions have ulp 0';

const abs = (a: Rational) => (a.num < 0n ? neg(a) : a);
const degreeOf = (stencil: ExactStencil) => stencil.operator[0]!.powers.reduce((s, p) => s + p, 0);
const leftSum = (stencil: ExactStencil) => stencil.lhs?.weights.reduce(add, ZERO) ?? ONE;

interface Residual {
  readonly powers: readonly number[];
  /** Divided by the left-hand sum. */
  readonly value: Rational;
  /** What rounding of the printed weights can account for, divided alike. */
  readonly rounding: Rational;
}

function residual(stencil: ExactStencil, powers: readonly number[], scale: Rational): Residual {
  let value = ZERO;
  let rounding = ZERO;
  const take = (weight: Rational, ulp: Rational, factor: Rational) => {
    if (!isZero(weight)) value = add(value, mul(weight, factor));
    if (!isZero(ulp)) rounding = add(rounding, mul(ulp, abs(factor)));
  };
  stencil.offsets.forEach((x, j) => take(stencil.weights[j]!, stencil.ulps[j]!, taylorFactor(x, powers)));
  const { lhs, lhsUlps, operator, dims } = stencil;
  if (lhs) lhs.offsets.forEach((y, j) => take(neg(lhs.weights[j]!), lhsUlps[j]!, operatorMoment(operator, y, powers)));
  else value = sub(value, operatorMoment(operator, new Array<Rational>(dims).fill(ZERO), powers));
  return { powers, value: div(value, scale), rounding: div(rounding, abs(scale)) };
}

/** A formula that reproduces every function: interpolation at a node, or the same row on both sides. */
function isIdentity(stencil: ExactStencil): boolean {
  if (degreeOf(stencil) !== 0) return false;
  const keyOf = (x: readonly Rational[]) => x.map(formatRational).join();
  const balance = new Map<string, Rational>();
  stencil.offsets.forEach((x, j) => balance.set(keyOf(x), stencil.weights[j]!));
  const centre = new Array<Rational>(stencil.dims).fill(ZERO);
  const left = stencil.lhs ?? { offsets: [centre], weights: [ONE] };
  left.offsets.forEach((y, j) =>
    balance.set(keyOf(y), sub(balance.get(keyOf(y)) ?? ZERO, mul(left.weights[j]!, stencil.operator[0]!.coefficient))),
  );
  return [...balance.values()].every(isZero);
}

function orderFacts(stencil: ExactStencil) {
  const m = degreeOf(stencil);
  const scale = leftSum(stencil);
  const shells: Residual[][] = [];
  const shell = (k: number) =>
    (shells[k] ??= multiIndices(stencil.dims, k).map((powers) => residual(stencil, powers, scale)));
  const violated = (k: number) => shell(k).some((r) => !isZero(r.value));
  const nominallyViolated = (k: number) => shell(k).some((r) => compare(abs(r.value), r.rounding) > 0);
  // A row of n + q exponentials cannot annihilate more moments than it has free numbers.
  const last = m + (stencil.offsets.length + (stencil.lhs?.offsets.length ?? 1)) * (m + 1) + 1;
  const firstFrom = (start: number, test: (k: number) => boolean) => {
    for (let k = start; k <= last; k++) if (test(k)) return k;
    return null;
  };
  const first = isIdentity(stencil) ? null : firstFrom(0, violated);
  const isDecimal = [...stencil.ulps, ...stencil.lhsUlps].some((u) => !isZero(u));
  const nominalFirst = isDecimal ? firstFrom(0, nominallyViolated) : null;
  return { m, shell, first, nominalFirst: nominalFirst !== null && nominalFirst > m ? nominalFirst : null };
}

const wordOf = (powers: readonly number[]) => powers.map((p, k) => 'xyz'[k]!.repeat(p)).join('');

function leadingError(shell: readonly Residual[], m: number, k: number, dims: number): StencilResult['leadingError'] {
  if (dims === 1) return { coefficient: formatRational(shell[0]!.value), hPower: k - m, derivative: k };
  const terms = shell.filter((r) => !isZero(r.value)).map((r) => [wordOf(r.powers), formatRational(r.value)] as const);
  return { hPower: k - m, terms: Object.fromEntries(terms) };
}

interface RowOf {
  readonly offsets: readonly (readonly Rational[])[];
  readonly weights: readonly Rational[];
}

function parity({ offsets, weights }: RowOf): StencilResult['symmetry'] {
  const used = offsets.map((x, j) => ({ x, w: weights[j]! })).filter(({ w }) => !isZero(w));
  const mirrored = (x: readonly Rational[]) => used.find((other) => other.x.every((o, k) => equals(o, neg(x[k]!))))?.w;
  const pairs = used.map(({ x, w }) => ({ w, other: mirrored(x) ?? ZERO }));
  if (pairs.length === 0) return 'none';
  if (pairs.every(({ w, other }) => equals(w, other))) return 'symmetric';
  return pairs.every(({ w, other }) => equals(w, neg(other))) ? 'antisymmetric' : 'none';
}

function symmetryOf(stencil: ExactStencil): StencilResult['symmetry'] {
  return stencil.lhs && parity(stencil.lhs) !== 'symmetric' ? 'none' : parity(stencil);
}

/** [left, right] reach along one dimension over nonzero weights. */
function reach({ offsets, weights }: RowOf, axis: number): [Rational, Rational] {
  let [left, right] = [ZERO, ZERO];
  offsets.forEach((x, j) => {
    if (isZero(weights[j]!)) return;
    if (compare(neg(x[axis]!), left) > 0) left = neg(x[axis]!);
    if (compare(x[axis]!, right) > 0) right = x[axis]!;
  });
  return [left, right];
}
const ceiling = (a: Rational) => Number(-(-a.num / a.den) + (a.num > 0n && a.num % a.den !== 0n ? 1n : 0n));
const pairOf = <T, U>([a, b]: [T, T], map: (value: T) => U): [U, U] => [map(a), map(b)];

const SYMBOL_ANGLES: Readonly<Record<2 | 3, readonly (readonly string[])[]>> = {
  2: [
    ['1/2*pi', '1/2*pi'],
    ['pi', '0'],
    ['pi', 'pi'],
    ['1/4*pi', '3/4*pi'],
  ],
  3: [
    ['1/2*pi', '1/2*pi', '1/2*pi'],
    ['pi', 'pi', 'pi'],
    ['pi', '0', '0'],
    ['1/4*pi', '1/2*pi', '3/4*pi'],
  ],
};
const TURNS: Readonly<Record<string, Rational>> = {
  '0': ZERO,
  '1/4*pi': rational(1, 4),
  '1/2*pi': rational(1, 2),
  '3/4*pi': rational(3, 4),
  pi: ONE,
};

function symbolSamples(stencil: ExactStencil): StencilResult['symbolSamples'] {
  if (stencil.dims === 1) return null;
  const sum = ({ offsets, weights }: RowOf, turns: readonly Rational[]): [number, number] => {
    let [re, im] = [0, 0];
    offsets.forEach((x, j) => {
      const angle = x.reduce((total, o, k) => add(total, mul(o, turns[k]!)), ZERO);
      re += toNumber(weights[j]!) * cosPi(angle);
      im += toNumber(weights[j]!) * sinPi(angle);
    });
    return [re, im];
  };
  return SYMBOL_ANGLES[stencil.dims].flatMap((theta) => {
    const turns = theta.map((text) => TURNS[text]!);
    const [re, im] = sum(stencil, turns);
    const [a, b] = stencil.lhs ? sum(stencil.lhs, turns) : [1, 0];
    const n = a * a + b * b;
    if (n < 1e-24) return [];
    return [{ theta: [...theta], symbolRe: (re * a + im * b) / n + 0, symbolIm: (im * a - re * b) / n + 0 }];
  });
}

/** The power of the spacing is part of the hoisted weights, so that ±1 is free only for interpolation. */
function stencilCost(stencil: ExactStencil): CostResult {
  const used = stencil.weights.filter((w) => !isZero(w));
  const sizes = new Set(used.map((w) => formatRational(abs(w))));
  if (degreeOf(stencil) === 0) sizes.delete('1');
  return trafficCost(
    { additions: Math.max(0, used.length - 1), multiplications: sizes.size },
    used.length > 0 ? 1 : 0,
    1,
    0,
  );
}

export function analyseStencil(stencil: ExactStencil): StencilResult {
  const { m, shell, first, nominalFirst } = orderFacts(stencil);
  const consistent = first === null || first > m;
  const { dims, lhs } = stencil;
  const reaches = Array.from({ length: dims }, (_, axis) => reach(stencil, axis));
  const isOneDimensional = dims === 1;
  const row = (r: RowOf) => ({ offsets: r.offsets.map((x) => x[0]!), weights: r.weights });
  const explicit = !lhs || lhs.offsets.every((y, j) => isZero(lhs.weights[j]!) || y.every(isZero));
  const nominalShell = nominalFirst === null ? null : shell(nominalFirst);
  const leadingSize = nominalShell && isOneDimensional ? toNumber(nominalShell[0]!.value) : null;
  const bad = consistent ? null : shell(first).find((r) => !isZero(r.value))!;
  return {
    kind: 'stencil',
    weights: stencil.weights.map(formatRational),
    lhsWeights: lhs?.weights.map(formatRational) ?? null,
    consistent,
    order: consistent && first !== null ? first - m : null,
    leadingError: consistent && first !== null ? leadingError(shell(first), m, first, dims) : null,
    firstViolatedMoment: consistent ? null : first,
    momentResidual: bad && formatRational(bad.value),
    nominal:
      nominalFirst === null ? null : { order: nominalFirst - m, leadingCoefficient: leadingSize, rule: NOMINAL_RULE },
    symmetry: symmetryOf(stencil),
    extent: isOneDimensional ? pairOf(reaches[0]!, formatRational) : null,
    halo: isOneDimensional ? pairOf(reaches[0]!, ceiling) : reaches.map((r) => pairOf(r, ceiling)),
    points: stencil.weights.filter((w) => sign(w) !== 0).length,
    lhsBandwidth: lhs && isOneDimensional ? pairOf(reach(lhs, 0), formatRational) : null,
    explicit,
    modifiedWavenumber:
      isOneDimensional && m > 0
        ? modifiedWavenumber({
            right: row(stencil),
            left: lhs && row(lhs),
            derivative: m,
            consistent,
            residuals: Array.from({ length: Math.max(28, (first ?? 0) + 20) - m }, (_, k) => shell(m + k)[0]!.value),
          })
        : null,
    symbolSamples: symbolSamples(stencil),
    cost: stencilCost(stencil),
  };
}

/** What an inconsistent formula does instead, as a sentence. */
export function inconsistencySentence(stencil: ExactStencil, result: StencilResult): string {
  const words = stencil.operator.map(
    (t) =>
      `${equals(t.coefficient, ONE) ? '' : `${formatRational(t.coefficient)} `}u${wordOf(t.powers) ? `_${wordOf(t.powers)}` : ''}`,
  );
  const target = words.join(' + ');
  const moment = result.firstViolatedMoment ?? 0;
  if (moment === 0 && degreeOf(stencil) > 0) {
    const sum = stencil.weights.reduce(add, ZERO);
    return `does not approximate ${target}: the weights sum to ${formatRational(sum)}, not to 0`;
  }
  if (moment === 0)
    return `does not approximate ${target}: the weights sum to ${formatRational(add(ONE, leadValue(result)))} of what they should`;
  return `does not approximate ${target}: moment ${moment} is off by ${result.momentResidual ?? '?'}`;
}
const leadValue = (result: StencilResult): Rational => {
  const [num, den] = (result.momentResidual ?? '0').split('/');
  return rational(BigInt(num!), BigInt(den ?? '1'));
};
