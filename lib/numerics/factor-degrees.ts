/**
 * Degrees that factors over Z of a square-free polynomial can have, from its factorisations modulo a few primes
 * (distinct-degree factorisation, von zur Gathen & Gerhard, Modern Computer Algebra, ch. 14): a cheap proof that
 * a polynomial is irreducible, or has no factor of low degree.
 */
import { degree, type IntegerPolynomial, leading } from './integer-polynomial';
import { modularGcd, type ModularPolynomial, PrimeField, trimModular } from './prime-field';

/** Small primes ≡ 1 modulo 4: powers x^p are then short to compute. */
const PRIMES = [1009, 1013, 1021, 1033, 1049, 1061, 1069, 1093, 1097, 1109, 1117, 1129];
const IMAGES = 4;

const reduced = (a: number, prime: number) => {
  const rest = a % prime;
  return rest < 0 ? rest + prime : rest;
};

/** Written over a; entries of a may be any integers below 2^53. Primes are so small that sums need no reduction. */
function remainder(field: PrimeField, a: ModularPolynomial, monic: ModularPolynomial): ModularPolynomial {
  const n = monic.length - 1;
  for (let top = a.length - 1; top >= n; top--) {
    const factor = reduced(a[top]!, field.prime);
    if (factor === 0) continue;
    const shift = top - n;
    for (let k = 0; k < n; k++) a[shift + k]! -= factor * monic[k]!;
  }
  a.length = Math.min(a.length, n);
  for (let k = 0; k < a.length; k++) a[k] = reduced(a[k]!, field.prime);
  return trimModular(a);
}

function productOf(
  field: PrimeField,
  a: ModularPolynomial,
  b: ModularPolynomial,
  monic: ModularPolynomial,
): ModularPolynomial {
  if (a.length === 0 || b.length === 0) return [];
  const product = new Array<number>(a.length + b.length - 1).fill(0);
  for (let j = 0; j < a.length; j++) {
    const factor = a[j]!;
    for (let k = 0; k < b.length; k++) product[j + k]! += factor * b[k]!;
  }
  return remainder(field, product, monic);
}

/**
 * Degrees up to `most` of the irreducible factors modulo one prime; null where the image is not square-free of the
 * full degree.
 */
function degreesModulo(field: PrimeField, f: IntegerPolynomial, most: number): number[] | null {
  if (field.reduce(leading(f)) === 0) return null;
  const image = f.map((c) => field.reduce(c));
  const inverse = field.inverse(image.at(-1)!);
  let rest = image.map((c) => field.mul(c, inverse));
  const slope = trimModular(rest.slice(1).map((c, k) => field.mul(c, (k + 1) % field.prime)));
  if (modularGcd(field, rest, slope).length > 1) return null;
  const found: number[] = [];
  let power: ModularPolynomial = [0, 1];
  for (let d = 1; d <= most && 2 * d < rest.length; d++) {
    let next: ModularPolynomial = [1];
    const base = remainder(field, [...power], rest);
    for (const bit of field.prime.toString(2)) {
      next = productOf(field, next, next, rest);
      if (bit === '1') next = productOf(field, next, base, rest);
    }
    power = next;
    const difference = [...power];
    while (difference.length < 2) difference.push(0);
    difference[1] = field.sub(difference[1]!, 1);
    const common = modularGcd(field, rest, trimModular(difference));
    for (let k = 0; k < (common.length - 1) / d; k++) found.push(d);
    if (common.length > 1) rest = quotient(field, rest, common);
  }
  // What is left has factors of higher degree only, or is irreducible.
  if (rest.length > 1) found.push(rest.length - 1);
  return found;
}

function quotient(field: PrimeField, a: ModularPolynomial, monic: ModularPolynomial): ModularPolynomial {
  const rest = [...a];
  const n = monic.length - 1;
  const result = new Array<number>(a.length - n).fill(0);
  for (let k = result.length - 1; k >= 0; k--) {
    const factor = rest[k + n]!;
    result[k] = factor;
    for (let j = 0; j <= n; j++) rest[k + j] = field.sub(rest[k + j]!, field.mul(factor, monic[j]!));
  }
  return result;
}

/**
 * possible[d] is false only where no factor of degree d exists.
 * @param most degrees asked about; higher ones are not told apart and may be called possible
 */
export function possibleFactorDegrees(f: IntegerPolynomial, most = degree(f)): boolean[] {
  const n = degree(f);
  let possible = new Array<boolean>(n + 1).fill(true);
  let images = 0;
  for (const prime of PRIMES) {
    const degrees = degreesModulo(new PrimeField(prime), f, most);
    if (!degrees) continue;
    const sums = new Array<boolean>(n + 1).fill(false);
    sums[0] = true;
    for (const d of degrees) for (let k = n; k >= d; k--) if (sums[k - d]) sums[k] = true;
    possible = possible.map((each, k) => k > most || (each && sums[k]!));
    if (++images === IMAGES || possible.slice(1, Math.min(n, most + 1)).every((each) => !each)) break;
  }
  return possible;
}
