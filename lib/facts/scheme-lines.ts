/**
 * The method of lines as a table: u_t = L u with dt·L = N/A in the shift operators, so that a Runge-Kutta method with
 * stability function P/Q gives Q(N/A) u^(n+1) = P(N/A) u^n, and a multistep method Σ (alpha_j A − beta_j N) u = 0.
 */
import { LIMITS, type LinesScheme, type TimeMethod } from '@/lib/entries/definition';
import type { CanonicalScheme, CanonicalTerm } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { equationTerms } from '@/lib/numerics/equation-terms';
import { constant, isZero as isZeroP, mul as mulP, scale, type Polynomial } from '@/lib/numerics/polynomial';
import { formatRational, isZero, neg, ONE, rational, ZERO, type Rational } from '@/lib/numerics/rational';
import {
  addShifts,
  collectShifts,
  mulShifts,
  scaleShifts,
  shiftPowers,
  type ShiftPolynomial,
} from '@/lib/numerics/shift-polynomial';
import { nominalStabilityFunction } from '@/lib/numerics/order-conditions';
import { stabilityFunction } from '@/lib/numerics/stability-function';
import { isExplicitTableau } from '@/lib/numerics/time-method';
import { canonicalStencil, type CanonicalStencil } from './canonical-stencil';
import type { Problem } from './facts';
import { hasErrors, problemAt } from './problem';
import { readTimeMethod, type ExactTimeMethod } from './canonical-time-method';
import { schemeVocabulary } from './scheme-vocabulary';

const ORDINALS = ['zeroth', 'first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth'];

const wordOf = (powers: readonly number[]) => powers.map((p, k) => 'xyz'[k]!.repeat(p)).join('');
const sameOperator = (a: readonly number[][], b: readonly number[][]) =>
  a.length === b.length && a.every((x) => b.some((y) => x.join() === y.join()));

/** A stencil and the axis along which a one-dimensional one acts; null axis: its offsets have all components. */
interface Operator {
  readonly stencil: CanonicalStencil;
  readonly axis: number | null;
}

function readSpace(definition: LinesScheme, problems: Problem[]): Operator[] | null {
  const { equation, space } = definition;
  const { dims } = CONVENTIONS[equation];
  const terms = equationTerms(equation);
  const together = space.length === 1 && terms.length > 1 && dims > 1 && space[0]!.dims === dims;
  if (!together && space.length !== terms.length) {
    problems.push(
      problemAt(
        '/space',
        'stencil-count',
        `${equation} has ${terms.length} operator term${terms.length === 1 ? '' : 's'} but ${space.length} stencil${space.length === 1 ? ' is' : 's are'} given; accepted: one stencil per term, in the order of the equation`,
      ),
    );
    return null;
  }
  const operators: Operator[] = [];
  space.forEach((written, k) => {
    const pointer = `/space/${k}`;
    const { stencil, problems: found } = canonicalStencil(written, pointer);
    problems.push(...found);
    if (!stencil) return;
    const due = together ? terms.map((t) => [...t.powers]) : [[...terms[k]!.powers]];
    if (stencil.dims === 1 && (dims === 1 || !together)) {
      const order = stencil.operator[0]!.powers[0]!;
      const dueOrder = terms[k]!.powers.reduce((s, p) => s + p, 0);
      if (order !== dueOrder || stencil.operator[0]!.coefficient.num !== stencil.operator[0]!.coefficient.den)
        problems.push(
          problemAt(
            `${pointer}/${written.derivative === undefined ? 'operator' : 'derivative'}`,
            'wrong-derivative',
            `a ${ORDINALS[order]}-derivative stencil cannot serve the ${equation} equation here; accepted: derivative ${dueOrder}`,
          ),
        );
      operators.push({ stencil, axis: dims === 1 ? 0 : k });
    } else {
      const given = stencil.operator.map((t) => [...t.powers]);
      if (
        stencil.dims !== dims ||
        !sameOperator(given, due) ||
        stencil.operator.some((t) => t.coefficient.num !== t.coefficient.den)
      )
        problems.push(
          problemAt(
            `${pointer}/operator`,
            'wrong-derivative',
            `this stencil does not approximate ${due.map((p) => `u_${wordOf(p)}`).join(' + ')}, which the ${equation} equation needs here`,
          ),
        );
      operators.push({ stencil, axis: null });
    }
    for (const [side, offsets] of [
      ['offsets', stencil.offsets],
      ['lhs/offsets', stencil.lhs?.offsets ?? []],
    ] as const)
      offsets.forEach((offset, j) => {
        if (offset.some((x) => x.den !== 1n))
          problems.push(
            problemAt(
              `${pointer}/${side}/${j}`,
              'off-grid',
              `offset ${offset.map(formatRational).join(', ')} is no grid point; accepted in the lines form: integers`,
            ),
          );
      });
  });
  return hasErrors(problems) ? null : operators;
}

function rowShifts(
  offsets: readonly (readonly Rational[])[],
  weights: readonly Rational[],
  { axis }: Operator,
  dims: number,
  variables: number,
): ShiftPolynomial {
  return collectShifts(
    offsets.map((offset, k) => ({
      offset: Array.from({ length: dims }, (_, d) =>
        axis === null ? Number(offset[d]!.num) : d === axis ? Number(offset[0]!.num) : 0,
      ),
      coefficient: constant(variables, weights[k]!),
    })),
  );
}

/** dt·L of each operator term over the common left-hand side A. */
function spaceOperators(
  operators: readonly Operator[],
  definition: LinesScheme,
  numbers: Readonly<Record<string, Polynomial>>,
  variables: number,
) {
  const { dims } = CONVENTIONS[definition.equation];
  const one: ShiftPolynomial = [{ offset: new Array<number>(dims).fill(0), coefficient: constant(variables, ONE) }];
  const terms = equationTerms(definition.equation);
  const lefts = operators.map((o) =>
    o.stencil.lhs ? rowShifts(o.stencil.lhs.offsets, o.stencil.lhs.weights, o, dims, variables) : one,
  );
  const left = lefts.reduce((product, a) => mulShifts(product, a), one);
  const rights = operators.map((o, k) => {
    const { parameter, parameterPower, re, im } = terms[k]!;
    const number = numbers[parameter]!;
    const factor = mulP(parameterPower === 2 ? mulP(number, number) : number, constant(variables, re, im));
    const others = lefts.reduce((product, a, j) => (j === k ? product : mulShifts(product, a)), one);
    return scaleShifts(mulShifts(rowShifts(o.stencil.offsets, o.stencil.weights, o, dims, variables), others), factor);
  });
  return { left, rights, one };
}

type LevelRow = { readonly level: number; readonly shifts: ShiftPolynomial };

function rungeKuttaRows(
  method: Extract<ExactTimeMethod, { kind: 'runge-kutta' }>,
  left: ShiftPolynomial,
  right: ShiftPolynomial,
  one: ShiftPolynomial,
  variables: number,
  nominal: boolean,
): LevelRow[] {
  const { numerator, denominator } = nominal
    ? nominalStabilityFunction(method.A, method.b, method.ulp)
    : stabilityFunction(method.A, method.b);
  const degree = Math.max(numerator.length, denominator.length) - 1;
  const leftPowers = shiftPowers(left, one, degree);
  const rightPowers = shiftPowers(right, one, degree);
  const expand = (coefficients: readonly Rational[], sign: Rational) =>
    coefficients.reduce<ShiftPolynomial>((sum, c, k) => {
      if (isZero(c)) return sum;
      const term = mulShifts(rightPowers[k]!, leftPowers[degree - k]!);
      return addShifts(sum, scaleShifts(term, constant(variables, sign.num < 0n ? neg(c) : c)));
    }, []);
  return [
    { level: 1, shifts: expand(denominator, ONE) },
    { level: 0, shifts: expand(numerator, rational(-1)) },
  ];
}

function multistepRows(
  alpha: readonly Rational[],
  betas: readonly (readonly Rational[])[],
  left: ShiftPolynomial,
  rights: readonly ShiftPolynomial[],
  variables: number,
): LevelRow[] {
  return alpha.map((a, j) => {
    const parts = [
      scaleShifts(left, constant(variables, a)),
      ...rights.map((right, k) => scaleShifts(right, constant(variables, neg(betas[k]![j]!)))),
    ];
    return { level: j + 2 - alpha.length, shifts: parts.reduce(addShifts) };
  });
}

function rowsOf(
  method: ExactTimeMethod,
  definition: LinesScheme,
  operators: ReturnType<typeof spaceOperators>,
  variables: number,
  nominal: boolean,
): LevelRow[] {
  const { left, rights, one } = operators;
  if (method.kind === 'runge-kutta')
    return rungeKuttaRows(method, left, rights.reduce(addShifts), one, variables, nominal);
  if (method.kind === 'multistep')
    return multistepRows(
      method.alpha,
      rights.map(() => method.beta),
      left,
      rights,
      variables,
    );
  // Advection is stepped explicitly, diffusion implicitly: the order of the equation's terms.
  return multistepRows(method.alpha, [method.betaExplicit, method.betaImplicit], left, rights, variables);
}

function timeProblem(time: TimeMethod, definition: LinesScheme): Problem | null {
  const { timeOrder } = CONVENTIONS[definition.equation];
  if (time.kind === 'runge-kutta' && timeOrder === 2)
    return problemAt(
      '/time',
      'first-order-method',
      'a Runge-Kutta method steps u_t = f; for u_tt use a multistep method (sum alpha u = dt² sum beta f), a table, or the velocity-pressure system',
    );
  if (time.kind === 'imex-multistep' && definition.equation !== 'advection-diffusion')
    return problemAt(
      '/time',
      'imex-needs-two-terms',
      'an IMEX method splits an explicit from an implicit term; accepted with: advection-diffusion (advection explicit, diffusion implicit)',
    );
  return null;
}

/** @param nominal whether an explicit Runge-Kutta method in decimals is taken as its author meant it */
export function canonicalLines(definition: LinesScheme, problems: Problem[], nominal = false): CanonicalScheme | null {
  const { dims, timeOrder } = CONVENTIONS[definition.equation];
  const operators = readSpace(definition, problems);
  const method = readTimeMethod(definition.time, '/time', problems);
  const problem = timeProblem(definition.time, definition);
  if (problem) problems.push(problem);
  if (!operators || !method || hasErrors(problems)) return null;
  const together = operators.length < equationTerms(definition.equation).length;
  const vocabulary = schemeVocabulary(definition, [], problems, together);
  if (!vocabulary) return null;
  const numbers = Object.values(vocabulary.numbers);
  if (together && numbers.some((n) => JSON.stringify(n, stringOfBig) !== JSON.stringify(numbers[0], stringOfBig))) {
    problems.push(
      problemAt(
        '/space/0',
        'unequal-numbers',
        'one stencil for all directions needs equal numbers in all directions; give one stencil per direction',
      ),
    );
    return null;
  }
  const variables = vocabulary.parameters.length;
  const space = spaceOperators(operators, definition, vocabulary.numbers, variables);
  const rows = rowsOf(method, definition, space, variables, nominal && isDecimalExplicit(method));
  const terms: CanonicalTerm[] = rows.flatMap(({ level, shifts }) =>
    shifts.map(({ offset, coefficient }) => ({
      level: rational(level),
      offset: offset.map((x) => rational(x)),
      coefficient,
    })),
  );
  const levels = terms.map((t) => Number(t.level.num));
  if (!levels.includes(1) || Math.min(...levels) === 1) {
    problems.push(
      problemAt(
        '/time',
        'one-level',
        'the method leaves only one time level; accepted: a nonzero last alpha and at least one earlier level',
      ),
    );
    return null;
  }
  const reach = Math.max(...terms.flatMap((t) => t.offset.map((x) => Math.abs(Number(x.num)))));
  if (reach > LIMITS.offset * LIMITS.stages) {
    problems.push(problemAt('/space', 'offset-too-far', `the stages together reach ${reach} grid spacings`));
    return null;
  }
  return {
    form: 'scalar',
    equation: definition.equation,
    dims,
    timeOrder,
    parameters: vocabulary.parameters,
    numbers: vocabulary.numbers,
    terms: withoutUnit(terms).sort(
      (a, b) =>
        Number(b.level.num - a.level.num) || a.offset.reduce((o, x, k) => o || Number(x.num - b.offset[k]!.num), 0),
    ),
  };
}

const isDecimalExplicit = (method: ExactTimeMethod) =>
  method.kind === 'runge-kutta' && !isZero(method.ulp) && isExplicitTableau(method.A);

const stringOfBig = (_: string, value: unknown) => (typeof value === 'bigint' ? String(value) : value);

/** Divides by the newest coefficient where that is a single constant, so that explicit schemes read u^(n+1) = … */
function withoutUnit(terms: readonly CanonicalTerm[]): CanonicalTerm[] {
  const newest = terms.filter((t) => t.level.num === 1n);
  const only = newest.length === 1 ? newest[0]!.coefficient : null;
  const isUnit = only && only.length === 1 && only[0]!.powers.every((p) => p === 0) && isZero(only[0]!.im);
  if (!isUnit) return terms.filter((t) => !isZeroP(t.coefficient));
  const inverse = rational(only[0]!.re.den, only[0]!.re.num === 0n ? ZERO.den : only[0]!.re.num);
  return terms.map((t) => ({ ...t, coefficient: scale(t.coefficient, inverse) }));
}
