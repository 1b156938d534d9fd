import type { Role } from './role';

/** Who is asking, read from the database at each request. */
export interface Actor {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly role: Role;
}
