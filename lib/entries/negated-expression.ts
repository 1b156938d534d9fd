/**
 * The text of −(expression), term by term: "1 - 2*lambda" becomes "-1 + 2*lambda". Applied twice it gives the
 * first text again, up to blanks, also where the text is unfinished; exact, since only signs change.
 */
export function negatedExpression(text: string): string {
  if (text.trim() === '') return '';
  const terms = additiveTerms(text.trim());
  return terms
    .map(({ sign, body }, k) => {
      const turned = sign === '-' ? '+' : '-';
      if (k === 0) return turned === '-' ? `-${body}` : body;
      return ` ${turned} ${body}`;
    })
    .join('')
    .trimEnd();
}

export interface AdditiveTerm {
  readonly sign: '+' | '-';
  readonly body: string;
  /** 0-based place of the body in the text. */
  readonly at: number;
}

/** The terms of a sum outside brackets. A sign after an operator or within a number such as 1e-3 belongs to its term. */
export function additiveTerms(text: string): AdditiveTerm[] {
  const terms: AdditiveTerm[] = [];
  let depth = 0;
  let sign: '+' | '-' = '+';
  let start = 0;
  const close = (end: number) => {
    const raw = text.slice(start, end);
    const body = raw.trim();
    terms.push({ sign, body, at: start + raw.length - raw.trimStart().length });
  };
  for (let k = 0; k < text.length; k++) {
    const sign0 = text[k]!;
    if (sign0 === '(' || sign0 === '[') depth++;
    else if (sign0 === ')' || sign0 === ']') depth--;
    else if ((sign0 === '+' || sign0 === '-') && depth === 0) {
      const before = text.slice(0, k).trimEnd();
      const isFirst = before === '' && terms.length === 0;
      const belongs = /[-+*/^]$/.test(before) || /(^|[^A-Za-z0-9_.])(\d+\.?\d*|\.\d+)[eE]$/.test(text.slice(0, k));
      if (belongs) continue;
      if (!isFirst) close(k);
      sign = sign0;
      start = k + 1;
    }
  }
  close(text.length);
  return terms;
}
