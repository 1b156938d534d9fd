/**
 * The shape of the demo's entries. They say what a person would bring (definition, references, notes) and
 * what shall become of it; no fact, date or trial is typed: those are computed and run.
 */
import type { z } from 'zod';
import type { Definition } from '@/lib/entries/definition';
import type { CALL_LETTERS, Reference } from '@/lib/entries/entry';
import type { DemoCode, DemoEmail } from '@/lib/people/demo-people';
import type { DemoPlan } from '@/lib/reviews/demo-plan';

export interface DemoRevision {
  title: string;
  /** One or two sentences: what it means for the run. */
  gist: string;
  synonyms: string[];
  definition: z.input<typeof Definition>;
  references: Reference[];
  /** Markdown; a derivation where there is no reference. */
  notes: string;
  author: DemoEmail;
  plan: DemoPlan;
  /** What changed against the revision before. */
  changeNote?: string;
}

export interface DemoEntry extends DemoRevision {
  letters: (typeof CALL_LETTERS)[number];
  /** 3 in AD 003. */
  number: number;
  slug: string;
  /**
   * Revisions before this one, oldest first, each with plan 'vetted'. The next is submitted when the one
   * before is vetted, and supersedes it when it is vetted itself.
   */
  earlier?: DemoRevision[];
  /** Recorded when the revision is vetted; `revision` counts from 1, by default the last. */
  adoptions?: { code: DemoCode; by: DemoEmail; revision?: number }[];
  /** Remarks on the last revision. */
  remarks?: { by: DemoEmail; part: string; text: string }[];
}
