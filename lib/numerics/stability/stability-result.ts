/**
 * What a stability analysis of one parameter answers. The same shapes as in the schema of facts, stated
 * here because the engine imports nothing of ours.
 */

/**
 * `exact`: ends are algebraic numbers, every gap between them decided by exact arithmetic.
 * `certified`: ends are rational brackets; stable side proved by exact arithmetic, unstable side by a witness wave.
 * `numeric`: sampled and refined in double precision, with a tolerance.
 */
export type StabilityMethod = 'exact' | 'certified' | 'numeric';

export const STABILITY_VERDICTS = [
  'conditionally stable',
  'unconditionally stable',
  'weakly unstable for all nonzero values',
  'unstable for all nonzero values',
  'two-parameter region',
  'degenerate newest level',
  'not decided within the time budget',
] as const;
export type StabilityVerdict = (typeof STABILITY_VERDICTS)[number];

export interface EndBehaviour {
  /** True where every solution stays bounded at the end itself. */
  stableAtLimit: boolean;
  why: string;
  /** Wavenumbers, radians in 0 … π, at which it is decided. */
  theta?: number[];
}

export interface InteriorDefect {
  /** Decimal text of the parameter value. */
  at: string;
  theta: number;
  why: string;
}

/** A set lo ≤ p ≤ hi on which all roots satisfy |z| ≤ 1; `null` at an end means that it has no end there. */
export interface StableInterval {
  /** Decimal text, 20 significant digits where it does not terminate earlier. */
  lo: string | null;
  hi: string | null;
  /** Whether the end itself is power-bounded; null where there is no end. */
  loIncluded: boolean | null;
  hiIncluded: boolean | null;
  /** Closed form such as "sqrt(3)/2"; null where none is recognised. */
  loExact: string | null;
  hiExact: string | null;
  /** Integer polynomial in the parameter that vanishes at the end. */
  loMinimalPolynomial?: string | null;
  hiMinimalPolynomial?: string | null;
  loBehaviour: EndBehaviour | null;
  hiBehaviour: EndBehaviour | null;
  interiorDefects?: InteriorDefect[];
  method: StabilityMethod;
  /** Width of the bracket (certified) or tolerance (numeric) of the ends; null where exact. */
  tolerance?: string | null;
}

/** The worst wave at a representative unstable value just outside a stable interval. */
export interface StabilityLoss {
  parameter: number;
  /** One component per dimension. */
  theta: number[];
  modulus: number;
}

export interface StabilityResult {
  verdict: StabilityVerdict;
  /** Disjoint, ascending. The trivial parameter value 0 alone is never an interval. */
  intervals: StableInterval[];
  /** Values (decimal or exact text) stable in themselves, with unstable values on both sides. */
  isolatedStablePoints: string[];
  lostAt: StabilityLoss | null;
  method: StabilityMethod;
  note: string | null;
}

/** An analysis that may not apply or may give up is an outcome, so that the caller can take the next road. */
export type StabilityOutcome =
  | { kind: 'decided'; result: StabilityResult }
  | { kind: 'work-limit'; why: string }
  | { kind: 'unsupported'; why: string };

/** How long an analysis may work; read often, so that typing in a browser never waits. */
export interface WorkBudget {
  /** Milliseconds for this analysis. */
  timeLimitMs: number;
  /** Asked between steps; true stops the analysis as if its time were over. */
  isCancelled?: () => boolean;
}
