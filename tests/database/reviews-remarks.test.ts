import { eq, sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { brokenRule } from '@/db/errors';
import { findKernelSubjectById } from '@/db/queries/kernel-subjects';
import { insertRemark, listRemarks } from '@/db/queries/remarks';
import { moveRevision, saveContent } from '@/db/queries/revisions';
import { events, letters } from '@/db/schema/house';
import { remarks } from '@/db/schema/reviews';
import { generateKernel } from '@/lib/codegen/generate-kernel';
import { KernelOptions } from '@/lib/codegen/kernel-request';
import type { Actor } from '@/lib/people/actor';
import type { Refusal } from '@/lib/refusal';
import { answerRemark } from '@/lib/reviews/answer-remark';
import { threadsOf } from '@/lib/reviews/remark';
import { reopenRemark, settleRemark } from '@/lib/reviews/settle-remark';
import { writeRemark } from '@/lib/reviews/write-remark';
import { type MadeRevision, aDraft, aPerson, aSubmission, aVettedRevision, someContent } from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let author: Actor;
let tomas: Actor;
let reader: Actor;
beforeAll(async () => {
  author = await aPerson('contributor');
  tomas = await aPerson('maintainer');
  reader = await aPerson('reader');
});

const onReadings = ({ id }: MadeRevision, text: string) =>
  ({ revisionId: id, part: 'readings', at: null, text }) as const;
const lettersTo = async ({ id }: Actor, revision: MadeRevision) =>
  db
    .select({ payload: letters.payload })
    .from(letters)
    .where(
      sql`${letters.kind} = 'remark' and ${letters.recipientId} = ${id} and ${letters.payload} ->> 'revisionId' = ${revision.id}`,
    );
const ledgerOf = async ({ id }: MadeRevision) =>
  (await db.select().from(events).where(eq(events.subjectId, id)).orderBy(events.id)).map(({ kind }) => kind);
const firstOf = async (revision: MadeRevision) => {
  const [thread] = threadsOf(await listRemarks(db, revision.id));
  if (!thread) throw new Error('There is no remark.');
  return thread;
};
const kernelLines = async ({ id }: MadeRevision) => {
  const subject = await findKernelSubjectById(db, id);
  const answer = subject?.input && generateKernel(subject.input, 'c', KernelOptions.parse({}));
  if (answer?.kind !== 'kernel') throw new Error('There is no kernel to remark on.');
  return answer.kernel.source.split('\n');
};

describe('a remark', () => {
  it('is kept with its place, its line in the ledger, and a letter to the author', async () => {
    const revision = await aVettedRevision(author);
    await writeRemark(reader, onReadings(revision, 'Is this the bound of the second edition?'));
    expect(await listRemarks(db, revision.id)).toMatchObject([
      { author: reader.name, part: 'readings', text: 'Is this the bound of the second edition?', version: 1 },
    ]);
    expect(await ledgerOf(revision)).toEqual(['remark.written']);
    expect(await lettersTo(author, revision)).toMatchObject([
      { payload: { author: reader.name, part: 'readings', text: 'Is this the bound of the second edition?' } },
    ]);
  });

  it('is said once where it is sent twice, also at the same moment', async () => {
    const revision = await aVettedRevision(author);
    const remark = onReadings(revision, 'Rounded down?');
    await Promise.all([writeRemark(tomas, remark), writeRemark(tomas, remark), writeRemark(tomas, remark)]);
    expect(await listRemarks(db, revision.id)).toHaveLength(1);
    expect(await ledgerOf(revision)).toEqual(['remark.written']);
    expect(await lettersTo(author, revision)).toHaveLength(1);
  });

  it('writes no letter to its own author', async () => {
    const revision = await aSubmission(author);
    await writeRemark(author, onReadings(revision, 'The second edition has another sign.'));
    expect(await lettersTo(author, revision)).toEqual([]);
  });

  it('is not for those who may not see the revision', async () => {
    const draft = await aDraft(author);
    await expect(writeRemark(reader, onReadings(draft, 'Nice.'))).rejects.toMatchObject({ code: 'not-found' });
  });

  it('on a line stands with the words of the line, in the language it is in', async () => {
    const revision = await aSubmission(author);
    const [first = ''] = await kernelLines(revision);
    const at = { language: 'c', line: 1, quote: first } as const;
    await writeRemark(tomas, { revisionId: revision.id, part: 'kernel', at, text: 'Say the edition here.' });
    expect(await listRemarks(db, revision.id)).toMatchObject([{ language: 'c', line: 1, quote: first }]);
    expect(await lettersTo(author, revision)).toMatchObject([{ payload: { part: 'kernel, line 1' } }]);
  });

  it('is refused on a line that is gone or no longer reads so, and nothing is written', async () => {
    const revision = await aSubmission(author);
    const lines = await kernelLines(revision);
    const remark = (line: number, quote: string) =>
      writeRemark(tomas, { revisionId: revision.id, part: 'kernel', at: { language: 'c', line, quote }, text: 'Why?' });
    await expect(remark(lines.length + 50, 'gone')).rejects.toThrow(`line ${lines.length + 50} is gone`);
    await expect(remark(1, 'not what it says')).rejects.toMatchObject({ code: 'conflict' });
    expect(await listRemarks(db, revision.id)).toEqual([]);
  });

  it('is refused on a part that the revision has lost, with words that are kept in the form', async () => {
    const revision = await aSubmission(author);
    await moveRevision(db, revision.id, { from: 'in-review', to: 'returned', reason: 'A sign is wrong.' });
    await saveContent(
      db,
      revision.id,
      1,
      someContent({ verdict: 'invalid', facts: null, summary: null, problems: [] }),
    );
    await expect(writeRemark(tomas, onReadings(revision, 'Why?'))).rejects.toThrow('no part "readings" now');
    await writeRemark(tomas, { revisionId: revision.id, part: 'notes', at: null, text: 'Why?' });
    expect(await listRemarks(db, revision.id)).toMatchObject([{ part: 'notes', version: 2 }]);
  });
});

describe('a thread', () => {
  const opened = async () => {
    const revision = await aVettedRevision(author);
    await writeRemark(tomas, onReadings(revision, 'Which edition?'));
    return { revision, thread: await firstOf(revision) };
  };

  it('is answered; everyone in it has a letter, but not who answers', async () => {
    const { revision, thread } = await opened();
    await answerRemark(reader, thread.id, 'The second, I think.');
    await answerRemark(author, thread.id, 'The second.');
    expect((await firstOf(revision)).answers.map(({ text }) => text)).toEqual(['The second, I think.', 'The second.']);
    expect(await ledgerOf(revision)).toEqual(['remark.written', 'remark.answered', 'remark.answered']);
    expect(await lettersTo(tomas, revision)).toHaveLength(2);
    expect(await lettersTo(reader, revision)).toHaveLength(1);
    // The remark itself and the reader's answer, not one's own.
    expect(await lettersTo(author, revision)).toHaveLength(2);
  });

  it('is settled and reopened by those whom it concerns', async () => {
    const { revision, thread } = await opened();
    await expect(settleRemark(reader, thread.id)).rejects.toThrow('A remark is settled by');
    await settleRemark(author, thread.id);
    expect(await firstOf(revision)).toMatchObject({ settledBy: author.name, settledAt: expect.any(String) });
    await reopenRemark(tomas, thread.id);
    expect(await firstOf(revision)).toMatchObject({ settledBy: null, settledAt: null });
    expect(await ledgerOf(revision)).toEqual(['remark.written', 'remark.settled', 'remark.reopened']);
  });

  it('is settled once where two do it at the same moment', async () => {
    const { revision, thread } = await opened();
    const outcomes = await Promise.allSettled([settleRemark(author, thread.id), settleRemark(tomas, thread.id)]);
    const refused = outcomes.filter((one) => one.status === 'rejected').map(({ reason }) => reason as Refusal);
    expect(refused).toMatchObject([{ code: 'conflict', message: 'Somebody has settled this remark meanwhile.' }]);
    expect(await ledgerOf(revision)).toEqual(['remark.written', 'remark.settled']);
  });

  it('keeps every word, and answers stay under a remark on their own revision: the database sees to it', async () => {
    const { revision, thread } = await opened();
    const rule = async (work: Promise<unknown>) => work.then(() => null, brokenRule);
    const change = db.update(remarks).set({ text: 'Never said.' }).where(eq(remarks.id, thread.id));
    expect(await rule(change)).toBe('remarks_keep_their_words');
    expect(await rule(db.delete(remarks).where(eq(remarks.id, thread.id)))).toBe('remarks_keep_their_words');
    const other = await aVettedRevision(author);
    const answer = { authorId: tomas.id, part: 'readings', text: 'Elsewhere.', answersId: thread.id };
    expect(await rule(insertRemark(db, { ...answer, revisionId: other.id }))).toBe('answers_follow_a_remark');
    const answerId = await insertRemark(db, { ...answer, revisionId: revision.id });
    const nested = { ...answer, revisionId: revision.id, text: 'An answer to an answer.', answersId: answerId ?? '' };
    expect(await rule(insertRemark(db, nested))).toBe('answers_follow_a_remark');
    await expect(answerRemark(reader, answerId ?? '', 'Too deep.')).rejects.toMatchObject({ code: 'not-found' });
  });
});
