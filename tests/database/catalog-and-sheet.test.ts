import { beforeAll, describe, expect, it } from 'vitest';
import { insertAdoption } from '@/db/queries/adoptions';
import { findSheet, listCatalogLines } from '@/db/queries/entries';
import { findKernelSubject, findKernelSubjectById } from '@/db/queries/kernel-subjects';
import { insertRemark } from '@/db/queries/remarks';
import { moveRevision } from '@/db/queries/revisions';
import { findings, trials } from '@/db/schema/trials';
import type { CatalogLine } from '@/lib/entries/entry';
import type { Actor } from '@/lib/people/actor';
import type { Role } from '@/lib/people/role';
import { withdrawRevision } from '@/lib/reviews/withdraw-revision';
import {
  type MadeRevision,
  aDraft,
  aPerson,
  aSignature,
  aSignedRevision,
  aSubmission,
  aTrial,
  aVettedRevision,
} from '../support/makers';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();

let author: Actor;
const people = {} as Record<Role, Actor>;
beforeAll(async () => {
  author = await aPerson('contributor');
  for (const role of ['reader', 'contributor', 'maintainer', 'administrator'] as const)
    people[role] = await aPerson(role);
});

const lineOf = async (viewer: Actor, { slug }: MadeRevision) =>
  (await listCatalogLines(db, viewer)).find((line) => line.slug === slug) ?? null;

describe('who sees a revision', () => {
  const made = {} as Record<string, MadeRevision>;
  beforeAll(async () => {
    made.draft = await aDraft(author);
    made['in-review'] = await aSubmission(author);
    made.returned = await aSubmission(author);
    await moveRevision(db, made.returned.id, { from: 'in-review', to: 'returned', reason: 'A sign is wrong.' });
    made.vetted = await aVettedRevision(author);
    made.withdrawn = await aVettedRevision(author);
    await moveRevision(db, made.withdrawn.id, { from: 'vetted', to: 'withdrawn', reason: 'Wrong.' });
  });

  it.each([
    // state        reader  contributor  author  maintainer  administrator
    ['draft', false, false, true, true, true],
    ['returned', false, false, true, true, true],
    ['in-review', false, true, true, true, true],
    ['vetted', true, true, true, true, true],
    ['withdrawn', true, true, true, true, true],
  ] as const)('in state %s: reader %s, contributor %s, author %s, maintainer %s', async (state, ...seen) => {
    const revision = made[state];
    if (!revision) throw new Error(`no revision in state ${state}`);
    const viewers = [people.reader, people.contributor, author, people.maintainer, people.administrator];
    for (const [index, viewer] of viewers.entries()) {
      const where = `${viewer.name} and ${state}`;
      expect((await lineOf(viewer, revision)) !== null, `catalog: ${where}`).toBe(seen[index]);
      expect((await findSheet(db, viewer, revision.slug)) !== null, `sheet: ${where}`).toBe(seen[index]);
      expect((await findSheet(db, viewer, revision.slug, 1)) !== null, `by number: ${where}`).toBe(seen[index]);
      expect((await findKernelSubject(db, viewer, revision.slug, 1)) !== null, `kernel: ${where}`).toBe(seen[index]);
    }
  });

  it('finds nothing at an address or a number that is not there', async () => {
    expect(await findSheet(db, people.administrator, 'no-such-entry')).toBeNull();
    expect(await findSheet(db, people.administrator, made.vetted?.slug ?? '', 9)).toBeNull();
  });
});

describe('a catalog line', () => {
  it('shows the revision in force, and not a later draft, even to its author', async () => {
    const vetted = await aVettedRevision(author);
    await aDraft(author, { of: vetted, content: { title: 'Backward difference, corrected' } });
    expect(await lineOf(author, vetted)).toMatchObject({ revision: 1, state: 'vetted', title: 'Backward difference' });
  });

  it('shows the newest visible revision where none is in force', async () => {
    const first = await aVettedRevision(author);
    await aSubmission(author, { of: first });
    await withdrawRevision(people.maintainer, first.id, { reason: 'Wrong.' });
    expect(await lineOf(people.contributor, first)).toMatchObject({ revision: 2, state: 'in-review' });
    expect(await lineOf(people.reader, first)).toMatchObject({ revision: 1, state: 'withdrawn' });
  });

  it('carries authors, users, summary and the outcome of the latest trial', async () => {
    const vetted = await aVettedRevision(author);
    const adoption = { revisionId: vetted.id, personId: people.reader.id };
    await insertAdoption(db, { ...adoption, code: 'Skerry', purpose: 'tides, open shelf' });
    await insertAdoption(db, { ...adoption, code: 'Fathomline', purpose: '' });
    const line: CatalogLine | null = await lineOf(people.reader, vetted);
    expect(line).toMatchObject({
      callNumber: expect.stringMatching(/^ST \d{3}$/),
      kind: 'stencil',
      equation: null,
      authors: ['Richtmyer', 'Morton'],
      languages: ['c'],
      usedBy: ['Fathomline', 'Skerry (tides, open shelf)'],
      trialOutcome: 'passed',
      summary: { orderSpace: 1 },
    });
    expect(line?.vettedAt).toMatch(/^\d{4}-\d\d-\d\dT/);
    await aTrial(vetted, 'running');
    expect(await lineOf(people.reader, vetted)).toMatchObject({ trialOutcome: 'running' });
  });

  it('keeps those who used an earlier revision', async () => {
    const first = await aVettedRevision(author);
    await insertAdoption(db, { revisionId: first.id, personId: people.reader.id, code: 'Saltings', purpose: '' });
    const second = await aSignedRevision(author, { of: first });
    await moveRevision(db, first.id, { from: 'vetted', to: 'superseded', replacedById: second.id });
    await moveRevision(db, second.id, { from: 'in-review', to: 'vetted' });
    expect(await lineOf(people.reader, first)).toMatchObject({ revision: 2, usedBy: ['Saltings'] });
  });

  it('does not exist for a draft whose definition gives no facts', async () => {
    const draft = await aDraft(author, { content: { verdict: 'invalid', facts: null, summary: null } });
    expect(await lineOf(author, draft)).toBeNull();
    expect(await findSheet(db, author, draft.slug)).toMatchObject({ facts: null, summary: null });
  });

  it('comes in the order of call numbers', async () => {
    const numbers = (await listCatalogLines(db, people.administrator)).map(({ callNumber }) => callNumber);
    expect(numbers).toEqual([...numbers].sort());
  });
});

describe('a sheet', () => {
  it('tells revisions newest first, with those who signed, and what replaced the one shown', async () => {
    const first = await aVettedRevision(author);
    const second = await aSignedRevision(author, { of: first, content: { changeNote: 'Bound corrected.' } });
    await moveRevision(db, first.id, { from: 'vetted', to: 'superseded', replacedById: second.id });
    await moveRevision(db, second.id, { from: 'in-review', to: 'vetted', reason: 'Right.' });

    const inForce = await findSheet(db, people.reader, first.slug);
    expect(inForce).toMatchObject({ revision: 2, state: 'vetted', replacement: null, author: author.name });
    expect(inForce?.revisions).toMatchObject([
      { number: 2, state: 'vetted', note: 'Bound corrected.' },
      { number: 1, state: 'superseded' },
    ]);
    expect(inForce?.revisions.every((line) => line.people.length === 2)).toBe(true);
    expect(inForce?.signatures).toHaveLength(2);

    const old = await findSheet(db, people.reader, first.slug, 1);
    expect(old).toMatchObject({ state: 'superseded', replacement: { slug: first.slug, revision: 2 } });
  });

  it('shows remarks in the order in which they were written, once each', async () => {
    const vetted = await aVettedRevision(author);
    const remark = { revisionId: vetted.id, authorId: author.id, part: 'bound', text: 'Rounded down?' };
    await insertRemark(db, remark);
    await insertRemark(db, remark);
    await insertRemark(db, { ...remark, authorId: people.maintainer.id, text: 'Yes, to four places.' });
    expect((await findSheet(db, people.reader, vetted.slug))?.remarks).toMatchObject([
      { author: author.name, role: 'contributor', part: 'bound', text: 'Rounded down?' },
      { author: people.maintainer.name, role: 'maintainer', text: 'Yes, to four places.' },
    ]);
  });

  it('shows the latest trial with its findings in the order of the book', async () => {
    const vetted = await aVettedRevision(author);
    const queued = { revisionId: vetted.id, queuedById: author.id, state: 'failed' } as const;
    const [trial] = await db
      .insert(trials)
      .values({ ...queued, queuedAt: new Date(Date.now() + 60_000) })
      .returning();
    const finding = { trialId: trial!.id, outcome: 'passed', measured: '0', target: '0', how: 'Counted.' } as const;
    await db.insert(findings).values([
      { ...finding, name: 'agreement', language: null },
      { ...finding, name: 'clean-build', language: 'fortran' },
      { ...finding, name: 'clean-build', language: 'c' },
    ]);
    const sheet = await findSheet(db, people.reader, vetted.slug);
    expect(sheet?.latestTrial).toMatchObject({ state: 'failed', revision: 1, queuedBy: author.name });
    expect(sheet?.latestTrial?.findings.map(({ name, language }) => `${name} ${language}`)).toEqual([
      'clean-build c',
      'clean-build fortran',
      'agreement null',
    ]);
  });

  it('says in review what a vetting waits for', async () => {
    const revision = await aSubmission(author);
    const obstacle = async () => (await findSheet(db, people.maintainer, revision.slug))?.vettingObstacle;
    expect(await obstacle()).toBe('It has not been tried yet.');
    await aTrial(revision, 'passed');
    expect(await obstacle()).toContain('It has none of two signatures');
    await aSignature(revision, people.maintainer);
    await aSignature(revision, people.administrator);
    expect(await obstacle()).toBeNull();
  });
});

describe('the subject of a kernel', () => {
  it('is all that its text depends on, for the house in any state', async () => {
    const draft = await aDraft(author);
    expect(await findKernelSubjectById(db, draft.id)).toMatchObject({
      revisionId: draft.id,
      state: 'draft',
      input: {
        slug: draft.slug,
        revision: 1,
        title: 'Backward difference',
        callNumber: expect.stringMatching(/^ST /),
        references: [
          'R. D. Richtmyer, K. W. Morton, Difference Methods for Initial-Value Problems, 2nd edition, Interscience, 1967',
        ],
      },
    });
  });
});
