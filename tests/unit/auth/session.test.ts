import { describe, expect, it } from 'vitest';
import { type SessionPerson, actorOfSession } from '@/lib/auth/actor-of-session';
import { safeCallbackUrl } from '@/lib/auth/callback-url';
import { networkAddress } from '@/lib/auth/network-address';

const person: SessionPerson = {
  id: 'p',
  name: 'Ada Lindqvist',
  email: 'ada@example.org',
  role: 'maintainer',
  sessionVersion: 3,
  disabledAt: null,
  demo: false,
};
const claim = { personId: 'p', sessionVersion: 3 };

describe('who a session stands for', () => {
  it('is the person with the role of now, and nothing that the page should not know', () => {
    expect(actorOfSession(claim, person, false)).toEqual({
      id: 'p',
      name: 'Ada Lindqvist',
      email: 'ada@example.org',
      role: 'maintainer',
    });
  });

  it.each<[string, SessionPerson | null]>([
    ['the person is gone', null],
    ['the session is older than the last sign-out everywhere', { ...person, sessionVersion: 4 }],
    ['the account is closed', { ...person, disabledAt: new Date() }],
    ['it is a demo account outside demo mode', { ...person, demo: true }],
    ['another person was found', { ...person, id: 'q' }],
  ])('is nobody where %s', (_, found) => {
    expect(actorOfSession(claim, found, false)).toBeNull();
  });

  it('is a demo account in demo mode', () => {
    expect(actorOfSession(claim, { ...person, demo: true }, true)).not.toBeNull();
  });
});

describe('where to go after signing in', () => {
  it.each(['/sheets/leapfrog-central-2', '/?equation=advection&q=leap%20frog', '/sheets/x#bound', '/sign-information'])(
    'follows %s',
    (wish) => expect(safeCallbackUrl(wish)).toBe(wish),
  );

  it.each([
    'https://elsewhere.example',
    '//elsewhere.example',
    '/\\elsewhere.example',
    '\\/elsewhere.example',
    '/\t/elsewhere.example',
    '/\n/elsewhere.example',
    'javascript:alert(1)',
    'sheets/relative',
    '',
    null,
    undefined,
    `/${'x'.repeat(600)}`,
    // A loop.
    '/sign-in',
    '/sign-in?callbackUrl=/sign-in',
  ])('goes to the catalog instead of %j', (wish) => expect(safeCallbackUrl(wish)).toBe('/'));
});

describe('the network address of a request', () => {
  it.each([
    ['203.0.113.9', '203.0.113.9'],
    // The first is the client's own word; the last was written by our proxy.
    ['10.0.0.1, 198.51.100.2, 203.0.113.9', '203.0.113.9'],
    ['2001:db8::1', '2001:db8::1'],
  ])('of X-Forwarded-For "%s" is %s', (header, address) => {
    expect(networkAddress(new Headers({ 'x-forwarded-for': header }))).toBe(address);
  });

  it('is "unknown" without the header, and never long', () => {
    expect(networkAddress(new Headers())).toBe('unknown');
    expect(networkAddress(new Headers({ 'x-forwarded-for': 'x'.repeat(900) })).length).toBe(64);
  });
});
