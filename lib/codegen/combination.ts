/**
 * Linear combinations of neighbours, arranged as a numerics engineer writes them: equal and opposite coefficients
 * share one product, products of the parameters are computed once a call.
 */
import { neg as negPolynomial } from '@/lib/numerics/polynomial';
import type { RationalFunction } from '@/lib/numerics/rational-function';
import { formatRational } from '@/lib/numerics/rational';
import { constantValue, isConstantFunction, leadingSign, type Coefficient } from './coefficient';
import {
  componentsOf,
  named,
  number,
  product,
  read,
  signedSum,
  type Node,
  type Place,
  type SignedNode,
} from './expression-tree';

export interface CombinationTerm extends Place {
  readonly array: string;
  /** Nonzero, real. */
  readonly coefficient: RationalFunction;
}

export interface Combination {
  readonly node: Node;
  readonly coefficients: readonly Coefficient[];
}

interface Group {
  readonly array: string;
  readonly coefficient: RationalFunction;
  readonly negative: boolean;
  readonly members: (Place & { readonly negative: boolean })[];
}

const AXES = ['x', 'y', 'z'] as const;

const key = ({ num, den }: RationalFunction) =>
  [num, den].map((a) => a.map((m) => `${m.powers.join(',')}:${formatRational(m.re)}`).join(' ')).join('/');
const negated = (f: RationalFunction): RationalFunction => ({ num: negPolynomial(f.num), den: f.den });

const reachOf = (place: Place) => Math.max(...componentsOf(place).map(Math.abs));
const axesUsed = (place: Place) => componentsOf(place).flatMap((o, axis) => (o === 0 ? [] : [axis]));

/** Along a row the highest offset first; on a grid axis by axis, the nearest first, forward before backward. */
function byPlace(a: Place, b: Place): number {
  if (!a.across && !b.across) return b.offset - a.offset;
  const rank = (place: Place) => {
    const axes = axesUsed(place);
    return [axes.length, axes[0] ?? -1, axes[1] ?? -1, reachOf(place), ...componentsOf(place).map((o) => -o)];
  };
  const [p, q] = [rank(a), rank(b)];
  const k = p.findIndex((value, at) => value !== q[at]);
  return k < 0 ? 0 : p[k]! - q[k]!;
}

/** Members of equal or opposite coefficient, in the order of their places; the first is positive. */
function groupsOf(terms: readonly CombinationTerm[]): Group[] {
  const groups: Group[] = [];
  for (const term of [...terms].sort(byPlace)) {
    const own = key(term.coefficient);
    const opposite = key(negated(term.coefficient));
    const present = groups.find(
      (g) =>
        g.array === term.array && [own, opposite].includes(key(g.negative ? negated(g.coefficient) : g.coefficient)),
    );
    if (present) {
      const lead = key(present.negative ? negated(present.coefficient) : present.coefficient);
      present.members.push({ offset: term.offset, across: term.across, negative: own !== lead });
      continue;
    }
    const negative = leadingSign(term.coefficient.num) < 0;
    groups.push({
      array: term.array,
      coefficient: negative ? negated(term.coefficient) : term.coefficient,
      negative,
      members: [{ offset: term.offset, across: term.across, negative: false }],
    });
  }
  return groups;
}

function coefficientName(letter: string, members: Group['members'], taken: ReadonlySet<string>): string {
  const first = componentsOf(members[0]!);
  const reach = Math.max(...members.map(reachOf));
  const balanced =
    members.length > 1 && members.some((m) => componentsOf(m).every((offset, axis) => offset === -first[axis]!));
  const signed = (offset: number) => (offset === 0 ? '0' : `${offset < 0 ? 'm' : 'p'}${Math.abs(offset)}`);
  const axes = [...new Set(members.flatMap(axesUsed))];
  const axis = first.length > 1 && axes.length === 1 ? AXES[axes[0]!]! : '';
  const plain =
    reach === 0 && members.length === 1
      ? `${letter}0`
      : balanced
        ? `${letter}${reach}${axis}`
        : first.length === 1
          ? `${letter}${signed(first[0]!)}`
          : `${letter}_${first.map(signed).join('_')}`;
  let name = plain;
  for (let k = 2; taken.has(name); k++) name = `${plain}_${k}`;
  return name;
}

const isOne = (f: RationalFunction) => isConstantFunction(f) && formatRational(constantValue(f)) === '1';

/** The parameter that a coefficient equals, or −1. */
function soleParameter({ num, den }: RationalFunction): number {
  const [monomial, more] = num;
  if (!monomial || more || !isConstantFunction({ num: den, den }) || formatRational(monomial.re) !== '1') return -1;
  const total = monomial.powers.reduce((a, b) => a + b, 0);
  return total === 1 ? monomial.powers.indexOf(1) : -1;
}

/**
 * @param terms   what is summed; arrays come in the order in which they should be written
 * @param letters letter of the coefficients of each array
 * @param symbols code names of the parameters
 */
export function combine(
  terms: readonly CombinationTerm[],
  letters: ReadonlyMap<string, string>,
  symbols: readonly string[],
): Combination {
  const order = [...new Set(terms.map((t) => t.array))];
  const reach = (g: Group) => Math.max(...g.members.map(reachOf));
  const groups = groupsOf(terms).sort(
    (a, b) =>
      Number(isOne(b.coefficient) && !b.negative) - Number(isOne(a.coefficient) && !a.negative) ||
      Number(isOne(a.coefficient) && a.negative) - Number(isOne(b.coefficient) && b.negative) ||
      order.indexOf(a.array) - order.indexOf(b.array) ||
      reach(a) - reach(b),
  );
  const positive = groups.findIndex((g) => !g.negative);
  if (positive > 0) groups.unshift(...groups.splice(positive, 1));

  const coefficients: Coefficient[] = [];
  const taken = new Set<string>(symbols);
  const signed = groups.map((group): SignedNode => {
    const inner = signedSum(
      group.members.map((m) => ({ negative: m.negative, node: read(group.array, m.offset, m.across) })),
    );
    if (isOne(group.coefficient)) return { negative: group.negative, node: inner };
    if (isConstantFunction(group.coefficient))
      return { negative: group.negative, node: product(number(constantValue(group.coefficient)), inner) };
    const parameter = soleParameter(group.coefficient);
    if (parameter >= 0) return { negative: group.negative, node: product(named(symbols[parameter]!), inner) };
    const name = coefficientName(letters.get(group.array) ?? 'a', group.members, taken);
    taken.add(name);
    coefficients.push({ name, value: group.coefficient });
    return { negative: group.negative, node: product(named(name), inner) };
  });
  coefficients.sort((a, b) => (a.name < b.name ? -1 : 1));
  return { node: signedSum(signed), coefficients };
}
