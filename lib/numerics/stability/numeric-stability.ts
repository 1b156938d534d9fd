/**
 * One parameter where no exact road leads: several dimensions. The search in double precision finds the ends; each
 * is then looked for among the exact ends of the same scheme on a line of waves through the deciding wave. Such an
 * end is proved necessary; that no other wave is worse rests on the search, hence the method "numeric".
 */
import type { CanonicalScheme, ScalarScheme } from '../canonical-scheme';
import type { Equation } from '../equation';
import { alongLine } from '../restricted-scheme';
import { compileScheme, coefficientsAt, polynomialFrom, type NumericScheme } from '../numeric-scheme';
import { polynomialRoots } from '../roots';
import { unitRootSeparation } from '../amplification';
import { amplificationMatrix, isPowerBounded } from '../system-matrix';
import { spectralRadius } from '../wave-grid';
import { DOUBLE_ROOT, exactIntervals, SIMPLE_ROOTS, TWO_LEVEL } from './exact-stability';
import { numericIntervals, type NumericEnd } from './numeric-intervals';
import type { EndBehaviour, StabilityLoss, StabilityOutcome, StableInterval, WorkBudget } from './stability-result';

const TOLERANCE = 1e-9;
const LINES: Readonly<Record<1 | 2 | 3, readonly (readonly bigint[])[]>> = {
  1: [[1n]],
  2: [
    [1n, 1n],
    [1n, -1n],
    [1n, 0n],
    [0n, 1n],
    [1n, 2n],
    [2n, 1n],
    [1n, -2n],
    [2n, -1n],
  ],
  3: [
    [1n, 1n, 1n],
    [1n, 1n, -1n],
    [1n, -1n, 1n],
    [-1n, 1n, 1n],
    [1n, 0n, 0n],
    [0n, 1n, 0n],
    [0n, 0n, 1n],
    [1n, 1n, 0n],
    [1n, 0n, 1n],
    [0n, 1n, 1n],
  ],
};

const DEFECTIVE = '||G^n|| grows linearly (or faster) at this wave: defective unit eigenvalue';
const SEMISIMPLE = '||G^n|| bounded (multiple unit eigenvalues, if any, are semisimple)';

/** The equation of one dimension whose sign rules and exempt double root apply on a line of waves. */
const ON_A_LINE: Partial<Record<Equation, Equation>> = {
  'advection-2d': 'advection',
  'diffusion-2d': 'diffusion',
  'diffusion-3d': 'diffusion',
  'wave-2d': 'wave',
  'wave-3d': 'wave',
};

const isNear = (x: number) => Math.abs(x) < 1e-5;
const wrapped = (x: number) => x - 2 * Math.PI * Math.round(x / (2 * Math.PI));

/** Lines shift·pi + t·direction that pass through a wave, simplest first. */
function linesThrough(
  theta: readonly number[],
  ray: readonly number[] | null,
): { direction: readonly bigint[]; shift: (0 | 1)[] }[] {
  const dims = theta.length as 1 | 2 | 3;
  const out: { direction: readonly bigint[]; shift: (0 | 1)[] }[] = [];
  for (const direction of LINES[dims]) {
    if (ray) {
      const along = direction.findIndex((d) => d !== 0n);
      const scale = ray[along]! / Number(direction[along]);
      if (!ray.every((r, d) => Math.abs(r - scale * Number(direction[d])) < 1e-4 * Math.abs(scale))) continue;
    }
    for (let bits = 0; bits < 2 ** dims; bits++) {
      const shift = theta.map((_, d) => ((bits >> d) & 1) as 0 | 1);
      const from = theta.map((x, d) => wrapped(x - shift[d]! * Math.PI));
      const along = direction.findIndex((d) => d !== 0n);
      // The position along the line, up to whole turns of its first moving component.
      const turns = [0, 1, -1].map((k) => (from[along]! + 2 * Math.PI * k) / Number(direction[along]));
      if (turns.some((t) => from.every((x, d) => isNear(wrapped(x - t * Number(direction[d]))))))
        out.push({ direction, shift });
    }
  }
  return out;
}

interface ExactEnd {
  text: string;
  exact: string | null;
  minimalPolynomial: string | null;
}

/** Ends of the scheme on lines of waves, each line analysed once. */
class LineEnds {
  private readonly known = new Map<string, { value: number; end: ExactEnd }[]>();

  constructor(
    private readonly scalar: ScalarScheme,
    private readonly budget: WorkBudget,
    private readonly isOver: () => boolean,
  ) {}

  private endsOn(direction: readonly bigint[], shift: readonly (0 | 1)[]) {
    const key = `${direction.join()}/${shift.join()}`;
    const known = this.known.get(key);
    if (known) return known;
    const line = alongLine(this.scalar, direction, shift);
    const equation = ON_A_LINE[this.scalar.equation] ?? this.scalar.equation;
    const outcome = line
      ? exactIntervals({ ...line, equation }, { ...this.budget, timeLimitMs: this.budget.timeLimitMs / 4 })
      : null;
    const ends =
      outcome?.kind === 'decided'
        ? outcome.result.intervals.flatMap((i) => [
            ...(i.lo === null
              ? []
              : [
                  {
                    value: Number(i.lo),
                    end: { text: i.lo, exact: i.loExact, minimalPolynomial: i.loMinimalPolynomial ?? null },
                  },
                ]),
            ...(i.hi === null
              ? []
              : [
                  {
                    value: Number(i.hi),
                    end: { text: i.hi, exact: i.hiExact, minimalPolynomial: i.hiMinimalPolynomial ?? null },
                  },
                ]),
          ])
        : [];
    this.known.set(key, ends);
    return ends;
  }

  find(end: NumericEnd): ExactEnd | null {
    if (!end.theta) return null;
    for (const { direction, shift } of linesThrough(end.theta, end.low?.direction ?? null).slice(0, 4)) {
      if (this.isOver()) return null;
      const match = this.endsOn(direction, shift).find(
        ({ value }) => Math.abs(value - end.value) < TOLERANCE * Math.max(1, Math.abs(value)),
      );
      if (match) return match.end;
    }
    return null;
  }
}

function behaviourAt(scheme: CanonicalScheme, numeric: NumericScheme, end: NumericEnd): EndBehaviour {
  const theta = end.theta!.map((x) => Math.abs(wrapped(x)));
  if (scheme.form === 'system') {
    const matrix = amplificationMatrix(scheme, [end.value], end.theta!);
    const stableAtLimit = matrix !== null && isPowerBounded(matrix);
    return { stableAtLimit, why: stableAtLimit ? SEMISIMPLE : DEFECTIVE, theta };
  }
  if (numeric.degree === 1) return { stableAtLimit: true, why: TWO_LEVEL };
  const roots = polynomialRoots(polynomialFrom(numeric, coefficientsAt(numeric, [end.value]), end.theta!));
  const exempt = numeric.timeOrder === 2 && theta.every(isNear);
  const stableAtLimit = exempt || unitRootSeparation(roots) > 1e-5;
  return { stableAtLimit, why: stableAtLimit ? SIMPLE_ROOTS : DOUBLE_ROOT, theta };
}

function endFields(scheme: CanonicalScheme, numeric: NumericScheme, end: NumericEnd | null, lines: LineEnds) {
  if (!end) return { text: null, included: null, exact: null, minimalPolynomial: null, behaviour: null };
  if (end.value === 0) return { text: '0', included: true, exact: '0', minimalPolynomial: null, behaviour: null };
  const exact = lines.find(end);
  const behaviour = behaviourAt(scheme, numeric, end);
  return {
    text: exact?.text ?? end.value.toPrecision(17),
    included: behaviour.stableAtLimit,
    exact: exact?.exact ?? null,
    minimalPolynomial: exact?.minimalPolynomial ?? null,
    behaviour,
  };
}

/** Worst wave 1 % outside the end nearest to 0. */
export function lossOutside(numeric: NumericScheme, ends: readonly number[]): StabilityLoss | null {
  const nearest = ends.filter((x) => x !== 0).sort((a, b) => Math.abs(a) - Math.abs(b) || b - a)[0];
  const parameter = nearest === undefined ? 0.4 : nearest * 1.01;
  const { modulus, theta } = spectralRadius(numeric, [parameter]);
  return Number.isFinite(modulus) && modulus > 1
    ? { parameter, theta: theta.map((x) => Math.abs(wrapped(x))), modulus }
    : null;
}

/**
 * @param scheme one parameter, any dimensions and levels
 * @param scalar its exact scalar form; of a system the characteristic polynomial
 * @param sides  signs of the parameter that are asked for
 */
export function numericStability(
  scheme: CanonicalScheme,
  scalar: ScalarScheme,
  sides: readonly (1 | -1)[],
  budget: WorkBudget,
): StabilityOutcome {
  const started = performance.now();
  const isOver = () => performance.now() - started > budget.timeLimitMs || (budget.isCancelled?.() ?? false);
  const numeric = compileScheme(scheme);
  const search = numericIntervals(numeric, scalar, sides, isOver);
  if (search.kind === 'stopped') return { kind: 'work-limit', why: 'The search for stable values ran out of time.' };
  const lines = new LineEnds(scalar, budget, isOver);
  const intervals: StableInterval[] = search.intervals.map(({ lo, hi }) => {
    const low = endFields(scheme, numeric, lo, lines);
    const high = endFields(scheme, numeric, hi, lines);
    return {
      lo: low.text,
      hi: high.text,
      loIncluded: low.included,
      hiIncluded: high.included,
      loExact: low.exact,
      hiExact: high.exact,
      loMinimalPolynomial: low.minimalPolynomial,
      hiMinimalPolynomial: high.minimalPolynomial,
      loBehaviour: low.behaviour,
      hiBehaviour: high.behaviour,
      method: 'numeric',
      tolerance: '1e-9',
    };
  });
  const everywhere =
    intervals.length === 1 &&
    intervals[0]!.hi === null &&
    (sides.includes(-1) ? intervals[0]!.lo === null : intervals[0]!.lo === '0');
  const ends = search.intervals.flatMap(({ lo, hi }) => [lo, hi].filter((e) => e !== null).map((e) => e.value));
  return {
    kind: 'decided',
    result: {
      verdict: everywhere
        ? 'unconditionally stable'
        : intervals.length === 0 && search.isolated.length === 0
          ? 'unstable for all nonzero values'
          : 'conditionally stable',
      intervals,
      isolatedStablePoints: search.isolated.map(String),
      lostAt: everywhere ? null : lossOutside(numeric, ends),
      method: 'numeric',
      note: null,
    },
  };
}
