import { and, eq, sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { insertAdoption } from '@/db/queries/adoptions';
import { findReview, moveRevision } from '@/db/queries/revisions';
import { events, letters } from '@/db/schema/house';
import { revisions } from '@/db/schema/revisions';
import { signatures } from '@/db/schema/reviews';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { returnRevision } from '@/lib/reviews/return-revision';
import { REVIEW_POINTS } from '@/lib/reviews/review-list';
import { signRevision } from '@/lib/reviews/sign-revision';
import { submitRevision } from '@/lib/reviews/submit-revision';
import { takeBackRevision } from '@/lib/reviews/take-back-revision';
import { vetRevision } from '@/lib/reviews/vet-revision';
import { withdrawRevision } from '@/lib/reviews/withdraw-revision';
import {
  type MadeRevision,
  aDraft,
  aPerson,
  aSignedRevision,
  aSubmission,
  aTrial,
  aVettedRevision,
} from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let author: Actor;
let maintainer: Actor;
let another: Actor;
beforeAll(async () => {
  author = await aPerson('contributor');
  maintainer = await aPerson('maintainer');
  another = await aPerson('maintainer');
});

const EVERY_POINT = { points: [...REVIEW_POINTS], sentence: 'Checked against the source.' };
const rowOf = async ({ id }: Pick<MadeRevision, 'id'>) => {
  const [row] = await db.select().from(revisions).where(eq(revisions.id, id));
  return row;
};
const ledgerOf = async ({ id }: MadeRevision) =>
  (await db.select().from(events).where(eq(events.subjectId, id)).orderBy(events.id)).map(({ kind }) => kind);
const lettersAbout = async ({ id }: MadeRevision, kind: 'submitted' | 'returned' | 'vetted' | 'recall') =>
  db
    .select({ recipientId: letters.recipientId, payload: letters.payload })
    .from(letters)
    .where(and(eq(letters.kind, kind), sql`${letters.payload} ->> 'revisionId' = ${id}`));

/** What two people get who press at the same moment, refusals as their codes. */
const atOnce = async (...calls: Promise<unknown>[]) =>
  (await Promise.allSettled(calls))
    .map((call) =>
      call.status === 'fulfilled' ? 'done' : call.reason instanceof Refusal ? call.reason.code : String(call.reason),
    )
    .sort();

describe('submitting', () => {
  it('puts a draft on the desk, writes the ledger, and tells every maintainer but the author', async () => {
    const draft = await aDraft(author);
    await submitRevision(author, draft.id);
    expect(await rowOf(draft)).toMatchObject({ state: 'in-review', submittedAt: expect.any(Date) });
    expect(await ledgerOf(draft)).toEqual(['revision.submitted']);
    const told = (await lettersAbout(draft, 'submitted')).map(({ recipientId }) => recipientId);
    expect(told).toEqual(expect.arrayContaining([maintainer.id, another.id]));
    expect(told).not.toContain(author.id);
  });

  it('happens once where the form is posted twice', async () => {
    const draft = await aDraft(author);
    const [first, second] = await atOnce(submitRevision(author, draft.id), submitRevision(author, draft.id));
    expect([first, second].filter((one) => one === 'done')).toHaveLength(1);
    expect(await ledgerOf(draft)).toEqual(['revision.submitted']);
  });

  it('is the business of the author alone', async () => {
    const draft = await aDraft(author);
    await expect(submitRevision(maintainer, draft.id)).rejects.toThrow('Only the author submits a revision.');
  });

  it('can be taken back, and the ledger keeps both', async () => {
    const submitted = await aSubmission(author);
    await expect(takeBackRevision(maintainer, submitted.id)).rejects.toMatchObject({ code: 'not-allowed' });
    await takeBackRevision(author, submitted.id);
    expect(await rowOf(submitted)).toMatchObject({ state: 'draft' });
    expect(await ledgerOf(submitted)).toEqual(['revision.taken-back']);
  });
});

describe('signing', () => {
  const tried = async (by = author) => {
    const revision = await aSubmission(by);
    await aTrial(revision, 'passed');
    return revision;
  };

  it('records who signed, and why', async () => {
    const revision = await tried();
    await signRevision(maintainer, revision.id, EVERY_POINT);
    expect((await findReview(db, revision.id))?.signerIds).toEqual([maintainer.id]);
    const [event] = await db.select().from(events).where(eq(events.subjectId, revision.id));
    expect(event).toMatchObject({ kind: 'revision.signed', actorId: maintainer.id, reason: EVERY_POINT.sentence });
  });

  it('refuses authors, contributors, a second signature, an unticked point and an empty sentence', async () => {
    const own = await tried(maintainer);
    await expect(signRevision(maintainer, own.id, EVERY_POINT)).rejects.toThrow('Authors cannot sign their own');
    const revision = await tried();
    await expect(signRevision(author, revision.id, EVERY_POINT)).rejects.toThrow('Only a maintainer');
    await expect(
      signRevision(maintainer, revision.id, { ...EVERY_POINT, points: ['facts', 'naming', 'start-up'] }),
    ).rejects.toThrow('Not ticked yet: The definition is the one in the source');
    await expect(signRevision(maintainer, revision.id, { ...EVERY_POINT, sentence: ' ' })).rejects.toMatchObject({
      code: 'invalid',
      fields: { sentence: expect.any(String) },
    });
    await signRevision(maintainer, revision.id, EVERY_POINT);
    await expect(signRevision(maintainer, revision.id, EVERY_POINT)).rejects.toThrow('You have signed this revision');
  });

  it('counts once where one person presses twice at once', async () => {
    const revision = await tried();
    const outcomes = await atOnce(
      signRevision(maintainer, revision.id, EVERY_POINT),
      signRevision(maintainer, revision.id, EVERY_POINT),
    );
    expect(outcomes.filter((one) => one === 'done')).toHaveLength(1);
    expect(await db.select().from(signatures).where(eq(signatures.revisionId, revision.id))).toHaveLength(1);
    expect(await ledgerOf(revision)).toEqual(['revision.signed']);
  });

  it('waits for the evidence', async () => {
    const revision = await aSubmission(author);
    const sign = () => signRevision(maintainer, revision.id, EVERY_POINT);
    await expect(sign()).rejects.toThrow('It has not been tried yet.');
    await aTrial(revision, 'running');
    await expect(sign()).rejects.toThrow('Its trial is still to finish.');
    await aTrial(revision, 'failed');
    await expect(sign()).rejects.toThrow('Its latest trial failed.');
  });
});

describe('vetting', () => {
  it('puts the revision in force, and writes ledger and letter with it', async () => {
    const revision = await aSignedRevision(author);
    await vetRevision(maintainer, revision.id, 'Bound and storage confirmed.');
    expect(await rowOf(revision)).toMatchObject({
      state: 'vetted',
      vettedAt: expect.any(Date),
      stateReason: 'Bound and storage confirmed.',
    });
    expect(await ledgerOf(revision)).toEqual(['revision.vetted']);
    expect(await lettersAbout(revision, 'vetted')).toMatchObject([{ recipientId: author.id }]);
  });

  it('supersedes the revision before, and recalls it from its adopters, all at once', async () => {
    const before = await aVettedRevision(author);
    const adopter = await aPerson('reader');
    const adoption = { revisionId: before.id, personId: adopter.id, purpose: 'tides, open shelf' };
    await insertAdoption(db, { ...adoption, code: 'Skerry' });
    const next = await aSignedRevision(author, { of: before });
    await vetRevision(maintainer, next.id, 'The bound was rounded up.');
    expect(await rowOf(before)).toMatchObject({ state: 'superseded', replacedById: next.id });
    expect(await rowOf(next)).toMatchObject({ state: 'vetted' });
    expect(await ledgerOf(before)).toEqual(['revision.superseded']);
    expect(await lettersAbout(before, 'recall')).toMatchObject([
      { recipientId: adopter.id, payload: { kind: 'superseded', codes: ['Skerry'], replacedByNumber: 2 } },
    ]);
  });

  it('lets one of two maintainers who press at once win; the other is told, and nothing is written twice', async () => {
    for (let round = 0; round < 5; round++) {
      const before = await aVettedRevision(author);
      const next = await aSignedRevision(author, { of: before });
      const outcomes = await atOnce(
        vetRevision(maintainer, next.id, 'Right.'),
        vetRevision(another, next.id, 'Right too.'),
      );
      expect(outcomes.filter((one) => one === 'done')).toHaveLength(1);
      // Read before or after the winner wrote: both are plain refusals.
      expect(['conflict', 'not-allowed']).toContain(outcomes.find((one) => one !== 'done'));
      expect(await ledgerOf(next)).toEqual(['revision.vetted']);
      expect(await ledgerOf(before)).toEqual(['revision.superseded']);
    }
  });

  it('lets one of two successors of a revision win where both are vetted at once', async () => {
    const before = await aVettedRevision(author);
    const left = await aSignedRevision(author, { of: before });
    const right = await aSignedRevision(author, { of: before });
    await atOnce(vetRevision(maintainer, left.id, 'Right.'), vetRevision(another, right.id, 'Right too.'));
    const inForce = await db
      .select({ id: revisions.id })
      .from(revisions)
      .where(and(eq(revisions.entryId, before.entryId), eq(revisions.state, 'vetted')));
    expect(inForce).toHaveLength(1);
  });

  it('leaves everything as it was where one part fails', async () => {
    const before = await aVettedRevision(author);
    const next = await aSignedRevision(author, { of: before });
    // A trial queued after the page was read: the rule passed a moment ago, the database says no.
    await db.execute(
      sql.raw(`
      create function spoil() returns trigger language plpgsql as $$ begin
        if new.kind = 'revision.vetted' then raise exception 'spoiled'; end if; return new; end $$;
      create trigger spoil before insert on events for each row execute function spoil()`),
    );
    await expect(vetRevision(maintainer, next.id, 'Right.')).rejects.toThrow();
    await db.execute(sql.raw('drop trigger spoil on events; drop function spoil()'));
    expect(await rowOf(before)).toMatchObject({ state: 'vetted' });
    expect(await rowOf(next)).toMatchObject({ state: 'in-review' });
    expect(await ledgerOf(before)).toEqual([]);
    expect(await lettersAbout(before, 'recall')).toEqual([]);
  });

  it('refuses the author, contributors, and an earlier revision than the one in force', async () => {
    const own = await aSignedRevision(maintainer);
    await expect(vetRevision(maintainer, own.id, 'Mine.')).rejects.toThrow('Authors cannot vet their own revision.');
    await expect(vetRevision(author, own.id, 'Nice.')).rejects.toThrow('Only a maintainer decides');
    const first = await aVettedRevision(author);
    const second = await aSignedRevision(author, { of: first });
    const third = await aSignedRevision(author, { of: first });
    await vetRevision(maintainer, third.id, 'Right.');
    await expect(vetRevision(maintainer, second.id, 'Right.')).rejects.toThrow(
      'Revision 3 is in force; an earlier one cannot replace it.',
    );
  });

  it('refuses what is not in the book', async () => {
    const nowhere = '00000000-0000-4000-8000-000000000000';
    await expect(vetRevision(maintainer, nowhere, 'Right.')).rejects.toMatchObject({ code: 'not-found' });
  });
});

describe('returning and withdrawing', () => {
  it('sends a revision back with its reason to its author', async () => {
    const revision = await aSubmission(author);
    await returnRevision(maintainer, revision.id, ' A sign is wrong. ');
    expect(await rowOf(revision)).toMatchObject({ state: 'returned', stateReason: 'A sign is wrong.' });
    expect(await lettersAbout(revision, 'returned')).toMatchObject([{ recipientId: author.id }]);
    await expect(returnRevision(maintainer, revision.id, 'Again.')).rejects.toMatchObject({ code: 'not-allowed' });
  });

  it('tells the second of two deciders who return and vet at once', async () => {
    const revision = await aSignedRevision(author);
    const outcomes = await atOnce(
      vetRevision(maintainer, revision.id, 'Right.'),
      returnRevision(another, revision.id, 'Wrong.'),
    );
    expect(outcomes.filter((one) => one === 'done')).toHaveLength(1);
    expect(['vetted', 'returned']).toContain((await rowOf(revision))?.state);
    expect(await ledgerOf(revision)).toHaveLength(1);
  });

  it('withdraws what was vetted, says why, what to use instead, and tells the adopters', async () => {
    const vetted = await aVettedRevision(author);
    const instead = await aVettedRevision(author);
    const adopter = await aPerson('reader');
    await insertAdoption(db, { revisionId: vetted.id, personId: adopter.id, code: 'Saltings', purpose: 'tides' });
    const reason = 'Unstable for every lambda.';
    await withdrawRevision(maintainer, vetted.id, { reason, useInstead: instead.slug });
    expect(await rowOf(vetted)).toMatchObject({ state: 'withdrawn', stateReason: reason, replacedById: instead.id });
    expect(await lettersAbout(vetted, 'recall')).toMatchObject([
      { recipientId: adopter.id, payload: { kind: 'withdrawn', useInstead: instead.slug } },
    ]);
    await expect(withdrawRevision(maintainer, vetted.id, { reason })).rejects.toThrow('withdrawn already');
  });

  it('withdraws nothing for contributors, no draft, and in favour of no entry that is not there', async () => {
    const vetted = await aVettedRevision(author);
    await expect(withdrawRevision(author, vetted.id, { reason: 'Wrong.' })).rejects.toThrow('Only a maintainer');
    await expect(
      withdrawRevision(maintainer, vetted.id, { reason: 'Wrong.', useInstead: 'no-such-entry' }),
    ).rejects.toThrow('There is no other entry at no-such-entry.');
    const draft = await aDraft(author);
    await expect(withdrawRevision(maintainer, draft.id, { reason: 'Wrong.' })).rejects.toThrow('Only what was vetted');
    // The page was read in review; meanwhile somebody moved the revision.
    expect(await moveRevision(db, draft.id, { from: 'in-review', to: 'vetted' })).toBe(false);
  });
});
