/** The three decisions as they stand for one reader: what each does, who hears of it, and what forbids it. */
import type { Actor } from '@/lib/people/actor';
import { returnObstacle, signingObstacle, withdrawalObstacle } from '@/lib/reviews/review-rules';
import { stampOf } from '@/lib/reviews/review-stamp';
import type { Choice, Offer } from './decision-form';
import type { Review } from './read-review';

export function offersOf(actor: Actor, given: Review): Record<Choice, Offer> {
  const { revision, review, reviewWas, codes, signaturesNeeded } = given;
  const seen = stampOf(review);
  const isLast = review.signerIds.length + 1 >= signaturesNeeded;
  const inForce = reviewWas?.state === 'vetted' ? reviewWas : null;
  // In review, what can be withdrawn is the revision that is in force meanwhile.
  const target = review.state === 'vetted' || review.state === 'superseded' ? review : (inForce ?? review);
  const tellsCodes =
    codes.length > 0 ? `Tells those who use it in ${codes.join(', ')}.` : 'No code has recorded its use.';
  return {
    vet: {
      revisionId: revision.id,
      seen,
      says: isLast
        ? `Readings and trials are right. Signs revision ${revision.number} and puts it in force.`
        : `Readings and trials are right. Signs revision ${revision.number}; more must sign.`,
      obstacle: signingObstacle(actor, review),
      button: isLast ? 'Sign and vet' : 'Sign',
      tells: isLast ? `Tells its author. ${inForce ? tellsCodes : ''}`.trim() : '',
    },
    return: {
      revisionId: revision.id,
      seen,
      says: `Say what must change. ${inForce ? `Revision ${inForce.number} stays in force.` : 'Nothing comes into force.'}`,
      obstacle: returnObstacle(actor, review),
      button: 'Return to its author',
      tells: 'Tells its author.',
    },
    withdraw: {
      revisionId: target.id,
      seen: stampOf(target),
      says: `Revision ${target.number} should not be used. Adopters are told at once.`,
      obstacle: withdrawalObstacle(actor, target),
      button: `Withdraw revision ${target.number}`,
      tells: tellsCodes,
    },
  };
}
