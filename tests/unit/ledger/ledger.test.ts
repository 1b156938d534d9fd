import { describe, expect, it } from 'vitest';
import { csvLine } from '@/lib/ledger/csv-line';
import { EVENT_KINDS } from '@/lib/ledger/event';
import { eventDetail, eventWords, ownEventWords } from '@/lib/ledger/event-words';
import { ledgerQuery, readLedgerFilter } from '@/lib/ledger/ledger-filter';

describe('a line of CSV', () => {
  it.each([
    // cell                        what is written
    ['plain', 'plain'],
    ['with, comma', '"with, comma"'],
    ['says "no"', '"says ""no"""'],
    ['two\nlines', '"two\nlines"'],
    // Formulas: OWASP, "CSV Injection".
    ['=1+1', "'=1+1"],
    ['=HYPERLINK("http://x","y")', `"'=HYPERLINK(""http://x"",""y"")"`],
    ['+49 1', "'+49 1"],
    ['-1/12', "'-1/12"],
    ['@SUM(A1)', "'@SUM(A1)"],
    ['\t=1', "'\t=1"],
    ['\r=1', `"'\r=1"`],
    ['', ''],
  ])('writes %j as %j', (cell, written) => expect(csvLine([cell, 'x'])).toBe(`${written},x\r\n`));
});

describe('conditions on the ledger', () => {
  const read = (query: Record<string, string>) => readLedgerFilter((name) => query[name]);

  it('live in the address: what is read is written again', () => {
    const query = {
      who: '5b7f3a52-6a3e-4d8e-9b1e-2f6f6c1d0a11',
      what: 'revision.vetted',
      about: 'leapfrog',
      why: 'start-up',
      from: '2026-03-01',
      to: '2026-03-11',
      before: '71',
    };
    const { filter, problems } = read(query);
    expect(problems).toEqual([]);
    expect(Object.fromEntries(new URLSearchParams(ledgerQuery(filter)))).toEqual(query);
    expect(ledgerQuery(filter, { before: null })).not.toContain('before');
    expect(ledgerQuery({})).toBe('');
  });

  it.each([
    ['who', 'Ruth', 'Who: accepted: somebody of this house.'],
    ['what', 'revision.eaten', 'What: accepted: one of the list.'],
    ['about', 'Leap frog', 'About: accepted: the address of an entry, such as leapfrog-central-2.'],
    ['from', '2026-02-30', 'From: accepted: a day such as 2026-11-30.'],
    ['to', 'yesterday', 'To: accepted: a day such as 2026-11-30.'],
    ['before', 'x', 'Before: accepted: the number of an event.'],
  ])('%s = "%s" is left out with a sentence', (name, value, sentence) => {
    expect(read({ [name]: value, why: 'kept' })).toEqual({ filter: { why: 'kept' }, problems: [sentence] });
  });

  it('an empty field is no condition', () =>
    expect(read({ who: '', from: ' ' })).toEqual({ filter: {}, problems: [] }));
});

describe('the words of the ledger', () => {
  it('are there for every kind, and make do with a kind of a later version', () => {
    for (const kind of EVENT_KINDS) expect(eventWords(kind)).toMatch(/^[a-z ]+$/);
    expect(eventWords('house.moved')).toBe('house: moved');
    expect(eventWords('toString')).toBe('toString');
  });

  it('do not say twice who changed their own account', () => {
    expect(ownEventWords('person.joined')).toBe('took up the invitation');
    expect(ownEventWords('person.password-reset')).toBe('set a new password');
    expect(ownEventWords('person.renamed')).toBe('renamed');
  });

  it('tell the particulars', () => {
    expect(eventDetail({ from: 'reader', to: 'maintainer' })).toBe('from reader to maintainer');
    expect(eventDetail({ trialId: 'x', state: 'passed' })).toBe('passed');
    expect(eventDetail({})).toBe('');
  });
});
