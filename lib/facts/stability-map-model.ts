/** Where a scheme of two numbers and more is stable, as a field of cells for drawing. */
import type { SchemeDefinition } from '@/lib/entries/definition';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { characteristicOf, compileScheme, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { variable } from '@/lib/numerics/polynomial';
import { withParameters } from '@/lib/numerics/restricted-scheme';
import { stabilityPlane } from '@/lib/numerics/stability-map';
import { canonicalScheme } from './canonical-scheme';

export interface StabilityMapModel {
  /** Names of the numbers to the right and upward. */
  readonly across: string;
  readonly upward: string;
  /** Numbers that share the value of `upward`. */
  readonly tied: readonly string[];
  /** Centres of the cells, ascending. */
  readonly xs: readonly number[];
  readonly ys: readonly number[];
  /** Cell at xs[i], ys[j] at j * xs.length + i. */
  readonly stable: readonly boolean[];
}

const COLUMNS = 49;
const ROWS = 37;
const COARSE = 17;
/** Where growth counts: below it lies the rounding of double roots. */
const TOLERANCE = 1e-7;
const WIDEST = 4;

/** Centres of equal cells; a middle cell stands on 0 where the range goes both ways. */
function centres(isOneSided: boolean, top: number, count: number): Float64Array {
  const from = isOneSided ? 0 : -top;
  const step = (top - from) / (count - 1);
  return Float64Array.from({ length: count }, (_, k) => Number((from + k * step).toPrecision(10)));
}

function field(numeric: NumericScheme, xs: Float64Array, ys: Float64Array): boolean[] {
  return Array.from(stabilityPlane(numeric, xs, ys), (modulus) => modulus <= 1 + TOLERANCE);
}

const reach = (at: Float64Array, isStable: (index: number) => boolean) =>
  at.reduce((most, value, k) => (isStable(k) ? Math.max(most, Math.abs(value)) : most), 0);

/** Range of both numbers that shows the region and a margin round it. */
function framed(numeric: NumericScheme, oneSided: readonly [boolean, boolean]): [number, number] {
  let tops: [number, number] = [WIDEST, WIDEST];
  for (let round = 0; round < 5; round++) {
    const xs = centres(oneSided[0], tops[0], COARSE);
    const ys = centres(oneSided[1], tops[1], COARSE);
    const stable = field(numeric, xs, ys);
    const across = reach(xs, (i) => ys.some((_, j) => stable[j * COARSE + i]));
    const upward = reach(ys, (j) => xs.some((_, i) => stable[j * COARSE + i]));
    const next = ([across, upward] as const).map((most, k) => {
      const cell = tops[k]! / (COARSE - 1);
      return most >= 0.99 * tops[k]! ? tops[k]! : 1.2 * Math.max(most + cell, 2 * cell);
    }) as [number, number];
    const isSettled = next.every((top, k) => top > 0.75 * tops[k]!);
    tops = next.map((top, k) => Math.min(top, tops[k]!)) as [number, number];
    if (isSettled) break;
  }
  return tops.map((top) => Number(top.toPrecision(2))) as [number, number];
}

const KEPT = 200;
const known = new Map<string, StabilityMapModel | null>();

/**
 * The map of a definition; those asked for last are remembered, since a map is the same for every reader.
 * @returns null where the definition does not hold or has fewer than two free numbers
 */
export function stabilityMapModel(definition: SchemeDefinition): StabilityMapModel | null {
  const key = JSON.stringify(definition);
  const found = known.get(key);
  if (found !== undefined) return found;
  const map = computedMap(definition);
  if (known.size >= KEPT) known.delete(known.keys().next().value!);
  known.set(key, map);
  return map;
}

function computedMap(definition: SchemeDefinition): StabilityMapModel | null {
  const { scheme } = canonicalScheme(definition);
  const [across, upward, ...tied] = scheme?.parameters ?? [];
  if (!scheme || across === undefined || upward === undefined) return null;
  const plane = withParameters(
    characteristicOf(scheme).scalar,
    [across, upward],
    scheme.parameters.map((_, k) => variable(2, Math.min(k, 1))),
  );
  const numeric = compileScheme(plane);
  const { nonNegative } = CONVENTIONS[scheme.equation];
  const oneSided = [nonNegative.includes(across), nonNegative.includes(upward)] as const;
  const [right, top] = framed(numeric, oneSided);
  const xs = centres(oneSided[0], right, COLUMNS);
  const ys = centres(oneSided[1], top, ROWS);
  return { across, upward, tied, xs: [...xs], ys: [...ys], stable: field(numeric, xs, ys) };
}
