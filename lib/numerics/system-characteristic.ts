/**
 * The characteristic polynomial of a system, exactly: the determinant of its symbol matrix over Q(i)[parameters]
 * with Laurent monomials in z and e^(i theta). Its nonzero roots in z are the eigenvalues of one step.
 */
import type { CanonicalTerm, ScalarScheme, SystemScheme } from './canonical-scheme';
import { add as addP, isZero, mul as mulP, neg as negP, type Polynomial } from './polynomial';
import { add, compare, formatRational, rational, sub, ZERO, type Rational } from './rational';

type Laurent = readonly CanonicalTerm[];

const keyOf = (level: Rational, offset: readonly Rational[]) => [level, ...offset].map(formatRational).join(',');

function collect(terms: Iterable<CanonicalTerm>): Laurent {
  const byKey = new Map<string, CanonicalTerm>();
  for (const t of terms) {
    const key = keyOf(t.level, t.offset);
    const present = byKey.get(key);
    byKey.set(key, present ? { ...present, coefficient: addP(present.coefficient, t.coefficient) } : t);
  }
  return [...byKey.values()].filter((t) => !isZero(t.coefficient));
}

function product(a: Laurent, b: Laurent): Laurent {
  const out: CanonicalTerm[] = [];
  for (const x of a)
    for (const y of b)
      out.push({
        level: add(x.level, y.level),
        offset: x.offset.map((o, d) => add(o, y.offset[d]!)),
        coefficient: mulP(x.coefficient, y.coefficient),
      });
  return collect(out);
}

const negated = (a: Laurent): Laurent => a.map((t) => ({ ...t, coefficient: negP(t.coefficient) }));

/** Expansion along the first remaining row; systems have at most six unknowns and sparse matrices. */
function determinant(matrix: readonly (readonly Laurent[])[], columns: readonly number[], row: number): Laurent {
  if (columns.length === 1) return matrix[row]![columns[0]!]!;
  let sum: CanonicalTerm[] = [];
  columns.forEach((column, position) => {
    const entry = matrix[row]![column]!;
    if (entry.length === 0) return;
    const minor = determinant(
      matrix,
      columns.filter((c) => c !== column),
      row + 1,
    );
    const part = product(entry, minor);
    sum = [...sum, ...(position % 2 === 0 ? part : negated(part))];
  });
  return collect(sum);
}

/** Quotient of `terms` by (z − 1) if it divides exactly, else null. Levels are integers above `oldest`. */
function dividedByStationary(terms: Laurent): Laurent | null {
  const columns = new Map<string, CanonicalTerm[]>();
  for (const t of terms) {
    const key = t.offset.map(formatRational).join(',');
    columns.set(key, [...(columns.get(key) ?? []), t]);
  }
  const out: CanonicalTerm[] = [];
  for (const column of columns.values()) {
    const sorted = [...column].sort((a, b) => -compare(a.level, b.level));
    let carried: Polynomial = [];
    for (let k = 0; k < sorted.length; k++) {
      const t = sorted[k]!;
      carried = addP(carried, t.coefficient);
      const next = sorted[k + 1];
      if (!next) {
        if (!isZero(carried)) return null;
        break;
      }
      // Synthetic division: the running sum is the quotient's coefficient at every level down to the next term.
      for (let level = sub(t.level, rational(1n)); compare(level, next.level) >= 0; level = sub(level, rational(1n)))
        if (!isZero(carried)) out.push({ level, offset: t.offset, coefficient: carried });
    }
  }
  return out.length === 0 ? null : collect(out);
}

const least = (values: readonly Rational[]) => values.reduce((a, b) => (compare(a, b) <= 0 ? a : b));
const largest = (values: readonly Rational[]) => values.reduce((a, b) => (compare(a, b) >= 0 ? a : b));

/** Multiplies by a power of z and of e^(i theta), which moves no root: newest level 1, offsets about 0. */
function normalised(terms: Laurent, dims: number): Laurent {
  const newest = largest(terms.map((t) => t.level));
  const lift = sub(rational(1n), newest);
  const shift = Array.from({ length: dims }, (_, d) => {
    const lo = least(terms.map((t) => t.offset[d]!));
    const hi = largest(terms.map((t) => t.offset[d]!));
    const centre = add(lo, hi);
    // The nearest whole position to the centre, counted from the lowest offset, so that all become integers.
    const steps = sub(rational(centre.num, centre.den * 2n), lo);
    return add(lo, rational(steps.num / steps.den));
  });
  return terms.map((t) => ({
    level: add(t.level, lift),
    offset: t.offset.map((o, d) => sub(o, shift[d]!)),
    coefficient: t.coefficient,
  }));
}

/**
 * @returns the determinant as a scalar scheme, and how many factors (z − 1) common to all waves were divided out:
 *   the stationary modes of velocity-pressure systems in several dimensions
 * @throws {RangeError} if the determinant vanishes identically: the system does not determine its unknowns
 */
export function systemCharacteristic(system: SystemScheme): { scalar: ScalarScheme; stationaryRoots: number } {
  const size = system.unknowns.length;
  if (system.equations.length !== size)
    throw new RangeError(
      `systemCharacteristic: ${size} unknowns need as many equations, not ${system.equations.length}`,
    );
  const matrix = system.equations.map((equation) =>
    Array.from({ length: size }, (_, unknown) => collect(equation.terms.filter((t) => t.unknown === unknown))),
  );
  const columns = Array.from({ length: size }, (_, k) => k);
  let terms = determinant(matrix, columns, 0);
  if (terms.length === 0) throw new RangeError('systemCharacteristic: the equations do not determine the unknowns');
  terms = normalised(terms, system.dims);
  let stationaryRoots = 0;
  // A first-order system for a second-order equation keeps its two wave roots; only further ones are stationary.
  const waveRoots = system.timeOrder;
  for (;;) {
    const levels = terms.map((t) => t.level);
    const degree = sub(largest(levels), least(levels));
    if (compare(degree, rational(BigInt(waveRoots))) <= 0) break;
    const quotient = dividedByStationary(terms);
    if (!quotient) break;
    terms = normalised(quotient, system.dims);
    stationaryRoots++;
  }
  return {
    scalar: {
      form: 'scalar',
      equation: system.equation,
      dims: system.dims,
      timeOrder: system.timeOrder,
      parameters: system.parameters,
      terms: [...terms].sort((a, b) => -compare(a.level, b.level) || compareOffsets(a.offset, b.offset)),
    },
    stationaryRoots,
  };
}

function compareOffsets(a: readonly Rational[], b: readonly Rational[]): number {
  for (let d = 0; d < a.length; d++) {
    const order = compare(a[d] ?? ZERO, b[d] ?? ZERO);
    if (order !== 0) return order;
  }
  return 0;
}
