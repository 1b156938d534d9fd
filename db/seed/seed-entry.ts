import { createDraft } from '@/lib/entries/create-draft';
import { DraftContent } from '@/lib/entries/draft-content';
import { DEMO_CODES } from '@/lib/people/demo-people';
import { demoActor } from '@/lib/reviews/demo-actor';
import type { StoredDemoPlan } from '@/lib/reviews/demo-plan';
import { placeDemoRevision } from '@/lib/reviews/place-demo-revision';
import { db } from '../client';
import { findDemoPlan, findRevision, insertDemoPlan } from '../queries/demo-plans';
import { insertRemark } from '../queries/remarks';
import type { DemoEntry, DemoRevision } from './demo-entry';

function planOf(entry: DemoEntry, revision: DemoRevision, number: number, last: number): StoredDemoPlan {
  const adoptions = (entry.adoptions ?? [])
    .filter((adoption) => (adoption.revision ?? last) === number)
    .map(({ code, by }) => ({ code, purpose: DEMO_CODES[code], by }));
  return { author: revision.author, plan: revision.plan, adoptions };
}

/** The revision of this number, made where it is missing; null where somebody else has taken its place. */
async function ensureRevision(entry: DemoEntry, revision: DemoRevision, number: number) {
  const author = await demoActor(revision.author);
  const present = await findRevision(db, entry.slug, number);
  if (present) return present.authorId === author.id ? present.id : null;
  const content = DraftContent.parse({ ...revision, changeNote: revision.changeNote ?? '' });
  const draft = await createDraft(
    author,
    number === 1 ? { content, place: { number: entry.number, slug: entry.slug } } : { content, revisionOf: entry.slug },
  );
  return draft.revisionId;
}

/**
 * Brings one entry of the demo into the book: its revisions as drafts, the first of them placed. The later
 * ones wait until the one before is vetted.
 * @returns whether anything was added
 */
export async function seedEntry(entry: DemoEntry): Promise<boolean> {
  const all: DemoRevision[] = [...(entry.earlier ?? []), entry];
  let added = false;
  for (const [index, revision] of all.entries()) {
    const number = index + 1;
    const present = await findRevision(db, entry.slug, number);
    if (present && (await findDemoPlan(db, present.id))?.placed) continue;
    // A later revision that is there, with its plan, waits for the one before it.
    if (present && index > 0 && (await findDemoPlan(db, present.id))) continue;

    const id = await ensureRevision(entry, revision, number);
    if (id === null) return added;
    const plan = planOf(entry, revision, number, all.length);
    await insertDemoPlan(db, id, plan);
    added = true;
    if (number === all.length) await seedRemarks(entry, id);
    if (index > 0) continue;
    const obstacle = await placeDemoRevision(id, plan);
    if (obstacle) throw new Error(`stays a draft: ${obstacle}`);
  }
  return added;
}

async function seedRemarks(entry: DemoEntry, revisionId: string): Promise<void> {
  for (const { by, part, text } of entry.remarks ?? [])
    await insertRemark(db, { revisionId, authorId: (await demoActor(by)).id, part, text });
}
