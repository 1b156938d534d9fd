/** One step on random data against the definition in exact arithmetic. */
import type { ApplyTask, MarchTask } from '@/lib/codegen/driver-protocol';

import { div, neg, power, rational, toNumber, type Rational } from '@/lib/numerics/rational';
import { outcomeOf, short, stateOf, type Answers, type Check, type Judgement } from './check';
import { exactCoefficient } from './exact-coefficient';
import { distanceInRoundings, type Part } from './exact-sum';
import { pointsOf, sized } from './grid';
import { randomField } from './smooth-field';
import type { MarchSubject, StencilSubject } from './subject';

/** No power of two, so that a loop which handles blocks of points meets its remainder. */
const GRIDS: Readonly<Record<1 | 2 | 3, readonly (readonly number[])[]>> = {
  1: [[37], [64]],
  2: [
    [13, 9],
    [8, 8],
  ],
  3: [
    [7, 5, 6],
    [8, 4, 4],
  ],
};
/** Exact in binary, so that dividing by its powers rounds nothing. */
const SPACING_POWER = 3;

interface Case {
  readonly id: string;
  readonly grid: readonly number[];
  readonly levels: readonly Float64Array[];
  readonly parts: readonly Part[];
  readonly about: Record<string, unknown>;
}

function judge(cases: readonly Case[], operations: number, answers: Answers, what: string): Judgement {
  // Each operation rounds once, by half a unit of a partial result that is no larger than the sum of magnitudes;
  // coefficients that are computed once round too.
  const limit = Math.max(8, 2 * operations);
  const rows = cases.map(({ id, grid, levels, parts, about }) => {
    const { worst, at } = distanceInRoundings(parts, levels, stateOf(answers, id).at(-1)!, grid);
    return { ...about, points: levels[0]!.length, roundings: Number.isFinite(worst) ? worst : null, at };
  });
  const worst = rows.reduce((largest, row) => Math.max(largest, row.roundings ?? Infinity), 0);
  return {
    outcome: outcomeOf(worst <= limit),
    measured: `${short(worst)} roundings`,
    target: `<= ${limit} roundings`,
    how: `${what} on random data, against the definition in exact integer arithmetic; one rounding is 2^-52 of the sum of the magnitudes.`,
    data: { cases: rows },
  };
}

/** The newest level of an explicit scheme as weights of the kept ones. */
export function stepParts(subject: MarchSubject, parameters: readonly number[]): Part[] {
  const { scheme, keptLevels } = subject;
  const values = scheme.terms.map((term) => exactCoefficient(term.coefficient, parameters));
  const newest = scheme.terms.findIndex((term) => toNumber(term.level) === 1);
  const lead = values[newest]!;
  const shift = scheme.terms[newest]!.offset.map(toNumber);
  const placeOf = (offset: readonly Rational[]) => {
    const [x = 0, ...across] = offset.map((o, axis) => toNumber(o) - shift[axis]!);
    return across.length > 0 ? { offset: x, across } : { offset: x };
  };
  return scheme.terms.flatMap((term, k) =>
    k === newest
      ? []
      : [
          {
            weight: neg(div(values[k]!, lead)),
            level: toNumber(term.level) - 1 + keptLevels,
            ...placeOf(term.offset),
          },
        ],
  );
}

export function exactStepCheck(subject: MarchSubject): Check {
  const cases = subject.working.flatMap((parameters, p) =>
    GRIDS[subject.scheme.dims].map((grid, g) => ({
      id: `exact-step:${p}:${g}`,
      grid,
      parameters,
      levels: Array.from({ length: subject.keptLevels }, (_, l) =>
        randomField(pointsOf(grid), 100 * p + 10 * g + l + 1),
      ),
      parts: stepParts(subject, parameters),
      about: { parameters },
    })),
  );
  return {
    name: 'exact-step',
    tasks: cases.map(({ id, grid, parameters, levels }): MarchTask => ({
      kind: 'march',
      id,
      ...sized(grid),
      steps: 1,
      parameters: [...parameters],
      levels,
    })),
    judge: (answers) => judge(cases, subject.operations, answers, 'One step'),
  };
}

export function exactStencilCheck(subject: StencilSubject): Check {
  const scale: Rational = power(rational(2), SPACING_POWER * subject.derivative);
  const cases = GRIDS[1].map((grid, g) => ({
    id: `exact-step:${g}`,
    grid,
    levels: [randomField(pointsOf(grid), g + 1)],
    parts: subject.weights.map((weight, k) => ({
      weight: rational(weight.num * scale.num, weight.den),
      level: 0,
      offset: subject.offsets[k]!,
    })),
    about: { spacing: 2 ** -SPACING_POWER },
  }));
  return {
    name: 'exact-step',
    tasks: cases.map(({ id, levels }): ApplyTask => ({
      kind: 'apply',
      id,
      n: levels[0]!.length,
      spacing: 2 ** -SPACING_POWER,
      values: levels[0]!,
    })),
    judge: (answers) => judge(cases, subject.operations, answers, 'One application'),
  };
}
