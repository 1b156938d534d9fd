import { eq } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { findAttachment, listAttachments } from '@/db/queries/attachments';
import { findDraft, listBuildingBlocks, listOwnDrafts } from '@/db/queries/drafts';
import { attachments } from '@/db/schema/attachments';
import { events } from '@/db/schema/house';
import { ATTACHMENT_BYTES_MAX, ATTACHMENTS_MAX } from '@/lib/attachments/attachment';
import { attachFile } from '@/lib/attachments/attach-file';
import { getAttachment } from '@/lib/attachments/get-attachment';
import { removeAttachment } from '@/lib/attachments/remove-attachment';
import { BLANKS } from '@/lib/entries/blank-definition';
import { createDraft } from '@/lib/entries/create-draft';
import { newDraftFrom } from '@/lib/entries/new-draft-from';
import { saveDraft } from '@/lib/entries/save-draft';
import type { Actor } from '@/lib/people/actor';
import { submitRevision } from '@/lib/reviews/submit-revision';
import { aDraft, aPerson, aVettedRevision } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let author: Actor;
let reader: Actor;
beforeAll(async () => {
  author = await aPerson('contributor');
  reader = await aPerson('reader');
});

const csv = (rows = 2) => Buffer.from(`theta,modulus\n${'0,1\n'.repeat(rows)}`);
const ledgerOf = async (id: string) =>
  (await db.select().from(events).where(eq(events.subjectId, id)).orderBy(events.id)).map(({ kind }) => kind);

describe('beginning a draft', () => {
  it.each(BLANKS)('from a blank %s gives a draft that lies on the table of its author', async (blank) => {
    const beginning = { kind: 'blank', blank, equation: 'wave', title: `Blank ${blank}` } as const;
    const { revisionId } = await createDraft(author, await newDraftFrom(author, beginning));
    const drafts = await listOwnDrafts(db, author.id);
    expect(drafts.find(({ id }) => id === revisionId)).toMatchObject({ title: `Blank ${blank}`, state: 'draft' });
  });

  it('from an entry in force gives its next revision with the same text', async () => {
    const vetted = await aVettedRevision(await aPerson('contributor'));
    const next = await createDraft(author, await newDraftFrom(author, { kind: 'next', slug: vetted.slug }));
    expect(next).toMatchObject({ entryId: vetted.entryId, number: vetted.number + 1 });
    const before = await findDraft(db, author, vetted.id);
    const after = await findDraft(db, author, next.revisionId);
    expect(after?.content).toEqual({ ...before?.content, changeNote: '' });
  });

  it('as a copy gives an entry of its own that says where it comes from', async () => {
    const vetted = await aVettedRevision(await aPerson('contributor'));
    const copy = await createDraft(
      author,
      await newDraftFrom(author, { kind: 'copy', slug: vetted.slug, title: 'A copy to change' }),
    );
    expect(copy.slug).toBe('a-copy-to-change');
    const draft = await findDraft(db, author, copy.revisionId);
    expect(draft?.content.changeNote).toMatch(/^Copied from ST \d{3}, revision 1\.$/);
  });

  it('from an entry that is not there, or that the author may not see, is refused', async () => {
    const hidden = await aDraft(await aPerson('contributor'));
    for (const slug of ['no-such-entry', hidden.slug])
      await expect(newDraftFrom(author, { kind: 'next', slug })).rejects.toMatchObject({ code: 'not-found' });
  });

  it('offers the parts in force to build on, drafts not', async () => {
    const vetted = await aVettedRevision(await aPerson('contributor'));
    const hidden = await aDraft(author);
    const blocks = await listBuildingBlocks(db);
    const titles = await Promise.all([vetted, hidden].map(({ id }) => findDraft(db, author, id)));
    expect(blocks.some(({ callNumber }) => callNumber === titles[0]?.callNumber)).toBe(true);
    expect(blocks.some(({ callNumber }) => callNumber === titles[1]?.callNumber)).toBe(false);
  });
});

describe('two windows on one draft', () => {
  it('both reach the server at once: one is kept, the other is told and can show both texts', async () => {
    const { revisionId } = await createDraft(
      author,
      await newDraftFrom(author, { kind: 'blank', blank: 'table', equation: 'advection', title: 'Two at once' }),
    );
    const draft = await findDraft(db, author, revisionId);
    const content = draft!.content;
    const calls = ['from the left', 'from the right'].map((notes) =>
      saveDraft(author, revisionId, draft!.version, { ...content, notes }),
    );
    const outcomes = await Promise.allSettled(calls);
    expect(outcomes.map(({ status }) => status).sort()).toEqual(['fulfilled', 'rejected']);
    const lost = outcomes.find((one) => one.status === 'rejected');
    expect(lost?.reason).toMatchObject({ code: 'conflict' });
    const now = await findDraft(db, author, revisionId);
    expect(now?.version).toBe(draft!.version + 1);
    expect(['from the left', 'from the right']).toContain(now?.content.notes);
  });
});

describe('attachments', () => {
  it('are kept with their type, size and fingerprint, and told in the ledger', async () => {
    const draft = await aDraft(author);
    await attachFile(author, draft.id, { name: 'growth.csv', bytes: csv() });
    expect(await listAttachments(db, draft.id)).toEqual([
      expect.objectContaining({ name: 'growth.csv', type: 'text/csv', bytes: csv().length, by: author.name }),
    ]);
    expect(await ledgerOf(draft.id)).toContain('attachment.added');
  });

  it.each([
    ['a program that calls itself a picture', 'plot.png', Buffer.from([127, 69, 76, 70, 2, 1, 1, 0, 0, 0])],
    ['an archive that calls itself a table', 'data.csv', Buffer.from([80, 75, 3, 4, 20, 0, 0, 0, 8, 0])],
    ['a page that calls itself a drawing', 'sketch.svg', Buffer.from('<!doctype html><script>1</script>')],
    ['nothing', 'empty.pdf', Buffer.alloc(0)],
  ])('are told by what is in them, not by their name: %s', async (_, name, bytes) => {
    const draft = await aDraft(author);
    await expect(attachFile(author, draft.id, { name, bytes })).rejects.toMatchObject({
      code: 'invalid',
      message: expect.stringContaining('accepted: PDF, PNG, SVG and CSV up to 10 MB') as string,
    });
    expect(await listAttachments(db, draft.id)).toEqual([]);
  });

  it('of 10 MB are taken, one byte more is refused', async () => {
    const draft = await aDraft(author);
    const most = Buffer.concat([Buffer.from('%PDF-1.7\n'), Buffer.alloc(ATTACHMENT_BYTES_MAX - 9)]);
    await attachFile(author, draft.id, { name: 'large.pdf', bytes: most });
    const more = Buffer.concat([most, Buffer.alloc(1)]);
    await expect(attachFile(author, draft.id, { name: 'larger.pdf', bytes: more })).rejects.toThrow(
      'larger than 10 MB',
    );
  });

  it('are at most twenty', async () => {
    const draft = await aDraft(author);
    for (let k = 0; k < ATTACHMENTS_MAX; k++)
      await attachFile(author, draft.id, { name: `${k}.csv`, bytes: csv(k + 1) });
    await expect(attachFile(author, draft.id, { name: 'more.csv', bytes: csv() })).rejects.toThrow('20 attachments');
  });

  it('are the author’s to add and to take off, while the draft is open', async () => {
    const draft = await aDraft(author);
    const { id } = await attachFile(author, draft.id, { name: 'a.csv', bytes: csv() });
    const other = await aPerson('maintainer');
    await expect(attachFile(other, draft.id, { name: 'b.csv', bytes: csv() })).rejects.toMatchObject({
      code: 'not-allowed',
    });
    await expect(removeAttachment(other, id)).rejects.toMatchObject({ code: 'not-allowed' });
    await submitRevision(author, draft.id);
    await expect(attachFile(author, draft.id, { name: 'b.csv', bytes: csv() })).rejects.toThrow('Take it back');
    await expect(removeAttachment(author, id)).rejects.toThrow('Take it back');
  });

  it('freeze in the database itself, whoever writes to it', async () => {
    const draft = await aDraft(author);
    const { id } = await attachFile(author, draft.id, { name: 'a.csv', bytes: csv() });
    await expect(db.update(attachments).set({ name: 'b.csv' }).where(eq(attachments.id, id))).rejects.toMatchObject({
      cause: { constraint: 'attachments_are_frozen' },
    });
    await submitRevision(author, draft.id);
    await expect(db.delete(attachments).where(eq(attachments.id, id))).rejects.toMatchObject({
      cause: { constraint: 'attachments_are_frozen' },
    });
  });

  it('taken off twice at once go once, and leave their name in the ledger', async () => {
    const draft = await aDraft(author);
    const { id } = await attachFile(author, draft.id, { name: 'a.csv', bytes: csv() });
    const outcomes = await Promise.allSettled([removeAttachment(author, id), removeAttachment(author, id)]);
    expect(outcomes.filter(({ status }) => status === 'fulfilled')).toHaveLength(1);
    expect((await ledgerOf(draft.id)).filter((kind) => kind === 'attachment.removed')).toHaveLength(1);
  });

  it('are for those who may see the revision', async () => {
    const draft = await aDraft(author);
    const { id } = await attachFile(author, draft.id, { name: 'a.csv', bytes: csv() });
    expect((await getAttachment(author, id)).bytes).toEqual(csv());
    expect(await findAttachment(db, reader, id)).toBeNull();
    await expect(getAttachment(reader, id)).rejects.toMatchObject({ code: 'not-found' });
  });
});
