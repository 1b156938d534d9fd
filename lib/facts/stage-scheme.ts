/** What one stage of a step reads, for the sketches. */
import type { SchemeDefinition } from '@/lib/entries/definition';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { constant } from '@/lib/numerics/polynomial';
import { ONE, type Rational, ZERO, toNumber } from '@/lib/numerics/rational';
import { canonicalStencil } from './canonical-stencil';

/**
 * An explicit Runge-Kutta step by what one of its stages reads; any other scheme as it is. The table of the whole
 * step would show the reach of all stages together, which no array is indexed by.
 */
export function stageScheme(definition: SchemeDefinition, scheme: ScalarScheme): ScalarScheme {
  if (definition.form !== 'lines' || definition.time.kind !== 'runge-kutta') return scheme;
  // What is solved together reaches over the whole line: the table shows that.
  const isSolved = scheme.terms.filter(({ level }) => toNumber(level) === 1).length > 1;
  if (isSolved) return scheme;
  const one = constant(scheme.parameters.length, ONE);
  const centre = Array.from({ length: scheme.dims }, () => ZERO);
  const read = new Map<string, readonly Rational[]>([[centre.map(toNumber).join(), centre]]);
  for (const [axis, space] of definition.space.entries()) {
    for (const offset of canonicalStencil(space).stencil?.offsets ?? []) {
      // A one-dimensional stencil among several dimensions acts along the axis of its place in the list.
      const whole =
        offset.length === scheme.dims ? offset : centre.map((zero, k) => (k === axis ? (offset[0] ?? zero) : zero));
      read.set(whole.map(toNumber).join(), whole);
    }
  }
  return {
    ...scheme,
    terms: [
      { level: ONE, offset: centre, coefficient: one },
      ...[...read.values()].map((offset) => ({ level: ZERO, offset, coefficient: one })),
    ],
  };
}
