/** Polynomials as text that other programs read: "-lambda*(2*lambda**2 + 1)/6", with I for the imaginary unit. */
import { exactQuotient } from './polynomial-division';
import { isZero, type Monomial, type Polynomial } from './polynomial';
import { abs, gcd, ONE, rational, ZERO, type Rational } from './rational';

const lcm = (a: bigint, b: bigint) => (a / gcd(a, b)) * b;

/** Splits off ±1, the denominators and the content: what remains has coprime integer coefficients. */
function primitive(a: Polynomial): { body: Polynomial; num: bigint; den: bigint; imaginary: boolean } {
  const imaginary = a.every((m) => m.re.num === 0n);
  const turned: Polynomial = imaginary ? a.map((m) => ({ ...m, re: m.im, im: ZERO })) : a;
  let den = 1n;
  for (const m of turned) den = lcm(lcm(den, m.re.den), m.im.den);
  let content = 0n;
  const whole = (q: Rational) => (q.num * den) / q.den;
  for (const m of turned) content = gcd(gcd(content, whole(m.re)), whole(m.im));
  const top = turned[turned.length - 1]!;
  if (top.re.num < 0n || (top.re.num === 0n && top.im.num < 0n)) content = -content;
  const body = turned.map((m) => ({
    powers: m.powers,
    re: rational(whole(m.re), content),
    im: rational(whole(m.im), content),
  }));
  const common = gcd(content, den);
  return { body, num: content / common, den: den / common, imaginary };
}

function monomialText(m: Monomial, names: readonly string[]): string {
  const letters = m.powers.flatMap((p, k) => (p === 0 ? [] : [p === 1 ? names[k]! : `${names[k]}**${p}`]));
  const both = m.re.num !== 0n && m.im.num !== 0n;
  if (both)
    return ['(' + `${m.re.num} ${m.im.num < 0n ? '-' : '+'} ${unitText(abs(m.im).num)}` + ')', ...letters].join('*');
  const value = m.re.num !== 0n ? m.re.num : m.im.num;
  const factors = m.re.num !== 0n ? letters : ['I', ...letters];
  if (factors.length === 0) return String(value);
  return value === 1n
    ? factors.join('*')
    : value === -1n
      ? `-${factors.join('*')}`
      : [String(value), ...factors].join('*');
}
const unitText = (size: bigint) => (size === 1n ? 'I' : `${size}*I`);

function sumText(a: Polynomial, names: readonly string[]): string {
  return [...a]
    .reverse()
    .map((m, k) => {
      const text = monomialText(m, names);
      if (k === 0) return text;
      return text.startsWith('-') ? ` - ${text.slice(1)}` : ` + ${text}`;
    })
    .join('');
}

function divisors(n: bigint): bigint[] {
  const found: bigint[] = [];
  for (let d = 1n; d * d <= n && d < 4096n; d++) if (n % d === 0n) found.push(d, n / d);
  return found;
}

/** Linear factors q·x − p of a primitive integer polynomial in one variable, with nonzero roots p/q. */
function linearFactors(
  body: Polynomial,
  index: number,
): { factors: { factor: Polynomial; power: number }[]; rest: Polynomial } {
  const factors: { factor: Polynomial; power: number }[] = [];
  let rest = body;
  const linear = (p: bigint, q: bigint): Polynomial => {
    const powers = body[0]!.powers.map(() => 0);
    return [
      { powers, re: rational(-p), im: ZERO },
      { powers: powers.map((_, k) => (k === index ? 1 : 0)), re: rational(q), im: ZERO },
    ];
  };
  const first = rest[0]!;
  const last = rest[rest.length - 1]!;
  for (const q of divisors(abs(last.re).num))
    for (const p of divisors(abs(first.re).num))
      for (const root of [p, -p]) {
        if (gcd(root, q) !== 1n) continue;
        const factor = linear(root, q);
        let power = 0;
        for (let next = exactQuotient(rest, factor); next && rest.length > 1; next = exactQuotient(rest, factor)) {
          rest = next;
          power++;
        }
        if (power > 0) factors.push({ factor, power });
      }
  return { factors, rest };
}

function factorsOf(body: Polynomial, names: readonly string[]): string[] {
  const least = names.map((_, k) => Math.min(...body.map((m) => m.powers[k]!)));
  const letters = least.flatMap((p, k) => (p === 0 ? [] : [p === 1 ? names[k]! : `${names[k]}**${p}`]));
  const bare = body.map((m) => ({ ...m, powers: m.powers.map((p, k) => p - least[k]!) }));
  const used = names.map((_, k) => k).filter((k) => bare.some((m) => m.powers[k]! > 0));
  const isReal = bare.every((m) => m.im.num === 0n);
  if (bare.length === 1 && isReal && bare[0]!.re.num === 1n) return letters;
  if (used.length !== 1 || !isReal) return [...letters, `(${sumText(bare, names)})`];
  const { factors, rest } = linearFactors(bare, used[0]!);
  const { body: tidy, num } = primitive(rest);
  const written = [...factors]
    .sort((a, b) => Number(b.factor[0]!.re.num - a.factor[0]!.re.num))
    .map(({ factor, power }) => `(${sumText(factor, names)})${power > 1 ? `**${power}` : ''}`);
  const restText = tidy.length === 1 && tidy[0]!.powers.every((p) => p === 0) ? [] : [`(${sumText(tidy, names)})`];
  const sign = num < 0n ? ['-1'] : [];
  return [...sign, ...letters, ...written, ...restText];
}

/** @param names one per variable of the ring */
export function polynomialText(a: Polynomial, names: readonly string[]): string {
  if (isZero(a)) return '0';
  const { body, num, den, imaginary } = primitive(a);
  const factors = factorsOf(body, names);
  const negatives = factors.filter((f) => f === '-1').length;
  const sign = num < 0n !== (negatives % 2 === 1) ? '-' : '';
  const size = num < 0n ? -num : num;
  const list = [
    ...(size === 1n ? [] : [String(size)]),
    ...(imaginary ? ['I'] : []),
    ...factors.filter((f) => f !== '-1'),
  ];
  // A single bracketed sum needs no brackets where nothing stands beside it.
  if (list.length === 1 && den === 1n && sign === '' && list[0]!.startsWith('(') && list[0]!.endsWith(')'))
    return list[0]!.slice(1, -1);
  return `${sign}${list.length === 0 ? '1' : list.join('*')}${den === 1n ? '' : `/${den}`}`;
}

/** num/den as text; a constant denominator is worked into the numerator by the caller. */
export function quotientText(num: Polynomial, den: Polynomial, names: readonly string[]): string {
  const isConstant =
    den.length === 1 &&
    den[0]!.powers.every((p) => p === 0) &&
    den[0]!.re.num === ONE.num &&
    den[0]!.re.den === 1n &&
    den[0]!.im.num === 0n;
  if (isConstant || isZero(num)) return polynomialText(num, names);
  return `(${polynomialText(num, names)})/(${polynomialText(den, names)})`;
}
