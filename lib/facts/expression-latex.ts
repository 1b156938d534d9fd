/** The engine's printed coefficients ("-lambda*(lambda**2 - 1)/6") as LaTeX. */

const GREEK: Readonly<Record<string, string>> = { lambda: '\\lambda', sigma: '\\sigma', mu: '\\mu', theta: '\\theta' };

const DERIVATIVES: Readonly<Record<string, string>> = { X: '\\partial_x', Y: '\\partial_y', Z: '\\partial_z' };

function nameLatex(name: string): string {
  if (name === 'I') return '\\mathrm{i}';
  const [letter = '', index] = name.split('_');
  const body = DERIVATIVES[letter] ?? GREEK[letter] ?? (letter.length === 1 ? letter : `\\mathrm{${letter}}`);
  return index ? `${body}_{${index}}` : body;
}

/** Where the bracket that opens at a place closes. */
function closing(text: string, open: number): number {
  let depth = 0;
  for (let k = open; k < text.length; k++) {
    if (text[k] === '(') depth++;
    else if (text[k] === ')' && --depth === 0) return k;
  }
  return text.length - 1;
}

/** Position of the last division of a single quotient, outside all brackets; −1 where the text is a sum or has none. */
function lastDivision(text: string): number {
  let depth = 0;
  let last = -1;
  for (let k = 0; k < text.length; k++) {
    if (text[k] === '(') depth++;
    else if (text[k] === ')') depth--;
    else if (depth === 0 && k > 0 && (text[k] === '+' || text[k] === '-')) return -1;
    else if (depth === 0 && text[k] === '/') last = k;
  }
  return last;
}

const withoutBrackets = (text: string) =>
  text.startsWith('(') && closing(text, 0) === text.length - 1 ? text.slice(1, -1) : text;

function flat(text: string): string {
  let out = '';
  for (let k = 0; k < text.length;) {
    const rest = text.slice(k);
    const root = /^sqrt\(/.exec(rest);
    const name = /^[A-Za-z]+(?:_[a-z]+)?/.exec(rest);
    const power = /^(?:\*\*|\^)(?:\(([^)]*)\)|(-?\d+))/.exec(rest);
    if (root) {
      const end = closing(text, k + 4);
      out += `\\sqrt{${expressionLatex(text.slice(k + 5, end))}}`;
      k = end + 1;
    } else if (name) {
      out += nameLatex(name[0]);
      k += name[0].length;
    } else if (power) {
      out += `^{${power[1] ?? power[2]}}`;
      k += power[0].length;
    } else if (text[k] === '(') {
      const end = closing(text, k);
      out += `\\left(${expressionLatex(text.slice(k + 1, end))}\\right)`;
      k = end + 1;
    } else {
      out += text[k] === '*' ? '\\,' : text[k];
      k++;
    }
  }
  return out;
}

/** @param text sums, products, quotients, powers and sqrt of numbers and names, as the engine prints them */
export function expressionLatex(text: string): string {
  const sign = text.startsWith('-') ? '-' : '';
  const size = sign ? text.slice(1) : text;
  const at = lastDivision(size);
  if (at < 0) return flat(text);
  const [above, below] = [size.slice(0, at), size.slice(at + 1)];
  return `${sign}\\frac{${expressionLatex(withoutBrackets(above))}}{${expressionLatex(withoutBrackets(below))}}`;
}
