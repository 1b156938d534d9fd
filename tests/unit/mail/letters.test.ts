import { readdirSync } from 'node:fs';
import path from 'node:path';
import { describe, expect, it } from 'vitest';
import { composeDailyLetter, composeLetter } from '@/lib/mail/compose-letter';
import { LETTER_KINDS, type LetterKind, goesOutAtOnce } from '@/lib/mail/letter';
import { LETTER_SHAPES, letterContent } from '@/lib/mail/letter-content';
import { escapeHtml } from '@/lib/mail/letter-text';
import { TRIES_MOST, pauseAfter } from '@/lib/mail/retry';
import { fromOf, senderOf } from '@/lib/mail/sender';

const SENDER = { origin: 'https://book.example.org', office: 'Brackwater Modelling Office' };
const SECRET = 'a'.repeat(43);
const REVISION = { revisionId: '5b7f3a52-6a3e-4d8e-9b1e-2f6f6c1d0a11', slug: 'leapfrog', number: 2, title: 'Leapfrog' };
const DECISION = { ...REVISION, sentence: 'The bound is that of the source.' };
const PAYLOADS: readonly (readonly [LetterKind, Record<string, unknown>, subject: string, link: string])[] = [
  [
    'submitted',
    { ...REVISION, author: 'Sanna Varga' },
    'To review: Leapfrog, revision 2',
    `/reviews/${REVISION.revisionId}`,
  ],
  ['returned', DECISION, 'Returned: Leapfrog, revision 2', `/drafts/${REVISION.revisionId}`],
  ['vetted', DECISION, 'Vetted: Leapfrog, revision 2', '/sheets/leapfrog/2'],
  [
    'remark',
    { ...REVISION, author: 'Ilse Quist', part: 'bound', text: 'Why open?' },
    'Remark on Leapfrog, revision 2',
    '/sheets/leapfrog/2#remarks',
  ],
  [
    'recall',
    { ...DECISION, kind: 'superseded', replacedByNumber: 3, codes: ['Skerry', 'Saltings', 'Skerry'] },
    'Recall: Leapfrog, revision 2 is superseded',
    '/sheets/leapfrog/3',
  ],
  [
    'recall',
    { ...DECISION, kind: 'withdrawn', useInstead: 'box', codes: ['Saltings'] },
    'Recall: Leapfrog, revision 2 is withdrawn',
    '/sheets/box',
  ],
  [
    'recall',
    { ...DECISION, kind: 'withdrawn', useInstead: null, codes: [] },
    'Recall: Leapfrog, revision 2 is withdrawn',
    '/sheets/leapfrog/2',
  ],
  [
    'invitation',
    { by: 'Ruth Halloran', role: 'administrator' },
    'Ruth Halloran invites you to the Levelbook of Brackwater Modelling Office',
    `/invitation/${SECRET}`,
  ],
  ['password-reset', {}, 'A new password for Levelbook', `/reset/${SECRET}`],
];

describe('the letters of the house', () => {
  it.each(PAYLOADS)(
    'a letter of kind %s with %j has its subject and its link in both forms',
    (kind, payload, subject, link) => {
      const letter = composeLetter({ kind, payload }, 'Mirre Okafor', SENDER, SECRET);
      expect(letter.subject).toBe(subject);
      expect(letter.text).toContain(`https://book.example.org${link}`);
      expect(letter.html).toContain(`href="https://book.example.org${link}"`);
      for (const form of [letter.text, letter.html]) {
        expect(form).toContain('Mirre Okafor,');
        expect(form).toContain('Levelbook of Brackwater Modelling Office');
        expect(form).toContain('https://book.example.org/profile');
        expect(form).not.toMatch(/\{\{|undefined|\[object/);
      }
    },
  );

  it('there is one for every kind', () => {
    expect(new Set(PAYLOADS.map(([kind]) => kind))).toEqual(new Set(LETTER_KINDS));
  });

  it('every template is one that is used, in both forms', () => {
    const files = readdirSync(path.resolve('templates/mail')).sort();
    expect(files).toEqual(
      [...LETTER_SHAPES, 'frame', 'daily'].flatMap((name) => [`${name}.html`, `${name}.txt`]).sort(),
    );
  });

  it('names each code of the reader once', () => {
    const [, payload] = PAYLOADS[4]!;
    expect(composeLetter({ kind: 'recall', payload }, 'Jonas Feld', SENDER).text).toContain(
      'which Saltings, Skerry uses',
    );
  });

  it('what people typed is text in HTML, whatever it looks like', () => {
    const sentence = '<script>alert(1)</script> & "1 < 2"\nsecond line {{office}}';
    const letter = composeLetter(
      { kind: 'returned', payload: { ...DECISION, title: '<b>T</b>', sentence } },
      '<i>Eve</i>',
      SENDER,
    );
    expect(letter.html).not.toMatch(/<script|<i>|<b>T/);
    expect(letter.html).toContain(
      '&lt;script&gt;alert(1)&lt;/script&gt; &amp; &quot;1 &lt; 2&quot;<br>second line {{office}}',
    );
    expect(letter.text).toContain(sentence.split('\n')[0]);
  });

  it('a title with line breaks adds no line to the head of a letter', () => {
    const title = 'Box\r\nBcc: everyone@example.org';
    const { subject } = composeLetter({ kind: 'vetted', payload: { ...DECISION, title } }, 'Jonas Feld', SENDER);
    expect(subject).toBe('Vetted: Box Bcc: everyone@example.org, revision 2');
  });

  it('lines of plain text keep within 78 characters, but for addresses, which stay whole', () => {
    const sentence = 'The start-up step of the second revision is first order only. '.repeat(6).trim();
    const { text } = composeLetter({ kind: 'returned', payload: { ...DECISION, sentence } }, 'Jonas Feld', SENDER);
    for (const line of text.split('\n')) if (!line.includes('https://')) expect(line.length).toBeLessThanOrEqual(78);
  });

  it('a payload of another kind is refused, as is a link without its secret', () => {
    expect(() => letterContent('vetted', { title: 'x' }, SENDER)).toThrow();
    expect(() => letterContent('invitation', { by: 'R', role: 'reader' }, SENDER)).toThrow('needs a secret');
  });

  it('a daily letter has all of them in the order they were written, and counts them', () => {
    const contents = PAYLOADS.slice(0, 3).map(([kind, payload]) => letterContent(kind, payload, SENDER));
    const letter = composeDailyLetter(contents, 'Jonas Feld', SENDER);
    expect(letter.subject).toBe('3 letters of the day in one');
    const places = ['has submitted', 'comes back', 'is vetted'].map((words) => letter.text.indexOf(words));
    expect(places.every((place) => place > 0)).toBe(true);
    expect(places).toEqual([...places].sort((a, b) => a - b));
    expect(composeDailyLetter(contents.slice(0, 1), 'Jonas Feld', SENDER).subject).toBe(
      'To review: Leapfrog, revision 2',
    );
  });

  it('recalls, invitations and new passwords ask nobody’s wish', () => {
    expect(LETTER_KINDS.filter(goesOutAtOnce)).toEqual(['recall', 'invitation', 'password-reset']);
  });
});

describe('small things about letters', () => {
  it('the pauses between tries grow, and end', () => {
    const pauses = Array.from({ length: TRIES_MOST - 1 }, (_, k) => pauseAfter(k + 1)!);
    expect(pauses).toEqual([...pauses].sort((a, b) => a - b));
    expect(pauses.reduce((sum, pause) => sum + pause, 0)).toBeGreaterThan(2 * 24 * 3600);
    expect(pauseAfter(TRIES_MOST)).toBeNull();
  });

  it('the sender is the setting, or an address of the site', () => {
    const NEXTAUTH_URL = 'https://book.example.org/';
    expect(senderOf({ NEXTAUTH_URL, LEVELBOOK_OFFICE: undefined })).toEqual({
      origin: 'https://book.example.org',
      office: null,
    });
    expect(fromOf({ NEXTAUTH_URL, MAIL_FROM: undefined })).toBe('Levelbook <levelbook@book.example.org>');
    expect(fromOf({ NEXTAUTH_URL, MAIL_FROM: 'The book <b@example.org>' })).toBe('The book <b@example.org>');
  });

  it('every sign with a meaning in HTML is escaped', () => {
    expect(escapeHtml(`<a href="x" b='y'>&</a>`)).toBe('&lt;a href=&quot;x&quot; b=&#39;y&#39;&gt;&amp;&lt;/a&gt;');
  });
});
