/** How far the decimals of a definition may be from the numbers that their author meant. */
import type { SchemeDefinition } from '@/lib/entries/definition';

const DECIMAL = /\d*\.\d+/g;

function decimalsOf(definition: SchemeDefinition): string[] {
  const texts =
    definition.form === 'table'
      ? definition.terms.map((t) => t.coefficient)
      : definition.form === 'system'
        ? definition.equations.flatMap((e) => e.terms.map((t) => t.coefficient))
        : [
            ...definition.space.flatMap((s) => [...(s.weights ?? []), ...(s.lhs?.weights ?? [])]),
            ...(definition.time.kind === 'runge-kutta' ? [...definition.time.A.flat(), ...definition.time.b] : []),
            ...(definition.time.kind === 'multistep' ? [...definition.time.alpha, ...definition.time.beta] : []),
            ...(definition.time.kind === 'imex-multistep'
              ? [...definition.time.alpha, ...definition.time.beta_explicit, ...definition.time.beta_implicit]
              : []),
          ];
  return [...texts, ...Object.values(definition.fixed ?? {})].flatMap((text) => text.match(DECIMAL) ?? []);
}

/** Products of several rounded numbers stand in one coefficient of a Runge-Kutta step. */
const MARGIN = 8;

/**
 * One unit in the last digit of the most coarsely printed decimal, relative to the largest of them, with a margin.
 * 0 where there are no decimals of at least four digits: a short decimal such as 0.25 is meant as it stands.
 */
export function roundingOf(definition: SchemeDefinition): number {
  const long = decimalsOf(definition).filter((text) => text.replace(/^\d*\./, '').length >= 4);
  if (long.length === 0) return 0;
  const digits = Math.min(...long.map((text) => text.replace(/^\d*\./, '').length));
  const largest = Math.max(...long.map(Number));
  return largest === 0 ? 0 : (MARGIN * 10 ** -digits) / Math.max(largest, 10 ** -digits);
}
