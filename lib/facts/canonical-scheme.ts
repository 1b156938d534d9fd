/** Any scheme definition as the one form that the engine analyses, or the problems that stand in the way. */
import type { SchemeDefinition } from '@/lib/entries/definition';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import type { Problem } from './facts';
import { canonicalLines } from './scheme-lines';
import { canonicalSystem, canonicalTable } from './scheme-terms';

/** Warnings may accompany a scheme; where there is none, at least one problem is an error. */
export function canonicalScheme(definition: SchemeDefinition): { scheme: CanonicalScheme | null; problems: Problem[] } {
  const problems: Problem[] = [];
  const scheme =
    definition.form === 'table'
      ? canonicalTable(definition, problems)
      : definition.form === 'lines'
        ? canonicalLines(definition, problems)
        : canonicalSystem(definition, problems);
  return { scheme, problems };
}
