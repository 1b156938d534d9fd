import { beforeAll, describe, expect, it } from 'vitest';
import { insertEvent } from '@/db/queries/house';
import { listEvents } from '@/db/queries/ledger';
import { exportLedger } from '@/lib/ledger/export-ledger';
import type { LedgerFilter } from '@/lib/ledger/ledger-filter';
import type { Actor } from '@/lib/people/actor';
import { type MadeRevision, aDraft, aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let ruth: Actor;
let sanna: Actor;
let draft: MadeRevision;
beforeAll(async () => {
  ruth = await aPerson('administrator');
  sanna = await aPerson('contributor');
  draft = await aDraft(sanna);
  await insertEvent(db, { kind: 'draft.created', actorId: sanna.id, subjectId: draft.id });
  await insertEvent(db, {
    kind: 'revision.returned',
    actorId: ruth.id,
    subjectId: draft.id,
    reason: 'The sign of b, 50% of it.',
  });
  await insertEvent(db, { kind: 'person.disabled', actorId: ruth.id, subjectId: sanna.id, reason: '=cmd|calc' });
  await insertEvent(db, { kind: 'demo.filled', actorId: null, subjectId: null });
});

const kinds = async (filter: LedgerFilter) => (await listEvents(db, filter, 50)).map(({ kind }) => kind);
const today = new Date().toISOString().slice(0, 10);
const exported = (filter: LedgerFilter) => new Response(exportLedger(db, filter)).text();

describe('the ledger', () => {
  it('tells who, what, when and why, the latest first', async () => {
    const [, disabled, returned] = await listEvents(db, {}, 50);
    expect(disabled).toMatchObject({
      kind: 'person.disabled',
      actor: ruth.name,
      person: { name: sanna.name },
      revision: null,
    });
    expect(returned).toMatchObject({
      actor: ruth.name,
      reason: 'The sign of b, 50% of it.',
      at: expect.any(Date),
      revision: { number: draft.number, title: 'Backward difference', slug: draft.slug },
    });
  });

  it('is read under conditions, and all of them together', async () => {
    expect(await kinds({ what: 'revision' })).toEqual(['revision.returned']);
    expect(await kinds({ what: 'person.disabled' })).toEqual(['person.disabled']);
    expect(await kinds({ who: 'house' })).toEqual(['demo.filled']);
    // Whoever did it, and whoever it was done to.
    expect(await kinds({ who: sanna.id })).toEqual(['person.disabled', 'draft.created']);
    expect(await kinds({ about: draft.slug })).toEqual(['revision.returned', 'draft.created']);
    expect(await kinds({ why: 'SIGN of' })).toEqual(['revision.returned']);
    // Signs with a meaning in patterns are what they look like.
    expect(await kinds({ why: '50% of' })).toEqual(['revision.returned']);
    expect(await kinds({ why: '5_%' })).toEqual([]);
    expect(await kinds({ about: draft.slug, who: ruth.id, from: today, to: today })).toEqual(['revision.returned']);
    expect(await kinds({ to: '2020-01-01' })).toEqual([]);
    expect(await kinds({ from: '2999-01-01' })).toEqual([]);
  });

  it('goes on from the last line of a page, whatever was written meanwhile', async () => {
    const first = await listEvents(db, {}, 2);
    await insertEvent(db, { kind: 'person.renamed', actorId: ruth.id, subjectId: ruth.id });
    const second = await listEvents(db, { before: first.at(-1)!.id }, 2);
    expect([...first, ...second].map(({ kind }) => kind)).toEqual([
      'demo.filled',
      'person.disabled',
      'revision.returned',
      'draft.created',
    ]);
  });

  it('is exported as CSV under the same conditions, and no cell is a formula', async () => {
    const lines = (await exported({ what: 'person.disabled' })).split('\r\n');
    expect(lines[0]).toBe('number,when,who,what,about,address,why,particulars');
    expect(lines[1]).toMatch(/^\d+,\d{4}-\d\d-\d\dT[\d:.]+Z,administrator \d+,person\.disabled,contributor \d+,/);
    expect(lines[1]).toContain(",'=cmd|calc,");
    expect(lines[2]).toBe('');
  });

  it('is exported whole, however long it is: every line once', async () => {
    for (let k = 0; k < 1_100; k++)
      await insertEvent(db, { kind: 'draft.saved', actorId: sanna.id, subjectId: draft.id, data: { k } });
    const numbers = (await exported({ what: 'draft.saved' }))
      .trim()
      .split('\r\n')
      .slice(1)
      .map((line) => Number(line.split(',')[0]));
    expect(numbers).toHaveLength(1_100);
    expect(new Set(numbers).size).toBe(1_100);
    expect(numbers).toEqual([...numbers].sort((a, b) => b - a));
  });
});
