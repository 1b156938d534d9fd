import 'server-only';
import { unstable_rethrow } from 'next/navigation';
import { currentActor } from '@/lib/auth/current-actor';
import type { Actor } from '@/lib/people/actor';
import { answerOfError } from './answer-of-error';
import { problem } from './problem';
import { isFromHere } from './same-origin';

export interface Visit<P> {
  actor: Actor;
  request: Request;
  url: URL;
  params: P;
}

/**
 * The frame of a route handler: asks who is there, calls `work`, and turns refusals, an absent database and
 * faults into problem documents (RFC 9457).
 */
export function route<P = Record<string, never>>(work: (visit: Visit<P>) => Promise<Response> | Response) {
  return async (request: Request, context: { params: Promise<P> }): Promise<Response> => {
    try {
      if (!isFromHere(request)) return problem('not-allowed', 'Changes are taken from pages of this site only.');
      const actor = await currentActor();
      if (!actor) return problem('not-signed-in', 'Sign in first; this address needs an account.');
      return await work({ actor, request, url: new URL(request.url), params: await context.params });
    } catch (error) {
      unstable_rethrow(error);
      const { code, message, fields } = answerOfError(`${request.method} ${new URL(request.url).pathname}`, error);
      return problem(code, message, fields);
    }
  };
}
