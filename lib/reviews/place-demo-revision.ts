import 'server-only';
import { db } from '@/db/client';
import { markDemoPlan } from '@/db/queries/demo-plans';
import { findReview } from '@/db/queries/revisions';
import { insertWaitingTrial } from '@/db/queries/waiting-trials';
import { demoActor } from './demo-actor';
import type { StoredDemoPlan } from './demo-plan';
import { returnRevision } from './return-revision';
import { submissionObstacle } from './review-rules';
import { submitRevision } from './submit-revision';

/**
 * Puts a draft of the demo where its plan wants it: on the author's table, on the desk with a trial to come, or
 * back with its author. It goes on where an earlier call was cut off.
 * @returns why it could not be submitted, or null
 */
export async function placeDemoRevision(revisionId: string, { plan, author }: StoredDemoPlan): Promise<string | null> {
  const writer = await demoActor(author);
  let obstacle: string | null = null;
  if (plan.become !== 'draft') {
    const draft = await findReview(db, revisionId);
    if (!draft) throw new Error(`placeDemoRevision: there is no revision ${revisionId}`);
    if (draft.latestTrial === null && draft.verdict === 'facts') await insertWaitingTrial(db, revisionId, writer.id);
    if (draft.state === 'draft') {
      obstacle = submissionObstacle(writer, draft);
      if (obstacle === null) await submitRevision(writer, revisionId);
    }
    if (plan.become === 'returned' && (await findReview(db, revisionId))?.state === 'in-review')
      await returnRevision(await demoActor(plan.by), revisionId, plan.reason);
  }
  await markDemoPlan(db, revisionId, { placed: true });
  return obstacle;
}
