import 'server-only';
import type { RevisionContent } from '@/db/queries/revisions';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import { createBudget } from '@/lib/numerics/budget';
import { ENGINE_VERSION } from '@/lib/facts/engine-version';
import { summarise } from '@/lib/facts/summarise';
import { printableLanguages } from '@/lib/kernels/printable-languages';
import type { DraftContent } from './draft-content';
import { referenceLine } from './reference-line';

/** A request is not to be held longer; what is undecided then says so, and the next save tries again. */
const TIME_LIMIT_MS = 20_000;

/** What an author brought, with the facts that the engine adds. A definition without facts is kept with its problems. */
export function analyseContent(content: DraftContent, callNumber: string, slug: string): RevisionContent {
  const { verdict, problems, facts } = analyseDefinition(content.definition, {
    budget: createBudget({ timeLimitMs: TIME_LIMIT_MS }),
  });
  if (!facts) return { ...content, verdict, problems, facts: null, summary: null, engineVersion: ENGINE_VERSION };
  const { title, definition, references } = content;
  return {
    ...content,
    verdict,
    problems,
    facts,
    summary: summarise(definition, facts),
    engineVersion: ENGINE_VERSION,
    // Which languages there are does not depend on the number of the revision.
    kernelLanguages: printableLanguages({
      callNumber,
      slug,
      title,
      definition,
      facts,
      revision: 1,
      references: references.map(referenceLine),
    }),
  };
}
