import 'server-only';
import { unstable_rethrow } from 'next/navigation';
import type { z } from 'zod';
import { currentActor } from '@/lib/auth/current-actor';
import type { Actor } from '@/lib/people/actor';
import { answerOfError } from './answer-of-error';
import { fieldMessages, objectOfForm } from './form-input';

export type ActionAnswer<T> =
  | { ok: true; value: T }
  | { ok: false; message: string; /** Field to message. */ fields: Readonly<Record<string, string>> };

/**
 * The frame of a server action, which is a public address: asks who is there, parses what came, calls `work`,
 * and answers. Refusals and a database that is away come back as sentences, faults as a mark in the log;
 * nothing is thrown but Next's own redirects. What the reader typed is the form's to keep.
 */
export function action<S extends z.ZodType, T>(schema: S, work: (actor: Actor, input: z.output<S>) => Promise<T>) {
  return async (input: z.input<S> | FormData): Promise<ActionAnswer<T>> => {
    try {
      const actor = await currentActor();
      if (!actor) return refused('You are signed out. Sign in again in another window, then send this once more.');
      const parsed = schema.safeParse(input instanceof FormData ? objectOfForm(input) : input);
      if (!parsed.success) return refused('Some of this cannot be read as it stands.', fieldMessages(parsed.error));
      return { ok: true, value: await work(actor, parsed.data) };
    } catch (error) {
      unstable_rethrow(error);
      const { message, fields } = answerOfError('action', error);
      return refused(message, fields);
    }
  };
}

const refused = (message: string, fields: Readonly<Record<string, string>> = {}) =>
  ({ ok: false, message, fields }) as const;
