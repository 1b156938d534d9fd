import { describe, expect, it } from 'vitest';
import {
  type Account,
  LAST_ADMINISTRATOR,
  closingObstacle,
  openingObstacle,
  roleObstacle,
  secondInvitationObstacle,
} from '@/lib/people/account-rules';
import type { Actor } from '@/lib/people/actor';
import { deviceName } from '@/lib/people/device';
import { passwordObstacle } from '@/lib/people/password-rule';
import { Invitation } from '@/lib/people/person-input';
import { standingText } from '@/lib/people/standing';

const ruth: Actor = { id: 'r', name: 'Ruth', email: 'ruth@example.org', role: 'administrator' };
const tomas: Actor = { ...ruth, id: 't', name: 'Tomas', role: 'maintainer' };
const account = (more: Partial<Account> = {}): Account => ({
  id: 'm',
  name: 'Mirre',
  role: 'reader',
  isClosed: false,
  hasPassword: true,
  administrators: 1,
  ...more,
});

describe('who may change an account', () => {
  it('administrators, and nobody else', () => {
    expect(roleObstacle(ruth, account(), 'maintainer')).toBeNull();
    expect(closingObstacle(ruth, account())).toBeNull();
    expect(openingObstacle(ruth, account({ isClosed: true }))).toBeNull();
    for (const obstacle of [
      roleObstacle(tomas, account(), 'maintainer'),
      closingObstacle(tomas, account()),
      openingObstacle(tomas, account({ isClosed: true })),
      secondInvitationObstacle(tomas, account({ hasPassword: false })),
    ])
      expect(obstacle).toBe('Only an administrator changes accounts.');
  });

  it('the last administrator stays, in role and in the house', () => {
    const last = account({ role: 'administrator' });
    expect(roleObstacle(ruth, last, 'reader')).toBe(LAST_ADMINISTRATOR);
    expect(closingObstacle(ruth, last)).toBe(LAST_ADMINISTRATOR);
    expect(closingObstacle(ruth, { ...last, administrators: 2 })).toBeNull();
    // Invited and never come: nobody loses anything.
    expect(closingObstacle(ruth, { ...last, hasPassword: false })).toBeNull();
  });

  it('an invitation is sent again only to somebody who has not come yet', () => {
    expect(secondInvitationObstacle(ruth, account({ hasPassword: false }))).toBeNull();
    expect(secondInvitationObstacle(ruth, account())).toContain('taken up the invitation already');
    expect(secondInvitationObstacle(ruth, account({ isClosed: true, hasPassword: false }))).toContain('closed');
  });
});

describe('a password', () => {
  const ada = { name: 'Ada Lindqvist', email: 'ada.lindqvist@example.org' };

  it.each(['low water at six', 'ebb and flow', 'żółty kamień nad rzeką', '一二三四五六七八九十百千'])(
    'may be "%s"',
    (password) => expect(passwordObstacle(password, ada)).toBeNull(),
  );

  it.each([
    // password            the sentence
    ['short one', 'This has 9 characters; accepted: at least 12'],
    ['x', 'This has 1 character;'],
    ['', 'This has 0 characters;'],
    ['aaaaaaaaaaaaaaaa', 'repeats the same few characters'],
    ['1212121212121212', 'repeats the same few characters'],
    ['Ada Lindqvist', 'your name or your address'],
    ['ADA.LINDQVIST@example.org', 'your name or your address'],
    ['x1y2z3'.repeat(40), 'at most 200 characters'],
  ])('may not be "%s"', (password, sentence) => expect(passwordObstacle(password, ada)).toContain(sentence));
});

describe('what is said of people', () => {
  const now = new Date('2026-03-11T12:00:00Z');
  it.each([
    [{ disabledAt: null, hasPassword: true, invitedUntil: null }, 'open'],
    [
      { disabledAt: new Date('2026-03-10T12:00:00Z'), hasPassword: true, invitedUntil: null },
      'closed on 10 March 2026',
    ],
    [{ disabledAt: null, hasPassword: false, invitedUntil: null }, 'invited, the letter has not gone out yet'],
    [
      { disabledAt: null, hasPassword: false, invitedUntil: new Date('2026-03-18T12:00:00Z') },
      'invited, until 18 March 2026',
    ],
    [
      { disabledAt: null, hasPassword: false, invitedUntil: new Date('2026-03-09T12:00:00Z') },
      'invited, the link ran out on 9 March 2026',
    ],
  ])('%j is "%s"', (facts, text) => expect(standingText(facts, now)).toBe(text));

  it.each([
    ['Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0', 'Firefox on Linux'],
    [
      'Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/139.0 Safari/537.36 Edg/139.0',
      'Edge on Windows',
    ],
    [
      'Mozilla/5.0 (iPhone; CPU iPhone OS 18_0 like Mac OS X) AppleWebKit/605.1.15 Version/18.0 Mobile/15E148 Safari/604.1',
      'Safari on iOS',
    ],
    [
      'Mozilla/5.0 (Linux; Android 15) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/139.0 Mobile Safari/537.36',
      'Chrome on Android',
    ],
    ['', 'A browser'],
  ])('%s is %s', (userAgent, name) => expect(deviceName(userAgent)).toBe(name));

  it('an invitation takes an address in any capitals, and says of each field what it accepts', () => {
    expect(Invitation.parse({ name: ' Ada ', email: ' ADA@Example.org ', role: 'reader' })).toEqual({
      name: 'Ada',
      email: 'ada@example.org',
      role: 'reader',
    });
    const wrong = Invitation.safeParse({ name: ' ', email: 'ada', role: 'king' });
    expect(wrong.error?.issues.map(({ path: [field], message }) => `${String(field)}: ${message}`)).toEqual([
      'name: accepted: a name such as "Ada Lindqvist"',
      'email: accepted: an e-mail address such as ada@example.org',
      'role: accepted: reader, contributor, maintainer, administrator',
    ]);
    expect(Invitation.safeParse({ name: 'A\nBcc: x', email: 'a@example.org', role: 'reader' }).success).toBe(false);
  });
});
