/** The few readings of an entry that a catalog line shows and the conditions ask about; stored beside the facts. */
import { z } from 'zod';

export const FactsSummary = z.object({
  dims: z.int(),
  explicit: z.boolean(),
  orderTime: z.int().nullable(),
  orderSpace: z.int().nullable(),
  arrays: z.int().nullable(),
  levels: z.int().nullable(),
  /** Halo of the first dimension, left and right. */
  halo: z.tuple([z.int(), z.int()]).nullable(),
  operations: z.int().nullable(),
  bytes: z.int().nullable(),
  /** Symbol of the parameter that the bound is about: "lambda", "r"; null for stencils. */
  parameter: z.string().nullable(),
  verdict: z.string().nullable(),
  /** Stable intervals [lo, hi] as decimals with their closed forms, null where there is no end. */
  bounds: z.array(
    z.object({
      lo: z.number().nullable(),
      hi: z.number().nullable(),
      loExact: z.string().nullable(),
      hiExact: z.string().nullable(),
      loIncluded: z.boolean(),
      hiIncluded: z.boolean(),
    }),
  ),
  dissipative: z.boolean().nullable(),
  /** Sites read and written, for the small sketch. */
  sketch: z.object({
    sites: z.array(z.object({ level: z.number(), offset: z.number(), role: z.enum(['computed', 'coupled', 'known']) })),
    /** Stages inside a step, 0 for tables. */
    stages: z.int(),
  }),
  /** 25 samples over theta in 0 … pi at `at`: |g| of the principal root and relative phase speed (or kappa/theta^m for stencils). */
  curves: z
    .object({ at: z.number().nullable(), modulus: z.array(z.number()), phase: z.array(z.number().nullable()) })
    .nullable(),
});
export type FactsSummary = z.infer<typeof FactsSummary>;
