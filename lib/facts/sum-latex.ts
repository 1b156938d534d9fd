/** Sums over sites as LaTeX, written as one would by hand: common factors before brackets, no redundant ones. */
import type { CanonicalTerm } from '@/lib/numerics/canonical-scheme';
import { type Rational, gcd, isZero, neg, rational, sign, toNumber } from '@/lib/numerics/rational';

const GREEK = new Set(['lambda', 'sigma', 'mu', 'nu', 'theta', 'kappa', 'epsilon']);
/** "lambda_x" → \\lambda_{x} */
export const letter = (name: string) => {
  const [head = '', index] = name.split('_');
  const written = GREEK.has(head) ? `\\${head}` : head;
  return index ? `${written}_{${index}}` : written;
};

const shifted = (name: string, by: Rational): string => {
  if (isZero(by)) return name;
  const size = by.num < 0n ? -by.num : by.num;
  const amount = by.den === 1n ? String(size) : `${size}/${by.den}`;
  return `${name}${by.num < 0n ? '-' : '+'}${amount}`;
};
const AXES = ['i', 'j', 'k'];
/** u at an offset from i (j, k) and, where given, a level from n. */
export const site = (offset: readonly Rational[], level: Rational | null): string => {
  const below = offset.map((by, axis) => shifted(AXES[axis] ?? 'i', by)).join(',');
  return level === null ? `u_{${below}}` : `u_{${below}}^{${shifted('n', level)}}`;
};

/** One site with the rational number that stands before it. */
export interface Weighted {
  readonly text: string;
  readonly weight: Rational;
}

export const lcm = (a: bigint, b: bigint) => (a / gcd(a, b)) * b;
const abs = (a: bigint) => (a < 0n ? -a : a);

/** The largest rational that divides all weights, with the sign of the first: what stands before the bracket. */
function content(members: readonly Weighted[]): Rational {
  const denominator = members.reduce((all, { weight }) => lcm(all, weight.den), 1n);
  const numerator = members.reduce((all, { weight }) => gcd(all, abs((weight.num * denominator) / weight.den)), 0n);
  const size = rational(numerator, denominator);
  return sign(members[0]?.weight ?? size) < 0 ? neg(size) : size;
}

export const number = (size: Rational) => (size.den === 1n ? String(size.num) : `\\tfrac{${size.num}}{${size.den}}`);

/** Σ weight · site with signs between; `lead` is a letter product put after each number. */
export function sum(members: readonly Weighted[], lead = ''): string {
  return members
    .map(({ text, weight }, k) => {
      const isNegative = weight.num < 0n;
      const size = rational(abs(weight.num), weight.den);
      const before = size.num === 1n && size.den === 1n ? lead : `${number(size)}${lead}`;
      const joint = k === 0 ? (isNegative ? '-' : '') : isNegative ? ' - ' : ' + ';
      return `${joint}${before ? `${before}\\,` : ''}${text}`;
    })
    .join('');
}

/** letters · content · (members), signed and ready to be appended. */
function group(members: readonly Weighted[], letters: string, isFirst: boolean): string {
  const factor = content(members);
  const isWhole = factor.den === 1n && abs(factor.num) === 1n;
  const [only] = members;
  if (members.length === 1 && only) return joined(sum([only], letters), isFirst);
  if (letters === '' && isWhole) return joined(sum(members), isFirst);
  const inner = members.map(({ text, weight }) => ({
    text,
    weight: rational(weight.num * factor.den, weight.den * factor.num),
  }));
  const size = rational(abs(factor.num), factor.den);
  const before = isWhole
    ? letters
    : size.num === 1n && letters !== ''
      ? `\\tfrac{${letters}}{${size.den}}`
      : `${number(size)}${letters}`;
  return joined(`${factor.num < 0n ? '-' : ''}${before}\\left(${sum(inner)}\\right)`, isFirst);
}

const joined = (text: string, isFirst: boolean) =>
  isFirst ? text : text.startsWith('-') ? ` - ${text.slice(1)}` : ` + ${text}`;

const byOffsetDown = (a: CanonicalTerm, b: CanonicalTerm) =>
  toNumber(b.level) - toNumber(a.level) ||
  b.offset.reduce((sum, by, axis) => sum || toNumber(by) - toNumber(a.offset[axis] ?? by), 0);

/** Terms sorted by the powers of the parameters: u + λ(…) + λ²(…), as such rules are written. */
export function byPowers(terms: readonly CanonicalTerm[], symbols: readonly string[]): string {
  const groups = new Map<string, { degree: number; letters: string; members: Weighted[] }>();
  for (const term of [...terms].sort(byOffsetDown)) {
    for (const { powers, re, im } of term.coefficient) {
      for (const [part, weight] of [
        ['', re],
        ['\\mathrm{i}', im],
      ] as const) {
        if (isZero(weight)) continue;
        const letters =
          part +
          powers.map((power, k) => (power === 0 ? '' : power === 1 ? symbols[k] : `${symbols[k]}^{${power}}`)).join('');
        const held = groups.get(letters) ?? {
          degree: powers.reduce((all, power) => all + power, 0),
          letters,
          members: [],
        };
        held.members.push({ text: site(term.offset, term.level), weight });
        groups.set(letters, held);
      }
    }
  }
  return [...groups.values()]
    .sort((a, b) => a.degree - b.degree)
    .map(({ members, letters }, k) => group(members, letters, k === 0))
    .join('');
}
