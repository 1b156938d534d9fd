/** A stability region in words, such as "lambda^2 <= 2 r <= 1", as conditions that a kernel can check. */
import { readExpression } from '@/lib/numerics/expression';
import { variable } from '@/lib/numerics/polynomial';
import { fromPolynomial, type RationalFunction } from '@/lib/numerics/rational-function';
import { isReal } from './coefficient';

export interface Inequality {
  readonly left: RationalFunction;
  readonly right: RationalFunction;
}

/** "2 r" and "2r" are products; the language of coefficients wants them written. */
const withProducts = (text: string) =>
  text
    .trim()
    .replace(/([\w)])\s+(?=[A-Za-z(])/g, '$1*')
    .replace(/(^|[^\w.])(\d+)(?=[A-Za-z(])/g, '$1$2*');

/** A chain a <= b <= c, or b >= a, as its sides in ascending order. */
function sidesOf(chain: string): string[] {
  return chain.includes('>=') ? chain.split('>=').reverse() : chain.split('<=');
}

/** |x| on the smaller side stands for x and for -x. */
function withoutModulus(chain: string): string[] {
  const modulus = /\|(\w+)\|/;
  const found = modulus.exec(chain);
  if (!found) return [chain];
  return [`(${found[1]!})`, `(-${found[1]!})`].flatMap((signed) => withoutModulus(chain.replace(modulus, signed)));
}

/**
 * @param symbols parameters of the scheme, in the order of the powers
 * @returns every a <= b of the text, or null where it is no list of chains of polynomials in the parameters
 */
export function regionInequalities(text: string, symbols: readonly string[]): Inequality[] | null {
  const variables = symbols.length;
  const vocabulary = {
    variables,
    symbols: new Map(symbols.map((symbol, k) => [symbol, fromPolynomial(variable(variables, k), variables)])),
    complex: false,
  };
  const clauses = text
    .replace(/\(([^()]*[<>]=[^()]*)\)/g, ', $1')
    .split(/\s+and\s+|,/)
    .map((clause) => clause.trim().replace(/^any\s+/, ''))
    .filter((clause) => clause !== '' && !symbols.includes(clause));
  const inequalities: Inequality[] = [];
  for (const chain of clauses.flatMap(withoutModulus)) {
    const sides = sidesOf(chain).map((side) => readExpression(withProducts(side), vocabulary));
    if (sides.length < 2) return null;
    for (let k = 1; k < sides.length; k++) {
      const [left, right] = [sides[k - 1]!, sides[k]!];
      if (!('value' in left) || !('value' in right)) return null;
      if (!isReal(left.value.num) || !isReal(right.value.num)) return null;
      inequalities.push({ left: left.value, right: right.value });
    }
  }
  return inequalities.length > 0 ? inequalities : null;
}
