/** What a kernel does, before any language is chosen: arrays, coefficients and sweeps. */
import type { RationalFunction } from '@/lib/numerics/rational-function';
import type { Coefficient } from './coefficient';
import type { Assignment, Node } from './expression-tree';

export interface Parameter {
  /** As in the definition: "lambda". */
  readonly symbol: string;
  /** In code, free of reserved words: "lam". */
  readonly name: string;
}

export interface Sweep {
  /** The array whose ghost cells must be filled before this sweep. */
  readonly source: string;
  readonly assignments: readonly Assignment[];
}

/** How the missing levels of a multi-level scheme are made from the initial data. */
export interface StartPlan {
  /** Terms of the Taylor series in time. */
  readonly terms: number;
  /** Order in space of the differences that it uses. */
  readonly spaceOrder: number;
  /** dt L y, or dt² L y for equations of second order in time. */
  readonly operator: Node;
  readonly coefficients: readonly Coefficient[];
}

interface SchemeBase {
  readonly parameters: readonly Parameter[];
  /** Ghost cells to the left and right, start-up included. */
  readonly halo: readonly [number, number];
  readonly coefficients: readonly Coefficient[];
  /** A polynomial quotient that must not vanish: the coefficient of the new level. null: it is a number. */
  readonly divisor: RationalFunction | null;
  readonly timeOrder: 1 | 2;
}

/** u at the new level from one sweep over kept levels. */
export interface TablePlan extends SchemeBase {
  readonly shape: 'table';
  /** Names of the levels read, newest first: u, u1, u2, …; the one that is overwritten is called w. */
  readonly known: readonly string[];
  readonly keptLevels: number;
  /** Ghost cells before and after, for x, y, z as far as there are dimensions; the first is `halo`. */
  readonly halos: readonly (readonly [number, number])[];
  /** Arrays in all; keptLevels where the oldest is overwritten in place. */
  readonly arrays: number;
  readonly inPlace: boolean;
  readonly sweep: Sweep;
  readonly start: StartPlan | null;
}

/** Runge-Kutta stages with fused sums; u is advanced in place. */
export interface StagesPlan extends SchemeBase {
  readonly shape: 'stages';
  /** Names of the work arrays. */
  readonly work: readonly string[];
  readonly sweeps: readonly Sweep[];
}

export type SchemePlan = TablePlan | StagesPlan;

/** An explicit difference or interpolation on offsets from the point of evaluation. */
export interface StencilPlan {
  readonly derivative: number;
  readonly halo: readonly [number, number];
  /** d[i] over reads of u, coefficients in h. */
  readonly node: Node;
  readonly coefficients: readonly Coefficient[];
  /** The approximation at index i stands at x_i + h/2. */
  readonly staggered: boolean;
}

/** "lambda" is a reserved word in Python. */
export const parameterName = (symbol: string) => symbol.replace(/^lambda/, 'lam');
export const asParameter = (symbol: string): Parameter => ({ symbol, name: parameterName(symbol) });

export type Planned<T> =
  { readonly kind: 'plan'; readonly plan: T } | { readonly kind: 'none'; readonly reason: string };
export const none = (reason: string) => ({ kind: 'none', reason }) as const;
