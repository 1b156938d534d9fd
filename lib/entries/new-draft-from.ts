import 'server-only';
import { db } from '@/db/client';
import { findDraftSource } from '@/db/queries/drafts';
import type { Equation } from '@/lib/numerics/equation';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { type Blank, blankDefinition } from './blank-definition';
import type { NewDraft } from './create-draft';
import type { DraftContent } from './draft-content';

export type Beginning =
  | { kind: 'blank'; blank: Blank; equation: Equation; title: string }
  /** The next revision of an entry, from its text in force. */
  | { kind: 'next'; slug: string }
  /** A new entry that begins as another one stands. */
  | { kind: 'copy'; slug: string; title: string };

async function contentOf(actor: Actor, beginning: Beginning): Promise<DraftContent> {
  if (beginning.kind === 'blank') {
    const definition = blankDefinition(beginning.blank, beginning.equation);
    return { title: beginning.title, gist: '', synonyms: [], definition, notes: '', references: [], changeNote: '' };
  }
  const source = await findDraftSource(db, actor, beginning.slug);
  if (!source) throw new Refusal('not-found', `There is no entry at ${beginning.slug}.`);
  if (beginning.kind === 'next') return { ...source.content, changeNote: '' };
  return {
    ...source.content,
    title: beginning.title,
    changeNote: `Copied from ${source.callNumber}, revision ${source.number}.`,
  };
}

/** The text that a draft begins with: from nothing, as the next revision of an entry, or as a copy of one. */
export async function newDraftFrom(actor: Actor, beginning: Beginning): Promise<NewDraft> {
  const content = await contentOf(actor, beginning);
  return { content, ...(beginning.kind === 'next' && { revisionOf: beginning.slug }) };
}
