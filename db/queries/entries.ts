import { and, asc, desc, eq, inArray, isNull, sql } from 'drizzle-orm';
import { authorSurnames } from '@/lib/entries/author-surnames';
import { formatCallNumber } from '@/lib/entries/call-number';
import type { CatalogLine, SheetView } from '@/lib/entries/entry';
import { bookObstacle } from '@/lib/reviews/review-rules';
import type { TrialState } from '@/lib/trials/trial';
import type { Database } from '../client';
import { adoptions } from '../schema/adoptions';
import { entries } from '../schema/entries';
import { people } from '../schema/people';
import { revisions } from '../schema/revisions';
import { trials } from '../schema/trials';
import { findLatestTrial } from './latest-trial';
import { listRemarks } from './remarks';
import { findReview } from './revisions';
import { findReplacement, listSignatures, listUses, listVisibleRevisions, revisionLine } from './sheet-parts';
import { type Viewer, visibleTo } from './visible-to';

/** A refused trial has tried nothing. */
const OUTCOME: Readonly<Record<TrialState, CatalogLine['trialOutcome']>> = {
  waiting: 'waiting',
  running: 'running',
  passed: 'passed',
  failed: 'failed',
  refused: 'none',
};

/**
 * Every entry that the viewer may see, by call number: the revision in force, or else the newest visible one.
 * A draft without a summary (its definition does not hold yet) has no line.
 */
export async function listCatalogLines(db: Database, viewer: Viewer): Promise<CatalogLine[]> {
  const shown = await db
    .selectDistinctOn([entries.letters, entries.number], {
      entryId: entries.id,
      letters: entries.letters,
      number: entries.number,
      slug: entries.slug,
      kind: entries.kind,
      equation: entries.equation,
      revisionId: revisions.id,
      title: revisions.title,
      gist: revisions.gist,
      synonyms: revisions.synonyms,
      references: revisions.references,
      revision: revisions.number,
      state: revisions.state,
      vettedAt: revisions.vettedAt,
      summary: revisions.summary,
      languages: revisions.kernelLanguages,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .where(and(visibleTo(viewer), sql`${revisions.summary} is not null`))
    .orderBy(
      asc(entries.letters),
      asc(entries.number),
      desc(sql`${revisions.state} = 'vetted'`),
      desc(revisions.number),
    );
  const ids = shown.map(({ revisionId }) => revisionId);
  const [latest, users] = await Promise.all([listLatestTrialStates(db, ids), listUsers(db, ids)]);

  return shown.flatMap(({ letters, number, revisionId, references, summary, vettedAt, ...line }) => {
    if (!summary) return [];
    const trial = latest.get(revisionId);
    return {
      ...line,
      callNumber: formatCallNumber(letters, number),
      authors: authorSurnames(references),
      vettedAt: vettedAt?.toISOString() ?? null,
      summary,
      usedBy: users.get(revisionId) ?? [],
      trialOutcome: trial ? OUTCOME[trial] : 'none',
    };
  });
}

async function listLatestTrialStates(db: Database, revisionIds: string[]): Promise<Map<string, TrialState>> {
  if (revisionIds.length === 0) return new Map();
  const rows = await db
    .selectDistinctOn([trials.revisionId], { revisionId: trials.revisionId, state: trials.state })
    .from(trials)
    .where(inArray(trials.revisionId, revisionIds))
    .orderBy(asc(trials.revisionId), desc(trials.queuedAt), asc(trials.id));
  return new Map(rows.map(({ revisionId, state }) => [revisionId, state]));
}

/** Codes that use any revision of the entry now: "Saltings (tides, inner estuary)", by the revision shown. */
async function listUsers(db: Database, revisionIds: string[]): Promise<Map<string, string[]>> {
  if (revisionIds.length === 0) return new Map();
  const adopted = db
    .$with('adopted')
    .as(
      db
        .selectDistinct({ entryId: revisions.entryId, code: adoptions.code, purpose: adoptions.purpose })
        .from(adoptions)
        .innerJoin(revisions, eq(revisions.id, adoptions.revisionId))
        .where(isNull(adoptions.endedAt)),
    );
  const rows = await db
    .with(adopted)
    .select({ revisionId: revisions.id, code: adopted.code, purpose: adopted.purpose })
    .from(revisions)
    .innerJoin(adopted, eq(adopted.entryId, revisions.entryId))
    .where(inArray(revisions.id, revisionIds))
    .orderBy(asc(adopted.code));
  const users = new Map<string, string[]>();
  for (const { revisionId, code, purpose } of rows)
    users.set(revisionId, [...(users.get(revisionId) ?? []), purpose ? `${code} (${purpose})` : code]);
  return users;
}

const iso = (moment: Date | null) => moment?.toISOString() ?? null;

/**
 * The sheet of an entry: the revision asked for, or the one in force, or else the newest that the viewer may
 * see; null where there is none.
 */
export async function findSheet(
  db: Database,
  viewer: Viewer,
  slug: string,
  revisionNumber?: number,
): Promise<SheetView | null> {
  const visible = await listVisibleRevisions(db, viewer, slug);
  const wanted =
    revisionNumber === undefined
      ? (visible.find(({ state }) => state === 'vetted') ?? visible[0])
      : visible.find(({ number }) => number === revisionNumber);
  if (!wanted) return null;
  const [sheet] = await db
    .select({
      entryId: entries.id,
      revisionId: revisions.id,
      letters: entries.letters,
      number: entries.number,
      slug: entries.slug,
      kind: entries.kind,
      equation: entries.equation,
      title: revisions.title,
      gist: revisions.gist,
      synonyms: revisions.synonyms,
      notes: revisions.notes,
      revision: revisions.number,
      version: revisions.version,
      state: revisions.state,
      stateReason: revisions.stateReason,
      replacedById: revisions.replacedById,
      authorId: revisions.authorId,
      author: people.name,
      vettedAt: revisions.vettedAt,
      definition: revisions.definition,
      facts: revisions.facts,
      summary: revisions.summary,
      problems: revisions.problems,
      engineVersion: revisions.engineVersion,
      references: revisions.references,
    })
    .from(revisions)
    .innerJoin(entries, eq(entries.id, revisions.entryId))
    .innerJoin(people, eq(people.id, revisions.authorId))
    .where(eq(revisions.id, wanted.id));
  if (!sheet) return null;

  const ids = visible.map(({ id }) => id);
  const [signed, usedBy, remarked, latestTrial, review, replacement] = await Promise.all([
    listSignatures(db, ids),
    listUses(db, sheet.entryId),
    listRemarks(db, wanted.id),
    findLatestTrial(db, wanted.id),
    findReview(db, wanted.id),
    sheet.replacedById ? findReplacement(db, sheet.replacedById) : null,
  ]);
  const { letters, number, version, replacedById: _replaced, vettedAt, ...rest } = sheet;
  return {
    ...rest,
    callNumber: formatCallNumber(letters, number),
    vettedAt: iso(vettedAt),
    replacement,
    signatures: signed
      .filter((one) => one.revisionId === wanted.id && one.revisionVersion === version)
      .map(({ name, at, sentence }) => ({ name, at: at.toISOString(), sentence })),
    revisions: visible.map((line) => revisionLine(line, signed)),
    usedBy,
    remarks: remarked,
    latestTrial,
    vettingObstacle: review && bookObstacle(review),
  };
}
