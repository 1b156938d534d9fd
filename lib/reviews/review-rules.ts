/** Who may do what to a revision, and if not, why not: one sentence that the page shows and the use case refuses with. */
import type { RevisionState } from '@/lib/entries/revision-state';
import type { Actor } from '@/lib/people/actor';
import { includesRole } from '@/lib/people/role';
import type { TrialState } from '@/lib/trials/trial';
import { REVIEW_POINTS, type ReviewPoint } from './review-list';

type Who = Pick<Actor, 'id' | 'role'>;

/** What the rules ask of a revision. Trial and signatures are those of its present text. */
export interface ReviewFacts {
  state: RevisionState;
  authorId: string;
  title: string;
  verdict: 'facts' | 'inconsistent' | 'invalid';
  referenceCount: number;
  notes: string;
  latestTrial: TrialState | null;
  signerIds: readonly string[];
  signaturesNeeded: number;
}

const COUNT = ['none', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine'];
const inWords = (count: number) => COUNT[count] ?? String(count);

/** Why `who` cannot change the text. */
export function editingObstacle(who: Who, revision: Pick<ReviewFacts, 'state' | 'authorId'>): string | null {
  if (who.id !== revision.authorId) return 'Only the author changes the text of a revision.';
  if (revision.state === 'in-review') return 'This revision is in review. Take it back to change it.';
  if (revision.state !== 'draft' && revision.state !== 'returned')
    return `This revision is ${revision.state} and stays as it is. A correction is a new revision.`;
  return null;
}

/** What still hinders the submission of a draft, whoever submits it; empty where nothing does. */
export function missingForSubmission(revision: ReviewFacts): string[] {
  const missing: string[] = [];
  if (revision.verdict === 'invalid') missing.push('The definition has errors.');
  if (revision.verdict === 'inconsistent') missing.push('The definition does not approximate its equation.');
  if (revision.title.trim() === '') missing.push('It has no title.');
  if (revision.referenceCount === 0 && revision.notes.trim() === '')
    missing.push('It needs a reference or a note with its derivation.');
  return missing;
}

export function submissionObstacle(who: Who, revision: ReviewFacts): string | null {
  if (who.id !== revision.authorId) return 'Only the author submits a revision.';
  if (revision.state === 'in-review') return 'This revision has already been submitted.';
  if (revision.state !== 'draft' && revision.state !== 'returned')
    return `A revision that is ${revision.state} cannot be submitted.`;
  return missingForSubmission(revision)[0] ?? null;
}

/** Why the evidence does not carry a decision for the book yet. */
function evidenceObstacle({ latestTrial }: ReviewFacts): string | null {
  if (latestTrial === null) return 'It has not been tried yet.';
  if (latestTrial === 'waiting' || latestTrial === 'running') return 'Its trial is still to finish.';
  if (latestTrial === 'failed') return 'Its latest trial failed. A revision is vetted only after its trial passes.';
  if (latestTrial === 'refused')
    return 'Its latest trial could not run. A revision is vetted only after its trial passes.';
  return null;
}

function deskObstacle(who: Who, revision: ReviewFacts): string | null {
  if (!includesRole(who.role, 'maintainer')) return 'Only a maintainer decides on a revision.';
  if (revision.state !== 'in-review') return `This revision is not in review; it is ${revision.state}.`;
  return null;
}

export function signingObstacle(who: Who, revision: ReviewFacts): string | null {
  const obstacle = deskObstacle(who, revision);
  if (obstacle) return obstacle;
  if (who.id === revision.authorId) return 'Authors cannot sign their own revision.';
  if (revision.signerIds.includes(who.id)) return 'You have signed this revision already.';
  return evidenceObstacle(revision);
}

/** The points that are not ticked; a signature needs them all. */
export const untickedPoints = (ticked: readonly string[]): ReviewPoint[] =>
  REVIEW_POINTS.filter((point) => !ticked.includes(point));

/** What the revision itself still lacks, whoever looks at it; null out of review. */
export function bookObstacle(revision: ReviewFacts): string | null {
  if (revision.state !== 'in-review') return null;
  const evidence = evidenceObstacle(revision);
  if (evidence) return evidence;
  const signed = new Set(revision.signerIds.filter((id) => id !== revision.authorId)).size;
  if (signed < revision.signaturesNeeded)
    return `It has ${inWords(signed)} of ${inWords(revision.signaturesNeeded)} signatures of maintainers who are not its author.`;
  return null;
}

export function vettingObstacle(who: Who, revision: ReviewFacts): string | null {
  const obstacle = deskObstacle(who, revision);
  if (obstacle) return obstacle;
  if (who.id === revision.authorId) return 'Authors cannot vet their own revision.';
  return bookObstacle(revision);
}

export function returnObstacle(who: Who, revision: ReviewFacts): string | null {
  const obstacle = deskObstacle(who, revision);
  if (obstacle) return obstacle;
  return who.id === revision.authorId ? 'Authors take their own revision back instead of returning it.' : null;
}

/** Withdrawing says "this is wrong"; its author may do so too, being the first to know. */
export function withdrawalObstacle(who: Who, revision: Pick<ReviewFacts, 'state'>): string | null {
  if (!includesRole(who.role, 'maintainer')) return 'Only a maintainer withdraws a revision.';
  if (revision.state === 'withdrawn') return 'This revision is withdrawn already.';
  if (revision.state !== 'vetted' && revision.state !== 'superseded')
    return `Only what was vetted can be withdrawn; this revision is ${revision.state}.`;
  return null;
}
