/**
 * The value of a printed closed form to 40 decimals, read from its text alone: an independent check that what a reader
 * sees is the number that was found.
 */
const DIGITS = 40n;
const UNIT = 10n ** DIGITS;

/** Largest r with r^n ≤ a, for a ≥ 0. */
function integerRoot(a: bigint, n: bigint): bigint {
  if (a < 2n) return a;
  let x = 1n << (BigInt(a.toString(2).length) / n + 1n);
  for (;;) {
    const next = ((n - 1n) * x + a / x ** (n - 1n)) / n;
    if (next >= x) return x;
    x = next;
  }
}

/** The n-th root of a number in units of 10^−40; of a negative one for odd n only. */
function rootOf(a: bigint, n: bigint): bigint {
  if (a < 0n) {
    if (n % 2n === 0n) throw new RangeError('printedValue: an even root of a negative number');
    return -rootOf(-a, n);
  }
  return integerRoot(a * UNIT ** (n - 1n), n);
}

class Reader {
  private at = 0;
  private readonly tokens: readonly string[];

  constructor(
    text: string,
    private readonly names: Readonly<Record<string, bigint>>,
  ) {
    this.tokens = text.match(/\d+|[a-z_]+|[-+*/^()]/g) ?? [];
  }

  whole(): bigint {
    const value = this.sum();
    if (this.at < this.tokens.length) throw new RangeError(`printedValue: '${this.tokens[this.at]}' is not expected`);
    return value;
  }

  private take(token: string): boolean {
    if (this.tokens[this.at] !== token) return false;
    this.at++;
    return true;
  }
  private expect(token: string): void {
    if (!this.take(token)) throw new RangeError(`printedValue: '${token}' is missing`);
  }

  private sum(): bigint {
    let value = this.take('-') ? -this.product() : this.product();
    for (;;) {
      if (this.take('+')) value += this.product();
      else if (this.take('-')) value -= this.product();
      else return value;
    }
  }

  private product(): bigint {
    let value = this.power();
    for (;;) {
      if (this.take('*')) value = (value * this.power()) / UNIT;
      else if (this.take('/')) value = (value * UNIT) / this.power();
      else return value;
    }
  }

  /** Powers are roots: base^(1/n). */
  private power(): bigint {
    const base = this.atom();
    if (!this.take('^')) return base;
    this.expect('(');
    this.expect('1');
    this.expect('/');
    const n = BigInt(this.tokens[this.at++] ?? '');
    this.expect(')');
    return rootOf(base, n);
  }

  private atom(): bigint {
    if (this.take('(')) {
      const inside = this.sum();
      this.expect(')');
      return inside;
    }
    const token = this.tokens[this.at++] ?? '';
    if (token === 'sqrt') {
      this.expect('(');
      const inside = this.sum();
      this.expect(')');
      return rootOf(inside, 2n);
    }
    const named = this.names[token];
    if (named !== undefined) return named;
    if (!/^\d+$/.test(token)) throw new RangeError(`printedValue: '${token}' is not expected`);
    return BigInt(token) * UNIT;
  }
}

/**
 * @param text  sums, products, quotients, sqrt(…) and …^(1/n) of whole numbers and names
 * @param names values of names, in units of 10^−40
 * @returns the value in units of 10^−40
 * @throws {RangeError} if the text is no such form
 */
export const printedValue = (text: string, names: Readonly<Record<string, bigint>> = {}): bigint =>
  new Reader(text, names).whole();

/** A rational in units of 10^−40. */
export const inPrintedUnits = ({ num, den }: { readonly num: bigint; readonly den: bigint }): bigint =>
  (num * UNIT) / den;

/** Whether two values agree in the first 25 digits. */
export function agrees(one: bigint, other: bigint): boolean {
  const off = one > other ? one - other : other - one;
  const scale = other < 0n ? -other : other;
  return off * 10n ** 25n <= scale;
}
