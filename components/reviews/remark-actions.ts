/** What can be done with remarks; pages hand in the actions behind it. */
import type { z } from 'zod';
import type { AnswerInput, RemarkId, RemarkInput } from '@/lib/reviews/remark-input';

export type Answered = { ok: true } | { ok: false; message: string };

export interface RemarkActions {
  write: (input: z.input<typeof RemarkInput>) => Promise<Answered>;
  answer: (input: z.input<typeof AnswerInput>) => Promise<Answered>;
  settle: (input: z.input<typeof RemarkId>) => Promise<Answered>;
  reopen: (input: z.input<typeof RemarkId>) => Promise<Answered>;
}
