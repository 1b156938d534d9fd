import { longDate } from '@/lib/entries/dates';

export interface StandingFacts {
  disabledAt: Date | null;
  hasPassword: boolean;
  /** Until when the latest invitation that was sent can be taken up; null where none is out. */
  invitedUntil: Date | null;
}

/** How an account stands, in words. */
export function standingText({ disabledAt, hasPassword, invitedUntil }: StandingFacts, now: Date): string {
  if (disabledAt) return `closed on ${longDate(disabledAt.toISOString())}`;
  if (hasPassword) return 'open';
  if (!invitedUntil) return 'invited, the letter has not gone out yet';
  const day = longDate(invitedUntil.toISOString());
  return invitedUntil > now ? `invited, until ${day}` : `invited, the link ran out on ${day}`;
}
