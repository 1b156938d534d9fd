import { describe, expect, it } from 'vitest';
import type { RevisionState } from '@/lib/entries/revision-state';
import { decisionSentence } from '@/lib/reviews/decision-sentence';
import { REVIEW_POINTS } from '@/lib/reviews/review-list';
import {
  type ReviewFacts,
  bookObstacle,
  editingObstacle,
  missingForSubmission,
  returnObstacle,
  signingObstacle,
  submissionObstacle,
  untickedPoints,
  vettingObstacle,
  withdrawalObstacle,
} from '@/lib/reviews/review-rules';

const author = { id: 'author', role: 'contributor' } as const;
const maintainer = { id: 'maintainer', role: 'maintainer' } as const;

/** In review, tried, signed by two. */
const ready = (more: Partial<ReviewFacts> = {}): ReviewFacts => ({
  state: 'in-review',
  authorId: 'author',
  title: 'Leapfrog',
  verdict: 'facts',
  referenceCount: 1,
  notes: '',
  latestTrial: 'passed',
  signerIds: ['first', 'second'],
  signaturesNeeded: 2,
  ...more,
});

describe('vetting', () => {
  it('stands open to a maintainer where evidence and signatures are there', () => {
    expect(vettingObstacle(maintainer, ready())).toBeNull();
    expect(vettingObstacle({ id: 'a', role: 'administrator' }, ready())).toBeNull();
  });

  it('does not let authors vet their own revision, even as maintainers', () => {
    const own = ready({ authorId: maintainer.id });
    expect(vettingObstacle(maintainer, own)).toBe('Authors cannot vet their own revision.');
  });

  it.each(['reader', 'contributor'] as const)('is not for the role %s', (role) => {
    expect(vettingObstacle({ id: 'x', role }, ready())).toBe('Only a maintainer decides on a revision.');
  });

  it.each([
    // trial     what it says
    [null, 'It has not been tried yet.'],
    ['waiting', 'Its trial is still to finish.'],
    ['running', 'Its trial is still to finish.'],
    ['failed', 'Its latest trial failed. A revision is vetted only after its trial passes.'],
    ['refused', 'Its latest trial could not run. A revision is vetted only after its trial passes.'],
  ] as const)('waits where the latest trial is %s', (latestTrial, sentence) => {
    expect(vettingObstacle(maintainer, ready({ latestTrial }))).toBe(sentence);
    expect(signingObstacle(maintainer, ready({ latestTrial }))).toBe(sentence);
  });

  it.each([
    [[], 2, 'It has none of two signatures'],
    [['first'], 2, 'It has one of two signatures'],
    [['first', 'second'], 3, 'It has two of three signatures'],
    // The author's does not count, nor one person twice.
    [['first', 'author'], 2, 'It has one of two signatures'],
    [['first', 'first'], 2, 'It has one of two signatures'],
  ] as const)('with the signatures of %j waits for %i', (signerIds, signaturesNeeded, sentence) => {
    expect(bookObstacle(ready({ signerIds: [...signerIds], signaturesNeeded }))).toContain(sentence);
  });

  it('says nothing of revisions that are not in review', () => {
    expect(bookObstacle(ready({ state: 'vetted', signerIds: [] }))).toBeNull();
    expect(vettingObstacle(maintainer, ready({ state: 'vetted' }))).toBe(
      'This revision is not in review; it is vetted.',
    );
  });
});

describe('signing', () => {
  it('is open to maintainers who neither wrote nor signed it', () => {
    expect(signingObstacle(maintainer, ready())).toBeNull();
    expect(signingObstacle({ ...maintainer, id: 'author' }, ready())).toBe('Authors cannot sign their own revision.');
    expect(signingObstacle({ ...maintainer, id: 'first' }, ready())).toBe('You have signed this revision already.');
    expect(signingObstacle(author, ready())).toBe('Only a maintainer decides on a revision.');
  });

  it('needs every point of the review list', () => {
    expect(untickedPoints([])).toEqual([...REVIEW_POINTS]);
    expect(untickedPoints(['facts', 'naming', 'definition', 'start-up'])).toEqual([]);
    expect(untickedPoints(['facts', 'anything else'])).toEqual(['definition', 'start-up', 'naming']);
  });

  it('needs a sentence of a length that can be read', () => {
    expect(decisionSentence('  Right. ')).toBe('Right.');
    expect(() => decisionSentence(' \n ')).toThrow('A decision needs a sentence');
    expect(() => decisionSentence('x'.repeat(1001))).toThrow('at most 1000 characters');
  });
});

describe('submitting', () => {
  it('lists everything that is missing', () => {
    const bare = ready({ state: 'draft', title: ' ', verdict: 'invalid', referenceCount: 0 });
    expect(missingForSubmission(bare)).toEqual([
      'The definition has errors.',
      'It has no title.',
      'It needs a reference or a note with its derivation.',
    ]);
    expect(missingForSubmission({ ...bare, verdict: 'inconsistent' })[0]).toBe(
      'The definition does not approximate its equation.',
    );
  });

  it('takes a derivation for a reference', () => {
    expect(submissionObstacle(author, ready({ state: 'draft', referenceCount: 0, notes: 'By Taylor.' }))).toBeNull();
  });

  it.each<[RevisionState, string | null]>([
    ['draft', null],
    ['returned', null],
    ['in-review', 'This revision has already been submitted.'],
    ['vetted', 'A revision that is vetted cannot be submitted.'],
    ['withdrawn', 'A revision that is withdrawn cannot be submitted.'],
  ])('from %s gives %s', (state, sentence) => {
    expect(submissionObstacle(author, ready({ state }))).toBe(sentence);
    expect(submissionObstacle(maintainer, ready({ state }))).toBe('Only the author submits a revision.');
  });
});

describe('editing, returning, withdrawing', () => {
  it('lets the author change drafts and what was returned', () => {
    expect(editingObstacle(author, ready({ state: 'draft' }))).toBeNull();
    expect(editingObstacle(author, ready({ state: 'returned' }))).toBeNull();
    expect(editingObstacle(author, ready())).toBe('This revision is in review. Take it back to change it.');
    expect(editingObstacle(author, ready({ state: 'vetted' }))).toContain('A correction is a new revision.');
    expect(editingObstacle(maintainer, ready({ state: 'draft' }))).toBe(
      'Only the author changes the text of a revision.',
    );
  });

  it('returns only what is in review, and nothing to oneself', () => {
    expect(returnObstacle(maintainer, ready({ latestTrial: 'failed', signerIds: [] }))).toBeNull();
    expect(returnObstacle(maintainer, ready({ state: 'draft' }))).toContain('is not in review');
    expect(returnObstacle(maintainer, ready({ authorId: maintainer.id }))).toContain('take their own revision back');
  });

  it.each<[RevisionState, boolean]>([
    ['draft', false],
    ['in-review', false],
    ['returned', false],
    ['vetted', true],
    ['superseded', true],
    ['withdrawn', false],
  ])('withdraws what is %s: %s', (state, allowed) => {
    expect(withdrawalObstacle(maintainer, { state }) === null).toBe(allowed);
    expect(withdrawalObstacle(author, { state })).toBe('Only a maintainer withdraws a revision.');
  });
});
