/** What comes in when somebody remarks, answers, settles or reopens. */
import { z } from 'zod';
import { KERNEL_LANGUAGES } from '@/lib/codegen/kernel-request';
import { REMARK_PARTS } from './remark-part';

export const REMARK_LENGTH = 4000;

const text = z
  .string()
  .trim()
  .min(1, 'accepted: a remark that says something')
  .max(REMARK_LENGTH, `accepted: at most ${REMARK_LENGTH} characters`);

export const RemarkInput = z.object({
  revisionId: z.uuid(),
  part: z.enum(REMARK_PARTS),
  /** A line of the kernel, with its text as the writer saw it; null where the remark is on the part as a whole. */
  at: z
    .object({
      language: z.enum(KERNEL_LANGUAGES),
      line: z.int('accepted: the number of a line').min(1, 'accepted: the number of a line').max(100_000),
      quote: z.string().max(400),
    })
    .nullable()
    .default(null),
  text,
});
export type RemarkInput = z.output<typeof RemarkInput>;

export const AnswerInput = z.object({ remarkId: z.uuid(), text });
export const RemarkId = z.object({ remarkId: z.uuid() });
