import { eq, sql } from 'drizzle-orm';
import { beforeAll, describe, expect, it } from 'vitest';
import { brokenRule } from '@/db/errors';
import { insertEvent } from '@/db/queries/house';
import { insertEntry, moveRevision, saveContent } from '@/db/queries/revisions';
import { people } from '@/db/schema/people';
import { revisions } from '@/db/schema/revisions';
import { signatures } from '@/db/schema/reviews';
import { trials } from '@/db/schema/trials';
import type { Actor } from '@/lib/people/actor';
import {
  aDraft,
  aPerson,
  aSignature,
  aSignedRevision,
  aSubmission,
  aTrial,
  aVettedRevision,
  someContent,
} from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

/** The name of the rule that the statement breaks; fails where it breaks none. */
const ruleBrokenBy = async (statement: PromiseLike<unknown>) => {
  try {
    await statement;
  } catch (error) {
    return brokenRule(error);
  }
  return 'none';
};
const set = (id: string, change: Partial<typeof revisions.$inferInsert>) =>
  db.update(revisions).set(change).where(eq(revisions.id, id));
const stateOf = async (id: string) => {
  const [row] = await db.select().from(revisions).where(eq(revisions.id, id));
  if (!row) throw new Error('the revision is gone');
  return row;
};

let author: Actor;
beforeAll(async () => {
  author = await aPerson('contributor');
});

describe('entries and people', () => {
  it('gives a call number and an address to one entry only', async () => {
    const { slug } = await aDraft(author);
    const entry = { letters: 'ST', number: 9999, slug: 'one-of-a-kind', kind: 'stencil', equation: null } as const;
    await insertEntry(db, entry);
    expect(await ruleBrokenBy(insertEntry(db, { ...entry, slug: 'another' }))).toBe('one_call_number_per_entry');
    expect(await ruleBrokenBy(insertEntry(db, { ...entry, number: 9998, slug }))).toBe('one_address_per_entry');
  });

  it.each([
    ['Has Capitals', 'slug_is_an_address'],
    ['two--dashes', 'slug_is_an_address'],
    ['', 'slug_is_an_address'],
  ])('refuses the address "%s"', async (slug, rule) => {
    const entry = { letters: 'ST', number: 9000, kind: 'stencil', equation: null } as const;
    expect(await ruleBrokenBy(insertEntry(db, { ...entry, slug }))).toBe(rule);
  });

  it('asks an equation of schemes and of nothing else', async () => {
    const entry = { letters: 'AD', number: 9000, slug: 'no-equation' } as const;
    const rule = 'only_schemes_have_an_equation';
    expect(await ruleBrokenBy(insertEntry(db, { ...entry, kind: 'scheme', equation: null }))).toBe(rule);
    expect(await ruleBrokenBy(insertEntry(db, { ...entry, kind: 'stencil', equation: 'wave' }))).toBe(rule);
  });

  it('keeps one account for an address, whatever its capitals', async () => {
    await db.insert(people).values({ name: 'Ada', email: 'ada@example.org' });
    const again = (email: string) => ruleBrokenBy(db.insert(people).values({ name: 'Ada', email }));
    expect(await again('ada@example.org')).toBe('one_account_per_email');
    expect(await again('Ada@example.org')).toBe('email_is_lower_case');
  });
});

describe('states of a revision', () => {
  const MOVES = [
    'draft in-review',
    'returned in-review',
    'in-review draft',
    'in-review returned',
    'in-review vetted',
    'vetted superseded',
    'vetted withdrawn',
    'superseded withdrawn',
  ];
  const STATES = ['draft', 'in-review', 'returned', 'vetted', 'superseded', 'withdrawn'] as const;

  /** A revision in that state, everything at hand for any move that is allowed. */
  async function revisionIn(state: (typeof STATES)[number]) {
    if (state === 'draft') return aDraft(author);
    if (state === 'in-review') return aSignedRevision(author);
    if (state === 'returned') {
      const returned = await aSubmission(author);
      await moveRevision(db, returned.id, { from: 'in-review', to: 'returned', reason: 'A sign is wrong.' });
      return returned;
    }
    const vetted = await aVettedRevision(author);
    if (state === 'superseded') {
      const next = await aDraft(author, { of: vetted });
      await moveRevision(db, vetted.id, { from: 'vetted', to: 'superseded', replacedById: next.id });
    }
    if (state === 'withdrawn') await moveRevision(db, vetted.id, { from: 'vetted', to: 'withdrawn', reason: 'Wrong.' });
    return vetted;
  }

  it.each(STATES.flatMap((from) => STATES.filter((to) => to !== from).map((to) => [from, to] as const)))(
    'lets a revision go from %s to %s only where the book allows it',
    async (from, to) => {
      const revision = await revisionIn(from);
      const replacement = to === 'superseded' ? await aDraft(author, { of: revision }) : null;
      const move = { from, to, reason: 'For a reason.', ...(replacement && { replacedById: replacement.id }) };
      const broken = await ruleBrokenBy(moveRevision(db, revision.id, move));
      if (MOVES.includes(`${from} ${to}`)) {
        expect(broken).toBe('none');
        expect((await stateOf(revision.id)).state).toBe(to);
      } else {
        expect(broken).toBe('allowed_moves_only');
        expect((await stateOf(revision.id)).state).toBe(from);
      }
    },
  );

  it('begins every revision as a draft', async () => {
    const { entryId } = await aDraft(author);
    const row = { ...someContent(), entryId, authorId: author.id, number: 7, state: 'vetted', vettedAt: new Date() };
    expect(await ruleBrokenBy(db.insert(revisions).values({ ...row, state: 'vetted' }))).toBe(
      'revision_is_born_a_draft',
    );
  });

  it('dates what is vetted, and never changes the date', async () => {
    const signed = await aSignedRevision(author);
    expect(await ruleBrokenBy(set(signed.id, { state: 'vetted' }))).toBe('vetted_means_dated');
    const draft = await aDraft(author);
    expect(await ruleBrokenBy(set(draft.id, { vettedAt: new Date() }))).toBe('vetted_means_dated');
    const vetted = await aVettedRevision(author);
    expect(await ruleBrokenBy(set(vetted.id, { vettedAt: new Date(0) }))).toBe('vetted_date_stands');
  });

  it('has one vetted revision of an entry at most', async () => {
    const first = await aVettedRevision(author);
    const second = await aSignedRevision(author, { of: first });
    expect(await ruleBrokenBy(moveRevision(db, second.id, { from: 'in-review', to: 'vetted' }))).toBe(
      'one_vetted_revision_per_entry',
    );
  });

  it('supersedes a revision by a later one of its own entry only', async () => {
    const vetted = await aVettedRevision(author);
    const other = await aDraft(author);
    const supersede = (replacedById: string | null) =>
      ruleBrokenBy(moveRevision(db, vetted.id, { from: 'vetted', to: 'superseded', replacedById }));
    expect(await supersede(other.id)).toBe('superseded_by_a_later_revision');
    expect(await supersede(null)).toBe('superseded_by_a_later_revision');
    expect(await supersede(vetted.id)).toBe('superseded_by_a_later_revision');
  });

  it('returns and withdraws with a reason only', async () => {
    const submitted = await aSubmission(author);
    const rule = 'returned_and_withdrawn_say_why';
    expect(await ruleBrokenBy(moveRevision(db, submitted.id, { from: 'in-review', to: 'returned' }))).toBe(rule);
    const vetted = await aVettedRevision(author);
    const blank = { from: 'vetted', to: 'withdrawn', reason: '  ' } as const;
    expect(await ruleBrokenBy(moveRevision(db, vetted.id, blank))).toBe(rule);
  });

  it('does not submit a definition without facts', async () => {
    const draft = await aDraft(author, { content: { verdict: 'inconsistent', facts: null, summary: null } });
    expect(await ruleBrokenBy(moveRevision(db, draft.id, { from: 'draft', to: 'in-review' }))).toBe(
      'submitted_means_valid',
    );
  });
});

describe('what was vetted', () => {
  it.each([
    ['title', { title: 'Another' }],
    ['gist', { gist: 'Another.' }],
    ['synonyms', { synonyms: ['another'] }],
    [
      'definition',
      { definition: { kind: 'stencil', dims: 1, derivative: 1, offsets: ['0', '1'], weights: ['-1', '1'] } },
    ],
    ['notes', { notes: 'Another.' }],
    ['references', { references: [] }],
    ['change note', { changeNote: 'Another.' }],
    ['facts', { facts: null }],
    ['summary', { summary: null }],
    ['engine version', { engineVersion: 'another' }],
  ] satisfies [string, Partial<typeof revisions.$inferInsert>][])(
    'keeps its %s in review and after',
    async (_, change) => {
      for (const revision of [await aSubmission(author), await aVettedRevision(author)])
        expect(await ruleBrokenBy(set(revision.id, change))).toBe('content_is_frozen');
    },
  );

  it('keeps entry, number and author', async () => {
    const vetted = await aVettedRevision(author);
    const other = await aDraft(author);
    const rule = 'revision_keeps_its_identity';
    expect(await ruleBrokenBy(set(vetted.id, { entryId: other.entryId, number: 9 }))).toBe(rule);
    expect(await ruleBrokenBy(set(vetted.id, { number: 9 }))).toBe(rule);
    expect(await ruleBrokenBy(set(vetted.id, { authorId: (await aPerson('reader')).id }))).toBe(rule);
  });

  it('is not deleted; a draft is', async () => {
    const vetted = await aVettedRevision(author);
    const remove = (id: string) => ruleBrokenBy(db.delete(revisions).where(eq(revisions.id, id)));
    expect(await remove(vetted.id)).toBe('only_drafts_are_deleted');
    expect(await remove((await aSubmission(author)).id)).toBe('only_drafts_are_deleted');
    expect(await remove((await aDraft(author)).id)).toBe('none');
    expect(await ruleBrokenBy(db.execute(sql`truncate revisions cascade`))).toMatch(/_only_grow$/);
  });
});

describe('signatures', () => {
  it('needs two before a revision is vetted, as the settings say', async () => {
    const revision = await aSubmission(author);
    await aTrial(revision, 'passed');
    const vet = () => ruleBrokenBy(moveRevision(db, revision.id, { from: 'in-review', to: 'vetted' }));
    expect(await vet()).toBe('vetted_means_signed');
    await aSignature(revision, await aPerson('maintainer'));
    expect(await vet()).toBe('vetted_means_signed');
    await aSignature(revision, await aPerson('administrator'));
    expect(await vet()).toBe('none');
  });

  it('needs a passed trial of the present text, the last one queued', async () => {
    const revision = await aSubmission(author);
    await aSignature(revision, await aPerson('maintainer'));
    await aSignature(revision, await aPerson('maintainer'));
    const vet = () => ruleBrokenBy(moveRevision(db, revision.id, { from: 'in-review', to: 'vetted' }));
    expect(await vet()).toBe('vetted_means_tried');
    await aTrial(revision, 'passed');
    await aTrial(revision, 'failed');
    expect(await vet()).toBe('vetted_means_tried');
    await aTrial(revision, 'passed');
    expect(await vet()).toBe('none');
  });

  it('takes none from the author, also where the author is a maintainer', async () => {
    const maintainer = await aPerson('maintainer');
    const revision = await aSubmission(maintainer);
    expect(await ruleBrokenBy(aSignature(revision, maintainer))).toBe('authors_do_not_sign');
  });

  it('takes them from maintainers who are not disabled', async () => {
    const revision = await aSubmission(author);
    expect(await ruleBrokenBy(aSignature(revision, await aPerson('contributor')))).toBe('maintainers_sign');
    const gone = await aPerson('maintainer');
    await db.update(people).set({ disabledAt: new Date() }).where(eq(people.id, gone.id));
    expect(await ruleBrokenBy(aSignature(revision, gone))).toBe('maintainers_sign');
  });

  it('takes one from each person, with every point ticked and a sentence', async () => {
    const revision = await aSubmission(author);
    const signer = await aPerson('maintainer');
    const sign = (points: string[], sentence: string) =>
      ruleBrokenBy(db.insert(signatures).values({ revisionId: revision.id, personId: signer.id, points, sentence }));
    expect(await sign(['definition'], 'Checked.')).toBe('every_point_is_ticked');
    expect(await sign(['definition', 'facts', 'start-up', 'naming'], ' ')).toBe('signature_has_a_sentence');
    await aSignature(revision, signer);
    expect(await ruleBrokenBy(aSignature(revision, signer))).toBe('one_signature_per_person');
  });

  it('are void, and trials with them, once the author has changed the text after a return', async () => {
    const revision = await aSignedRevision(author);
    await moveRevision(db, revision.id, { from: 'in-review', to: 'returned', reason: 'A sign is wrong.' });
    expect(await saveContent(db, revision.id, 1, someContent({ notes: 'The sign is right now.' }))).toBe(2);
    await moveRevision(db, revision.id, { from: 'returned', to: 'in-review' });
    const vet = () => ruleBrokenBy(moveRevision(db, revision.id, { from: 'in-review', to: 'vetted' }));
    expect(await vet()).toBe('vetted_means_signed');
    await aSignature(revision, await aPerson('maintainer'));
    await aSignature(revision, await aPerson('maintainer'));
    expect(await vet()).toBe('vetted_means_tried');
    await aTrial(revision, 'passed');
    expect(await vet()).toBe('none');
  });

  it('are neither changed nor taken back', async () => {
    const revision = await aSignedRevision(author);
    const mine = eq(signatures.revisionId, revision.id);
    expect(await ruleBrokenBy(db.update(signatures).set({ sentence: 'No.' }).where(mine))).toBe('signatures_only_grow');
    expect(await ruleBrokenBy(db.delete(signatures).where(mine))).toBe('signatures_only_grow');
  });
});

describe('the version of a text', () => {
  it('goes up with every change of content and with nothing else', async () => {
    const draft = await aDraft(author);
    expect(await saveContent(db, draft.id, 1, someContent())).toBe(1);
    expect(await saveContent(db, draft.id, 1, someContent({ notes: 'More.' }))).toBe(2);
    await moveRevision(db, draft.id, { from: 'draft', to: 'in-review' });
    await set(draft.id, { version: 40 });
    expect((await stateOf(draft.id)).version).toBe(2);
  });

  it('is stamped on a trial when it is queued', async () => {
    const draft = await aDraft(author);
    await saveContent(db, draft.id, 1, someContent({ notes: 'More.' }));
    await aTrial(draft, 'waiting');
    const [trial] = await db.select().from(trials).where(eq(trials.revisionId, draft.id));
    expect(trial?.revisionVersion).toBe(2);
  });
});

describe('the ledger', () => {
  it('refuses updates, deletes and truncation', async () => {
    await insertEvent(db, { kind: 'draft.created', actorId: author.id, subjectId: null });
    expect(await ruleBrokenBy(db.execute(sql`update events set kind = 'nothing'`))).toBe('events_only_grow');
    expect(await ruleBrokenBy(db.execute(sql`delete from events`))).toBe('events_only_grow');
    expect(await ruleBrokenBy(db.execute(sql`truncate events`))).toBe('events_only_grow');
  });
});
