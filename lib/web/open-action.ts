import 'server-only';
import { headers } from 'next/headers';
import { unstable_rethrow } from 'next/navigation';
import type { z } from 'zod';
import { networkAddress } from '@/lib/auth/network-address';
import type { ActionAnswer } from './action';
import { answerOfError } from './answer-of-error';
import { fieldMessages, objectOfForm } from './form-input';

/**
 * The frame of a server action for those who have no account yet, or no password: as `action`, without anyone
 * signed in. What it calls must limit how often it is tried.
 * @param work gets the network address that asks
 */
export function openAction<S extends z.ZodType, T>(
  schema: S,
  work: (input: z.output<S>, address: string) => Promise<T>,
) {
  return async (input: z.input<S> | FormData): Promise<ActionAnswer<T>> => {
    try {
      const parsed = schema.safeParse(input instanceof FormData ? objectOfForm(input) : input);
      if (!parsed.success)
        return { ok: false, message: 'Some of this cannot be read as it stands.', fields: fieldMessages(parsed.error) };
      return { ok: true, value: await work(parsed.data, networkAddress(await headers())) };
    } catch (error) {
      unstable_rethrow(error);
      const { message, fields } = answerOfError('open action', error);
      return { ok: false, message, fields };
    }
  };
}
