/** A problem as the shortlist takes it: one zod schema for the form, the address bar and the tests. */
import { z } from 'zod';
import { EQUATIONS } from '@/lib/numerics/equation';

export const SHORTLIST_EQUATIONS = ['advection', 'wave', 'diffusion'] as const;
export const RANKINGS = ['bytes', 'memory', 'steps'] as const;
export const OFFERS = ['vetted', 'vetted-and-in-review', 'all-open'] as const;

const number = (low: number, high: number, sentence: string) =>
  z.coerce
    .number({ error: sentence })
    .refine((value) => Number.isFinite(value) && value >= low && value <= high, sentence);

export const Requirement = z
  .object({
    equation: z.enum(SHORTLIST_EQUATIONS).default('advection'),
    dims: z.coerce
      .number()
      .pipe(z.union([z.literal(1), z.literal(2), z.literal(3)]))
      .default(1),
    /** Error allowed at the end, in per cent of the wave. */
    errorPercent: number(1e-6, 100, 'Accepted: an error between 0.000001 and 100 per cent.').default(5),
    /** Distance in wavelengths, or e-foldings for diffusion. */
    duration: number(0.01, 1e6, 'Accepted: a distance between 0.01 and 1 000 000 wavelengths.').default(20),
    /** Speeds on the grid as parts of the bound, slowest and fastest. */
    slowest: number(0.001, 1, 'Accepted: a part of the bound between 0.001 and 1.').default(0.3),
    fastest: number(0.001, 1, 'Accepted: a part of the bound between 0.001 and 1.').default(0.8),
    orderAtLeast: z.coerce
      .number()
      .pipe(z.union([z.literal(0), z.literal(2), z.literal(4)]))
      .default(2),
    arraysAtMost: z.coerce.number().int().min(0).max(9).default(3),
    haloAtMost: z.coerce.number().int().min(0).max(16).default(2),
    bothSigns: z.enum(['yes', 'no']).default('yes'),
    coupling: z.enum(['explicit', 'any']).default('explicit'),
    damping: z.enum(['any', 'none']).default('any'),
    language: z.enum(['any', 'c', 'fortran', 'python']).default('any'),
    offer: z.enum(OFFERS).default('vetted-and-in-review'),
    rank: z.enum(RANKINGS).default('bytes'),
  })
  .refine((asked) => asked.slowest <= asked.fastest, {
    path: ['slowest'],
    message: 'The slowest speed is faster than the fastest; accepted: slowest ≤ fastest.',
  });
export type Requirement = z.infer<typeof Requirement>;

/** The equation that a requirement is about. */
export function equationOf({
  equation,
  dims,
}: Pick<Requirement, 'equation' | 'dims'>): (typeof EQUATIONS)[number] | null {
  const name = dims === 1 ? equation : `${equation}-${dims}d`;
  return EQUATIONS.find((known) => known === name) ?? null;
}
