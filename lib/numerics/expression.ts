/**
 * The small language of coefficients: numbers, symbols, + - * / ^ (or **) with integer exponents, parentheses, and
 * `i` where the equation is complex. mathjs parses the structure; nothing is ever evaluated as code, and every
 * operand reaches the parser as a placeholder, so that its own functions, units and keywords have no meaning here.
 */
import { create, parseDependencies, type MathNode } from 'mathjs/number';
import { constant, type Polynomial } from './polynomial';
import { addF, divF, fromPolynomial, mulF, negF, type RationalFunction } from './rational-function';
import { ONE, parseRational, ZERO } from './rational';

const { parse } = create({ parseDependencies: parseDependencies! }, {});

/** Exponents beyond this, or results of a higher degree or of longer numbers, are refused before they cost time. */
export const EXPRESSION_LIMITS = { exponent: 16, degree: 48, digits: 400, characters: 200 } as const;

export interface Vocabulary {
  /** Number of variables of the ring of the result. */
  readonly variables: number;
  /** What each accepted symbol stands for. */
  readonly symbols: ReadonlyMap<string, RationalFunction>;
  /** Whether `i` is the imaginary unit. */
  readonly complex: boolean;
}

export interface ExpressionProblem {
  readonly code: 'syntax' | 'unknown-symbol' | 'not-rational' | 'division-by-zero' | 'too-large' | 'not-complex';
  /** 1-based column in the text. */
  readonly column: number;
  readonly message: string;
}
export type ExpressionOutcome = { readonly value: RationalFunction } | { readonly problem: ExpressionProblem };

class ProblemAt extends Error {
  constructor(readonly problem: ExpressionProblem) {
    super(problem.message);
  }
}
const fail = (code: ExpressionProblem['code'], column: number, message: string): never => {
  throw new ProblemAt({ code, column, message });
};

interface Token {
  readonly kind: 'number' | 'name' | 'operator' | 'open' | 'close';
  readonly text: string;
  readonly column: number;
}

const TOKEN = /\s*(?:((?:\d+(?:\.\d*)?|\.\d+)(?:[eE][+-]?\d+)?)|([A-Za-z_][A-Za-z0-9_]*)|(\*\*|[-+*/^])|(\()|(\)))/y;

function tokens(text: string): Token[] {
  const found: Token[] = [];
  let at = 0;
  while (text.slice(at).trim() !== '') {
    TOKEN.lastIndex = at;
    const match = TOKEN.exec(text);
    if (!match) {
      const column = at + text.slice(at).search(/\S/) + 1;
      const character = String.fromCodePoint(text.codePointAt(column - 1)!);
      return fail(
        'syntax',
        column,
        `'${character}' is not part of a coefficient; accepted: numbers, the equation's symbols, + - * / ^ and parentheses`,
      );
    }
    const [whole, number, name, operator, open] = match;
    const value = number ?? name ?? operator ?? open ?? ')';
    const kind = number ? 'number' : name ? 'name' : operator ? 'operator' : open ? 'open' : 'close';
    const column = at + whole.length - value.length + 1;
    if (number && /[eE]/.test(number))
      fail(
        'syntax',
        column,
        `'${number}' has an exponent of ten; accepted: integers, decimals such as 0.25, and fractions such as 1/12`,
      );
    const before = found[found.length - 1];
    if (before && (kind === 'number' || kind === 'name' || kind === 'open')) {
      if (before.kind === 'name' && kind === 'open')
        fail(
          'not-rational',
          before.column,
          `'${before.text}(…)' is a function or lacks a '*'; a coefficient is a rational function of the equation's symbols`,
        );
      if (before.kind === 'number' || before.kind === 'name' || before.kind === 'close')
        fail('syntax', column, `'${before.text}' is followed by '${value}'; write '*' between factors`);
    }
    found.push({ kind, text: value === '**' ? '^' : value, column });
    at += whole.length;
  }
  return found;
}

function structure(list: readonly Token[], text: string): MathNode {
  if (list.length === 0) fail('syntax', 1, 'the coefficient is empty; accepted: an expression such as -lambda/2');
  let written = '';
  const starts: number[] = [];
  list.forEach((token, index) => {
    written += ' ';
    starts.push(written.length);
    written += token.kind === 'number' || token.kind === 'name' ? `t${index}` : token.text;
  });
  try {
    return parse(written);
  } catch (error) {
    const char = (error as { char?: number }).char ?? written.length + 1;
    const index = starts.findIndex((start, k) => char - 1 >= start && char - 1 < (starts[k + 1] ?? written.length));
    const token = index >= 0 ? list[index] : undefined;
    const reason = token ? `an operand is missing at '${token.text}'` : 'the expression ends too early';
    return fail(
      'syntax',
      token?.column ?? text.length + 1,
      `${reason}; accepted: numbers, symbols, + - * / ^ and balanced parentheses`,
    );
  }
}

interface TreeNode {
  readonly type: string;
  readonly name?: string;
  readonly op?: string;
  readonly args?: readonly TreeNode[];
  readonly content?: TreeNode;
}

const digitsOf = (a: Polynomial) =>
  a.reduce((most, m) => {
    for (const q of [m.re, m.im])
      if (q.num !== 0n) most = Math.max(most, q.num.toString(16).length, q.den.toString(16).length);
    return most;
  }, 0);
const degreeOf = (a: Polynomial) =>
  a.reduce(
    (most, m) =>
      Math.max(
        most,
        m.powers.reduce((s, p) => s + p, 0),
      ),
    0,
  );

class Reader {
  constructor(
    readonly list: readonly Token[],
    readonly vocabulary: Vocabulary,
  ) {}

  private tokenOf(node: TreeNode): Token {
    return this.list[Number(node.name!.slice(1))]!;
  }

  /** Column of the first operand below a node: where a message about the whole node points. */
  private columnOf(node: TreeNode): number {
    if (node.type === 'SymbolNode') return this.tokenOf(node).column;
    const first = node.type === 'ParenthesisNode' ? node.content! : node.args![0]!;
    return this.columnOf(first);
  }

  private bounded(value: RationalFunction, node: TreeNode): RationalFunction {
    const { degree, digits } = EXPRESSION_LIMITS;
    if (Math.max(degreeOf(value.num), degreeOf(value.den)) > degree)
      fail('too-large', this.columnOf(node), `the degree exceeds ${degree}`);
    if (Math.max(digitsOf(value.num), digitsOf(value.den)) > digits)
      fail('too-large', this.columnOf(node), 'a number in this expression becomes too long');
    return value;
  }

  private operand(node: TreeNode): RationalFunction {
    const { kind, text, column } = this.tokenOf(node);
    const { variables, symbols, complex } = this.vocabulary;
    if (kind === 'number') return fromPolynomial(constant(variables, parseRational(text)), variables);
    const value = symbols.get(text);
    if (value) return value;
    if (text === 'i' && complex) return fromPolynomial(constant(variables, ZERO, ONE), variables);
    const accepted = [...symbols.keys(), ...(complex ? ['i'] : [])].join(', ') || 'numbers only';
    if (text === 'i')
      return fail(
        'not-complex',
        column,
        `the imaginary unit i belongs to complex equations only; accepted symbols: ${accepted}`,
      );
    return fail('unknown-symbol', column, `unknown symbol '${text}'; accepted symbols: ${accepted}`);
  }

  private exponent(node: TreeNode): number {
    const value = this.value(node);
    const column = this.columnOf(node);
    const numerator = value.num[0];
    const isConstant = degreeOf(value.num) === 0 && degreeOf(value.den) === 0;
    if (!isConstant || (numerator && (numerator.re.den !== 1n || numerator.im.num !== 0n)))
      fail('not-rational', column, 'an exponent must be an integer');
    const power = numerator ? Number(numerator.re.num) : 0;
    if (Math.abs(power) > EXPRESSION_LIMITS.exponent)
      fail(
        'too-large',
        column,
        `an exponent lies within -${EXPRESSION_LIMITS.exponent} … ${EXPRESSION_LIMITS.exponent}`,
      );
    return power;
  }

  private quotient(a: RationalFunction, b: RationalFunction, node: TreeNode): RationalFunction {
    if (b.num.length === 0)
      fail('division-by-zero', this.columnOf(node), 'this divisor is zero for every parameter value');
    return divF(a, b, this.vocabulary.variables);
  }

  value(node: TreeNode): RationalFunction {
    const { variables } = this.vocabulary;
    if (node.type === 'SymbolNode') return this.operand(node);
    if (node.type === 'ParenthesisNode') return this.value(node.content!);
    const [left, right] = node.args!;
    const a = this.value(left!);
    if (!right) return node.op === '-' ? negF(a) : a;
    if (node.op === '^') {
      const power = this.exponent(right);
      if (
        degreeOf(a.num) * Math.abs(power) > EXPRESSION_LIMITS.degree ||
        digitsOf(a.num) * Math.abs(power) > 4 * EXPRESSION_LIMITS.digits
      )
        fail(
          'too-large',
          this.columnOf(node),
          `this power is too large; the degree may be at most ${EXPRESSION_LIMITS.degree}`,
        );
      let result = fromPolynomial(constant(variables, ONE), variables);
      for (let k = 0; k < Math.abs(power); k++) result = this.bounded(mulF(result, a, variables), node);
      return power < 0 ? this.quotient(fromPolynomial(constant(variables, ONE), variables), result, left!) : result;
    }
    const b = this.value(right);
    const value =
      node.op === '+'
        ? addF(a, b, variables)
        : node.op === '-'
          ? addF(a, negF(b), variables)
          : node.op === '*'
            ? mulF(a, b, variables)
            : this.quotient(a, b, right);
    return this.bounded(value, node);
  }
}

/** Reads a coefficient as a rational function, or says what is wrong and at which column. Never throws on bad text. */
export function readExpression(text: string, vocabulary: Vocabulary): ExpressionOutcome {
  try {
    if (text.length > EXPRESSION_LIMITS.characters)
      fail(
        'too-large',
        EXPRESSION_LIMITS.characters + 1,
        `an expression has at most ${EXPRESSION_LIMITS.characters} characters`,
      );
    const list = tokens(text);
    return { value: new Reader(list, vocabulary).value(structure(list, text) as unknown as TreeNode) };
  } catch (error) {
    if (error instanceof ProblemAt) return { problem: error.problem };
    throw error;
  }
}
