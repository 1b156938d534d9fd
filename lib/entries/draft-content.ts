/** What an author brings of a revision: the same schema for the form, the import and the seed. */
import { z } from 'zod';
import { Definition } from './definition';

const line = (most: number) =>
  z
    .string()
    .trim()
    .max(most, `accepted: at most ${most} characters`)
    .refine((text) => !/[\r\n]/.test(text), 'accepted: one line');

export const ReferenceInput = z.object({
  authors: line(300).min(1, 'accepted: the authors, such as H. O. Kreiss, J. Oliger'),
  title: line(400).min(1, 'accepted: the title of the work'),
  source: line(300).default(''),
  year: z.int().min(1600, 'accepted: a year from 1600 on').max(2100, 'accepted: a year up to 2100'),
  doi: line(200)
    .regex(/^10\.\d{4,9}\/\S+$/, 'accepted: a DOI such as 10.1007/BF01448839')
    .nullable()
    .default(null),
  note: line(400).nullable().default(null),
});

export const DraftContent = z.object({
  title: line(200).min(1, 'accepted: a title of 1 to 200 characters'),
  gist: line(400).default(''),
  synonyms: z.array(line(120).min(1)).max(40, 'accepted: at most 40 other names').default([]),
  definition: Definition,
  /** Markdown. */
  notes: z.string().max(40_000, 'accepted: notes of at most 40 000 characters').default(''),
  references: z.array(ReferenceInput).max(60, 'accepted: at most 60 references').default([]),
  changeNote: line(400).default(''),
});
export type DraftContent = z.infer<typeof DraftContent>;
