/** Plans the kernel of an explicit table in one, two or three dimensions, lines of multistep methods included. */
import type { SchemeFacts } from '@/lib/facts/facts';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { divF, fromPolynomial, negF, type RationalFunction } from '@/lib/numerics/rational-function';
import { toNumber, type Rational } from '@/lib/numerics/rational';
import { isConstantPolynomial, isReal } from './coefficient';
import { combine, type CombinationTerm } from './combination';
import { componentsOf, type Place } from './expression-tree';
import { asParameter, none, type Planned, type TablePlan } from './kernel-plan';
import { planStart } from './start-plan';

const LETTERS = ['a', 'b', 'c', 'd', 'e', 'f', 'g', 'h'];

interface KnownTerm extends Place {
  /** Steps before level n: 0, 1, 2, … */
  readonly age: number;
  readonly coefficient: RationalFunction;
}

const placeOf = ([offset = 0, ...across]: readonly number[]): Place =>
  across.length > 0 ? { offset, across } : { offset };

/** u^(n+1) at i as a sum over known terms, or the reason why it cannot be written so. */
function explicitForm(scheme: ScalarScheme): Planned<{ known: KnownTerm[]; divisor: RationalFunction | null }> {
  const variables = scheme.parameters.length;
  if (!scheme.terms.every((t) => isReal(t.coefficient)))
    return none('The coefficients are complex; kernels are printed for real unknowns.');
  const integer = (a: Rational | undefined) => a !== undefined && a.den === 1n;
  if (!scheme.terms.every((t) => integer(t.level) && t.offset.every(integer)))
    return none('A level or an offset is not an integer; kernels are printed for unstaggered tables.');
  const newest = Math.max(...scheme.terms.map((t) => toNumber(t.level)));
  const [pivot, another] = scheme.terms.filter((t) => toNumber(t.level) === newest);
  if (!pivot || another)
    return none(
      'The scheme is implicit: it couples several points of the new level. Kernels are printed for explicit schemes.',
    );
  const shift = pivot.offset.map(toNumber);
  const divisor = fromPolynomial(pivot.coefficient, variables);
  const known = scheme.terms
    .filter((t) => t !== pivot)
    .map((t) => ({
      age: newest - 1 - toNumber(t.level),
      ...placeOf(t.offset.map((o, axis) => toNumber(o) - shift[axis]!)),
      coefficient: negF(divF(fromPolynomial(t.coefficient, variables), divisor, variables)),
    }));
  if (known.length === 0) return none('The scheme reads no known level.');
  return { kind: 'plan', plan: { known, divisor: isConstantPolynomial(pivot.coefficient) ? null : divisor } };
}

export function planTable(scheme: ScalarScheme, facts: SchemeFacts): Planned<TablePlan> {
  const form = explicitForm(scheme);
  if (form.kind === 'none') return form;
  const { known, divisor } = form.plan;
  const keptLevels = Math.max(1, ...known.map((t) => t.age + 1));
  const oldest = keptLevels - 1;
  const inPlace = keptLevels > 1 && known.every((t) => t.age < oldest || componentsOf(t).every((o) => o === 0));
  const nameOf = (age: number) => (inPlace && age === oldest ? 'w' : age === 0 ? 'u' : `u${age}`);

  const parameters = scheme.parameters.map(asParameter);
  const symbols = parameters.map((p) => p.name);
  const ages = Array.from({ length: keptLevels }, (_, age) => age);
  const terms: CombinationTerm[] = [...known]
    .sort((a, b) => a.age - b.age)
    .map((t) => ({ array: nameOf(t.age), offset: t.offset, across: t.across, coefficient: t.coefficient }));
  const letters = new Map(ages.map((age) => [nameOf(age), LETTERS[age]!]));
  const { node, coefficients } = combine(terms, letters, symbols);

  const reaches = Array.from({ length: scheme.dims }, (_, axis): [number, number] => {
    const offsets = known.map((t) => componentsOf(t)[axis]!);
    return [Math.max(0, ...offsets.map((o) => -o)), Math.max(0, ...offsets)];
  });
  const start = keptLevels > 1 ? planStart(scheme, facts, keptLevels, reaches) : null;
  const halos = start ? start.halos : reaches;
  return {
    kind: 'plan',
    plan: {
      shape: 'table',
      parameters,
      halo: halos[0]!,
      halos,
      coefficients,
      divisor,
      timeOrder: scheme.timeOrder,
      known: ages.map(nameOf),
      keptLevels,
      arrays: inPlace ? keptLevels : keptLevels + 1,
      inPlace,
      sweep: { source: 'u', assignments: [{ kind: 'store', array: 'w', node }] },
      start: start ? start.plan : null,
    },
  };
}
