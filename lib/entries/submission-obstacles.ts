/** What hinders a draft from being sent to review, each with the place of the page where it is put right. */
import { missingForSubmission } from '@/lib/reviews/review-rules';
import type { DraftContent } from './draft-content';

export interface SubmissionObstacle {
  readonly sentence: string;
  /** Id of the part of the drafting table. */
  readonly place: 'title' | 'definition' | 'notes';
}

const PLACES: readonly [RegExp, SubmissionObstacle['place']][] = [
  [/definition/i, 'definition'],
  [/title/i, 'title'],
  [/reference|note/i, 'notes'],
];

/** The rule of the review desk, asked of text that may not be kept yet. */
export function submissionObstacles(
  content: Pick<DraftContent, 'title' | 'notes' | 'references'>,
  verdict: 'facts' | 'inconsistent' | 'invalid',
): SubmissionObstacle[] {
  return missingForSubmission({
    state: 'draft',
    authorId: '',
    title: content.title,
    verdict,
    referenceCount: content.references.length,
    notes: content.notes,
    latestTrial: null,
    signerIds: [],
    signaturesNeeded: 0,
  }).map((sentence) => ({
    sentence,
    place: PLACES.find(([pattern]) => pattern.test(sentence))?.[1] ?? 'definition',
  }));
}
