import 'server-only';
import { db } from '@/db/client';
import { isAdopted } from '@/db/queries/adoptions';
import {
  findDemoPlan,
  findNextDemoRevision,
  listDemoRevisionsToDecide,
  markDemoPlan,
  tryToLockDemoPlan,
} from '@/db/queries/demo-plans';
import { findReview } from '@/db/queries/revisions';
import { adopt } from '@/lib/adoptions/adopt';
import type { Actor } from '@/lib/people/actor';
import { DEMO_PEOPLE } from '@/lib/people/demo-people';
import { demoActor } from './demo-actor';
import type { DemoPlan, StoredDemoPlan } from './demo-plan';
import { placeDemoRevision } from './place-demo-revision';
import { REVIEW_POINTS } from './review-list';
import { signingObstacle, vettingObstacle, withdrawalObstacle } from './review-rules';
import { signRevision } from './sign-revision';
import { vetRevision } from './vet-revision';
import { withdrawRevision } from './withdraw-revision';

const SENTENCES = [
  'Definition and facts agree with the source; the trial confirms them.',
  'Checked against the source, start-up and halo included.',
] as const;

/** Two maintainers, in the order of the office, who did not write it. */
async function defaultSigners(authorId: string): Promise<Actor[]> {
  const maintainers = DEMO_PEOPLE.filter(({ role }) => role === 'maintainer' || role === 'administrator');
  const actors = await Promise.all(maintainers.map(({ email }) => demoActor(email)));
  return actors.filter(({ id }) => id !== authorId).slice(-2);
}

async function signersOf(plan: DemoPlan, authorId: string): Promise<Actor[]> {
  if ((plan.become === 'in-review' || plan.become === 'vetted') && plan.signedBy)
    return Promise.all(plan.signedBy.map(demoActor));
  return plan.become === 'vetted' || plan.become === 'withdrawn' ? defaultSigners(authorId) : [];
}

/**
 * Lets the demo's maintainers decide on a revision whose trial has passed, through the same use cases as a
 * person: sign, vet, adopt, withdraw, and submit the next revision. Each step asks its own rule first, so that
 * it may be called at any time, again after a crash, and where it may not go on it stops. Does nothing for a
 * revision that is not the demo's.
 */
export async function vetDemoEntry(revisionId: string): Promise<void> {
  await db.transaction(async (tx) => {
    // Where another worker decides on it at this moment, that one sees it through.
    if (await tryToLockDemoPlan(tx, revisionId)) await decide(revisionId);
  });
}

async function decide(revisionId: string): Promise<void> {
  const stored = await findDemoPlan(db, revisionId);
  if (!stored?.placed || stored.done) return;
  const { plan, adoptions } = stored.plan;
  const review = await findReview(db, revisionId);
  if (!review || (plan.become !== 'in-review' && plan.become !== 'vetted' && plan.become !== 'withdrawn')) return;

  const signers = await signersOf(plan, review.authorId);
  const sentences = (plan.become === 'vetted' && plan.sentences) || SENTENCES;
  for (const [index, signer] of signers.entries()) {
    const now = await findReview(db, revisionId);
    if (now && signingObstacle(signer, now) === null)
      await signRevision(signer, revisionId, {
        points: [...REVIEW_POINTS],
        sentence: sentences[index] ?? SENTENCES[0],
      });
  }
  if (plan.become !== 'in-review' && !(await putInForce(revisionId, signers.at(-1), sentences[1]))) return;
  if (plan.become !== 'in-review') await recordAdoptions(revisionId, adoptions);
  if (plan.become === 'withdrawn') await withdraw(revisionId, plan);
  const next = await findNextDemoRevision(db, review.entryId, review.number);
  if (next) await placeDemoRevision(next.id, next.plan);
  await markDemoPlan(db, revisionId, { done: true });
}

/** Whether the revision is in force, or has been. */
async function putInForce(revisionId: string, signer: Actor | undefined, sentence: string): Promise<boolean> {
  const review = await findReview(db, revisionId);
  if (!review || !signer) return false;
  if (review.state === 'in-review' && vettingObstacle(signer, review) === null)
    await vetRevision(signer, revisionId, sentence);
  const state = (await findReview(db, revisionId))?.state;
  return state === 'vetted' || state === 'superseded' || state === 'withdrawn';
}

async function recordAdoptions(revisionId: string, adoptions: StoredDemoPlan['adoptions']): Promise<void> {
  const review = await findReview(db, revisionId);
  if (review?.state !== 'vetted') return;
  for (const { code, purpose, by } of adoptions)
    if (!(await isAdopted(db, revisionId, code))) await adopt(await demoActor(by), { revisionId, code, purpose });
}

async function withdraw(revisionId: string, plan: Extract<DemoPlan, { become: 'withdrawn' }>): Promise<void> {
  const by = await demoActor(plan.by);
  const review = await findReview(db, revisionId);
  if (review && withdrawalObstacle(by, review) === null)
    await withdrawRevision(by, revisionId, { reason: plan.reason, useInstead: plan.useInstead });
}

/** Decides on every revision of the demo that waits for it; for the start of a worker, after a crash. */
export async function vetWaitingDemoEntries(): Promise<void> {
  for (const revisionId of await listDemoRevisionsToDecide(db)) await vetDemoEntry(revisionId);
}
