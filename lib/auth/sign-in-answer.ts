/**
 * What the sign-in page says. Only a code travels in the address, never a sentence: otherwise anyone could
 * send a link that makes our page say what they like.
 */
export type SignInFailure =
  | { kind: 'no-match'; triesLeft: number }
  | { kind: 'too-many'; waitSeconds: number }
  | { kind: 'closed' }
  | { kind: 'away' };

export const signInCode = (failure: SignInFailure): string => {
  if (failure.kind === 'no-match') return `no-match-${failure.triesLeft}`;
  if (failure.kind === 'too-many') return `too-many-${failure.waitSeconds}`;
  return failure.kind;
};

const NUMBERS = ['No tries are', 'One try is', 'Two tries are', 'Three tries are', 'Four tries are'];

/** The sentence for a code of `signInCode`; any other text, next-auth's own codes too, gives a general one. */
export function signInSentence(code: string): string {
  const [, kind, figure] = /^(no-match|too-many)-(\d{1,4})$/.exec(code) ?? [];
  const count = Number(figure);
  if (kind === 'no-match') {
    const left = count < NUMBERS.length ? `${NUMBERS[count]} left.` : `${count} tries are left.`;
    return `That e-mail address and password do not match. ${left}`;
  }
  if (kind === 'too-many') {
    const minutes = Math.max(1, Math.ceil(count / 60));
    return `Too many tries. Wait ${minutes === 1 ? 'a minute' : `${minutes} minutes`}, then try again.`;
  }
  if (code === 'closed') return 'This account is closed. An administrator can open it again.';
  if (code === 'away') return 'The database does not answer just now. Try again in a moment.';
  return 'Signing in did not work. Try again.';
}
