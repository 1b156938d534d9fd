import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { findSheet } from '@/db/queries/entries';
import { events } from '@/db/schema/house';
import { revisions } from '@/db/schema/revisions';
import { createDraft } from '@/lib/entries/create-draft';
import { DraftContent } from '@/lib/entries/draft-content';
import { saveDraft } from '@/lib/entries/save-draft';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { submitRevision } from '@/lib/reviews/submit-revision';
import { aPerson } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let author: Actor;
beforeAll(async () => {
  author = await aPerson('contributor');
});

const leapfrog = (more: object = {}) =>
  DraftContent.parse({
    title: 'Leapfrog in time, centred in space',
    definition: {
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: -1, coefficient: '-lambda' },
        { level: 0, offset: 1, coefficient: 'lambda' },
        { level: -1, offset: 0, coefficient: '-1' },
      ],
    },
    notes: 'Central differences in both directions.',
    ...more,
  });
const rowOf = async (id: string) => (await db.select().from(revisions).where(eq(revisions.id, id)))[0];
const ledgerOf = async (id: string) =>
  (await db.select().from(events).where(eq(events.subjectId, id)).orderBy(events.id)).map(({ kind }) => kind);

describe('a new draft', () => {
  it('gets the next call number of its equation, an address from its title, and computed facts', async () => {
    const first = await createDraft(author, { content: leapfrog({ title: 'Leapfrog, plain' }) });
    const second = await createDraft(author, { content: leapfrog({ title: 'Leapfrog, again' }) });
    const sheet = await findSheet(db, author, 'leapfrog-plain');
    expect(sheet).toMatchObject({ callNumber: 'AD 001', revision: 1, state: 'draft', equation: 'advection' });
    expect((await findSheet(db, author, second.slug))?.callNumber).toBe('AD 002');
    if (sheet?.facts?.kind !== 'scheme') throw new Error('no facts of a scheme');
    // Textbook: order (2, 2), three levels, two arrays kept, one start-up step, |lambda| <= 1.
    expect(sheet.facts).toMatchObject({ levels: 3, startUpSteps: 1, storage: { arraysInPlace: 2 } });
    expect(sheet.summary).toMatchObject({ orderTime: 2, orderSpace: 2, arrays: 2, levels: 3, explicit: true });
    expect(sheet.engineVersion).not.toBe('');
    expect(await ledgerOf(first.revisionId)).toEqual(['draft.created']);
  });

  it('is kept, with what is wrong and where, also when its definition does not hold', async () => {
    const definition = {
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: 0, coefficient: '-1 + nonsense' },
      ],
    };
    const draft = await createDraft(author, { content: leapfrog({ title: 'Broken', definition }) });
    const sheet = await findSheet(db, author, draft.slug);
    expect(sheet).toMatchObject({ facts: null, summary: null });
    expect(sheet?.problems[0]).toMatchObject({ severity: 'error', pointer: expect.stringContaining('/terms/1') });
    await expect(submitRevision(author, draft.revisionId)).rejects.toThrow('The definition has errors.');
  });

  it('is not for readers', async () => {
    await expect(createDraft(await aPerson('reader'), { content: leapfrog() })).rejects.toMatchObject({
      code: 'not-allowed',
    });
  });

  it('is refused an address that is taken', async () => {
    await createDraft(author, { content: leapfrog({ title: 'The same title' }) });
    await expect(createDraft(author, { content: leapfrog({ title: 'The same title' }) })).rejects.toThrow(
      'An entry with this address is in the book already.',
    );
  });

  it('can be the next revision of an entry, of the same kind only', async () => {
    const first = await createDraft(author, { content: leapfrog({ title: 'Twice revised' }) });
    const next = await createDraft(author, { content: leapfrog({ title: 'New title' }), revisionOf: first.slug });
    expect(next).toMatchObject({ entryId: first.entryId, slug: first.slug, number: 2 });
    const stencil = { kind: 'stencil', derivative: 1, offsets: ['-1', '1'] };
    await expect(
      createDraft(author, { content: leapfrog({ definition: stencil }), revisionOf: first.slug }),
    ).rejects.toMatchObject({ code: 'invalid', fields: { definition: expect.stringContaining('AD') } });
    await expect(createDraft(author, { content: leapfrog(), revisionOf: 'no-such-entry' })).rejects.toMatchObject({
      code: 'not-found',
    });
  });

  it('gets a number of its own where two begin at once, or a plain refusal', async () => {
    const first = await createDraft(author, { content: leapfrog({ title: 'Raced for' }) });
    const calls = [1, 2, 3].map(() => createDraft(author, { content: leapfrog(), revisionOf: first.slug }));
    const outcomes = await Promise.allSettled(calls);
    const numbers = outcomes.flatMap((one) => (one.status === 'fulfilled' ? [one.value.number] : []));
    expect(new Set(numbers).size).toBe(numbers.length);
    expect(numbers.length).toBeGreaterThan(0);
    for (const one of outcomes) if (one.status === 'rejected') expect(one.reason).toBeInstanceOf(Refusal);
  });
});

describe('saving a draft', () => {
  it('computes the facts again and raises the version', async () => {
    const { revisionId } = await createDraft(author, { content: leapfrog({ title: 'Saved' }) });
    const downwind = {
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: -1, coefficient: '-lambda' },
        { level: 0, offset: 0, coefficient: '-1 + lambda' },
      ],
    };
    expect(await saveDraft(author, revisionId, 1, leapfrog({ title: 'Saved', definition: downwind }))).toBe(2);
    expect((await rowOf(revisionId))?.summary).toMatchObject({ orderTime: 1, levels: 2 });
    expect(await ledgerOf(revisionId)).toEqual(['draft.created', 'draft.saved']);
  });

  it('says nothing in the ledger where nothing changed', async () => {
    const { revisionId } = await createDraft(author, { content: leapfrog({ title: 'Saved twice' }) });
    expect(await saveDraft(author, revisionId, 1, leapfrog({ title: 'Saved twice' }))).toBe(1);
    expect(await ledgerOf(revisionId)).toEqual(['draft.created']);
  });

  it('tells the second of two editors, and overwrites nothing', async () => {
    const { revisionId } = await createDraft(author, { content: leapfrog({ title: 'Two windows' }) });
    await saveDraft(author, revisionId, 1, leapfrog({ title: 'Two windows', notes: 'From the first.' }));
    await expect(
      saveDraft(author, revisionId, 1, leapfrog({ title: 'Two windows', notes: 'From the second.' })),
    ).rejects.toMatchObject({
      code: 'conflict',
      message: expect.stringContaining('changed while you were reading it'),
    });
    expect((await rowOf(revisionId))?.notes).toBe('From the first.');
  });

  it('is the author’s alone, and ends with the submission', async () => {
    const { revisionId } = await createDraft(author, { content: leapfrog({ title: 'Submitted' }) });
    await expect(saveDraft(await aPerson('maintainer'), revisionId, 1, leapfrog())).rejects.toMatchObject({
      code: 'not-allowed',
    });
    await submitRevision(author, revisionId);
    await expect(saveDraft(author, revisionId, 1, leapfrog())).rejects.toThrow('Take it back to change it.');
  });

  it('loses to a submission at the same moment, or wins before it: never both halves', async () => {
    for (let round = 0; round < 4; round++) {
      const title = `Raced ${round}`;
      const { revisionId } = await createDraft(author, { content: leapfrog({ title }) });
      await Promise.allSettled([
        saveDraft(author, revisionId, 1, leapfrog({ title, notes: 'Changed.' })),
        submitRevision(author, revisionId),
      ]);
      const row = await rowOf(revisionId);
      const saved = row?.notes === 'Changed.';
      expect(row?.version).toBe(saved ? 2 : 1);
      expect(await ledgerOf(revisionId)).toEqual([
        'draft.created',
        ...(saved ? ['draft.saved'] : []),
        ...(row?.state === 'in-review' ? ['revision.submitted'] : []),
      ]);
    }
  });
});
