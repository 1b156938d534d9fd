/** Longer ones are refused before any work: the cost of hashing would grow with the length. */
export const PASSWORD_LENGTH = { min: 12, max: 200 } as const;
const DISTINCT_LEAST = 5;

/**
 * Why a text cannot be the password of this person; null where it can. Length is what counts (NIST SP 800-63B,
 * section 5.1.1.2, asks for no mixture of signs); what is left out is what anyone would try first.
 */
export function passwordObstacle(password: string, { name, email }: { name: string; email: string }): string | null {
  const length = [...password].length;
  if (length < PASSWORD_LENGTH.min)
    return `This has ${length} ${length === 1 ? 'character' : 'characters'}; accepted: at least ${PASSWORD_LENGTH.min}. A few words in a row do well.`;
  if (password.length > PASSWORD_LENGTH.max) return `Accepted: at most ${PASSWORD_LENGTH.max} characters.`;
  if (new Set(password.toLowerCase()).size < DISTINCT_LEAST)
    return `This repeats the same few characters; accepted: at least ${DISTINCT_LEAST} different ones.`;
  const bare = (text: string) => text.toLowerCase().replace(/[^\p{L}\p{N}]/gu, '');
  if ([bare(name), bare(email), bare(email.split('@')[0] ?? '')].includes(bare(password)))
    return 'This is your name or your address, which anyone would try; choose something else.';
  return null;
}
