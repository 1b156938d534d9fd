import 'server-only';
import { z } from 'zod';
import { db } from '@/db/client';
import { insertAdoption, isAdopted } from '@/db/queries/adoptions';
import { insertEvent } from '@/db/queries/house';
import { findReview } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { refuseBrokenRule } from '@/lib/reviews/refuse-broken-rule';

export const AdoptionInput = z.object({
  revisionId: z.uuid(),
  code: z.string().trim().min(1, 'accepted: the name of the code').max(80, 'accepted: at most 80 characters'),
  purpose: z.string().trim().max(200, 'accepted: at most 200 characters').default(''),
});
export type AdoptionInput = z.infer<typeof AdoptionInput>;

/** Records that a code uses a revision, so that its keeper is told when the revision no longer stands. */
export async function adopt(actor: Actor, { revisionId, code, purpose }: AdoptionInput): Promise<void> {
  const revision = await findReview(db, revisionId);
  if (!revision) throw new Refusal('not-found', 'There is no such revision.');
  if (revision.state !== 'vetted')
    throw new Refusal('not-allowed', `Only a vetted revision is adopted; this one is ${revision.state}.`);
  if (await isAdopted(db, revisionId, code))
    throw new Refusal('conflict', `${code} is already recorded for this revision.`);

  await refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      await insertAdoption(tx, { revisionId, personId: actor.id, code, purpose });
      await insertEvent(tx, { kind: 'adoption.recorded', actorId: actor.id, subjectId: revisionId, data: { code } });
    }),
  );
}
