import { eq, sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { insertAdoption } from '@/db/queries/adoptions';
import {
  countWaitingFor,
  findComparedWith,
  listAllSignatures,
  listDesk,
  listDecisions,
} from '@/db/queries/review-desk';
import { findReview, saveContent } from '@/db/queries/revisions';
import { events, letters } from '@/db/schema/house';
import { signatures } from '@/db/schema/reviews';
import { revisions } from '@/db/schema/revisions';
import type { Actor } from '@/lib/people/actor';
import { Refusal } from '@/lib/refusal';
import { returnRevision } from '@/lib/reviews/return-revision';
import { REVIEW_POINTS } from '@/lib/reviews/review-list';
import { stampOf } from '@/lib/reviews/review-stamp';
import { signAndVet } from '@/lib/reviews/sign-and-vet';
import { submitRevision } from '@/lib/reviews/submit-revision';
import { takeBackRevision } from '@/lib/reviews/take-back-revision';
import { withdrawRevision } from '@/lib/reviews/withdraw-revision';
import {
  type MadeRevision,
  aDraft,
  aPerson,
  aSignature,
  aSubmission,
  aTrial,
  aVettedRevision,
  someContent,
} from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let author: Actor;
let tomas: Actor;
let ilse: Actor;
beforeAll(async () => {
  author = await aPerson('contributor');
  tomas = await aPerson('maintainer');
  ilse = await aPerson('maintainer');
});

const tried = async (by: Actor = author, more: Parameters<typeof aSubmission>[1] = {}) => {
  const revision = await aSubmission(by, more);
  await aTrial(revision, 'passed');
  return revision;
};
const reviewOf = async ({ id }: Pick<MadeRevision, 'id'>) => {
  const review = await findReview(db, id);
  if (!review) throw new Error(`There is no revision ${id}.`);
  return review;
};
const seenNow = async (revision: MadeRevision) => stampOf(await reviewOf(revision));
const signed = async (revision: MadeRevision, seen?: string) => ({
  points: [...REVIEW_POINTS],
  sentence: 'Checked against the source.',
  seen: seen ?? (await seenNow(revision)),
});
const ledgerOf = async ({ id }: MadeRevision) =>
  (await db.select().from(events).where(eq(events.subjectId, id)).orderBy(events.id)).map(({ kind }) => kind);
const signaturesUnder = async ({ id }: MadeRevision) =>
  db.select({ by: signatures.personId }).from(signatures).where(eq(signatures.revisionId, id));
const lettersAbout = async ({ id }: MadeRevision, kind: 'returned' | 'vetted' | 'recall') =>
  db
    .select({ recipientId: letters.recipientId, payload: letters.payload })
    .from(letters)
    .where(sql`${letters.kind} = ${kind} and ${letters.payload} ->> 'revisionId' = ${id}`);

const atOnce = async (...calls: Promise<unknown>[]) =>
  (await Promise.allSettled(calls)).map((call) =>
    call.status === 'fulfilled' ? 'done' : call.reason instanceof Refusal ? call.reason.code : String(call.reason),
  );

/** New text by the author after a return, sent in again and tried. */
async function rewritten(revision: MadeRevision, notes: string): Promise<void> {
  const { version } = await reviewOf(revision);
  await saveContent(db, revision.id, version, someContent({ notes }));
  await submitRevision(revision.author, revision.id);
  await aTrial(revision, 'passed');
}

describe('signing on the desk', () => {
  it('waits for the second maintainer, whose signature puts the revision in force with ledger and letter', async () => {
    const revision = await tried();
    expect(await signAndVet(tomas, revision.id, await signed(revision))).toEqual({ vetted: false });
    expect((await reviewOf(revision)).state).toBe('in-review');
    expect(await signAndVet(ilse, revision.id, await signed(revision))).toEqual({ vetted: true });
    expect((await reviewOf(revision)).state).toBe('vetted');
    expect(await ledgerOf(revision)).toEqual(['revision.signed', 'revision.signed', 'revision.vetted']);
    expect(await lettersAbout(revision, 'vetted')).toMatchObject([{ recipientId: author.id }]);
  });

  it('refuses one’s own, a second signature, an unticked point and an empty sentence', async () => {
    const own = await tried(tomas);
    await expect(signAndVet(tomas, own.id, await signed(own))).rejects.toThrow('Authors cannot sign their own');
    const revision = await tried();
    const input = await signed(revision);
    await expect(signAndVet(author, revision.id, input)).rejects.toThrow('Only a maintainer decides');
    await expect(signAndVet(tomas, revision.id, { ...input, points: ['facts'] })).rejects.toThrow('Not ticked yet');
    await expect(signAndVet(tomas, revision.id, { ...input, sentence: '  ' })).rejects.toThrow('needs a sentence');
    expect(await signaturesUnder(revision)).toEqual([]);
    await signAndVet(tomas, revision.id, input);
    await expect(signAndVet(tomas, revision.id, await signed(revision))).rejects.toThrow('You have signed this');
    expect(await signaturesUnder(revision)).toEqual([{ by: tomas.id }]);
  });

  it('counts once where one person presses twice at once', async () => {
    const revision = await tried();
    const input = await signed(revision);
    const outcomes = await atOnce(signAndVet(tomas, revision.id, input), signAndVet(tomas, revision.id, input));
    expect(outcomes.toSorted()).toEqual(['done', 'not-allowed']);
    expect(await ledgerOf(revision)).toEqual(['revision.signed']);
  });

  it('lets one of two who sign at once through; the other is told, and may then be the second', async () => {
    for (let round = 0; round < 5; round++) {
      const revision = await tried();
      const input = await signed(revision);
      const outcomes = await atOnce(signAndVet(tomas, revision.id, input), signAndVet(ilse, revision.id, input));
      expect(outcomes.toSorted()).toEqual(['conflict', 'done']);
      expect(await signaturesUnder(revision)).toHaveLength(1);
      const other = outcomes[0] === 'done' ? ilse : tomas;
      await expect(signAndVet(other, revision.id, input)).rejects.toThrow('somebody else has signed it');
      expect(await signAndVet(other, revision.id, await signed(revision))).toEqual({ vetted: true });
    }
  });

  it('vets once where two bring the last signature at the same moment', async () => {
    for (let round = 0; round < 5; round++) {
      const before = await aVettedRevision(author);
      const revision = await tried(author, { of: before });
      await aSignature(revision, await aPerson('maintainer'));
      const input = await signed(revision);
      const outcomes = await atOnce(signAndVet(tomas, revision.id, input), signAndVet(ilse, revision.id, input));
      expect(outcomes.toSorted()).toEqual(['conflict', 'done']);
      expect(await ledgerOf(revision)).toEqual(['revision.signed', 'revision.vetted']);
      expect((await reviewOf(before)).state).toBe('superseded');
    }
  });

  it('leaves no signature behind where the vetting with it fails', async () => {
    const revision = await tried();
    await aSignature(revision, await aPerson('maintainer'));
    await db.execute(
      sql.raw(`
      create function spoil_letters() returns trigger language plpgsql as $$ begin
        if new.kind = 'vetted' then raise exception 'spoiled'; end if; return new; end $$;
      create trigger spoil_letters before insert on letters for each row execute function spoil_letters()`),
    );
    await expect(signAndVet(tomas, revision.id, await signed(revision))).rejects.toThrow();
    await db.execute(sql.raw('drop trigger spoil_letters on letters; drop function spoil_letters()'));
    expect(await signaturesUnder(revision)).toHaveLength(1);
    expect((await reviewOf(revision)).state).toBe('in-review');
    expect(await ledgerOf(revision)).toEqual([]);
  });
});

describe('while the author edits', () => {
  it('a signature under what was read before is refused, and says that the text changed', async () => {
    const revision = await tried();
    const seen = await seenNow(revision);
    await returnRevision(ilse, revision.id, 'A sign is wrong.', seen);
    await expect(signAndVet(tomas, revision.id, await signed(revision, seen))).rejects.toThrow(
      'it has been returned to its author',
    );
    await rewritten(revision, 'The sign is right now.');
    await expect(signAndVet(tomas, revision.id, await signed(revision, seen))).rejects.toThrow(
      'its author has changed the text',
    );
    expect(await signaturesUnder(revision)).toEqual([]);
  });

  it('new text after a return makes earlier signatures void, and they stay to be seen', async () => {
    const revision = await tried();
    await signAndVet(tomas, revision.id, await signed(revision));
    await returnRevision(ilse, revision.id, 'A sign is wrong.', await seenNow(revision));
    await rewritten(revision, 'The sign is right now.');
    expect(await listAllSignatures(db, revision.id)).toMatchObject([{ name: tomas.name, isVoid: true }]);
    expect((await listDesk(db, ilse)).find(({ id }) => id === revision.id)?.signers).toEqual([]);
    expect(await signAndVet(ilse, revision.id, await signed(revision))).toEqual({ vetted: false });
    expect(await signAndVet(tomas, revision.id, await signed(revision))).toEqual({ vetted: true });
  });

  it('the same text sent in again keeps its signatures', async () => {
    const revision = await tried();
    await signAndVet(tomas, revision.id, await signed(revision));
    await returnRevision(ilse, revision.id, 'Is the source the second edition?', await seenNow(revision));
    await submitRevision(author, revision.id);
    expect(await listAllSignatures(db, revision.id)).toMatchObject([{ isVoid: false }]);
  });

  it('nobody signs a text that its author takes back at the same moment without the ledger in that order', async () => {
    for (let round = 0; round < 6; round++) {
      const revision = await tried();
      const input = await signed(revision);
      const [taken, sign] = await atOnce(takeBackRevision(author, revision.id), signAndVet(tomas, revision.id, input));
      expect(taken).toBe('done');
      expect(await ledgerOf(revision)).toEqual(
        sign === 'done' ? ['revision.signed', 'revision.taken-back'] : ['revision.taken-back'],
      );
      expect(await signaturesUnder(revision)).toHaveLength(sign === 'done' ? 1 : 0);
    }
  });
});

describe('returning and withdrawing from the desk', () => {
  it('tells the second of two who return at once, and writes one letter', async () => {
    const revision = await tried();
    const seen = await seenNow(revision);
    const outcomes = await atOnce(
      returnRevision(tomas, revision.id, 'A sign is wrong.', seen),
      returnRevision(ilse, revision.id, 'The halo is missing.', seen),
    );
    expect(outcomes.toSorted()).toEqual(['conflict', 'done']);
    expect(await lettersAbout(revision, 'returned')).toHaveLength(1);
  });

  it('withdraws what was read, not what came after it', async () => {
    const revision = await aVettedRevision(author);
    const adopter = await aPerson('reader');
    await insertAdoption(db, { revisionId: revision.id, personId: adopter.id, code: 'Skerry', purpose: 'tides' });
    const seen = await seenNow(revision);
    const reason = 'The bound was rounded up.';
    await expect(withdrawRevision(tomas, revision.id, { reason, seen: 'vetted:0:0' })).rejects.toThrow('changed');
    await expect(withdrawRevision(tomas, revision.id, { reason, seen, useInstead: 'nowhere' })).rejects.toThrow(
      'There is no other entry at nowhere.',
    );
    await withdrawRevision(tomas, revision.id, { reason, seen });
    expect(await lettersAbout(revision, 'recall')).toMatchObject([
      { recipientId: adopter.id, payload: { kind: 'withdrawn', codes: ['Skerry'] } },
    ]);
  });
});

describe('the desk', () => {
  it('lists what waits longest first, then what was returned, and nothing else', async () => {
    const first = await tried();
    const second = await tried();
    await db.execute(sql`update revisions set state_since = now() - interval '9 days' where id = ${second.id}`);
    const back = await tried();
    await returnRevision(tomas, back.id, 'A sign is wrong.');
    const draft = await aDraft(author);
    const desk = (await listDesk(db, tomas)).map(({ id }) => id);
    expect(desk.indexOf(second.id)).toBeLessThan(desk.indexOf(first.id));
    expect(desk.indexOf(first.id)).toBeLessThan(desk.indexOf(back.id));
    expect(desk).not.toContain(draft.id);
  });

  it('shows another’s returned revision to maintainers and its author, not to other contributors', async () => {
    const back = await tried();
    await returnRevision(tomas, back.id, 'A sign is wrong.');
    const has = async (viewer: Actor) => (await listDesk(db, viewer)).some(({ id }) => id === back.id);
    expect(await has(ilse)).toBe(true);
    expect(await has(author)).toBe(true);
    expect(await has(await aPerson('contributor'))).toBe(false);
    expect((await listDecisions(db, await aPerson('contributor'), 50)).some((one) => one.revisionId === back.id)).toBe(
      false,
    );
  });

  it('counts for each maintainer what they have not signed and did not write', async () => {
    const newcomer = await aPerson('maintainer');
    const before = await countWaitingFor(db, newcomer.id);
    const revision = await tried();
    await tried(newcomer);
    expect(await countWaitingFor(db, newcomer.id)).toBe(before + 1);
    await signAndVet(newcomer, revision.id, await signed(revision));
    expect(await countWaitingFor(db, newcomer.id)).toBe(before);
  });

  it('holds a revision against the one in force, and the first one against nothing', async () => {
    const first = await aVettedRevision(author);
    const next = await tried(author, { of: first });
    expect(await findComparedWith(db, next.entryId, next.number)).toMatchObject({ id: first.id, state: 'vetted' });
    expect(await findComparedWith(db, first.entryId, first.number)).toBeNull();
    await aSignature(next, tomas);
    await signAndVet(ilse, next.id, await signed(next));
    // Once in force itself, against the one it superseded.
    expect(await findComparedWith(db, next.entryId, next.number)).toMatchObject({ id: first.id, state: 'superseded' });
    const [row] = await db.select({ state: revisions.state }).from(revisions).where(eq(revisions.id, next.id));
    expect(row?.state).toBe('vetted');
  });
});
