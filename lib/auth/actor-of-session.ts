import type { Actor } from '@/lib/people/actor';
import type { Role } from '@/lib/people/role';

/** What a session carries, and nothing more: the rest is read from the database at each request. */
export interface SessionClaim {
  personId: string;
  sessionVersion: number;
  /** Row of the session, by which it can be ended; absent before the row is made. */
  sessionId?: string;
}

export interface SessionPerson {
  id: string;
  name: string;
  email: string;
  role: Role;
  sessionVersion: number;
  disabledAt: Date | null;
  demo: boolean;
}

/**
 * Who a session stands for, as the database says now; null where it no longer stands for anyone: signed out
 * everywhere, closed, or a demo account on a site that is not in demo mode.
 */
export function actorOfSession(claim: SessionClaim, person: SessionPerson | null, demoMode: boolean): Actor | null {
  if (!person || person.id !== claim.personId || person.sessionVersion !== claim.sessionVersion) return null;
  if (person.disabledAt !== null || (person.demo && !demoMode)) return null;
  return { id: person.id, name: person.name, email: person.email, role: person.role };
}
