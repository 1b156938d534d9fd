/**
 * Arithmetic modulo primes below 2²⁶, whose products are exact in a double: what the exact algebra of large
 * polynomials is built from (images modulo many primes, put together by the Chinese remainder theorem).
 */

/** A field with p elements, p ≡ 1 modulo 4, so that it holds a square root of −1. */
export class PrimeField {
  readonly bigPrime: bigint;
  private readonly reciprocal: number;
  /** A square root of −1. */
  readonly imaginary: number;

  constructor(readonly prime: number) {
    this.bigPrime = BigInt(prime);
    this.reciprocal = 1 / prime;
    this.imaginary = this.squareRootOfMinusOne();
  }

  mul(a: number, b: number): number {
    const product = a * b;
    const rest = product - Math.floor(product * this.reciprocal) * this.prime;
    return rest < 0 ? rest + this.prime : rest >= this.prime ? rest - this.prime : rest;
  }
  add(a: number, b: number): number {
    const sum = a + b;
    return sum >= this.prime ? sum - this.prime : sum;
  }
  sub(a: number, b: number): number {
    return a >= b ? a - b : a - b + this.prime;
  }
  power(a: number, k: number): number {
    let result = 1;
    for (let base = a, n = k; n > 0; n = Math.floor(n / 2), base = this.mul(base, base))
      if (n % 2 === 1) result = this.mul(result, base);
    return result;
  }
  /** Inverse of a nonzero element. */
  inverse(a: number): number {
    let r = this.prime;
    let s = a;
    let u = 0;
    let v = 1;
    while (s !== 0) {
      const q = Math.floor(r / s);
      const rest = r - q * s;
      const next = u - q * v;
      r = s;
      s = rest;
      u = v;
      v = next;
    }
    return u < 0 ? u + this.prime : u;
  }
  reduce(a: bigint): number {
    const rest = Number(a % this.bigPrime);
    return rest < 0 ? rest + this.prime : rest;
  }

  private squareRootOfMinusOne(): number {
    for (let a = 2; ; a++) {
      const root = this.power(a, (this.prime - 1) / 4);
      if (this.mul(root, root) === this.prime - 1) return root;
    }
  }
}

const fields: PrimeField[] = [];

function isPrime(n: number): boolean {
  for (let d = 3; d * d <= n; d += 2) if (n % d === 0) return false;
  return n % 2 === 1;
}

/** The k-th field of a fixed sequence with descending primes. */
export function primeField(k: number): PrimeField {
  while (fields.length <= k) {
    let candidate = (fields.at(-1)?.prime ?? 2 ** 26 + 1) - 4;
    while (!isPrime(candidate)) candidate -= 4;
    fields.push(new PrimeField(candidate));
  }
  return fields[k]!;
}

/** Polynomials modulo p: ascending coefficients without trailing zeros; zero is []. */
export type ModularPolynomial = number[];

export function trimModular(a: ModularPolynomial): ModularPolynomial {
  while (a.length > 0 && a[a.length - 1] === 0) a.pop();
  return a;
}

/** Remainder of a by b (b nonzero), written over a. */
function reduceBy(field: PrimeField, a: ModularPolynomial, b: ModularPolynomial): ModularPolynomial {
  const inverse = field.inverse(b[b.length - 1]!);
  for (let top = a.length - 1; top >= b.length - 1; top--) {
    if (a[top] !== 0) {
      const factor = field.mul(a[top]!, inverse);
      const shift = top - b.length + 1;
      for (let k = 0; k < b.length; k++) a[k + shift] = field.sub(a[k + shift]!, field.mul(factor, b[k]!));
    }
  }
  a.length = Math.min(a.length, b.length - 1);
  return trimModular(a);
}

/** Monic greatest common divisor; [] where both are zero. */
export function modularGcd(field: PrimeField, a: ModularPolynomial, b: ModularPolynomial): ModularPolynomial {
  let [f, g] = [[...a], [...b]];
  while (g.length > 0) [f, g] = [g, f.length >= g.length ? reduceBy(field, f, g) : f];
  if (f.length === 0) return f;
  const inverse = field.inverse(f[f.length - 1]!);
  return f.map((c) => field.mul(c, inverse));
}

const degreeBelow = (a: readonly number[], from: number) => {
  let d = from;
  while (d >= 0 && a[d] === 0) d--;
  return d;
};

/**
 * Resultant of polynomials of formal degrees m and n, also where leading coefficients vanish modulo p.
 * Convention: lc(a)ⁿ · Π b(α) over the roots α of a. Both arrays, of m + 1 and n + 1 entries, are overwritten.
 */
export function modularResultant(field: PrimeField, a: number[], b: number[], m: number, n: number): number {
  let f = a;
  let g = b;
  let formalF = m;
  let formalG = n;
  let result = 1;
  const flip = (times: number) => {
    if (times % 2 === 1) result = field.sub(0, result);
  };
  for (;;) {
    const degreeF = degreeBelow(f, formalF);
    const degreeG = degreeBelow(g, formalG);
    if (formalG === 0) return field.mul(result, field.power(g[0]!, formalF));
    if (formalF === 0) return field.mul(result, field.power(f[0]!, formalG));
    if (degreeF < 0 || degreeG < 0 || (degreeF < formalF && degreeG < formalG)) return 0;
    if (degreeF < formalF) {
      result = field.mul(result, field.power(g[degreeG]!, formalF - degreeF));
      flip(formalG * (formalF - degreeF));
    }
    if (degreeG < formalG) result = field.mul(result, field.power(f[degreeF]!, formalG - degreeG));
    if (degreeG === 0) return field.mul(result, field.power(g[0]!, degreeF));
    if (degreeF === 0) return field.mul(result, field.power(f[0]!, degreeG));
    // Res(f, g) = (−1)^(mn) Res(g, f), and the one of higher degree may be replaced by its remainder with the same
    // formal degree.
    if (degreeF >= degreeG) {
      const inverse = field.inverse(g[degreeG]!);
      for (let top = degreeF; top >= degreeG; top--) {
        if (f[top] === 0) continue;
        const factor = field.mul(f[top]!, inverse);
        const shift = top - degreeG;
        for (let k = 0; k < degreeG; k++) f[k + shift] = field.sub(f[k + shift]!, field.mul(factor, g[k]!));
        f[top] = 0;
      }
    }
    flip(degreeF * degreeG);
    const other = f;
    f = g;
    g = other;
    formalF = degreeG;
    formalG = degreeF;
  }
}

/** Coefficients of the polynomial of degree < nodes.length through the given values. */
export function interpolate(field: PrimeField, nodes: readonly number[], values: readonly number[]): ModularPolynomial {
  const n = nodes.length;
  const table = [...values];
  for (let k = 1; k < n; k++)
    for (let j = n - 1; j >= k; j--)
      table[j] = field.mul(field.sub(table[j]!, table[j - 1]!), inverseOf(field, field.sub(nodes[j]!, nodes[j - k]!)));
  const result = new Array<number>(n).fill(0);
  for (let k = n - 1; k >= 0; k--) {
    for (let j = n - 1 - k; j >= 1; j--) result[j] = field.sub(result[j - 1]!, field.mul(nodes[k]!, result[j]!));
    result[0] = field.add(table[k]!, field.sub(0, field.mul(nodes[k]!, result[0]!)));
  }
  return result;
}

const SMALL = 4096;
const inverseTables = new WeakMap<PrimeField, number[]>();

/** Inverses of small differences come from a table: nodes are mostly consecutive integers. */
function inverseOf(field: PrimeField, a: number): number {
  if (a >= SMALL) return field.inverse(a);
  let table = inverseTables.get(field);
  if (!table) {
    table = [0, 1];
    for (let k = 2; k < SMALL; k++)
      table.push(field.mul(field.prime - Math.floor(field.prime / k), table[field.prime % k]!));
    inverseTables.set(field, table);
  }
  return table[a]!;
}

/** Determinant of a square matrix, which is overwritten. */
export function modularDeterminant(field: PrimeField, rows: number[][]): number {
  let result = 1;
  for (let column = 0; column < rows.length; column++) {
    const pivot = rows.findIndex((row, k) => k >= column && row[column] !== 0);
    if (pivot < 0) return 0;
    if (pivot !== column) {
      [rows[pivot], rows[column]] = [rows[column]!, rows[pivot]!];
      result = field.sub(0, result);
    }
    const head = rows[column]!;
    result = field.mul(result, head[column]!);
    const inverse = field.inverse(head[column]!);
    for (let k = column + 1; k < rows.length; k++) {
      const row = rows[k]!;
      if (row[column] === 0) continue;
      const factor = field.mul(row[column]!, inverse);
      for (let j = column; j < rows.length; j++) row[j] = field.sub(row[j]!, field.mul(factor, head[j]!));
    }
  }
  return result;
}

/** Integers known modulo a growing product of primes, in the symmetric range. */
export class ChineseRemainder {
  private modulus = 1n;
  private readonly values: bigint[];

  constructor(size: number) {
    this.values = new Array<bigint>(size).fill(0n);
  }

  /** @returns whether any value changed; balanced digits, so that small negative numbers come to rest too */
  include(field: PrimeField, images: ArrayLike<number>): boolean {
    const inverse = field.inverse(field.reduce(this.modulus));
    let changed = false;
    for (let k = 0; k < this.values.length; k++) {
      const value = this.values[k]!;
      const step = field.mul(field.sub(images[k] ?? 0, field.reduce(value)), inverse);
      if (step === 0) continue;
      changed = true;
      this.values[k] = value + this.modulus * BigInt(2 * step > field.prime ? step - field.prime : step);
    }
    this.modulus *= field.bigPrime;
    return changed;
  }

  lifted(): bigint[] {
    return [...this.values];
  }
}
