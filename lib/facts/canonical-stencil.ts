/** A stencil definition as exact numbers, with every reason why it cannot be read. */
import { LIMITS, type StencilDefinition } from '@/lib/entries/definition';
import {
  add,
  compare,
  formatRational,
  isZero,
  ONE,
  parseRational,
  rational,
  ZERO,
  type Rational,
} from '@/lib/numerics/rational';
import {
  resolveWeights,
  type OperatorTerm,
  type StencilQuestion,
  type StencilRow,
} from '@/lib/numerics/stencil-weights';
import type { Problem } from './facts';
import { hasErrors, problemAt } from './problem';

export interface CanonicalStencil {
  readonly dims: 1 | 2 | 3;
  readonly operator: readonly OperatorTerm[];
  readonly offsets: readonly (readonly Rational[])[];
  readonly weights: readonly Rational[];
  readonly lhs: { readonly offsets: readonly (readonly Rational[])[]; readonly weights: readonly Rational[] } | null;
  /** One unit in the last printed digit of each weight: 0 for fractions, integers and derived weights. */
  readonly ulps: readonly Rational[];
  readonly lhsUlps: readonly Rational[];
}

/** Reads an exact number; a divisor 0 is reported. */
export function readRational(text: string, pointer: string, problems: Problem[]): Rational | null {
  try {
    return parseRational(text);
  } catch {
    problems.push(
      problemAt(
        pointer,
        'not-a-number',
        `'${text}' is not a number; accepted: an integer, a fraction such as -1/12, or a decimal`,
      ),
    );
    return null;
  }
}

/** One unit in the last digit of a decimal as printed; 0 for integers and fractions. */
function ulpOf(text: string): Rational {
  const match = /\.(\d+)$/.exec(text.trim());
  return match ? rational(1n, 10n ** BigInt(match[1]!.length)) : rational(0n);
}

const LIMIT = rational(LIMITS.offset);

/** Reads an offset with one component per dimension, within the limit. */
export function readOffset(
  value: string | readonly string[],
  dims: number,
  pointer: string,
  problems: Problem[],
): Rational[] | null {
  const parts = typeof value === 'string' ? [value] : value;
  if (parts.length !== dims) {
    const due =
      dims === 1
        ? 'one number'
        : `${dims === 2 ? 'two' : 'three'} components, such as ${dims === 2 ? '[1, 0]' : '[1, 0, 0]'}`;
    problems.push(
      problemAt(
        pointer,
        'offset-components',
        `this offset has ${parts.length} component${parts.length === 1 ? '' : 's'}; accepted: ${due}`,
      ),
    );
    return null;
  }
  const offset: Rational[] = [];
  for (const [k, part] of parts.entries()) {
    const place = typeof value === 'string' ? pointer : `${pointer}/${k}`;
    const number = readRational(part, place, problems);
    if (!number) return null;
    if (compare(number, LIMIT) > 0 || compare(number, rational(-LIMIT.num)) < 0) {
      problems.push(
        problemAt(
          place,
          'offset-too-far',
          `offset ${formatRational(number)} is too far; accepted: offsets within -${LIMITS.offset} … ${LIMITS.offset}`,
        ),
      );
      return null;
    }
    offset.push(number);
  }
  return offset;
}

const keyOf = (offset: readonly Rational[]) => offset.map(formatRational).join(',');

function readOffsets(
  values: readonly (string | readonly string[])[],
  dims: number,
  pointer: string,
  problems: Problem[],
) {
  const seen = new Map<string, number>();
  const offsets: Rational[][] = [];
  values.forEach((value, k) => {
    const offset = readOffset(value, dims, `${pointer}/${k}`, problems);
    if (!offset) return;
    const earlier = seen.get(keyOf(offset));
    if (earlier !== undefined)
      problems.push(
        problemAt(
          `${pointer}/${k}`,
          'duplicate-offset',
          `offset ${keyOf(offset)} stands here and at position ${earlier + 1}; offsets must be distinct`,
        ),
      );
    seen.set(keyOf(offset), k);
    offsets.push(offset);
  });
  return offsets;
}

function readWeights(texts: readonly string[] | null, offsets: number, pointer: string, problems: Problem[]) {
  if (texts === null) return null;
  if (texts.length !== offsets) {
    problems.push(
      problemAt(
        pointer,
        'length-mismatch',
        `${offsets} offsets but ${texts.length} weights; accepted: one weight per offset, or null to derive them`,
      ),
    );
    return null;
  }
  return texts.map((text, k) => readRational(text, `${pointer}/${k}`, problems));
}

function readOperator(definition: StencilDefinition, pointer: string, problems: Problem[]): OperatorTerm[] {
  const { dims, derivative, operator } = definition;
  if (operator && derivative !== undefined)
    problems.push(
      problemAt(
        `${pointer}/operator`,
        'two-operators',
        'give either a derivative (one dimension) or an operator, not both',
      ),
    );
  if (!operator) {
    if (dims === 1 && derivative !== undefined) return [{ powers: [derivative], coefficient: ONE }];
    problems.push(
      problemAt(
        derivative === undefined ? pointer : `${pointer}/derivative`,
        'missing-operator',
        dims === 1
          ? 'what is approximated is missing; accepted: "derivative" from 0 to 8'
          : 'several dimensions need an "operator" such as {"xx":"1","yy":"1"} in place of "derivative"',
      ),
    );
    return [];
  }
  const terms = new Map<string, OperatorTerm>();
  for (const [word, text] of Object.entries(operator)) {
    const place = `${pointer}/operator/${word}`;
    const coefficient = readRational(text, place, problems);
    const letters = [...word];
    if (letters.some((letter) => 'xyz'.indexOf(letter) >= dims)) {
      problems.push(
        problemAt(
          place,
          'unknown-direction',
          `'${word}' leaves the ${dims} dimension${dims === 1 ? '' : 's'} of this stencil; accepted letters: ${'xyz'.slice(0, dims)}`,
        ),
      );
      continue;
    }
    const powers = [...'xyz'].slice(0, dims).map((axis) => letters.filter((letter) => letter === axis).length);
    if (coefficient && terms.has(powers.join()))
      problems.push(problemAt(place, 'duplicate-partial', `'${word}' names a partial that is given twice`));
    if (coefficient && !isZero(coefficient)) terms.set(powers.join(), { powers, coefficient });
  }
  const list = [...terms.values()];
  const degrees = new Set(list.map((term) => term.powers.reduce((s, p) => s + p, 0)));
  if (list.length === 0 && !hasErrors(problems))
    problems.push(
      problemAt(
        `${pointer}/operator`,
        'missing-operator',
        'the operator is zero; accepted: at least one partial with a nonzero coefficient',
      ),
    );
  if (degrees.size > 1)
    problems.push(
      problemAt(
        `${pointer}/operator`,
        'mixed-degree',
        'the partials of one operator must have the same total order, since one power of the spacing scales the row',
      ),
    );
  return list;
}

const sumOf = (values: readonly Rational[]) => values.reduce(add, ZERO);

/** @param pointer JSON pointer of the stencil within the whole definition */
export function canonicalStencil(
  definition: StencilDefinition,
  pointer = '',
): { stencil: CanonicalStencil | null; problems: Problem[] } {
  const problems: Problem[] = [];
  const { dims } = definition;
  const operator = readOperator(definition, pointer, problems);
  const offsets = readOffsets(definition.offsets, dims, `${pointer}/offsets`, problems);
  const weights = readWeights(definition.weights, definition.offsets.length, `${pointer}/weights`, problems);
  let lhs: StencilRow | null = null;
  if (definition.lhs) {
    const leftOffsets = readOffsets(definition.lhs.offsets, dims, `${pointer}/lhs/offsets`, problems);
    const leftWeights = readWeights(
      definition.lhs.weights,
      definition.lhs.offsets.length,
      `${pointer}/lhs/weights`,
      problems,
    );
    lhs = { offsets: leftOffsets, weights: leftWeights as Rational[] | null };
  }
  if (hasErrors(problems)) return { stencil: null, problems };
  const question: StencilQuestion = { dims, operator, offsets, weights: weights as Rational[] | null, lhs };
  const outcome = resolveWeights(question);
  if (outcome.kind !== 'weights') {
    problems.push(problemAt(`${pointer}/offsets`, outcome.kind, outcome.message));
    return { stencil: null, problems };
  }
  if (outcome.lhsWeights && isZero(sumOf(outcome.lhsWeights))) {
    problems.push(
      problemAt(
        `${pointer}/lhs`,
        'zero-lhs',
        'the left-hand weights sum to 0, so that the row approximates nothing; accepted: a nonzero sum',
      ),
    );
    return { stencil: null, problems };
  }
  const none = (count: number) => new Array<Rational>(count).fill(rational(0n));
  return {
    stencil: {
      dims,
      operator,
      offsets,
      weights: outcome.weights,
      lhs: lhs && outcome.lhsWeights ? { offsets: lhs.offsets, weights: outcome.lhsWeights } : null,
      ulps: definition.weights?.map(ulpOf) ?? none(offsets.length),
      lhsUlps: definition.lhs?.weights?.map(ulpOf) ?? none(lhs?.offsets.length ?? 0),
    },
    problems,
  };
}
