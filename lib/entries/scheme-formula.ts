/**
 * The formula line of a table: `u[n+1,i] = u[n-1,i] - lambda*(u[n,i+1] - u[n,i-1])`. Both ways between the line and
 * the terms of a definition; the coefficients are read by the engine's own expression language.
 */
import { CONVENTIONS, type Equation } from '@/lib/numerics/equation';
import { readExpression } from '@/lib/numerics/expression';
import { neg, type Polynomial, variable } from '@/lib/numerics/polynomial';
import { quotientText } from '@/lib/numerics/polynomial-text';
import { addF, fromPolynomial, negF, type RationalFunction } from '@/lib/numerics/rational-function';
import { formatRational, parseRational, toNumber } from '@/lib/numerics/rational';
import { LIMITS, type TableScheme } from './definition';
import { additiveTerms, negatedExpression } from './negated-expression';

type Term = TableScheme['terms'][number];
type TermInput = { level: string; offset: string | string[]; coefficient: string };

const AXES = ['i', 'j', 'k'] as const;
const offsetsOf = (offset: Term['offset']) => (Array.isArray(offset) ? offset : [offset]);

const indexText = (letter: string, by: string) => {
  const value = parseRational(by);
  if (value.num === 0n) return letter;
  return value.num < 0n ? `${letter}${formatRational(value)}` : `${letter}+${formatRational(value)}`;
};

/** "u[n-1,i+1]" */
export const siteText = (level: string, offset: Term['offset']) =>
  `u[${[indexText('n', level), ...offsetsOf(offset).map((by, axis) => indexText(AXES[axis] ?? 'i', by))].join(',')}]`;

function product(coefficient: string, site: string): string {
  const text = coefficient.trim();
  if (text === '1') return site;
  if (text === '-1') return `-${site}`;
  return additiveTerms(text).length > 1 ? `(${text})*${site}` : `${text}*${site}`;
}

const joined = (parts: readonly string[]) =>
  parts.map((part, k) => (k === 0 ? part : part.startsWith('-') ? ` - ${part.slice(1)}` : ` + ${part}`)).join('') ||
  '0';

const valueOf = (text: string) => toNumber(parseRational(text));

/** Newest level first, then from left to right. */
function asRead(a: Term, b: Term): number {
  const [left, right] = [offsetsOf(a.offset), offsetsOf(b.offset)];
  return (
    valueOf(b.level) - valueOf(a.level) ||
    left.reduce((order, by, axis) => order || valueOf(by) - valueOf(right[axis] ?? '0'), 0)
  );
}

/** The terms as a line: the newest level on the left, the others on the right with their signs turned. */
export function formulaOf(written: readonly Term[]): string {
  const terms = [...written].sort(asRead);
  const newest = newestLevel(terms);
  const left = terms.filter(({ level }) => Number(parseRational(level).num) === newest);
  const right = terms.filter((term) => !left.includes(term));
  return `${joined(left.map((t) => product(t.coefficient, siteText(t.level, t.offset))))} = ${joined(
    right.map((t) => product(negatedExpression(t.coefficient), siteText(t.level, t.offset))),
  )}`;
}

/** Largest level of a table; levels are whole. */
export const newestLevel = (terms: readonly Pick<Term, 'level'>[]) =>
  Math.max(...terms.map(({ level }) => Number(parseRational(level).num)));

export interface FormulaProblem {
  /** 1-based column in the line. */
  readonly column: number;
  readonly message: string;
}
export type FormulaOutcome = { readonly terms: TermInput[] } | { readonly problem: FormulaProblem };

interface Site {
  readonly level: string;
  readonly offset: string[];
  readonly name: string;
}

class Fault extends Error {
  constructor(readonly problem: FormulaProblem) {
    super(problem.message);
  }
}
const fail = (column: number, message: string): never => {
  throw new Fault({ column, message });
};

function readIndex(text: string, letter: string, column: number): string {
  const match = new RegExp(`^\\s*${letter}\\s*(?:([+-])\\s*(\\d+(?:/2|\\.5)?))?\\s*$`).exec(text);
  if (!match)
    return fail(
      column,
      `'${text.trim()}' cannot be read; accepted: ${letter}, or ${letter} with a step such as ${letter}-1`,
    );
  if (match[2] === undefined) return '0';
  return formatRational(parseRational(`${match[1] === '-' ? '-' : ''}${match[2]}`));
}

/** Replaces every u[…] by a name of the same length, so that the columns stay, and collects what it stands for. */
function withNames(text: string, dims: number, sites: Site[]): string {
  return text.replace(/\bu\s*\[([^\]]*)\]?/g, (whole, inside: string, at: number) => {
    if (!whole.endsWith(']')) fail(at + 1, 'a bracket is not closed; accepted: u[n,i]');
    const parts = inside.split(',');
    if (parts.length !== dims + 1)
      fail(at + 1, `${whole} has ${parts.length} indices; accepted: ${siteText('0', Array<string>(dims).fill('0'))}`);
    const start = at + whole.indexOf('[') + 2;
    const level = readIndex(parts[0] ?? '', 'n', start);
    const offset = parts
      .slice(1)
      .map((part, axis) => readIndex(part, AXES[axis] ?? 'i', start + (parts[0]?.length ?? 0) + 1));
    const known = sites.find((site) => site.level === level && site.offset.join() === offset.join());
    const name = known?.name ?? `u_${sites.length}`;
    if (!known) sites.push({ level, offset, name });
    return name.padEnd(whole.length, ' ');
  });
}

function read(side: string, from: number, vocabulary: Parameters<typeof readExpression>[1]): RationalFunction | null {
  let sum: RationalFunction | null = null;
  for (const { sign, body, at } of additiveTerms(side)) {
    if (body === '') fail(from + at + 1, 'a term is missing here; accepted: a product such as lambda*u[n,i]');
    const outcome = readExpression(body, vocabulary);
    if ('problem' in outcome)
      return fail(from + at + outcome.problem.column, outcome.problem.message.replace(/, u_\d+/g, ''));
    const value = sign === '-' ? negF(outcome.value) : outcome.value;
    sum = sum === null ? value : addF(sum, value, vocabulary.variables);
  }
  return sum;
}

/** The part of a polynomial that belongs to one site: its power taken out. */
function partOf(polynomial: Polynomial, index: number): Polynomial {
  return polynomial
    .filter(({ powers }) => powers[index] === 1)
    .map((m) => ({ ...m, powers: m.powers.map((power, k) => (k === index ? 0 : power)) }));
}

/** Monomials up to this many are written one after the other, more of them in factors. */
const PLAIN_TERMS = 2;

function plainText(polynomial: Polynomial, names: readonly string[]): string | null {
  if (polynomial.length > PLAIN_TERMS || polynomial.some(({ im }) => im.num !== 0n)) return null;
  const degree = (powers: readonly number[]) => powers.reduce((sum, power) => sum + power, 0);
  return [...polynomial]
    .sort((a, b) => degree(a.powers) - degree(b.powers))
    .map(({ powers, re }, k) => {
      const size = re.num < 0n ? -re.num : re.num;
      const letters = powers.flatMap((power, n) =>
        power === 0 ? [] : [`${names[n]}${power === 1 ? '' : `^${power}`}`],
      );
      const factors = size === 1n && letters.length > 0 ? letters : [String(size), ...letters];
      const text = `${factors.join('*')}${re.den === 1n ? '' : `/${re.den}`}`;
      return k === 0 ? `${re.num < 0n ? '-' : ''}${text}` : `${re.num < 0n ? ' - ' : ' + '}${text}`;
    })
    .join('');
}

const isUnit = (den: Polynomial) => den.length === 1 && den[0]!.powers.every((power) => power === 0);

/** A weight as an author would write it. */
function coefficientOf(part: Polynomial, den: Polynomial, names: readonly string[]): string {
  if (part.length === 0) return '0';
  return (isUnit(den) ? plainText(part, names) : null) ?? asWritten(quotientText(part, den, names));
}

const asWritten = (text: string) => text.replaceAll('**', '^').replace(/\bI\b/g, 'i');

/**
 * Reads a formula line into terms: linear in u, coefficients in the equation's numbers.
 * @param fixed names held fixed in the definition, which may be used too
 */
export function readFormula(text: string, equation: Equation, fixed: readonly string[] = []): FormulaOutcome {
  const { dims, parameters, common, complex } = CONVENTIONS[equation];
  try {
    const sites: Site[] = [];
    const plain = withNames(text, dims, sites);
    if (sites.length === 0) return fail(1, 'there is no point in this line; accepted: u[n+1,i] = u[n,i] and the like');
    if (sites.length > LIMITS.terms)
      return fail(1, `${sites.length} points are too many; accepted: at most ${LIMITS.terms}`);
    const names = [...new Set([...parameters, ...(common ? [common] : []), ...fixed])];
    const all = [...names, ...sites.map(({ name }) => name)];
    const symbols = new Map(all.map((name, k) => [name, fromPolynomial(variable(all.length, k), all.length)]));
    const vocabulary = { variables: all.length, symbols, complex };
    const equals = plain.indexOf('=');
    if (equals < 0) return fail(plain.length + 1, 'there is no equals sign; accepted: u[n+1,i] = …');
    const second = plain.indexOf('=', equals + 1);
    if (second >= 0) return fail(second + 1, 'there are two equals signs; accepted: one');
    const left = read(plain.slice(0, equals), 0, vocabulary);
    const right = read(plain.slice(equals + 1), equals + 1, vocabulary);
    if (!left || !right) return fail(1, 'a side of the line is empty');
    const difference = addF(left, negF(right), all.length);
    for (const { powers } of difference.num) {
      const degree = powers.slice(names.length).reduce((sum, power) => sum + power, 0);
      if (degree === 0) return fail(1, 'a term stands without a point; accepted: products such as lambda*u[n,i]');
      if (degree > 1) return fail(1, 'points are multiplied by each other; accepted: schemes that are linear in u');
    }
    if (difference.den.some(({ powers }) => powers.slice(names.length).some((power) => power > 0)))
      return fail(1, 'a point stands below a fraction line; accepted: schemes that are linear in u');
    const newest = String(Math.max(...sites.map(({ level }) => Number(level))));
    const terms = sites
      .map(({ level, offset }, k) => {
        const part = partOf(difference.num, names.length + k);
        // On the right of the equals sign the text of the weight is what is read, so that is what is made readable.
        const coefficient =
          level === newest
            ? coefficientOf(part, difference.den, all)
            : negatedExpression(coefficientOf(neg(part), difference.den, all));
        return { level, offset: dims === 1 ? (offset[0] ?? '0') : offset, coefficient };
      })
      .filter(({ coefficient }) => coefficient !== '0');
    if (terms.length === 0) return fail(1, 'everything cancels; accepted: a line that relates two levels');
    return { terms };
  } catch (error) {
    if (error instanceof Fault) return { problem: error.problem };
    throw error;
  }
}
