import { z } from 'zod';

/** Cases one person may keep. */
export const CASES_MAX = 100;

export const CaseInput = z.object({
  name: z
    .string()
    .trim()
    .min(1, 'A case needs a name. Accepted: 1 to 80 characters.')
    .max(80, 'The name is too long. Accepted: 1 to 80 characters.'),
  question: z.string().min(1, 'There is no run to keep.').max(2000, 'The question is too long to be kept.'),
});
export const CaseChoice = z.object({ id: z.uuid() });
