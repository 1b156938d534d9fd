import { and, eq, sql } from 'drizzle-orm';
import { describe, expect, it } from 'vitest';
import { findSheet, listCatalogLines } from '@/db/queries/entries';
import { findPersonByEmail } from '@/db/queries/people';
import { letters } from '@/db/schema/house';
import { people } from '@/db/schema/people';
import { revisions } from '@/db/schema/revisions';
import { trials } from '@/db/schema/trials';
import type { DemoEntry } from '@/db/seed/demo-entry';
import { DEMO_ENTRIES } from '@/db/seed/entries/all-entries';
import { seedBook } from '@/db/seed/seed-book';
import { signIn } from '@/lib/auth/sign-in';
import type { EntryKind } from '@/lib/entries/entry';
import { DEMO_PASSWORD, DEMO_PEOPLE } from '@/lib/people/demo-people';
import { ROLES } from '@/lib/people/role';
import { demoActor } from '@/lib/reviews/demo-actor';
import { takeBackRevision } from '@/lib/reviews/take-back-revision';
import { vetDemoEntry, vetWaitingDemoEntries } from '@/lib/reviews/vet-demo-entries';
import { useTestDatabase } from '../support/test-database';

const { db } = useTestDatabase();
const silent = () => undefined;
const administrator = () => demoActor('ruth.halloran@example.org');

const one = (wanted: (entry: DemoEntry) => boolean): DemoEntry => {
  const found = DEMO_ENTRIES.find(wanted);
  if (!found) throw new Error('the demo has no such entry');
  return found;
};
const revisionOf = async ({ slug }: DemoEntry, number?: number) => {
  const sheet = await findSheet(db, await administrator(), slug, number);
  if (!sheet) throw new Error(`no sheet of ${slug}`);
  return sheet;
};
/** What the worker does when all findings are in. */
const finishTrials = (revisionId: string, state: 'passed' | 'failed') =>
  db.update(trials).set({ state, finishedAt: new Date() }).where(eq(trials.revisionId, revisionId));
const everything = async () => {
  const { rows } = await db.execute(sql`select
    (select count(*)::int from people) people, (select count(*)::int from entries) entries,
    (select count(*)::int from revisions) revisions, (select count(*)::int from trials) trials,
    (select count(*)::int from remarks) remarks, (select count(*)::int from events) events,
    (select count(*)::int from letters) letters`);
  return rows[0];
};

describe('the demo', () => {
  it('books every one of its entries with computed facts, and adds nothing when it runs again', async () => {
    const first = await seedBook(DEMO_ENTRIES, silent);
    expect(first.troubles).toEqual([]);
    expect(first).toMatchObject({ people: DEMO_PEOPLE.length, added: DEMO_ENTRIES.length });
    const before = await everything();
    expect(await seedBook(DEMO_ENTRIES, silent)).toEqual({ people: 0, added: 0, troubles: [] });
    expect(await everything()).toEqual(before);

    const lines = await listCatalogLines(db, await administrator());
    expect(lines).toHaveLength(DEMO_ENTRIES.length);
    const kinds = (kind: EntryKind) => lines.filter((line) => line.kind === kind).length;
    for (const kind of ['scheme', 'time-method', 'stencil'] as const) expect(kinds(kind)).toBeGreaterThan(3);
    const withFacts = await db.select({ id: revisions.id }).from(revisions).where(eq(revisions.verdict, 'facts'));
    const all = await db.select({ id: revisions.id }).from(revisions);
    expect(withFacts).toHaveLength(all.length);
  }, 180_000);

  it('has people of every role who can sign in in demo mode', async () => {
    expect(new Set(DEMO_PEOPLE.map(({ role }) => role))).toEqual(new Set(ROLES));
    for (const { email } of DEMO_PEOPLE)
      expect(await signIn(db, { email, password: DEMO_PASSWORD, address: '192.0.2.1' }, true)).toMatchObject({
        kind: 'signed-in',
      });
  });

  it('leaves alone what people have changed since', async () => {
    const entry = one(({ plan, earlier }) => plan.become === 'in-review' && !plan.signedBy && !earlier);
    const { revisionId } = await revisionOf(entry);
    await takeBackRevision(await demoActor(entry.author), revisionId);
    await db.update(people).set({ role: 'reader' }).where(eq(people.email, 'pavel.marsh@example.org'));
    await seedBook(DEMO_ENTRIES, silent);
    expect(await revisionOf(entry)).toMatchObject({ state: 'draft' });
    expect(await findPersonByEmail(db, 'pavel.marsh@example.org')).toMatchObject({ role: 'reader' });
    await db.update(people).set({ role: 'contributor' }).where(eq(people.email, 'pavel.marsh@example.org'));
  }, 60_000);

  it('puts a draft, a return and a submission where the plan wants them', async () => {
    expect(await revisionOf(one(({ plan }) => plan.become === 'draft'))).toMatchObject({ state: 'draft' });
    const returned = one(({ plan }) => plan.become === 'returned');
    expect(await revisionOf(returned)).toMatchObject({
      state: 'returned',
      stateReason: returned.plan.become === 'returned' ? returned.plan.reason : '',
    });
    const vetted = one(({ plan, earlier }) => plan.become === 'vetted' && !earlier);
    expect(await revisionOf(vetted)).toMatchObject({
      state: 'in-review',
      latestTrial: { state: 'waiting' },
      vettingObstacle: 'Its trial is still to finish.',
    });
  });
});

describe('the demo’s maintainers', () => {
  it('do not vet before the trial passes, nor after it failed', async () => {
    const entry = one(({ plan, earlier }) => plan.become === 'vetted' && !earlier);
    const { revisionId } = await revisionOf(entry);
    await vetDemoEntry(revisionId);
    await finishTrials(revisionId, 'failed');
    await vetDemoEntry(revisionId);
    expect(await revisionOf(entry)).toMatchObject({ state: 'in-review', signatures: [] });
  });

  it('sign and vet once the trial has passed, and record who uses it', async () => {
    const entry = one(
      ({ plan, earlier, adoptions }) => plan.become === 'vetted' && !earlier && (adoptions ?? []).length > 0,
    );
    const { revisionId } = await revisionOf(entry);
    await finishTrials(revisionId, 'passed');
    await vetDemoEntry(revisionId);
    // Called again, as after a crash: nothing happens twice.
    await vetDemoEntry(revisionId);
    const sheet = await revisionOf(entry);
    expect(sheet.state).toBe('vetted');
    expect(sheet.signatures).toHaveLength(2);
    expect(sheet.signatures.map(({ name }) => name)).not.toContain(sheet.author);
    expect(sheet.usedBy.map(({ code }) => code).sort()).toEqual((entry.adoptions ?? []).map(({ code }) => code).sort());
  });

  it('decide once where two workers ask at the same moment', async () => {
    const [entry] = DEMO_ENTRIES.filter(({ plan, earlier }) => plan.become === 'vetted' && !earlier).slice(5);
    if (!entry) throw new Error('the demo has too few entries');
    const { revisionId } = await revisionOf(entry);
    await finishTrials(revisionId, 'passed');
    await Promise.all([vetDemoEntry(revisionId), vetDemoEntry(revisionId), vetDemoEntry(revisionId)]);
    await vetWaitingDemoEntries();
    const sheet = await revisionOf(entry);
    expect(sheet).toMatchObject({ state: 'vetted' });
    expect(sheet.signatures).toHaveLength(2);
  });

  it('withdraw the scheme that grows for every step, with the reason', async () => {
    const entry = one(({ slug }) => slug === 'forward-euler-central');
    const { revisionId } = await revisionOf(entry);
    await finishTrials(revisionId, 'passed');
    await vetDemoEntry(revisionId);
    expect(await revisionOf(entry)).toMatchObject({
      state: 'withdrawn',
      stateReason: entry.plan.become === 'withdrawn' ? entry.plan.reason : '',
      facts: { stability: { verdict: 'unstable for all nonzero values' } },
    });
  });

  it('supersede an earlier revision by the next, and its adopters are told', async () => {
    const entry = one(({ earlier, plan }) => earlier !== undefined && plan.become === 'vetted');
    const last = (entry.earlier?.length ?? 0) + 1;
    for (let number = 1; number <= last; number++) {
      const { revisionId } = await revisionOf(entry, number);
      await finishTrials(revisionId, 'passed');
      // As at the start of a worker that was killed between the trial and the decision.
      await vetWaitingDemoEntries();
      expect(await revisionOf(entry, number)).toMatchObject({ state: 'vetted' });
    }
    const superseded = await revisionOf(entry, last - 1);
    expect(superseded).toMatchObject({ state: 'superseded', replacement: { slug: entry.slug, revision: last } });
    const adopters = (entry.adoptions ?? []).filter(({ revision }) => revision === last - 1);
    const recalls = await db
      .select({ id: letters.id })
      .from(letters)
      .where(and(eq(letters.kind, 'recall'), sql`${letters.payload} ->> 'revisionId' = ${superseded.revisionId}`));
    expect(recalls).toHaveLength(new Set(adopters.map(({ by }) => by)).size);
  });

  it('sign what stays in review, and leave it there', async () => {
    const entry = one(({ plan }) => plan.become === 'in-review' && plan.signedBy?.length === 1);
    const { revisionId } = await revisionOf(entry);
    await finishTrials(revisionId, 'passed');
    await vetDemoEntry(revisionId);
    const sheet = await revisionOf(entry);
    expect(sheet).toMatchObject({ state: 'in-review', vettingObstacle: expect.stringContaining('one of two') });
    expect(sheet.signatures).toHaveLength(1);
  });
});
