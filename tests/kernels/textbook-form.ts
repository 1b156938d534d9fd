/**
 * Schemes as a textbook writes them, the oracle of the kernels: neighbours by `%` in C and by np.roll in Python, a sum
 * of coefficient times value for every term, the coefficient divided out at every point, levels copied after the step.
 */
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { KernelInput } from '@/lib/codegen/kernel-request';
import { coefficientSource, literalSource } from '@/lib/codegen/coefficient';
import { parameterName } from '@/lib/codegen/kernel-plan';
import { fromPolynomial } from '@/lib/numerics/rational-function';
import { toNumber } from '@/lib/numerics/rational';

export interface TextbookForm {
  readonly parameters: readonly string[];
  readonly levels: number;
  /** void textbook(ptrdiff_t steps, ptrdiff_t n, double …, double *level[levels + 1]): newest level last but one. */
  readonly c: string;
  /** def textbook(steps, levels, …): returns the levels, oldest first. */
  readonly python: string;
}

export function textbookForm(input: KernelInput): TextbookForm {
  if (input.definition.kind !== 'scheme') throw new RangeError('textbookForm: not a scheme');
  const { scheme } = canonicalScheme(input.definition);
  if (scheme?.form !== 'scalar') throw new RangeError('textbookForm: not a scalar scheme');
  const symbols = scheme.parameters.map(parameterName);
  const source = (t: (typeof scheme.terms)[number]) =>
    coefficientSource(fromPolynomial(t.coefficient, symbols.length), symbols, (value) => literalSource(value));
  const newest = Math.max(...scheme.terms.map((t) => toNumber(t.level)));
  const pivot = scheme.terms.find((t) => toNumber(t.level) === newest)!;
  const known = scheme.terms.filter((t) => t !== pivot);
  const levels = Math.max(...known.map((t) => newest - toNumber(t.level)));
  const place = (t: (typeof known)[number]) => levels - (newest - toNumber(t.level));
  const offset = (t: (typeof known)[number]) => toNumber(t.offset[0]!) - toNumber(pivot.offset[0]!);
  const c = [
    '#include <stddef.h>',
    '#include <string.h>',
    `void textbook(ptrdiff_t steps, ptrdiff_t n, ${symbols.map((s) => `double ${s}`).join(', ')}, double *level[${levels + 1}]);`,
    `void textbook(ptrdiff_t steps, ptrdiff_t n, ${symbols.map((s) => `double ${s}`).join(', ')}, double *level[${levels + 1}])`,
    '{',
    '    for (ptrdiff_t s = 0; s < steps; ++s) {',
    '        for (ptrdiff_t i = 0; i < n; ++i)',
    `            level[${levels}][i] = -(${known
      .map((t) => `(${source(t)})*level[${place(t)}][(i + ${offset(t)} + n) % n]`)
      .join('\n                + ')})/(${source(pivot)});`,
    ...Array.from(
      { length: levels },
      (_, k) => `        memcpy(level[${k}], level[${k + 1}], (size_t)n * sizeof(double));`,
    ),
    '    }',
    '}',
    '',
  ].join('\n');
  const python = [
    'import numpy as np',
    '',
    `def textbook(steps, levels, ${symbols.join(', ')}):`,
    '    for _ in range(steps):',
    `        new = -(${known.map((t) => `(${source(t)})*np.roll(levels[${place(t)}], ${-offset(t)})`).join(' + ')})/(${source(pivot)})`,
    '        levels = [*levels[1:], new]',
    '    return levels',
    '',
  ].join('\n');
  return { parameters: symbols, levels, c, python };
}
