/** Values at which a kernel with several parameters is tried, and the ends of its stable region. */
import { boundOf } from '@/lib/codegen/bound';
import type { Inequality } from '@/lib/codegen/region';
import type { SchemeFacts } from '@/lib/facts/facts';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { evaluate, type Polynomial } from '@/lib/numerics/polynomial';
import { parseRational, toNumber } from '@/lib/numerics/rational';
import { gridGrowth, sampleScheme } from './characteristic';
import type { ParameterChoice } from './parameter-choice';
import type { BoundEnd } from './subject';

/** Grids on whose waves the definition itself is asked for growth. */
export const SURVEY: Readonly<Record<1 | 2 | 3, readonly number[]>> = { 1: [64], 2: [16, 16], 3: [8, 8, 8] };

const candidates = ({ parameters }: ScalarScheme): number[][] =>
  [
    [0.3, 0.25, 0.1],
    [0.2, 0.1, 0.1],
    [0.1, 0.05, 0.05],
    [0.05, 0.2, 0.1],
    [-0.2, 0.15, 0.1],
    [0.02, 0.01, 0.01],
  ].map((values) => values.slice(0, parameters.length));

const fulfils = (inequalities: readonly Inequality[], values: readonly number[]) => {
  const at = (polynomial: Polynomial) => evaluate(polynomial, values)[0];
  return inequalities.every(({ left, right }) => at(left.num) / at(left.den) <= at(right.num) / at(right.den));
};

/** How many times a point may be stretched from the origin until it leaves the region; null where it never does. */
function stretch(inequalities: readonly Inequality[], values: readonly number[]): number | null {
  const inside = (factor: number) =>
    fulfils(
      inequalities,
      values.map((value) => value * factor),
    );
  let [low, high] = [1, 1024];
  if (!inside(low) || inside(high)) return null;
  while (high - low > 1e-13 * high) {
    const middle = (low + high) / 2;
    if (middle === low || middle === high) break;
    if (inside(middle)) low = middle;
    else high = middle;
  }
  return low;
}

/** Several dimensions: points within the closed form of the stable region, and its end along the rays through two. */
export function chooseByRegion(scheme: ScalarScheme, facts: SchemeFacts): ParameterChoice | null {
  if (scheme.dims === 1) return null;
  const bound = boundOf(facts, scheme.parameters, CONVENTIONS[scheme.equation].nonNegative);
  const inequalities = bound.kind === 'region' ? bound.inequalities : null;
  if (bound.kind !== 'region' || !inequalities) return null;
  const working = candidates(scheme).filter(
    (values) =>
      fulfils(inequalities, values) &&
      gridGrowth(sampleScheme(scheme, values), SURVEY[scheme.dims]).growth <= 1 + 1e-12,
  );
  const ends = working.flatMap((values): BoundEnd[] => {
    const factor = stretch(inequalities, values);
    if (factor === null) return [];
    // The first parameter leads, the others keep their proportion to it.
    const lead = values[0]!;
    const end = lead * factor;
    return [
      {
        parameter: scheme.parameters[0]!,
        bound: end,
        text: `${bound.text}, along ${scheme.parameters.join(' : ')} = ${values.join(' : ')}`,
        inside: end - 0.01 * end,
        outward: end > 0 ? 1 : -1,
        vector: (value) => values.map((other) => (other / lead) * value),
      },
    ];
  });
  return working.length > 0
    ? { working: working.slice(0, 3), stable: true, ends: ends.slice(0, 2), farInside: null }
    : null;
}

/** Two or more parameters: the values of a short list that the definition itself finds stable. */
export function chooseSeveral(scheme: ScalarScheme, facts: SchemeFacts): ParameterChoice {
  const lists = candidates(scheme);
  const working = lists.filter(
    (values) => gridGrowth(sampleScheme(scheme, values), SURVEY[scheme.dims]).growth <= 1 + 1e-12,
  );
  const ends = facts.stability.cuts.flatMap(({ fixed, intervals }) => {
    const held = Object.entries(fixed);
    const free = scheme.parameters.find((name) => !(name in fixed));
    const hi = intervals[0]?.[1];
    if (!free || !hi || held.length !== scheme.parameters.length - 1 || !(Number(hi) > 0)) return [];
    const vector = (value: number) =>
      scheme.parameters.map((name) => (name === free ? value : toNumber(parseRational(fixed[name]!))));
    const bound = Number(hi);
    const where = held.map(([name, value]) => `${name} = ${value}`).join(', ');
    return [
      { parameter: free, bound, text: `${hi} at ${where}`, inside: 0.99 * bound, outward: 1, vector } as BoundEnd,
    ];
  });
  return working.length > 0
    ? { working: working.slice(0, 3), stable: true, ends: ends.slice(0, 2), farInside: null }
    : { working: [lists[2]!], stable: false, ends: [], farInside: null };
}
