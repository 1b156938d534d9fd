/** Tables and systems: terms read, repeated ones summed, levels counted, denominators cleared. */
import { LIMITS, type SystemScheme as SystemDefinition, type TableScheme } from '@/lib/entries/definition';
import type { CanonicalScheme, CanonicalTerm } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { readExpression } from '@/lib/numerics/expression';
import { isZero } from '@/lib/numerics/polynomial';
import { addF, clearDenominators, type RationalFunction } from '@/lib/numerics/rational-function';
import { compare, equals, formatRational, ONE, rational, sub, type Rational } from '@/lib/numerics/rational';
import { readOffset, readRational } from './canonical-stencil';
import type { Problem } from './facts';
import { hasErrors, problemAt, warningAt } from './problem';
import { schemeVocabulary, type SchemeVocabulary } from './scheme-vocabulary';

interface ReadTerm {
  readonly unknown: number;
  readonly level: Rational;
  readonly offset: readonly Rational[];
  readonly coefficient: RationalFunction;
}
interface WrittenTerm {
  readonly level: string;
  readonly offset: string | readonly string[];
  readonly coefficient: string;
}

const isWhole = (a: Rational, parts: bigint) => parts % a.den === 0n;

function readTerm(
  term: WrittenTerm,
  place: string,
  { dims, vocabulary, halfLevels }: { dims: number; vocabulary: SchemeVocabulary; halfLevels: boolean },
  problems: Problem[],
): Omit<ReadTerm, 'unknown'> | null {
  const level = readRational(term.level, `${place}/level`, problems);
  const offset = readOffset(term.offset, dims, `${place}/offset`, problems);
  if (level && !isWhole(level, 1n) && !halfLevels)
    problems.push(
      problemAt(
        `${place}/level`,
        'half-level',
        `level ${formatRational(level)} is not an integer; accepted in a table: integers such as 1, 0, -1 (half levels need the system form)`,
      ),
    );
  else if (level && !isWhole(level, 2n))
    problems.push(
      problemAt(
        `${place}/level`,
        'bad-level',
        `level ${formatRational(level)} is neither whole nor half; accepted: multiples of 1/2`,
      ),
    );
  if (offset && !offset.every((x) => isWhole(x, 2n)))
    problems.push(
      problemAt(
        `${place}/offset`,
        'off-grid',
        'a scheme lives on grid points and midpoints; accepted: multiples of 1/2',
      ),
    );
  const outcome = readExpression(term.coefficient, { variables: vocabulary.parameters.length, ...vocabulary });
  if ('problem' in outcome) {
    problems.push(
      problemAt(`${place}/coefficient`, outcome.problem.code, outcome.problem.message, outcome.problem.column),
    );
    return null;
  }
  return level && offset ? { level, offset, coefficient: outcome.value } : null;
}

const keyOf = (term: ReadTerm) =>
  `${term.unknown}|${formatRational(term.level)}|${term.offset.map(formatRational).join(',')}`;

/** Sums repeated terms, with a warning at each repetition; drops the terms that vanish. */
function summed(terms: readonly (ReadTerm & { place: string })[], variables: number, problems: Problem[]): ReadTerm[] {
  const byKey = new Map<string, ReadTerm>();
  for (const { place, ...term } of terms) {
    const present = byKey.get(keyOf(term));
    if (present)
      problems.push(
        warningAt(
          place,
          'repeated-term',
          `level ${formatRational(term.level)}, offset ${term.offset.map(formatRational).join(', ')} stands more than once; its coefficients are summed`,
        ),
      );
    byKey.set(
      keyOf(term),
      present ? { ...term, coefficient: addF(present.coefficient, term.coefficient, variables) } : term,
    );
  }
  return [...byKey.values()].filter((term) => !isZero(term.coefficient.num));
}

const newestOf = (terms: readonly { level: Rational }[]) =>
  terms.reduce((most, { level }) => (compare(level, most) > 0 ? level : most), terms[0]!.level);
const oldestOf = (terms: readonly { level: Rational }[]) =>
  terms.reduce((least, { level }) => (compare(level, least) < 0 ? level : least), terms[0]!.level);

/** Newest level first, then by offset: the order in which the formula is written. */
const inOrder = (a: CanonicalTerm, b: CanonicalTerm) =>
  compare(b.level, a.level) || a.offset.reduce((order, x, k) => order || compare(x, b.offset[k]!), 0);

function levelProblem(terms: readonly { level: Rational }[], pointer: string): Problem | null {
  if (terms.length === 0)
    return problemAt(
      pointer,
      'no-terms',
      'every coefficient is zero; accepted: at least two time levels with nonzero coefficients',
    );
  const newest = newestOf(terms);
  const oldest = oldestOf(terms);
  if (equals(newest, oldest))
    return problemAt(
      pointer,
      'one-level',
      `only one time level (${formatRational(newest)}) has nonzero coefficients; accepted: at least two levels, such as 1 and 0`,
    );
  const span = sub(newest, oldest);
  if (compare(span, rational(LIMITS.levels - 1)) > 0)
    return problemAt(
      pointer,
      'too-many-levels',
      `the levels ${formatRational(oldest)} to ${formatRational(newest)} are more than ${LIMITS.levels}; accepted: at most ${LIMITS.levels} time levels`,
    );
  return null;
}

export function canonicalTable(definition: TableScheme, problems: Problem[]): CanonicalScheme | null {
  const { dims, timeOrder } = CONVENTIONS[definition.equation];
  const vocabulary = schemeVocabulary(
    definition,
    definition.terms.map((t) => t.coefficient),
    problems,
  );
  if (!vocabulary) return null;
  const variables = vocabulary.parameters.length;
  const read = definition.terms.flatMap((written, k) => {
    const place = `/terms/${k}`;
    const term = readTerm(written, place, { dims, vocabulary, halfLevels: false }, problems);
    return term ? [{ ...term, unknown: 0, place }] : [];
  });
  if (hasErrors(problems)) return null;
  const terms = summed(read, variables, problems);
  const problem = levelProblem(terms, '/terms');
  if (problem) {
    problems.push(problem);
    return null;
  }
  const shift = sub(newestOf(terms), ONE);
  const coefficients = clearDenominators(
    terms.map((t) => t.coefficient),
    variables,
  );
  return {
    form: 'scalar',
    equation: definition.equation,
    dims,
    timeOrder,
    parameters: vocabulary.parameters,
    numbers: vocabulary.numbers,
    terms: terms
      .map(({ level, offset }, k) => ({ level: sub(level, shift), offset, coefficient: coefficients[k]! }))
      .sort(inOrder),
  };
}

export function canonicalSystem(definition: SystemDefinition, problems: Problem[]): CanonicalScheme | null {
  const { dims, timeOrder } = CONVENTIONS[definition.equation];
  const { unknowns, equations } = definition;
  unknowns.forEach((name, k) => {
    if (unknowns.indexOf(name) < k)
      problems.push(
        problemAt(`/unknowns/${k}`, 'duplicate-unknown', `'${name}' is named twice; unknowns must be distinct`),
      );
  });
  if (equations.length !== unknowns.length)
    problems.push(
      problemAt(
        '/equations',
        'count-mismatch',
        `${unknowns.length} unknowns but ${equations.length} equations; accepted: one equation for each unknown`,
      ),
    );
  const texts = equations.flatMap((e) => e.terms.map((t) => t.coefficient));
  const vocabulary = schemeVocabulary(definition, texts, problems);
  if (!vocabulary) return null;
  const variables = vocabulary.parameters.length;
  const read = equations.map((equation, j) =>
    equation.terms.flatMap((written, k) => {
      const place = `/equations/${j}/terms/${k}`;
      const unknown = unknowns.indexOf(written.unknown);
      if (unknown < 0)
        problems.push(
          problemAt(
            `${place}/unknown`,
            'unknown-unknown',
            `'${written.unknown}' is not one of the unknowns; accepted: ${unknowns.join(', ')}`,
          ),
        );
      const term = readTerm(written, place, { dims, vocabulary, halfLevels: true }, problems);
      return term && unknown >= 0 ? [{ ...term, unknown, place }] : [];
    }),
  );
  if (hasErrors(problems)) return null;
  const rows = read.map((terms) => summed(terms, variables, problems));
  rows.forEach((terms, j) => {
    if (terms.length === 0)
      problems.push(
        problemAt(
          `/equations/${j}/terms`,
          'no-terms',
          'every coefficient of this equation is zero; accepted: at least one nonzero coefficient',
        ),
      );
  });
  unknowns.forEach((name, k) => {
    if (!rows.some((terms) => terms.some((t) => t.unknown === k)))
      problems.push(problemAt(`/unknowns/${k}`, 'unused-unknown', `'${name}' appears in no equation`));
  });
  const all = rows.flat();
  const problem = levelProblem(all, '/equations');
  if (problem) problems.push(problem);
  if (hasErrors(problems)) return null;
  const shift = sub(newestOf(all), ONE);
  return {
    form: 'system',
    equation: definition.equation,
    dims,
    timeOrder,
    parameters: vocabulary.parameters,
    numbers: vocabulary.numbers,
    unknowns,
    equations: rows.map((terms) => {
      const coefficients = clearDenominators(
        terms.map((t) => t.coefficient),
        variables,
      );
      return {
        terms: terms.map(({ level, offset, unknown }, k) => ({
          unknown,
          level: sub(level, shift),
          offset,
          coefficient: coefficients[k]!,
        })),
      };
    }),
  };
}
