import 'server-only';
import { PASSWORD_LENGTH } from '@/lib/people/password-rule';
import { type Options, hash, verify } from '@node-rs/argon2';

// argon2id with 19 MiB, two passes, one lane: OWASP's password storage cheat sheet, first recommendation.
// The package's enum of algorithms exists only for its types; 2 is argon2id.
const COST: Options = { algorithm: 2, memoryCost: 19_456, timeCost: 2, parallelism: 1 };

export const hashPassword = (password: string) => hash(password, COST);

let decoy: Promise<string> | undefined;

/**
 * Whether the password belongs to the hash. Without a hash (no such person, or no password set) it does the
 * same work on a decoy and says no, so that the time of an answer does not tell which addresses have accounts.
 */
export async function verifyPassword(passwordHash: string | null, password: string): Promise<boolean> {
  if (password.length > PASSWORD_LENGTH.max) return false;
  decoy ??= hashPassword('nobody has this password');
  const matches = await verify(passwordHash ?? (await decoy), password);
  return passwordHash !== null && matches;
}
