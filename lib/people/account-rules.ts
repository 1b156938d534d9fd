/** Who may change an account, and why not. The button shows the sentence, the use case refuses with it. */
import type { Actor } from './actor';
import { type Role, includesRole } from './role';

export interface Account {
  id: string;
  name: string;
  role: Role;
  isClosed: boolean;
  hasPassword: boolean;
  /** Administrators with a password and an open account, this one among them where it is one. */
  administrators: number;
}

export const LAST_ADMINISTRATOR = 'This is the last administrator; make somebody else one first.';

export const administrationObstacle = (actor: Actor): string | null =>
  includesRole(actor.role, 'administrator') ? null : 'Only an administrator changes accounts.';

const isLast = ({ role, isClosed, hasPassword, administrators }: Account) =>
  role === 'administrator' && !isClosed && hasPassword && administrators <= 1;

export function roleObstacle(actor: Actor, account: Account, to: Role): string | null {
  const obstacle = administrationObstacle(actor);
  if (obstacle) return obstacle;
  if (account.role === to) return `${account.name} has this role already.`;
  return isLast(account) ? LAST_ADMINISTRATOR : null;
}

export function closingObstacle(actor: Actor, account: Account): string | null {
  const obstacle = administrationObstacle(actor);
  if (obstacle) return obstacle;
  if (account.isClosed) return 'This account is closed already.';
  return isLast(account) ? LAST_ADMINISTRATOR : null;
}

export function openingObstacle(actor: Actor, account: Account): string | null {
  return administrationObstacle(actor) ?? (account.isClosed ? null : 'This account is open already.');
}

export function secondInvitationObstacle(actor: Actor, account: Account): string | null {
  const obstacle = administrationObstacle(actor);
  if (obstacle) return obstacle;
  if (account.isClosed) return 'This account is closed; open it first.';
  return account.hasPassword ? `${account.name} has taken up the invitation already.` : null;
}
