/**
 * What the engine says of a definition: one zod schema for the page, the API, the database and `npm run analyse`.
 *
 * Exact numbers are text ("-1/12"); decimals that stand for algebraic numbers are text with at least 17 digits;
 * a double is used only for samples of curves. `null` at an end of an interval means that it has no end there.
 */
import { z } from 'zod';

export const Problem = z.object({
  /** JSON pointer into the definition, "" for the whole. */
  pointer: z.string(),
  /** 1-based column within an expression, where the place is inside one. */
  column: z.int().positive().optional(),
  severity: z.enum(['error', 'warning']),
  /** Stable word for programs: "duplicate-offset", "unknown-symbol", … */
  code: z.string(),
  /** What is wrong and what is accepted, one sentence. */
  message: z.string(),
});
export type Problem = z.infer<typeof Problem>;

const Method = z.enum(['exact', 'certified', 'numeric']);

export const LeadingError = z.object({
  coefficient: z.string().optional(),
  hPower: z.int(),
  /** Order of the derivative in one dimension. */
  derivative: z.int().optional(),
  /** Several dimensions: coefficient by word in x, y, z. */
  terms: z.record(z.string(), z.string()).optional(),
});

export const ModifiedWavenumber = z.object({
  samples: z.array(z.object({ theta: z.string(), re: z.number(), im: z.number() })),
  maxRe: z.object({ value: z.number(), theta: z.number() }).nullable(),
  minAbsLhsSymbol: z.number().nullable(),
  /** First theta at which the relative complex error passes eps, keyed "0.01", "0.001". */
  resolvedBandwidthComplex: z.record(z.string(), z.number()).nullable(),
  resolvedBandwidthReal: z.record(z.string(), z.number()).nullable(),
  reentersComplex: z.record(z.string(), z.boolean()).optional(),
  reentersReal: z.record(z.string(), z.boolean()).optional(),
  lattice: z.enum(['integer', 'half-integer', 'nonuniform']),
});

export const Cost = z.object({
  /** Floating-point operations a point and step, after hoisting coefficients. */
  operations: z.int(),
  additions: z.int(),
  multiplications: z.int(),
  loads: z.int(),
  stores: z.int(),
  /** Bytes moved a point and step, a store that misses counted twice. */
  bytesDouble: z.int(),
  bytesSingle: z.int(),
});

export const StencilFacts = z.object({
  kind: z.literal('stencil'),
  weights: z.array(z.string()),
  lhsWeights: z.array(z.string()).nullable(),
  consistent: z.boolean(),
  /** null with consistent = true: exact. */
  order: z.int().nullable(),
  leadingError: LeadingError.nullable(),
  firstViolatedMoment: z.int().nullable(),
  momentResidual: z.string().nullable(),
  nominal: z.object({ order: z.int(), leadingCoefficient: z.number().nullable(), rule: z.string() }).nullable(),
  symmetry: z.enum(['symmetric', 'antisymmetric', 'none']),
  /** [left, right] reach over nonzero weights; null in several dimensions. */
  extent: z.tuple([z.string(), z.string()]).nullable(),
  /** [left, right], or one pair per dimension. */
  halo: z.union([z.tuple([z.int(), z.int()]), z.array(z.tuple([z.int(), z.int()]))]),
  points: z.int(),
  lhsBandwidth: z.tuple([z.string(), z.string()]).nullable(),
  explicit: z.boolean(),
  modifiedWavenumber: ModifiedWavenumber.nullable(),
  symbolSamples: z
    .array(z.object({ theta: z.array(z.string()), symbolRe: z.number(), symbolIm: z.number() }))
    .nullable(),
  cost: Cost,
});

export const TimeMethodFacts = z.object({
  kind: z.literal('time-method'),
  stages: z.int().nullable(),
  steps: z.int().nullable(),
  explicit: z.boolean(),
  orderLinear: z.int(),
  /** Runge-Kutta: order on nonlinear problems by the order conditions, up to 4. */
  orderNonlinear: z.int().nullable(),
  orderNominal: z.int().nullable(),
  zeroStable: z.boolean(),
  /** Largest |y| with y·i·[0,1] inside the stability region; null where unbounded, 0 where empty. Decimal text. */
  imaginaryLimit: z.string().nullable(),
  imaginaryLimitExact: z.string().nullable(),
  realLimit: z.string().nullable(),
  realLimitExact: z.string().nullable(),
  registersGeneral: z.int().nullable(),
  registersAccumulating: z.int().nullable(),
  registersLowStorage: z.int().nullable(),
  startUpSteps: z.int(),
});

export const OrderFacts = z.object({
  consistent: z.boolean(),
  orderAtFixedParameter: z.int().nullable(),
  pT: z.int().nullable(),
  pX: z.int().nullable(),
  /** Powers (dt, dx) of truncation terms with a negative exponent. */
  conditionalTerms: z.array(z.object({ dt: z.int(), dx: z.int() })),
  mixedLowest: z.array(z.object({ dt: z.int(), dx: z.int() })),
  modifiedEquationLeading: z.object({ powerOfITheta: z.int(), coefficient: z.string() }).nullable(),
  modifiedEquationSecond: z.object({ powerOfITheta: z.int(), coefficient: z.string() }).nullable(),
  /** What the two terms do, in words. */
  meaning: z.string().nullable(),
  /** Parameter values at which the order rises. */
  specialValues: z.array(z.object({ parameter: z.string(), value: z.string(), order: z.int().nullable() })),
  reason: z.string().nullable(),
});

export const EndBehaviour = z.object({
  stableAtLimit: z.boolean(),
  why: z.string(),
  /** Wavenumbers, radians, at which it is decided; one list per dimension flattened. */
  theta: z.array(z.number()).optional(),
});

export const StableInterval = z.object({
  lo: z.string().nullable(),
  hi: z.string().nullable(),
  loIncluded: z.boolean().nullable(),
  hiIncluded: z.boolean().nullable(),
  /** Closed form such as "1", "sqrt(3)/2"; null where none is recognised. */
  loExact: z.string().nullable(),
  hiExact: z.string().nullable(),
  loMinimalPolynomial: z.string().nullable().optional(),
  hiMinimalPolynomial: z.string().nullable().optional(),
  loBehaviour: EndBehaviour.nullable(),
  hiBehaviour: EndBehaviour.nullable(),
  /** Values strictly inside at which a multiple root stands on the unit circle. */
  interiorDefects: z.array(z.object({ at: z.string(), theta: z.number(), why: z.string() })).optional(),
  method: Method,
  /** Absolute tolerance of the ends where method is numeric, width of the bracket where certified. */
  tolerance: z.string().nullable().optional(),
});

export const Growth = z.object({
  /** max|z| − 1 ~ K p^q as p → 0; rational text. */
  q: z.string(),
  factor: z.number().nullable(),
  /** At a chosen value: growth a step, and steps until amplification by ten. */
  at: z.object({ parameter: z.number(), growthPerStep: z.number(), stepsToTenfold: z.number().nullable() }).nullable(),
  /** How the factor K was obtained. */
  method: Method,
  /** Relative tolerance of K; null where it is read off the growth at a small value. */
  tolerance: z.string().nullable().optional(),
  /** How the exponent q was obtained. */
  exponentMethod: Method.optional(),
});

export const VERDICTS = [
  'conditionally stable',
  'unconditionally stable',
  'weakly unstable for all nonzero values',
  'unstable for all nonzero values',
  'two-parameter region',
  'degenerate newest level',
  'not decided within the time budget',
] as const;

export const StabilityFacts = z.object({
  kind: z.enum(['one-parameter', 'two-parameter']),
  parameter: z.string().nullable(),
  examined: z.tuple([z.number(), z.number()]).nullable(),
  verdict: z.enum(VERDICTS),
  intervals: z.array(StableInterval),
  isolatedStablePoints: z.array(z.string()),
  growth: z.object({ positive: Growth.nullable(), negative: Growth.nullable() }).nullable(),
  /** Worst wave at a representative unstable value. */
  lostAt: z.object({ parameter: z.number(), theta: z.array(z.number()), modulus: z.number() }).nullable(),
  /** Two parameters and several dimensions: the general condition where it is known in closed form. */
  region: z.string().nullable(),
  /** Two parameters: intervals of the first at fixed values of the second. */
  cuts: z.array(
    z.object({
      fixed: z.record(z.string(), z.string()),
      intervals: z.array(z.tuple([z.string().nullable(), z.string().nullable()])),
      method: Method.optional(),
    }),
  ),
  /** Advection with diffusion: the cuts as decimals, r held fixed. */
  lambdaLimitAtR: z
    .array(
      z.object({
        r: z.string(),
        /** Stable intervals of lambda within the range examined; an end null where it goes on. */
        intervalsLambda: z.array(z.tuple([z.number().nullable(), z.number().nullable()])),
        examined: z.tuple([z.number(), z.number()]),
        /** Largest stable lambda of the interval at 0; null where there is no end. */
        lambdaMaxExact: z.number().nullable(),
        /** The same in closed form where one is recognised. */
        lambdaMaxClosedForm: z.string().nullable(),
      }),
    )
    .optional(),
  /** Several dimensions: bounds along single directions. */
  singleDirection: z.array(
    z.object({
      parameter: z.string(),
      lo: z.string().nullable(),
      hi: z.string().nullable(),
      method: Method.optional(),
    }),
  ),
  method: Method,
  note: z.string().nullable(),
});

export const StorageFacts = z.object({
  levels: z.int().nullable(),
  explicit: z.boolean(),
  arraysOnePerLevel: z.int().nullable(),
  /** What the sheet shows as "arrays". */
  arraysInPlace: z.int(),
  arraysWithRollingBuffer: z.int().nullable(),
  rollingBufferLayers: z.int().nullable(),
  registersGeneral: z.int().nullable(),
  registersAccumulating: z.int().nullable(),
  registersLowStorage: z.int().nullable(),
  /** Direction in which an in-place update must sweep: one word per dimension, null where it does not matter. */
  sweep: z.array(z.enum(['ascending', 'descending'])).nullable(),
  unknowns: z.int().nullable(),
  reason: z.string(),
});

export const DissipationFacts = z.object({
  at: z.record(z.string(), z.string()),
  /** Even exponent 2s of −ln|z| of the principal root; negative where it grows; null where it does neither. */
  principalRootDampingOrder: z.int().nullable(),
  maxModulusForThetaGt02: z.number().nullable(),
  kreissDissipative: z.boolean(),
  kreissOrder: z.int().nullable(),
  rootsOnUnitCircleAtTheta0: z.int(),
  /** |z| = 1 for every wave and root inside the bound. */
  conservative: z.boolean(),
});

export const SchemeFacts = z.object({
  kind: z.literal('scheme'),
  order: OrderFacts,
  levels: z.int().nullable(),
  rootsPerWave: z.int(),
  computationalModes: z.int(),
  startUpSteps: z.int(),
  storage: StorageFacts,
  /** [left, right] per dimension. */
  halo: z.array(z.tuple([z.int(), z.int()])),
  cost: Cost,
  stability: StabilityFacts,
  dissipation: DissipationFacts.nullable(),
  timeMethod: TimeMethodFacts.nullable(),
});

export const Facts = z.discriminatedUnion('kind', [StencilFacts, TimeMethodFacts, SchemeFacts]);

export const SamplePoint = z.object({
  parameters: z.record(z.string(), z.string()),
  theta: z.array(z.string()),
  roots: z.array(z.tuple([z.number(), z.number()])),
  maxModulus: z.number(),
  principalRoot: z.tuple([z.number(), z.number()]).nullable(),
  relativePhaseSpeed: z.number().nullable(),
  relativeDecayRate: z.number().nullable(),
});

export const Analysis = z.object({
  verdict: z.enum(['facts', 'inconsistent', 'invalid']),
  problems: z.array(Problem),
  facts: Facts.nullable(),
  samples: z.array(SamplePoint).optional(),
});

export type StencilFacts = z.infer<typeof StencilFacts>;
export type TimeMethodFacts = z.infer<typeof TimeMethodFacts>;
export type SchemeFacts = z.infer<typeof SchemeFacts>;
export type OrderFacts = z.infer<typeof OrderFacts>;
export type StabilityFacts = z.infer<typeof StabilityFacts>;
export type StableInterval = z.infer<typeof StableInterval>;
export type StorageFacts = z.infer<typeof StorageFacts>;
export type DissipationFacts = z.infer<typeof DissipationFacts>;
export type Cost = z.infer<typeof Cost>;
export type Facts = z.infer<typeof Facts>;
export type SamplePoint = z.infer<typeof SamplePoint>;
export type Analysis = z.infer<typeof Analysis>;
