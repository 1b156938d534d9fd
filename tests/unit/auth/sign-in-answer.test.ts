import { describe, expect, it } from 'vitest';
import { type SignInFailure, signInCode, signInSentence } from '@/lib/auth/sign-in-answer';

describe('what the sign-in page says', () => {
  it.each<[SignInFailure, string]>([
    [{ kind: 'no-match', triesLeft: 12 }, 'That e-mail address and password do not match. 12 tries are left.'],
    [{ kind: 'no-match', triesLeft: 3 }, 'That e-mail address and password do not match. Three tries are left.'],
    [{ kind: 'no-match', triesLeft: 1 }, 'That e-mail address and password do not match. One try is left.'],
    [{ kind: 'no-match', triesLeft: 0 }, 'That e-mail address and password do not match. No tries are left.'],
    [{ kind: 'too-many', waitSeconds: 895 }, 'Too many tries. Wait 15 minutes, then try again.'],
    [{ kind: 'too-many', waitSeconds: 2 }, 'Too many tries. Wait a minute, then try again.'],
    [{ kind: 'closed' }, 'This account is closed. An administrator can open it again.'],
    [{ kind: 'away' }, 'The database does not answer just now. Try again in a moment.'],
  ])('for %j', (failure, sentence) => {
    const code = signInCode(failure);
    expect(code).toMatch(/^[a-z0-9-]+$/);
    expect(signInSentence(code)).toBe(sentence);
  });

  it.each(['CredentialsSignin', '', 'Your account is hacked, call 555', 'no-match-', 'no-match-99999', '<b>'])(
    'never repeats text from the address: "%s"',
    (code) => expect(signInSentence(code)).toBe('Signing in did not work. Try again.'),
  );
});
