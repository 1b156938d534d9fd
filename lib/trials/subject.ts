/** What a trial holds a kernel against: the definition in exact numbers, and the facts that it must bear out. */
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import type { Rational } from '@/lib/numerics/rational';
import type { Complex } from './characteristic';

/** One end of a stable set, along one parameter. */
export interface BoundEnd {
  /** The parameter as the sheet names it. */
  readonly parameter: string;
  readonly bound: number;
  /** The bound as the facts print it: "sqrt(2)/2". */
  readonly text: string;
  /** A value within the set near the bound. */
  readonly inside: number;
  /** +1 where the set ends towards larger values. */
  readonly outward: 1 | -1;
  /** All parameters of the kernel, where this one has a value. */
  readonly vector: (value: number) => number[];
}

export interface MarchSubject {
  readonly kind: 'march';
  /** What the driver marches; one dimension, real, explicit. */
  readonly scheme: ScalarScheme;
  /** Levels between steps: newest − oldest of the canonical scheme. */
  readonly keptLevels: number;
  /** Reach to either side, in points. */
  readonly halo: number;
  /** Order that halving the steps must show; null where the definition is not consistent. */
  readonly order: number | null;
  /** `grid`: dx and dt together at fixed parameters. `time`: dt alone, against the solution exact in time. */
  readonly refine: 'grid' | 'time';
  /** With `time`: dt times the symbol of the space differences for a wave; null with `grid`. */
  readonly spaceSymbol: ((parameters: readonly number[], theta: number) => Complex) | null;
  /** Sets of parameter values, the first the main one; within the stable set wherever there is one. */
  readonly working: readonly (readonly number[])[];
  readonly stable: boolean;
  /** The finite, nonzero ends of the stable sets. */
  readonly ends: readonly BoundEnd[];
  /** A large stable value where the stable set has no end. */
  readonly farInside: readonly number[] | null;
  /** Whether the kernel itself compares the parameter with the bound and tells by its status. */
  readonly checksBound: boolean;
  /** "unstable for all nonzero values" and the like, for the sentences. */
  readonly verdict: string;
  readonly operations: number;
  readonly bytes: number;
}

export interface StencilSubject {
  readonly kind: 'stencil';
  /** Offsets from the point that a value is printed at, in grid points of the kernel's array. */
  readonly offsets: readonly number[];
  readonly weights: readonly Rational[];
  readonly derivative: number;
  /** Where result i stands, in spacings from point i: ½ for a staggered stencil. */
  readonly shift: number;
  readonly order: number | null;
  readonly halo: number;
  readonly operations: number;
  readonly bytes: number;
}

export type Subject = MarchSubject | StencilSubject;
