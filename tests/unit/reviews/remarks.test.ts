import { describe, expect, it } from 'vitest';
import { type DeskItem, daysText, waitsFor } from '@/lib/reviews/desk-item';
import { type Remark, lineNow, threadsOf } from '@/lib/reviews/remark';
import { partsToRemarkOn, remarkPlace } from '@/lib/reviews/remark-part';
import { lineObstacle, partObstacle, settlingObstacle } from '@/lib/reviews/remark-rules';
import { changeSince, stampOf } from '@/lib/reviews/review-stamp';

const aRemark = (id: string, more: Partial<Remark> = {}): Remark => ({
  id,
  authorId: 'p1',
  author: 'Ilse',
  role: 'maintainer',
  at: '2026-12-01T09:00:00.000Z',
  answersId: null,
  part: 'kernel',
  language: null,
  line: null,
  quote: null,
  version: 1,
  text: 'Why?',
  settledAt: null,
  settledBy: null,
  ...more,
});

describe('threads', () => {
  it('put answers under the remark they answer, in their order', () => {
    const threads = threadsOf([
      aRemark('a'),
      aRemark('b'),
      aRemark('c', { answersId: 'a' }),
      aRemark('d', { answersId: 'a' }),
    ]);
    expect(threads.map(({ id, answers }) => [id, answers.map((one) => one.id)])).toEqual([
      ['a', ['c', 'd']],
      ['b', []],
    ]);
  });
});

describe('a remark on a line of a kernel', () => {
  const lines = ['{', '  w[i] -= c;', '}', '  w[i] -= c;'];

  it('moves with its words when lines before it come or go', () => {
    expect(lineNow({ line: 4, quote: '  w[i] -= c;' }, lines)).toBe(4);
    expect(lineNow({ line: 1, quote: 'w[i] -= c;' }, lines)).toBe(2);
  });

  it('has no place any more when its words are gone', () => {
    expect(lineNow({ line: 2, quote: '  w[i] = v[i] - c;' }, lines)).toBeNull();
    expect(lineNow({ line: null, quote: null }, lines)).toBeNull();
  });

  it('is refused where the line is gone, or is no longer what was read, and its words are kept', () => {
    expect(lineObstacle(lines, 9, '}')).toBe(
      'The kernel has 4 lines now; line 9 is gone. Your words are kept; choose another line.',
    );
    expect(lineObstacle(lines, 2, '  w[i] += c;')).toContain('Line 2 has changed while you were reading.');
    expect(lineObstacle(lines, 2, 'w[i] -= c;  ')).toBeNull();
  });
});

describe('parts', () => {
  it('are those of the sheet: only schemes have a bound, and nothing is computed without facts', () => {
    expect(partsToRemarkOn('scheme', true)).toContain('bound');
    expect(partsToRemarkOn('stencil', true)).not.toContain('bound');
    expect(partsToRemarkOn('scheme', false)).not.toContain('kernel');
    expect(partObstacle('kernel', { kind: 'scheme', hasFacts: false })).toContain('no part "kernel" now');
    expect(partObstacle('notes', { kind: 'scheme', hasFacts: false })).toBeNull();
  });

  it('are named as people say them', () => {
    expect(remarkPlace('kernel', 4)).toBe('kernel, line 4');
    expect(remarkPlace('something of long ago', null)).toBe('something of long ago');
  });
});

describe('settling', () => {
  const thread = { remarkAuthorId: 'asks', revisionAuthorId: 'wrote' };

  it.each([
    ['who asked', { id: 'asks', role: 'reader' }],
    ['who wrote the revision', { id: 'wrote', role: 'contributor' }],
    ['a maintainer', { id: 'else', role: 'maintainer' }],
  ] as const)('is open to %s', (_who, who) => {
    expect(settlingObstacle(who, thread)).toBeNull();
  });

  it('is closed to others', () => {
    expect(settlingObstacle({ id: 'else', role: 'contributor' }, thread)).toContain('A remark is settled by');
  });
});

describe('what a reader has seen', () => {
  const seen = { state: 'in-review', version: 3, signerIds: ['a'] } as const;

  it('stands as long as state, text and signatures do', () => {
    expect(changeSince(stampOf(seen), { ...seen })).toBeNull();
  });

  it.each([
    [{ state: 'returned' } as const, 'it has been returned to its author'],
    [{ state: 'vetted' } as const, 'it has been vetted'],
    [{ version: 4, signerIds: [] }, 'its author has changed the text'],
    [{ signerIds: ['a', 'b'] }, 'somebody else has signed it'],
  ])('is told from what is there now: %o', (change, what) => {
    const sentence = changeSince(stampOf(seen), { ...seen, ...change });
    expect(sentence).toContain('This changed while you were reading');
    expect(sentence).toContain(what);
  });

  it('is never taken for the present where the stamp is nonsense', () => {
    expect(changeSince('', { ...seen })).not.toBeNull();
  });
});

describe('the queue', () => {
  const item: DeskItem = {
    id: 'r',
    callNumber: 'AD 004',
    number: 4,
    title: 'Leapfrog',
    state: 'in-review',
    since: '2026-11-28T09:00:00.000Z',
    authorId: 'wrote',
    author: 'Sanna',
    signers: [],
    signaturesNeeded: 2,
    latestTrial: 'passed',
    openRemarks: 0,
  };

  it.each([
    ['2026-11-28T23:00:00.000Z', 'today'],
    ['2026-11-29T10:00:00.000Z', '1 day'],
    ['2026-12-07T09:00:00.000Z', '9 days'],
  ])('counts whole days up to %s: %s', (now, text) => {
    expect(daysText(item.since, new Date(now))).toBe(text);
  });

  it.each([
    [{}, 'me', 'waits for you and 1 more'],
    [{ signers: [{ id: 'a', name: 'Ilse' }] }, 'me', 'waits for you or one more maintainer'],
    [{ signers: [{ id: 'me', name: 'I' }] }, 'me', 'waits for another maintainer'],
    [{}, 'wrote', 'waits for 2 maintainers'],
    [{ latestTrial: 'running' as const }, 'me', 'waits for its trial to end'],
    [{ latestTrial: null }, 'me', 'waits for a trial'],
    [{ latestTrial: 'failed' as const }, 'me', 'waits for its author: the trial did not pass'],
    [{ state: 'returned' as const }, 'me', 'returned to Sanna'],
    [{ state: 'returned' as const }, 'wrote', 'returned to you'],
  ])('says for whom it waits: %o', (more, viewer, text) => {
    expect(waitsFor({ ...item, ...more }, viewer)).toBe(text);
  });
});
