/** An entry as readers meet it: what a catalog line and a sheet show. */
import type { Facts, Problem } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import type { Equation } from '@/lib/numerics/equation';
import type { Remark } from '@/lib/reviews/remark';
import type { TrialView } from '@/lib/trials/trial';
import type { Definition } from './definition';
import type { RevisionState } from './revision-state';

export const ENTRY_KINDS = ['scheme', 'time-method', 'stencil'] as const;
export type EntryKind = (typeof ENTRY_KINDS)[number];

/**
 * First two letters of a call number: AD 003.
 * AD advection, DI diffusion, AX advection-diffusion, WA wave, SC Schrodinger, AI Airy, HY hyperdiffusion,
 * VP velocity-pressure systems, TM time methods, ST stencils.
 */
export const CALL_LETTERS = ['AD', 'DI', 'AX', 'WA', 'SC', 'AI', 'HY', 'VP', 'TM', 'ST'] as const;

export interface Reference {
  /** "H. O. Kreiss, J. Oliger" */
  authors: string;
  title: string;
  /** Journal with volume and pages, or publisher. */
  source: string;
  year: number;
  doi: string | null;
  /** Where in the source, or what it settles. */
  note: string | null;
}

export interface CatalogLine {
  entryId: string;
  /** "AD 003" */
  callNumber: string;
  /** Address of the sheet: "leapfrog-central-2". */
  slug: string;
  kind: EntryKind;
  equation: Equation | null;
  title: string;
  /** One or two sentences: what it means for the run. */
  gist: string;
  /** Other common names and people's usual wordings. */
  synonyms: string[];
  /** Surnames from the references, for the search. */
  authors: string[];
  revision: number;
  state: RevisionState;
  vettedAt: string | null;
  summary: FactsSummary;
  /** Languages of which a kernel can be printed. */
  languages: string[];
  /** Codes that use it: "Saltings (tides)". */
  usedBy: string[];
  trialOutcome: 'passed' | 'failed' | 'running' | 'waiting' | 'none';
}

export interface RevisionLine {
  number: number;
  state: RevisionState;
  /** ISO time at which it reached its state. */
  since: string;
  note: string;
  people: string[];
  engineVersion: string;
}

export interface SheetView {
  entryId: string;
  revisionId: string;
  callNumber: string;
  slug: string;
  kind: EntryKind;
  equation: Equation | null;
  title: string;
  gist: string;
  synonyms: string[];
  /** Markdown. */
  notes: string;
  revision: number;
  state: RevisionState;
  stateReason: string | null;
  /** The entry that replaces a superseded or withdrawn one. */
  replacement: { slug: string; callNumber: string; title: string; revision: number } | null;
  authorId: string;
  author: string;
  signatures: { name: string; at: string; sentence: string }[];
  vettedAt: string | null;
  definition: Definition;
  facts: Facts | null;
  summary: FactsSummary | null;
  problems: Problem[];
  engineVersion: string;
  references: Reference[];
  revisions: RevisionLine[];
  usedBy: { code: string; purpose: string; revision: number }[];
  /** The oldest first; answers name what they answer. */
  remarks: Remark[];
  latestTrial: TrialView | null;
  /** Why this revision cannot be vetted now, for those who may vet it; null where nothing stands in the way. */
  vettingObstacle: string | null;
}
