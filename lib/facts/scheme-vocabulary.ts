/** Which symbols a scheme may use and what they stand for: parameters, a common symbol, fixed numbers, a path. */
import type { Equation } from '@/lib/numerics/equation';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { readExpression } from '@/lib/numerics/expression';
import { constant, variable, type Polynomial } from '@/lib/numerics/polynomial';
import { fromPolynomial, type RationalFunction } from '@/lib/numerics/rational-function';
import type { Rational } from '@/lib/numerics/rational';
import { readRational } from './canonical-stencil';
import type { Problem } from './facts';
import { hasErrors, problemAt } from './problem';

export interface SchemeVocabulary {
  /** Free parameters of the scheme, in the order of the powers. */
  readonly parameters: readonly string[];
  readonly symbols: ReadonlyMap<string, RationalFunction>;
  /** The equation's own numbers in the free parameters. */
  readonly numbers: Readonly<Record<string, Polynomial>>;
  readonly complex: boolean;
}

const MOST_FIXED = 16;
const NAME = /^[A-Za-z_][A-Za-z0-9_]*$/;

interface Cut {
  /** Eliminated numbers, each with the text that replaces it. */
  readonly replaced: ReadonlyMap<string, string>;
  /** All of the equation's numbers are said to be equal. */
  readonly allEqual: boolean;
}

function readPath(path: string | undefined, free: readonly string[], problems: Problem[]): Cut {
  const replaced = new Map<string, string>();
  if (path === undefined || path.trim() === '') return { replaced, allEqual: false };
  const refuse = (message: string) =>
    problems.push(
      problemAt(
        '/path',
        'bad-path',
        `${message}; accepted: a relation such as ${free.length > 1 ? `${free[0]}=${free[1]}` : 'lambda_x=2*lambda_y'} between the equation's numbers`,
      ),
    );
  const sides = path.split('=').map((side) => side.trim());
  if (sides.length < 2 || sides.some((side) => side === '')) {
    refuse(`'${path}' is not a relation`);
    return { replaced, allEqual: false };
  }
  const last = sides[sides.length - 1]!;
  const isNumber = (side: string) => free.includes(side);
  if (sides.length === 2 && !isNumber(sides[0]!) && isNumber(last)) sides.reverse();
  const target = sides[sides.length - 1]!;
  for (const side of sides.slice(0, -1)) {
    if (!isNumber(side)) refuse(`'${side}' is not a free number of this equation`);
    else if (new RegExp(`\\b${side}\\b`).test(target) || replaced.has(side))
      refuse(`'${path}' leaves ${side} undetermined`);
    else replaced.set(side, target);
  }
  return { replaced, allEqual: sides.every(isNumber) && free.every((name) => sides.includes(name)) };
}

/**
 * @param texts     every coefficient text of the definition, to see whether the common symbol is used
 * @param useCommon true where the definition itself treats all numbers as equal (one Laplacian for all directions)
 */
export function schemeVocabulary(
  definition: { equation: Equation; fixed?: Readonly<Record<string, string>> | undefined; path?: string | undefined },
  texts: readonly string[],
  problems: Problem[],
  useCommon = false,
): SchemeVocabulary | null {
  const { parameters, common, complex } = CONVENTIONS[definition.equation];
  const fixed = new Map<string, Rational>();
  const given = Object.keys(definition.fixed ?? {}).length;
  if (given > MOST_FIXED) {
    problems.push(problemAt('/fixed', 'too-many', `${given} numbers are fixed; accepted: at most ${MOST_FIXED}`));
    return null;
  }
  for (const [name, text] of Object.entries(definition.fixed ?? {})) {
    const place = `/fixed/${name.replace(/~/g, '~0').replace(/\//g, '~1')}`;
    if (!NAME.test(name) || name === 'i')
      problems.push(
        problemAt(place, 'bad-name', `'${name}' cannot name a fixed number; accepted: letters, digits and _, not 'i'`),
      );
    const value = readRational(text, place, problems);
    if (value) fixed.set(name, value);
  }
  if (common !== null && fixed.has(common)) {
    for (const name of parameters) {
      if (fixed.has(name)) problems.push(problemAt(`/fixed/${name}`, 'fixed-twice', `${common} fixes ${name} already`));
      fixed.set(name, fixed.get(common)!);
    }
  }
  const free = parameters.filter((name) => !fixed.has(name));
  const cut = readPath(definition.path, free, problems);
  if (hasErrors(problems)) return null;

  const isWritten =
    common !== null && !fixed.has(common) && texts.some((text) => new RegExp(`\\b${common}\\b`).test(text));
  const equal = common !== null && free.length === parameters.length && (cut.allEqual || isWritten || useCommon);
  if (isWritten && !equal)
    problems.push(
      problemAt(
        '/fixed',
        'common-and-fixed',
        `${common} means that ${parameters.join(', ')} are equal, but some are fixed; use ${free.join(', ') || 'the fixed numbers'}`,
      ),
    );
  if (equal && cut.replaced.size > 0 && !cut.allEqual)
    problems.push(
      problemAt(
        '/path',
        'bad-path',
        `the coefficients use ${common}, which makes all numbers equal; drop the path or write ${parameters.join(', ')}`,
      ),
    );
  if (hasErrors(problems)) return null;

  const names = equal ? [common] : free.filter((name) => !cut.replaced.has(name));
  const count = names.length;
  const symbols = new Map<string, RationalFunction>();
  names.forEach((name, k) => symbols.set(name, fromPolynomial(variable(count, k), count)));
  if (equal) for (const name of parameters) symbols.set(name, symbols.get(common)!);
  for (const [name, value] of fixed) symbols.set(name, fromPolynomial(constant(count, value), count));
  for (const [name, text] of cut.replaced) {
    if (equal) break;
    const outcome = readExpression(text, { variables: count, symbols, complex: false });
    if ('problem' in outcome)
      problems.push(
        problemAt(
          '/path',
          outcome.problem.code,
          outcome.problem.message,
          (definition.path ?? '').indexOf(text) + outcome.problem.column,
        ),
      );
    else if (outcome.value.den.length !== 1 || outcome.value.den[0]!.powers.some((p) => p > 0))
      problems.push(
        problemAt('/path', 'bad-path', `'${text}' divides by a parameter; accepted: a polynomial in the other numbers`),
      );
    else symbols.set(name, outcome.value);
  }
  if (hasErrors(problems)) return null;
  const numbers = Object.fromEntries(parameters.map((name) => [name, symbols.get(name)!.num]));
  return { parameters: names, symbols, numbers, complex };
}
