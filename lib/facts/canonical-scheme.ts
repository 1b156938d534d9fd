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

/**
 * The scheme that the author of a Runge-Kutta method in decimals meant: coefficients of its stability function that are
 * 1/k! within rounding are taken as 1/k!. Null where the definition has no such method.
 */
export function nominalScheme(definition: SchemeDefinition): CanonicalScheme | null {
  if (definition.form !== 'lines' || definition.time.kind !== 'runge-kutta') return null;
  return canonicalLines(definition, [], true);
}
