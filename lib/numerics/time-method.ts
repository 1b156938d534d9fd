/** What a Runge-Kutta or multistep method is worth by itself: orders, zero-stability, stability along the axes, registers. */
import { axisLimit, type AxisLimit } from './axis-limit';
import { hasTwoRegisterForm, linearOrder, multistepOrder, nominalOrder, nonlinearOrder } from './order-conditions';
import { gcd, isZero, ZERO, type Rational } from './rational';
import { stabilityFunction } from './stability-function';
import type { Registers } from './storage';
import { rootPosition } from './stability/schur-cohn';

export type TimeMethodData =
  | {
      readonly kind: 'runge-kutta';
      readonly A: readonly (readonly Rational[])[];
      readonly b: readonly Rational[];
      readonly ulp: Rational;
    }
  | {
      readonly kind: 'multistep';
      readonly alpha: readonly Rational[];
      readonly beta: readonly Rational[];
      readonly ulp: Rational;
    }
  | {
      readonly kind: 'imex-multistep';
      readonly alpha: readonly Rational[];
      readonly betaExplicit: readonly Rational[];
      readonly betaImplicit: readonly Rational[];
      readonly ulp: Rational;
    };

export interface TimeMethodResult {
  kind: 'time-method';
  stages: number | null;
  steps: number | null;
  explicit: boolean;
  orderLinear: number;
  orderNonlinear: number | null;
  orderNominal: number | null;
  zeroStable: boolean;
  imaginaryLimit: string | null;
  imaginaryLimitExact: string | null;
  realLimit: string | null;
  realLimitExact: string | null;
  registersGeneral: number | null;
  registersAccumulating: number | null;
  registersLowStorage: number | null;
  startUpSteps: number;
}

export const isExplicitTableau = (A: readonly (readonly Rational[])[]) =>
  A.every((row, i) => row.every((x, j) => j < i || isZero(x)));

/**
 * Registers of an explicit tableau for an operator that reads neighbours: u, s slopes and a stage state in general;
 * where every stage uses only the slope before it, u, the accumulated result, a stage state and one slope.
 */
export function tableauRegisters(A: readonly (readonly Rational[])[], b: readonly Rational[]): Registers {
  const s = b.length;
  const general = s === 1 ? 2 : s + 2;
  const isChain = isExplicitTableau(A) && A.every((row, i) => row.every((x, j) => j === i - 1 || isZero(x)));
  const needsSum = b.slice(0, -1).some((x) => !isZero(x));
  const accumulating = isChain ? (needsSum ? 4 : 3) : null;
  return {
    general,
    accumulating: accumulating !== null && accumulating < general ? accumulating : null,
    lowStorage: s > 1 && hasTwoRegisterForm(A, b) ? 2 : null,
  };
}

/** Coefficients scaled to integers with one common factor. */
function integers(values: readonly Rational[]): bigint[] {
  let den = 1n;
  for (const v of values) den = (den / gcd(den, v.den)) * v.den;
  return values.map((v) => (v.num * den) / v.den);
}

/** Levels before the oldest that is used at all are left out. */
function trimmedSteps(lists: readonly (readonly Rational[])[]): Rational[][] {
  const first = lists[0]!.findIndex((_, k) => lists.some((list) => !isZero(list[k]!)));
  return lists.map((list) => list.slice(Math.max(0, first)));
}

function isZeroStable(alpha: readonly Rational[]): boolean {
  const position = rootPosition(integers(alpha).map((re) => ({ re, im: 0n })));
  return position === 'inside' || position === 'simple on circle';
}

type Axis = 'imaginary' | 'real';

/** |P(z)| <= |Q(z)| at z = i·num/den or z = −num/den, in whole numbers. */
function rungeKuttaLimit(A: readonly (readonly Rational[])[], b: readonly Rational[], axis: Axis): AxisLimit {
  const { numerator, denominator } = stabilityFunction(A, b);
  const degree = Math.max(numerator.length, denominator.length) - 1;
  const scaled = integers([...numerator, ...denominator]);
  const P = scaled.slice(0, numerator.length);
  const Q = scaled.slice(numerator.length);
  const normAt = (coefficients: readonly bigint[], num: bigint, den: bigint) => {
    let [re, im] = [0n, 0n];
    coefficients.forEach((c, k) => {
      const size = c * num ** BigInt(k) * den ** BigInt(degree - k);
      const turns = axis === 'imaginary' ? k % 4 : (k % 2) * 2;
      if (turns === 0) re += size;
      else if (turns === 1) im += size;
      else if (turns === 2) re -= size;
      else im -= size;
    });
    return re * re + im * im;
  };
  return axisLimit(({ num, den }) => normAt(P, num, den) <= normAt(Q, num, den));
}

/** All roots of rho − z sigma in the closed unit disc, those on the circle simple, at z = i·num/den or z = −num/den. */
function multistepLimit(alpha: readonly Rational[], beta: readonly Rational[], axis: Axis): AxisLimit {
  const scaled = integers([...alpha, ...beta]);
  const a = scaled.slice(0, alpha.length);
  const b = scaled.slice(alpha.length);
  return axisLimit(({ num, den }) => {
    const polynomial = a.map((value, k) =>
      axis === 'imaginary' ? { re: value * den, im: -b[k]! * num } : { re: value * den + b[k]! * num, im: 0n },
    );
    const position = rootPosition(polynomial);
    return position === 'inside' || position === 'simple on circle';
  });
}

const limits = (limit: (axis: Axis) => AxisLimit) => {
  const [imaginary, real] = [limit('imaginary'), limit('real')];
  return {
    imaginaryLimit: imaginary.value,
    imaginaryLimitExact: imaginary.exact,
    realLimit: real.value,
    realLimitExact: real.exact,
  };
};

function analyseRungeKutta(method: Extract<TimeMethodData, { kind: 'runge-kutta' }>): TimeMethodResult {
  const { A, b, ulp } = method;
  const explicit = isExplicitTableau(A);
  const registers = tableauRegisters(A, b);
  return {
    kind: 'time-method',
    stages: b.length,
    steps: null,
    explicit,
    orderLinear: linearOrder(A, b),
    orderNonlinear: nonlinearOrder(A, b),
    orderNominal: isZero(ulp) ? null : nominalOrder(A, b, ulp),
    zeroStable: true,
    ...limits((axis) => rungeKuttaLimit(A, b, axis)),
    registersGeneral: explicit ? registers.general : null,
    registersAccumulating: explicit ? registers.accumulating : null,
    registersLowStorage: explicit ? registers.lowStorage : null,
    startUpSteps: 0,
  };
}

/** An IMEX pair has the order of its weaker half; the real axis belongs to its implicit, the imaginary to its explicit part. */
export function analyseTimeMethod(method: TimeMethodData): TimeMethodResult {
  if (method.kind === 'runge-kutta') return analyseRungeKutta(method);
  const lists = method.kind === 'multistep' ? [method.beta] : [method.betaExplicit, method.betaImplicit];
  const [alpha, ...betas] = trimmedSteps([method.alpha, ...lists]);
  const order = Math.min(...betas.map((beta) => multistepOrder(alpha!, beta)));
  const nominal = Math.min(...betas.map((beta) => multistepOrder(alpha!, beta, method.ulp)));
  const [explicitPart, implicitPart] = [betas[0]!, betas[betas.length - 1]!];
  const steps = alpha!.length - 1;
  return {
    kind: 'time-method',
    stages: null,
    steps,
    explicit: betas.every((beta) => isZero(beta[steps] ?? ZERO)),
    orderLinear: order,
    orderNonlinear: order,
    orderNominal: isZero(method.ulp) ? null : nominal,
    zeroStable: isZeroStable(alpha!),
    ...limits((axis) => multistepLimit(alpha!, axis === 'imaginary' ? explicitPart : implicitPart, axis)),
    registersGeneral: null,
    registersAccumulating: null,
    registersLowStorage: null,
    startUpSteps: Math.max(0, steps - 1),
  };
}
