import 'server-only';
import { db } from '@/db/client';
import { insertEvent } from '@/db/queries/house';
import { findEntry, insertEntry, insertRevision, nextCallNumber } from '@/db/queries/revisions';
import type { Actor } from '@/lib/people/actor';
import { includesRole } from '@/lib/people/role';
import { Refusal } from '@/lib/refusal';
import { refuseBrokenRule } from '@/lib/reviews/refuse-broken-rule';
import { analyseContent } from './analyse-content';
import { callLettersOf, equationOf, formatCallNumber, kindOf, slugOfTitle } from './call-number';
import type { DraftContent } from './draft-content';

export interface NewDraft {
  content: DraftContent;
  /** Slug of the entry whose next revision this is; without it a new entry is begun. */
  revisionOf?: string;
  /** For a new entry that has its place already (import, demo): without them the next number and the title's slug. */
  place?: { number: number; slug: string };
}

export interface CreatedDraft {
  entryId: string;
  revisionId: string;
  slug: string;
  number: number;
}

/** Begins a draft: of a new entry, or of the next revision of one in the book. */
export async function createDraft(actor: Actor, draft: NewDraft): Promise<CreatedDraft> {
  if (!includesRole(actor.role, 'contributor'))
    throw new Refusal('not-allowed', 'Only a contributor adds to the book. An administrator can make you one.');
  const { definition, title } = draft.content;
  const letters = callLettersOf(definition);
  const entry = draft.revisionOf === undefined ? null : await findEntry(db, draft.revisionOf);
  if (draft.revisionOf !== undefined && !entry)
    throw new Refusal('not-found', `There is no entry at ${draft.revisionOf}.`);
  if (entry && (entry.kind !== kindOf(definition) || entry.letters !== letters))
    throw new Refusal('invalid', `A revision of ${formatCallNumber(entry.letters, entry.number)} stays of its kind.`, {
      definition: `accepted: a definition that is booked under ${entry.letters}`,
    });

  const number = entry?.number ?? draft.place?.number ?? (await nextCallNumber(db, letters));
  const slug = entry?.slug ?? draft.place?.slug ?? slugOfTitle(title);
  // Before the transaction: facts take longer than a lock should be held.
  const content = analyseContent(draft.content, formatCallNumber(letters, number), slug);
  return refuseBrokenRule(() =>
    db.transaction(async (tx) => {
      const entryId =
        entry?.id ??
        (await insertEntry(tx, { letters, number, slug, kind: kindOf(definition), equation: equationOf(definition) }));
      const revision = await insertRevision(tx, entryId, actor.id, content);
      await insertEvent(tx, {
        kind: 'draft.created',
        actorId: actor.id,
        subjectId: revision.id,
        data: { slug, number: revision.number },
      });
      return { entryId, revisionId: revision.id, slug, number: revision.number };
    }),
  );
}
