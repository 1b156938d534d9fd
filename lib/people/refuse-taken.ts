import 'server-only';
import { brokenRule } from '@/db/errors';
import { Refusal } from '@/lib/refusal';
import { LAST_ADMINISTRATOR } from './account-rules';

/** Runs `work`, and refuses with a sentence where it broke a rule of the database about people. */
export async function refuseTaken<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work();
  } catch (error) {
    switch (brokenRule(error)) {
      case 'one_account_per_email':
        throw new Refusal('conflict', 'There is an account with this address already.', {
          email: 'accepted: an address that has no account yet',
        });
      case 'an_administrator_stays':
        throw new Refusal('conflict', LAST_ADMINISTRATOR);
      default:
        throw error;
    }
  }
}
