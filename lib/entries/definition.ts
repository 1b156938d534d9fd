/**
 * The language of definitions: one zod schema for forms, API, import, storage and the engine's input.
 *
 * A definition is checked here for its shape and limits; whether it means something (offsets distinct,
 * symbols known, consistent with its equation) is for the engine to say, with the place.
 */
import { z } from 'zod';
import { EQUATIONS } from '@/lib/numerics/equation';

export const LIMITS = {
  /** Offsets lie within −16 … 16 grid spacings. */
  offset: 16,
  /** Time levels, newest and oldest included. */
  levels: 8,
  /** Terms of one table or one equation of a system. */
  terms: 64,
  /** Nodes of one stencil. */
  nodes: 64,
  /** Characters of one coefficient. */
  expression: 200,
  /** Stages of a Runge-Kutta method, steps of a multistep method. */
  stages: 16,
  /** Unknowns of a system. */
  unknowns: 6,
} as const;

const RATIONAL_TEXT = /^[+-]?(\d+(\.\d*)?|\.\d+)(\/\d+)?$/;

/** An exact number as text: an integer, a fraction p/q, or a decimal taken as written. JSON numbers are accepted. */
export const RationalText = z
  .union([z.string().trim().max(60), z.number().refine(Number.isFinite, 'must be finite')])
  .transform(String)
  .pipe(z.string().regex(RATIONAL_TEXT, 'accepted: an integer, a fraction such as -1/12, or a decimal such as 0.25'));

/** A coefficient in the equation's own symbols; its grammar is the engine's (lib/numerics/expression). */
export const ExpressionText = z
  .union([z.string(), z.number()])
  .transform(String)
  .pipe(
    z
      .string()
      .trim()
      .min(1, 'accepted: an expression such as -lambda/2')
      .max(LIMITS.expression, `accepted: at most ${LIMITS.expression} characters`),
  );

/** One component in 1-D, or a tuple with one component per dimension. */
export const OffsetText = z.union([RationalText, z.array(RationalText).min(1).max(3)]);

const dims = z.union([z.literal(1), z.literal(2), z.literal(3)]).default(1);

export const CompactSide = z.object({
  offsets: z.array(OffsetText).min(1).max(LIMITS.nodes),
  weights: z.array(RationalText).max(LIMITS.nodes).nullable().default(null),
});

export const StencilDefinition = z.object({
  kind: z.literal('stencil'),
  dims,
  /** m of d^m/dx^m in one dimension; 0 is interpolation. */
  derivative: z.int().min(0).max(8).optional(),
  /** A polynomial in partials in several dimensions: {"xx":"1","yy":"1"}. */
  operator: z
    .record(z.string().regex(/^[xyz]{0,8}$/, 'accepted: a word of x, y, z such as xxyy'), RationalText)
    .optional(),
  offsets: z.array(OffsetText).min(1).max(LIMITS.nodes),
  weights: z.array(RationalText).max(LIMITS.nodes).nullable().default(null),
  lhs: CompactSide.optional(),
});

export const RungeKutta = z.object({
  kind: z.literal('runge-kutta'),
  A: z.array(z.array(RationalText).max(LIMITS.stages)).min(1).max(LIMITS.stages),
  b: z.array(RationalText).min(1).max(LIMITS.stages),
  c: z.array(RationalText).max(LIMITS.stages).optional(),
});
/** sum alpha_j u^(n+1-k+j) = dt sum beta_j f^(n+1-k+j), oldest first; the last belongs to level n+1. */
export const Multistep = z.object({
  kind: z.literal('multistep'),
  alpha: z.array(RationalText).min(2).max(LIMITS.levels),
  beta: z.array(RationalText).min(2).max(LIMITS.levels),
});
export const ImexMultistep = z.object({
  kind: z.literal('imex-multistep'),
  alpha: z.array(RationalText).min(2).max(LIMITS.levels),
  beta_explicit: z.array(RationalText).min(2).max(LIMITS.levels),
  beta_implicit: z.array(RationalText).min(2).max(LIMITS.levels),
});
export const TimeMethod = z.discriminatedUnion('kind', [RungeKutta, Multistep, ImexMultistep]);

export const TimeMethodDefinition = z.object({ kind: z.literal('time-method'), time: TimeMethod });

/** Numbers of a family held fixed, and a one-parameter cut through several parameters. */
const family = {
  fixed: z.record(z.string(), RationalText).optional(),
  path: z.string().max(LIMITS.expression).optional(),
};

export const TableTerm = z.object({ level: RationalText, offset: OffsetText, coefficient: ExpressionText });
export const TableScheme = z.object({
  kind: z.literal('scheme'),
  form: z.literal('table'),
  equation: z.enum(EQUATIONS),
  terms: z.array(TableTerm).min(1).max(LIMITS.terms),
  ...family,
});
export const LinesScheme = z.object({
  kind: z.literal('scheme'),
  form: z.literal('lines'),
  equation: z.enum(EQUATIONS),
  space: z.array(StencilDefinition).min(1).max(4),
  time: TimeMethod,
  ...family,
});
export const SystemScheme = z.object({
  kind: z.literal('scheme'),
  form: z.literal('system'),
  equation: z.enum(EQUATIONS),
  unknowns: z
    .array(z.string().regex(/^[A-Za-z][A-Za-z0-9_]{0,11}$/))
    .min(1)
    .max(LIMITS.unknowns),
  equations: z
    .array(
      z.object({
        terms: z
          .array(
            z.object({ unknown: z.string(), level: RationalText, offset: OffsetText, coefficient: ExpressionText }),
          )
          .min(1)
          .max(LIMITS.terms),
      }),
    )
    .min(1)
    .max(LIMITS.unknowns),
  ...family,
});
export const SchemeDefinition = z.discriminatedUnion('form', [TableScheme, LinesScheme, SystemScheme]);

export const Definition = z.discriminatedUnion('kind', [StencilDefinition, TimeMethodDefinition, SchemeDefinition]);

export type StencilDefinition = z.infer<typeof StencilDefinition>;
export type TimeMethod = z.infer<typeof TimeMethod>;
export type RungeKutta = z.infer<typeof RungeKutta>;
export type Multistep = z.infer<typeof Multistep>;
export type TimeMethodDefinition = z.infer<typeof TimeMethodDefinition>;
export type TableScheme = z.infer<typeof TableScheme>;
export type LinesScheme = z.infer<typeof LinesScheme>;
export type SystemScheme = z.infer<typeof SystemScheme>;
export type SchemeDefinition = z.infer<typeof SchemeDefinition>;
export type Definition = z.infer<typeof Definition>;
