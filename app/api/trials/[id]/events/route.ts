import { z } from 'zod';
import { db } from '@/db/client';
import { findTrialFor } from '@/db/queries/latest-trial';
import { Refusal } from '@/lib/refusal';
import { eventStream } from '@/lib/web/event-stream';
import { route } from '@/lib/web/route';

export const dynamic = 'force-dynamic';

/** The state of a trial, told again at every step until it has ended: server-sent events, each a TrialView as JSON. */
export const GET = route<{ id: string }>(async ({ actor, request, params: { id } }) => {
  const notFound = () => new Refusal('not-found', 'There is no such trial.');
  if (!z.uuid().safeParse(id).success) throw notFound();
  const read = () => findTrialFor(db, actor, id);
  if (!(await read())) throw notFound();
  return eventStream(id, read, ({ finishedAt }) => finishedAt !== null, request.signal);
});
