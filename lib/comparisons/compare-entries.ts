import 'server-only';
import { db } from '@/db/client';
import { listCandidates } from '@/db/queries/candidates';
import { findSheet } from '@/db/queries/entries';
import type { SheetView } from '@/lib/entries/entry';
import { drawingOf } from '@/lib/facts/drawing';
import { EQUATIONS } from '@/lib/numerics/equation';
import type { Actor } from '@/lib/people/actor';
import { answerShortlist } from '@/lib/shortlist/answer-shortlist';
import { Requirement, SHORTLIST_EQUATIONS } from '@/lib/shortlist/requirement';
import { pointsText } from '@/lib/shortlist/shortlist';
import {
  type ComparedCurves,
  comparedCurves,
  comparedReadings,
  comparedRow,
  type ComparedRow,
  PLACES,
} from './side-by-side';

export interface Comparison {
  readonly sheets: readonly SheetView[];
  readonly rows: readonly ComparedRow[];
  readonly curves: readonly ComparedCurves[];
  /** Slugs that name nothing this reader may see. */
  readonly unknown: readonly string[];
  /** Slugs beyond the places there are. */
  readonly beyond: readonly string[];
}

/** The entries of these slugs, in this order, each once, as this reader may see them. */
export async function compareEntries(actor: Actor, slugs: readonly string[]): Promise<Comparison> {
  const asked = [...new Set(slugs)];
  const found = await Promise.all(asked.slice(0, PLACES).map((slug) => findSheet(db, actor, slug)));
  const sheets = found.filter((sheet) => sheet !== null);
  const curves = sheets
    .map((sheet) => {
      const { numeric } = drawingOf(sheet.definition, sheet.facts, sheet.summary);
      return numeric && comparedCurves(sheet, numeric);
    })
    .filter((curve) => curve !== null);
  return {
    sheets,
    rows: [...comparedReadings(sheets), ...(await costRows(actor, sheets))],
    curves,
    unknown: asked.slice(0, PLACES).filter((_, k) => found[k] === null),
    beyond: asked.slice(PLACES),
  };
}

/** Points a wave and bytes at the shortlist's first question, where all entries are schemes for one of its equations. */
async function costRows(actor: Actor, sheets: readonly SheetView[]): Promise<ComparedRow[]> {
  const [equation, ...others] = [...new Set(sheets.map((sheet) => sheet.equation))];
  const base = SHORTLIST_EQUATIONS.find((name) => equation === name || equation?.startsWith(`${name}-`));
  if (!equation || others.length > 0 || !base || sheets.length < 2) return [];
  const dims = sheets[0]?.summary?.dims;
  const asked = Requirement.safeParse({ equation: base, dims, offer: 'all-open', arraysAtMost: 0, haloAtMost: 0 });
  const answer = asked.success ? await answerShortlist(actor, asked.data) : null;
  if (!asked.success || !answer?.known) return [];
  const placed = [...answer.list.fits, ...answer.list.misses];
  const costs = sheets.map(({ slug }) => placed.find(({ candidate }) => candidate.slug === slug)?.cost ?? null);
  const least = Math.min(...costs.map((cost) => cost?.bytes ?? Infinity));
  const { errorPercent, duration } = asked.data;
  return [
    comparedRow(
      `Points a wave, ${errorPercent} % after ${duration}`,
      costs.map((cost) => (cost ? pointsText(cost.pointsPerWave) : 'never')),
    ),
    comparedRow(
      'Bytes moved, best = 1',
      costs.map((cost) => (cost ? (cost.bytes / least).toFixed(1) : 'never')),
    ),
  ];
}

/** What can still be added: every scheme that the reader may see, of the same equation first. */
export async function listAddable(actor: Actor, sheets: readonly SheetView[]) {
  const rows = await listCandidates(db, actor, EQUATIONS);
  const taken = new Set(sheets.map(({ slug }) => slug));
  const equation = sheets[0]?.equation;
  return rows
    .filter(({ slug }) => !taken.has(slug))
    .sort((a, b) => Number(b.equation === equation) - Number(a.equation === equation))
    .map(({ slug, callNumber, title }) => ({ slug, callNumber, title }));
}
