/** Real algebraic numbers: a square-free integer polynomial and a rational bracket that holds one of its roots. */
import { gcd, type IntegerPolynomial, signAt } from './integer-polynomial';
import { halved, isolateRealRoots, type RootBracket } from './real-roots';
import { rational, type Rational } from './rational';

export class AlgebraicNumber {
  private bracket: RootBracket;

  /** @param polynomial square-free, with exactly one root in the bracket, strictly inside where lo < hi */
  constructor(
    readonly polynomial: IntegerPolynomial,
    bracket: RootBracket,
  ) {
    this.bracket = bracket;
  }

  static ofRational(value: Rational): AlgebraicNumber {
    return new AlgebraicNumber([-value.num, value.den], { lo: value.num, hi: value.num, den: value.den });
  }

  /** The distinct real roots, ascending. */
  static rootsOf(a: IntegerPolynomial, check?: () => void): AlgebraicNumber[] {
    return isolateRealRoots(a, undefined, check).map((root) => new AlgebraicNumber(a, root));
  }

  get lo(): Rational {
    return rational(this.bracket.lo, this.bracket.den);
  }
  get hi(): Rational {
    return rational(this.bracket.hi, this.bracket.den);
  }
  /** The value where it is known to be this rational, else null. */
  get exact(): Rational | null {
    return this.bracket.lo === this.bracket.hi ? this.lo : null;
  }

  /** Narrows the bracket until it is at most 2^−bits wide; bisection, quickened by the secant (Abbott 2006). */
  refine(bits: number): this {
    let span = 4n;
    const goal = 1n << BigInt(Math.max(0, bits));
    while ((this.bracket.hi - this.bracket.lo) * goal > this.bracket.den) {
      if (this.bracket.lo === this.bracket.hi) break;
      span = this.secantStep(span) ? span * span : span > 4n ? 4n : (this.bisect(), 4n);
      if (span > 1n << 64n) span = 1n << 64n;
    }
    return this;
  }

  bisect(): void {
    this.bracket = reduced(halved(this.polynomial, this.bracket));
  }

  /** One step of quadratic interval refinement: true where one of `parts` equal cells, guessed by the secant, holds the root. */
  private secantStep(parts: bigint): boolean {
    const { lo, hi, den } = this.bracket;
    const atLo = scaled(this.polynomial, lo, den);
    const atHi = scaled(this.polynomial, hi, den);
    if (atLo === 0n || atHi === 0n || atLo > 0n === atHi > 0n) return false;
    const width = hi - lo;
    const size = (c: bigint) => (c < 0n ? -c : c);
    let cell = (parts * size(atLo)) / (size(atLo) + size(atHi));
    if (cell >= parts) cell = parts - 1n;
    const fine = den * parts;
    const left = lo * parts + cell * width;
    const signLeft = cell === 0n ? Math.sign(Number(atLo > 0n) - 0.5) : signAt(this.polynomial, left, fine);
    const right = left + width;
    const signRight = cell === parts - 1n ? Math.sign(Number(atHi > 0n) - 0.5) : signAt(this.polynomial, right, fine);
    if (signLeft === 0) this.bracket = reduced({ lo: left, hi: left, den: fine });
    else if (signRight === 0) this.bracket = reduced({ lo: right, hi: right, den: fine });
    else if (signLeft !== signRight) this.bracket = reduced({ lo: left, hi: right, den: fine });
    else return false;
    return true;
  }

  /** −1, 0 or 1: the order of two numbers. */
  compare(other: AlgebraicNumber): number {
    let common: IntegerPolynomial | null = null;
    for (let bits = 8; ; bits *= 2) {
      if (this.bracket.hi * other.bracket.den < other.bracket.lo * this.bracket.den) return -1;
      if (this.bracket.lo * other.bracket.den > other.bracket.hi * this.bracket.den) return 1;
      if (this.exact && other.exact) return 0;
      common ??= gcd(this.polynomial, other.polynomial);
      if (this.isRootOf(common) && other.isRootOf(common)) {
        const shared = new AlgebraicNumber(common, this.bracket);
        if (shared.isIn(other.bracket)) return 0;
      }
      this.refine(bits);
      other.refine(bits);
    }
  }

  compareRational(value: Rational): number {
    for (;;) {
      if (this.bracket.hi * value.den < value.num * this.bracket.den) return -1;
      if (this.bracket.lo * value.den > value.num * this.bracket.den) return 1;
      if (this.exact) return 0;
      if (signAt(this.polynomial, value.num, value.den) === 0 && this.holdsInside(value)) {
        this.bracket = { lo: value.num, hi: value.num, den: value.den };
        return 0;
      }
      this.bisect();
    }
  }

  private holdsInside(value: Rational): boolean {
    return (
      this.bracket.lo * value.den < value.num * this.bracket.den &&
      this.bracket.hi * value.den > value.num * this.bracket.den
    );
  }

  private isIn(bracket: RootBracket): boolean {
    const { lo, hi, den } = this.bracket;
    return bracket.lo * den <= hi * bracket.den && lo * bracket.den <= bracket.hi * den;
  }

  /** Whether another polynomial vanishes at this number. */
  isRootOf(a: IntegerPolynomial): boolean {
    if (a.length === 0) return true;
    if (this.exact) return signAt(a, this.bracket.lo, this.bracket.den) === 0;
    const common = gcd(this.polynomial, a);
    if (common.length === 1) return false;
    // The common factor has a root in the bracket only if it is this one: a simple root, so its sign changes.
    this.refine(4);
    for (;;) {
      const left = signAt(common, this.bracket.lo, this.bracket.den);
      const right = signAt(common, this.bracket.hi, this.bracket.den);
      if (left !== 0 && right !== 0) return left !== right;
      this.bisect();
      if (this.exact) return signAt(a, this.bracket.lo, this.bracket.den) === 0;
    }
  }

  toNumber(): number {
    return Number(this.toDecimal(17));
  }

  /**
   * Decimal text, correctly rounded to so many significant digits; trailing zeros after the point are dropped,
   * so that 1/2 is "0.5" and 1 is "1".
   */
  toDecimal(digits: number): string {
    for (let bits = Math.ceil(digits * 3.33) + 8; ; bits += 32) {
      this.refine(bits);
      const { lo, hi, den } = this.bracket;
      const left = decimalText(lo, den, digits);
      if (lo === hi || left === decimalText(hi, den, digits)) return left;
      // A root that is a short decimal is never passed by narrowing: try it once.
      const candidate = rational(lo + hi, 2n * den);
      const short = parseDecimal(decimalText(candidate.num, candidate.den, digits));
      if (signAt(this.polynomial, short.num, short.den) === 0 && this.holdsInside(short))
        this.bracket = { lo: short.num, hi: short.num, den: short.den };
      // A very small number needs more bits for the same significant digits.
      if (lo !== 0n && hi !== 0n) continue;
      if (this.compareRational(rational(0n)) === 0) return '0';
    }
  }
}

function reduced({ lo, hi, den }: RootBracket): RootBracket {
  let shift = 0n;
  while (den > 1n << (shift + 1n) && ((lo | hi | den) >> shift) % 2n === 0n) shift++;
  return shift === 0n ? { lo, hi, den } : { lo: lo >> shift, hi: hi >> shift, den: den >> shift };
}

function scaled(a: IntegerPolynomial, num: bigint, den: bigint): bigint {
  let value = 0n;
  let scale = 1n;
  for (let k = a.length - 1; k >= 0; k--) {
    value = value * num + a[k]! * scale;
    scale *= den;
  }
  return value;
}

function parseDecimal(text: string): Rational {
  const [mantissa, exponent] = text.split('e');
  const [whole, fraction = ''] = mantissa!.split('.');
  const shift = Number(exponent ?? 0) - fraction.length;
  const digits = BigInt(whole! + fraction);
  return shift >= 0 ? rational(digits * 10n ** BigInt(shift)) : rational(digits, 10n ** BigInt(-shift));
}

/** num / den (den > 0) rounded half away from zero to so many significant digits. */
export function decimalText(num: bigint, den: bigint, digits: number): string {
  if (num === 0n) return '0';
  const sign = num < 0n ? '-' : '';
  const size = num < 0n ? -num : num;
  let exponent = size.toString().length - den.toString().length;
  const atLeast = (e: number) => (e >= 0 ? size >= den * 10n ** BigInt(e) : size * 10n ** BigInt(-e) >= den);
  if (!atLeast(exponent)) exponent--;
  const shift = digits - 1 - exponent;
  const [top, bottom] = shift >= 0 ? [size * 10n ** BigInt(shift), den] : [size, den * 10n ** BigInt(-shift)];
  let text = ((2n * top + bottom) / (2n * bottom)).toString();
  if (text.length > digits) {
    text = text.slice(0, digits);
    exponent++;
  }
  if (exponent < -7 || exponent > 30) {
    const rest = text.slice(1).replace(/0+$/, '');
    return `${sign}${text[0]}${rest === '' ? '' : `.${rest}`}e${exponent}`;
  }
  if (exponent < 0) return `${sign}0.${'0'.repeat(-exponent - 1)}${text.replace(/0+$/, '')}`;
  const whole = text.padEnd(exponent + 1, '0').slice(0, exponent + 1);
  const fraction = text.slice(exponent + 1).replace(/0+$/, '');
  return `${sign}${whole}${fraction === '' ? '' : `.${fraction}`}`;
}
