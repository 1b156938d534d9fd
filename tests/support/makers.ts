/** Makers of what database tests need: people, drafts, trials, revisions in any state, each through the real tables. */
import { sql } from 'drizzle-orm';
import { db } from '@/db/client';
import { insertPerson } from '@/db/queries/people';
import {
  type RevisionContent,
  insertEntry,
  insertRevision,
  insertSignature,
  moveRevision,
} from '@/db/queries/revisions';
import { trials } from '@/db/schema/trials';
import type { Facts } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import type { Actor } from '@/lib/people/actor';
import type { Role } from '@/lib/people/role';
import { REVIEW_POINTS } from '@/lib/reviews/review-list';
import type { TrialState } from '@/lib/trials/trial';

let count = 0;

export async function aPerson(role: Role, more: { passwordHash?: string; demo?: boolean } = {}): Promise<Actor> {
  const name = `${role} ${(count += 1)}`;
  const email = `${name.replace(' ', '.')}@example.org`;
  const id = await insertPerson(db, { name, email, role, ...more });
  return { id, name, email, role };
}

/** The backward difference (u_i − u_{i−1}) / h: small, and its facts are known by heart. */
const FACTS: Facts = {
  kind: 'stencil',
  weights: ['-1', '1'],
  lhsWeights: null,
  consistent: true,
  order: 1,
  leadingError: { coefficient: '-1/2', hPower: 1, derivative: 2 },
  firstViolatedMoment: 2,
  momentResidual: '1',
  nominal: null,
  symmetry: 'none',
  extent: ['-1', '0'],
  halo: [1, 0],
  points: 2,
  lhsBandwidth: null,
  explicit: true,
  modifiedWavenumber: null,
  symbolSamples: null,
  cost: {
    operations: 2,
    additions: 1,
    multiplications: 1,
    loads: 1,
    stores: 1,
    bytesDouble: 24,
    bytesSingle: 12,
  },
};
const SUMMARY: FactsSummary = {
  dims: 1,
  explicit: true,
  orderTime: null,
  orderSpace: 1,
  arrays: null,
  levels: null,
  halo: [1, 0],
  operations: 2,
  bytes: 24,
  parameter: null,
  verdict: null,
  bounds: [],
  dissipative: null,
  sketch: {
    sites: [
      { level: 0, offset: -1, role: 'known' },
      { level: 0, offset: 0, role: 'known' },
    ],
    stages: 0,
  },
  curves: null,
};

export const someContent = (more: Partial<RevisionContent> = {}): RevisionContent => ({
  title: 'Backward difference',
  gist: 'One-sided.',
  synonyms: ['upstream difference'],
  definition: {
    kind: 'stencil',
    dims: 1,
    derivative: 1,
    offsets: ['-1', '0'],
    weights: ['-1', '1'],
  },
  notes: 'Taylor expansion to first order.',
  references: [
    {
      authors: 'R. D. Richtmyer, K. W. Morton',
      title: 'Difference Methods for Initial-Value Problems, 2nd edition',
      source: 'Interscience',
      year: 1967,
      doi: null,
      note: null,
    },
  ],
  changeNote: '',
  verdict: 'facts',
  facts: FACTS,
  summary: SUMMARY,
  problems: [],
  engineVersion: 'test',
  kernelLanguages: ['c'],
  ...more,
});

export interface MadeRevision {
  id: string;
  entryId: string;
  slug: string;
  number: number;
  author: Actor;
}

/** A draft of a new entry, or the next one of the entry of `of`. */
export async function aDraft(
  author: Actor,
  more: { of?: MadeRevision; content?: Partial<RevisionContent> } = {},
): Promise<MadeRevision> {
  const number = (count += 1);
  const slug = more.of?.slug ?? `backward-difference-${number}`;
  const entryId =
    more.of?.entryId ?? (await insertEntry(db, { letters: 'ST', number, slug, kind: 'stencil', equation: null }));
  const revision = await insertRevision(db, entryId, author.id, someContent(more.content));
  return { ...revision, entryId, slug, author };
}

export async function aTrial(revision: MadeRevision, state: TrialState): Promise<void> {
  // Each later than the one before, also within one millisecond of the clock.
  await db.insert(trials).values({
    revisionId: revision.id,
    queuedById: revision.author.id,
    state,
    queuedAt: sql`clock_timestamp()`,
  });
}

export async function aSubmission(author: Actor, more: Parameters<typeof aDraft>[1] = {}): Promise<MadeRevision> {
  const revision = await aDraft(author, more);
  await moveRevision(db, revision.id, { from: 'draft', to: 'in-review' });
  return revision;
}

export async function aSignature(revision: MadeRevision, signer: Actor): Promise<void> {
  await insertSignature(db, {
    revisionId: revision.id,
    personId: signer.id,
    points: [...REVIEW_POINTS],
    sentence: 'Checked against the source.',
  });
}

/** In review, tried, and signed by two: one move from being vetted. */
export async function aSignedRevision(author: Actor, more: Parameters<typeof aDraft>[1] = {}): Promise<MadeRevision> {
  const revision = await aSubmission(author, more);
  await aTrial(revision, 'passed');
  await aSignature(revision, await aPerson('maintainer'));
  await aSignature(revision, await aPerson('maintainer'));
  return revision;
}

export async function aVettedRevision(author: Actor, more: Parameters<typeof aDraft>[1] = {}): Promise<MadeRevision> {
  const revision = await aSignedRevision(author, more);
  await moveRevision(db, revision.id, { from: 'in-review', to: 'vetted', reason: 'Signed by two.' });
  return revision;
}
