import 'server-only';
import { brokenRule } from '@/db/errors';
import { Refusal } from '@/lib/refusal';

const CHANGED = 'This revision changed while you were reading it. Nothing of yours is lost; look again, then decide.';

/** What the database's own rules mean to a reader. They bite only where two people act at once: a pure rule has asked before. */
const SENTENCE: Readonly<Record<string, string>> = {
  content_is_frozen: CHANGED,
  allowed_moves_only: CHANGED,
  vetted_means_signed: CHANGED,
  vetted_means_tried: CHANGED,
  signed_in_review_only: CHANGED,
  one_vetted_revision_per_entry: 'Another revision of this entry has been vetted meanwhile.',
  one_signature_per_person: 'You have signed this revision already.',
  one_number_per_entry: 'Somebody began a revision of this entry at the same moment. Try again.',
  one_call_number_per_entry: 'This call number has just been taken. Try again.',
  one_address_per_entry: 'An entry with this address is in the book already. Choose another title.',
  attachments_are_frozen: CHANGED,
  one_running_adoption_per_code: 'This code is already recorded for this revision.',
};

/** Runs `work`, and refuses with a conflict where it broke a rule of the database that a reader can understand. */
export async function refuseBrokenRule<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    const sentence = SENTENCE[brokenRule(error) ?? ''];
    if (sentence) throw new Refusal('conflict', sentence);
    throw error;
  }
}

export const changedMeanwhile = () => new Refusal('conflict', CHANGED);
