/**
 * Closed forms of algebraic numbers: a rational, a root of one, (a + b√n)/c or the square root of it, else the
 * minimal polynomial. A factor is looked for by lattice reduction on many digits and then proved to vanish at the
 * number by exact division; the printed form, read back, must reproduce 25 digits of the number's own bracket.
 */
import { type AlgebraicNumber } from '../algebraic-number';
import { degree, gcd, type IntegerPolynomial, polynomialText, primitivePart, trimmed } from '../integer-polynomial';
import { possibleFactorDegrees } from '../factor-degrees';
import { agrees, inPrintedUnits, printedValue } from './printed-value';
import { reducedLattice } from '../lattice-reduction';
import { formatRational, gcd as gcdOfIntegers, type Rational, rational, toNumber } from '../rational';

export interface ClosedForm {
  /** In the language of expressions, with sqrt; null where none is recognised. */
  readonly text: string | null;
  /** Null for rational numbers, and where the polynomial is too long to be read. */
  readonly minimalPolynomial: string | null;
}

/** Longest polynomial shown to a reader. */
const POLYNOMIAL_TEXT_MAX = 1200;
const SEARCH_DEGREE_MAX = 6;
/** Digits of the number, in bits per coefficient of the relation looked for. */
const SEARCH_BITS = 64;
/** Largest coefficient of a relation that is taken for one. */
const RELATION_MAX = 1n << 52n;

/** An integer polynomial of degree ≤ n that vanishes at the number, proved; null where none is found. */
function smallRelation(value: AlgebraicNumber, n: number, check: () => void): IntegerPolynomial | null {
  const bits = SEARCH_BITS * (n + 1);
  value.refine(bits + 20);
  const scale = 1n << BigInt(bits);
  const { lo } = value;
  const rows: bigint[][] = [];
  for (let k = 0; k <= n; k++) {
    const row = new Array<bigint>(n + 2).fill(0n);
    row[k] = 1n;
    row[n + 1] = (scale * lo.num ** BigInt(k)) / lo.den ** BigInt(k);
    rows.push(row);
  }
  const shortest = reducedLattice(rows, check)[0]!;
  // Without a relation the shortest vector is about as long as the digits allow: no need to try it.
  if (shortest.some((c) => (c < 0n ? -c : c) >= RELATION_MAX)) return null;
  const candidate = primitivePart(trimmed(shortest.slice(0, n + 1)));
  return candidate.length > 1 && value.isRootOf(candidate) ? candidate : null;
}

/** The polynomial as one in x^step with the largest step. */
function inPowers(a: IntegerPolynomial): { step: number; core: IntegerPolynomial } {
  let step = 0;
  a.forEach((c, k) => {
    if (c !== 0n) step = Number(gcdOfIntegers(BigInt(step), BigInt(k)));
  });
  return { step: Math.max(1, step), core: a.filter((_, k) => k % Math.max(1, step) === 0) };
}

/** The irreducible factor that vanishes at the number where one of low degree does, else the known polynomial. */
function minimalCandidate(value: AlgebraicNumber, check: () => void): IntegerPolynomial {
  const { polynomial } = value;
  const { step, core } = inPowers(polynomial);
  // Polynomials in x^step with a core of degree ≤ 2 have closed forms as they are.
  if (
    degree(core) <= 2 &&
    step <= 4 &&
    possibleFactorDegrees(core)
      .slice(1, degree(core))
      .every((each) => !each)
  )
    return polynomial;
  const possible = possibleFactorDegrees(polynomial, SEARCH_DEGREE_MAX);
  for (let n = 1; n <= SEARCH_DEGREE_MAX; n++) {
    if (n >= degree(polynomial) || !possible[n]) continue;
    const found = smallRelation(value, n, check);
    if (found) return gcd(found, polynomial);
  }
  return polynomial;
}

/** √(a/b) = outside · √inside, for a/b > 0, with squares of small primes taken out of the inside. */
export function squareRootParts(square: Rational): { outside: Rational; inside: bigint } {
  const { outside, inside } = withoutSquares(square.num * square.den);
  return { outside: rational(outside, square.den), inside };
}

function withoutSquares(a: bigint): { outside: bigint; inside: bigint } {
  let [outside, inside] = [1n, a];
  for (let p = 2n; p * p <= inside && p < 2000n; p++)
    while (inside % (p * p) === 0n) {
      inside /= p * p;
      outside *= p;
    }
  return { outside, inside };
}

/** √(a/b) as "2*sqrt(3)/9", for a/b > 0. */
function squareRootText(square: Rational): string {
  const { outside, inside } = squareRootParts(square);
  if (inside === 1n) return formatRational(outside);
  const head = outside.num === 1n ? '' : `${outside.num}*`;
  return `${head}sqrt(${inside})${outside.den === 1n ? '' : `/${outside.den}`}`;
}

/** The root (−b ± √(b² − 4ac)) / 2a of a quadratic nearest to a value, as text and number. */
function quadraticText(core: IntegerPolynomial, near: number): { text: string; value: number } | null {
  const [c, b, a] = [core[0]!, core[1]!, core[2]!];
  const { outside, inside } = withoutSquares(b * b - 4n * a * c);
  const common = gcdOfIntegers(gcdOfIntegers(b, outside), 2n * a);
  const [constant, factor, den] = [-b / common, outside / common, (2n * a) / common];
  for (const side of [1n, -1n]) {
    const value = (Number(constant) + Number(side * factor) * Math.sqrt(Number(inside))) / Number(den);
    if (Math.abs(value - near) > 1e-9 * Math.max(1, Math.abs(near))) continue;
    const root = `${factor === 1n ? '' : `${factor}*`}sqrt(${inside})`;
    const sum =
      constant === 0n
        ? `${side < 0n ? '-' : ''}${root}`
        : side > 0n && constant < 0n
          ? `${root} - ${-constant}`
          : `${constant} ${side > 0n ? '+' : '-'} ${root}`;
    if (den === 1n) return { text: sum, value };
    return { text: constant === 0n ? `${sum}/${den}` : `(${sum})/${den}`, value };
  }
  return null;
}

function radicalText(minimal: IntegerPolynomial, value: AlgebraicNumber): { text: string; value: number } | null {
  const number = value.toNumber();
  const { step, core } = inPowers(minimal);
  const sign = number < 0 ? '-' : '';
  const size = Math.abs(number);
  const signed = (text: string, result: number) => ({
    text: sign === '' ? text : /^[\w*/^().]+$/.test(text) ? `-${text}` : `-(${text})`,
    value: sign === '' ? result : -result,
  });
  if (degree(core) === 1) {
    const power = rational(-core[0]!, core[1]!);
    if (step === 1) return { text: formatRational(power), value: toNumber(power) };
    const root = number < 0 && step % 2 === 1 ? rational(-power.num, power.den) : power;
    const computed = toNumber(root) ** (1 / step);
    if (step === 2) return signed(squareRootText(root), computed);
    const base = root.den === 1n ? String(root.num) : `(${formatRational(root)})`;
    return signed(`${base}^(1/${step})`, computed);
  }
  if (degree(core) !== 2 || step > 2) return null;
  const inner = quadraticText(core, step === 1 ? number : size * size);
  if (!inner || step === 1) return inner;
  return signed(`sqrt(${inner.text})`, Math.sqrt(inner.value));
}

/** The number to 40 digits, from its bracket. */
export const refinedValue = (value: AlgebraicNumber): bigint => inPrintedUnits(value.refine(140).lo);

/** @param symbol name of the parameter, for the minimal polynomial */
export function closedForm(value: AlgebraicNumber, symbol: string, check: () => void = () => undefined): ClosedForm {
  const known = value.exact;
  if (known) return { text: formatRational(known), minimalPolynomial: null };
  const minimal = minimalCandidate(value, check);
  const radical = radicalText(minimal, value);
  const text = radical && agrees(printedValue(radical.text), refinedValue(value)) ? radical.text : null;
  const isRational = text !== null && /^-?\d+(\/\d+)?$/.test(text);
  if (isRational) return { text, minimalPolynomial: null };
  const polynomial = polynomialText(minimal, symbol);
  return { text, minimalPolynomial: polynomial.length <= POLYNOMIAL_TEXT_MAX ? polynomial : null };
}
