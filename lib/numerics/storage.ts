/**
 * Arrays that a scheme keeps, the sweep that an update in place needs, steps before the first full one, halo and work.
 * Definitions: a table needs one array per level but one, where the oldest level is read only at the point being
 * written or only on one side of it in some lexicographic sweep; otherwise one array per level, or one fewer with a
 * rolling buffer of rows. Work arrays of linear solvers are not counted.
 */
import type { CanonicalScheme, CanonicalTerm, ScalarScheme, SystemScheme } from './canonical-scheme';
import { combinationCost, isUnit, trafficCost, type CostResult } from './cost';
import { compare, equals, isZero, sub, toNumber, ZERO, type Rational } from './rational';

export type Sweep = 'ascending' | 'descending';

export interface StorageResult {
  levels: number | null;
  explicit: boolean;
  arraysOnePerLevel: number | null;
  arraysInPlace: number;
  arraysWithRollingBuffer: number | null;
  rollingBufferLayers: number | null;
  registersGeneral: number | null;
  registersAccumulating: number | null;
  registersLowStorage: number | null;
  sweep: Sweep[] | null;
  unknowns: number | null;
  reason: string;
}

export const newestOf = (terms: readonly CanonicalTerm[]): Rational =>
  terms.reduce((most, t) => (compare(t.level, most) > 0 ? t.level : most), terms[0]!.level);
export const oldestOf = (terms: readonly CanonicalTerm[]): Rational =>
  terms.reduce((least, t) => (compare(t.level, least) < 0 ? t.level : least), terms[0]!.level);

/** Newest − oldest + 1. */
export const levelCount = (terms: readonly CanonicalTerm[]) =>
  Math.round(toNumber(sub(newestOf(terms), oldestOf(terms)))) + 1;

/** One coefficient at the newest level: the step is solved for it. */
export function isExplicit(scheme: ScalarScheme): boolean {
  const newest = newestOf(scheme.terms);
  return scheme.terms.filter((t) => equals(t.level, newest)).length === 1;
}

function orders(dims: number): number[][] {
  if (dims === 1) return [[0]];
  return dims === 2
    ? [
        [0, 1],
        [1, 0],
      ]
    : [
        [0, 1, 2],
        [0, 2, 1],
        [1, 0, 2],
        [1, 2, 0],
        [2, 0, 1],
        [2, 1, 0],
      ];
}

/**
 * A lexicographic sweep in which every point read lies ahead of the point written.
 * @param offsets reads of the overwritten level, relative to the point written
 * @returns direction per dimension; 'any' where only the point itself is read; null where there is no such sweep
 */
function sweepFor(offsets: readonly (readonly Rational[])[], dims: number): Sweep[] | 'any' | null {
  const others = offsets.filter((x) => !x.every(isZero));
  if (others.length === 0) return 'any';
  for (const order of orders(dims)) {
    const directions: Sweep[] = new Array<Sweep>(dims).fill('ascending');
    let open = others;
    for (const axis of order) {
      const signs = open.map((x) => compare(x[axis]!, ZERO));
      const ahead = signs.some((s) => s > 0);
      const behind = signs.some((s) => s < 0);
      if (ahead && behind) break;
      directions[axis] = behind ? 'descending' : 'ascending';
      open = open.filter((_, k) => signs[k] === 0);
    }
    if (open.length === 0) return directions;
  }
  return null;
}

const widest = (offsets: readonly (readonly Rational[])[]) =>
  Math.ceil(Math.max(0, ...offsets.flatMap((x) => x.map((o) => Math.abs(toNumber(o))))));

function tableReason(explicit: boolean, sweep: Sweep[] | 'any' | null): string {
  if (!explicit)
    return 'implicit: the right side may be assembled over the oldest level; the solver’s own work arrays are not counted';
  if (sweep === 'any') return 'oldest level read only at the point being written';
  if (sweep) return 'oldest level read on one side only: sweep so that no value is overwritten before its last use';
  return 'oldest level read on both sides of the point being written: either a full extra array, or one array fewer and a rolling buffer';
}

export function tableStorage(scheme: ScalarScheme): StorageResult {
  const newest = newestOf(scheme.terms);
  const oldest = oldestOf(scheme.terms);
  const levels = levelCount(scheme.terms);
  const explicit = isExplicit(scheme);
  const centre = explicit
    ? scheme.terms.find((t) => equals(t.level, newest))!.offset
    : new Array<Rational>(scheme.dims).fill(ZERO);
  const reads = scheme.terms
    .filter((t) => equals(t.level, oldest))
    .map((t) => t.offset.map((o, k) => sub(o, centre[k]!)));
  const sweep = sweepFor(reads, scheme.dims);
  return {
    levels,
    explicit,
    arraysOnePerLevel: levels,
    arraysInPlace: sweep ? levels - 1 : levels,
    arraysWithRollingBuffer: levels - 1,
    rollingBufferLayers: !sweep && explicit ? widest(reads) : null,
    registersGeneral: null,
    registersAccumulating: null,
    registersLowStorage: null,
    sweep: sweep === 'any' ? null : sweep,
    unknowns: null,
    reason: tableReason(explicit, sweep),
  };
}

export interface Registers {
  readonly general: number;
  readonly accumulating: number | null;
  readonly lowStorage: number | null;
}

/** Runge-Kutta lines: registers of the method; one-stage methods are stored as the table they are. */
export function rungeKuttaStorage(
  scheme: ScalarScheme,
  stages: number,
  explicit: boolean,
  registers: Registers,
): StorageResult {
  const table = tableStorage(scheme);
  const own = {
    ...table,
    explicit,
    registersGeneral: registers.general,
    registersAccumulating: registers.accumulating,
    registersLowStorage: registers.lowStorage,
  };
  if (stages === 1 && explicit) return own;
  const least = Math.min(registers.general, registers.accumulating ?? Infinity, registers.lowStorage ?? Infinity);
  return {
    ...own,
    levels: 2,
    arraysOnePerLevel: null,
    arraysInPlace: least,
    arraysWithRollingBuffer: null,
    rollingBufferLayers: null,
    sweep: null,
    reason:
      least === registers.lowStorage
        ? 'the tableau has a two-register form: u and one running increment'
        : least === registers.accumulating
          ? 'u, the accumulated result, one stage state and one slope'
          : 'u, one slope for each stage and one stage state; the operator reads neighbours, so that no slope may overwrite its argument',
  };
}

function unknownLevels(scheme: SystemScheme): number[] {
  return scheme.unknowns.map((_, k) => {
    const terms = scheme.equations.flatMap((e) => e.terms.filter((t) => t.unknown === k));
    return levelCount(terms);
  });
}

export function systemStorage(scheme: SystemScheme): StorageResult {
  const each = unknownLevels(scheme);
  const arrays = each.reduce((sum, levels) => sum + Math.max(1, levels - 1), 0);
  const all = scheme.equations.flatMap((e) => e.terms);
  const isStaggered = all.some((t) => t.level.den !== 1n);
  return {
    levels: isStaggered ? Math.max(...each) : levelCount(all),
    explicit: isExplicitSystem(scheme),
    arraysOnePerLevel: each.reduce((sum, levels) => sum + levels, 0),
    arraysInPlace: arrays,
    arraysWithRollingBuffer: null,
    rollingBufferLayers: null,
    registersGeneral: null,
    registersAccumulating: null,
    registersLowStorage: null,
    sweep: null,
    unknowns: scheme.unknowns.length,
    reason: 'one array for each unknown: every field is overwritten in place, in the order of the equations',
  };
}

/** In update order, each equation holds its own newest value at one point, and otherwise only what is known by then. */
function isExplicitSystem(scheme: SystemScheme): boolean {
  const keyOf = (t: { unknown: number; level: Rational }) => `${t.unknown}|${t.level.num}/${t.level.den}`;
  const newest = new Map<number, Rational>();
  for (const { terms } of scheme.equations)
    for (const t of terms) {
      const present = newest.get(t.unknown);
      if (!present || compare(t.level, present) > 0) newest.set(t.unknown, t.level);
    }
  const known = new Set<string>();
  return scheme.equations.every(({ terms }) => {
    const fresh = terms.filter((t) => equals(t.level, newest.get(t.unknown)!) && !known.has(keyOf(t)));
    const names = new Set(fresh.map(keyOf));
    if (names.size !== 1 || fresh.length !== 1) return false;
    known.add(keyOf(fresh[0]!));
    return true;
  });
}

/** Half-open reach per dimension over all levels, relative to the point that is written. */
export function schemeHalo(scheme: CanonicalScheme): [number, number][] {
  const groups = scheme.form === 'scalar' ? [scheme.terms] : scheme.equations.map((e) => e.terms);
  return Array.from({ length: scheme.dims }, (_, axis) => {
    let [left, right] = [0, 0];
    for (const terms of groups) {
      const centre = pointWritten(terms, axis);
      for (const t of terms) {
        const offset = toNumber(t.offset[axis]!) - centre;
        left = Math.max(left, Math.ceil(-offset));
        right = Math.max(right, Math.ceil(offset));
      }
    }
    return [left, right];
  });
}

function pointWritten(terms: readonly CanonicalTerm[], axis: number): number {
  const newest = newestOf(terms);
  const written = terms.filter((t) => equals(t.level, newest));
  return written.length === 1 ? toNumber(written[0]!.offset[axis]!) : 0;
}

/** Operations and traffic of one step of a table: everything but the newest point, divided by its coefficient beforehand. */
export function schemeCost(scheme: CanonicalScheme, storage: StorageResult): CostResult {
  const groups = scheme.form === 'scalar' ? [scheme.terms] : scheme.equations.map((e) => e.terms);
  let work = { additions: 0, multiplications: 0 };
  for (const terms of groups) {
    const newest = newestOf(terms);
    const written = terms.filter((t) => equals(t.level, newest));
    const known = terms.filter((t) => !equals(t.level, newest));
    const only = written.length === 1 ? written[0]! : null;
    // A leading coefficient other than ±1 is divided into the others once, which leaves no ±1 among them.
    const isScaled = only !== null && !isUnit(only.coefficient);
    const { additions, multiplications } = combinationCost(known.map((t) => t.coefficient));
    const equalToLead = isScaled ? unitsAmong(known) : 0;
    const coupled = only ? { additions: 0, multiplications: 0 } : combinationCost(written.map((t) => t.coefficient));
    work = {
      additions: work.additions + additions + coupled.additions,
      multiplications: work.multiplications + multiplications + equalToLead + coupled.multiplications,
    };
  }
  const { loads, stores, overwrites } = traffic(scheme, storage);
  return trafficCost(work, loads, stores, overwrites);
}

const unitsAmong = (terms: readonly CanonicalTerm[]) => (terms.some((t) => isUnit(t.coefficient)) ? 1 : 0);

/** Arrays streamed through memory: every older level once, and the new one, in place or not. */
function traffic(scheme: CanonicalScheme, storage: StorageResult) {
  if (scheme.form === 'system') {
    // One sweep for each equation: the fields it reads, and its own, which it overwrites.
    const reads = scheme.equations.map((e) => new Set(e.terms.map((t) => t.unknown)).size);
    const stores = scheme.equations.length;
    return { loads: reads.reduce((sum, n) => sum + n, 0), stores, overwrites: stores };
  }
  const newest = newestOf(scheme.terms);
  const loads = new Set(
    scheme.terms.filter((t) => !equals(t.level, newest)).map((t) => `${t.level.num}/${t.level.den}`),
  ).size;
  const inPlace =
    storage.levels !== null && storage.arraysInPlace < storage.levels && storage.registersGeneral === null;
  return {
    loads,
    stores: 1,
    overwrites: inPlace || (storage.registersGeneral !== null && storage.arraysInPlace === 1) ? 1 : 0,
  };
}

/** Steps by another method before this one can start. */
export const startUpSteps = (levels: number | null) => Math.max(0, (levels ?? 2) - 2);
