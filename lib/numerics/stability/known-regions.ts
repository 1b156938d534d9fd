/**
 * Closed conditions for stability in several parameters, recognised by trial: each candidate is compared with the
 * engine's own decision at many points inside and outside it, and is named only if every one agrees.
 */
import type { ScalarScheme } from '../canonical-scheme';
import { CONVENTIONS } from '../equation';
import { stabilityTest } from './numeric-intervals';

export interface Region {
  /** The condition, in the scheme's own parameters. */
  readonly text: string;
  /** Positive inside, negative outside; points near 0 are not asked. */
  readonly margin: (values: readonly number[]) => number;
}

/** A bound along one parameter with the others 0. */
export interface DirectionBound {
  readonly name: string;
  readonly lo: number | null;
  readonly hi: number | null;
  /** Closed form of `hi`, or its decimal. */
  readonly hiText: string | null;
}

const POINTS = 60;
const CLEAR = 0.04;

const sum = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);

/** Conditions that follow from the bounds along single directions: simplex, ellipsoid, astroid, box. */
function fromDirections(names: readonly string[], bounds: readonly DirectionBound[]): Region[] {
  const wellPosed = names.every((n) => n.startsWith('r'));
  const signs = wellPosed ? ` (${names.join(', ')} >= 0)` : '';
  if (bounds.every((b) => b.hi === null))
    return [
      {
        text: wellPosed ? `all ${names.join(',')}>=0` : `all ${names.join(', ')}`,
        margin: () => 1,
      },
    ];
  if (bounds.some((b) => b.hi === null || b.lo === null || b.hi <= 0)) return [];
  const his = bounds.map((b) => b.hi!);
  const oneSided = bounds.every((b) => b.lo === 0);
  const symmetric = bounds.every((b) => Math.abs(b.lo! + b.hi!) < 1e-9);
  if (!oneSided && !symmetric) return [];
  const equal = his.every((h) => Math.abs(h - his[0]!) < 1e-9);
  const limit = bounds[0]!.hiText!;
  const sized = names.map((n) => (symmetric ? `|${n}|` : n));
  const outside = (v: readonly number[]) => (oneSided && v.some((x) => x < 0) ? Math.min(...v) : null);
  const prefix = oneSided && !wellPosed ? `${names.map((n) => `${n}>=0`).join(', ')}, ` : '';
  const shares = (v: readonly number[]) => v.map((x, k) => Math.abs(x) / his[k]!);
  const scaled = names.map((_, k) => (bounds[k]!.hiText === '1' ? sized[k]! : `${sized[k]}/(${bounds[k]!.hiText})`));
  const power = (text: string, e: string) => (text.includes('/') ? `(${text})^${e}` : `${text}^${e}`);
  const square = his[0]! ** 2;
  const den = [1, 2, 3, 4, 5, 6, 8, 9].find((d) => Math.abs(square * d - Math.round(square * d)) < 1e-9);
  return [
    {
      text: equal ? `${prefix}${sized.join('+')}<=${limit}` : `${prefix}${scaled.join('+')}<=1`,
      margin: (v) => outside(v) ?? 1 - sum(shares(v)),
    },
    {
      text:
        equal && den
          ? `${prefix}${names.map((n) => `${n}^2`).join('+')}<=${den === 1 ? Math.round(square) : `${Math.round(square * den)}/${den}`}`
          : `${prefix}${scaled.map((t) => power(t, '2')).join('+')}<=1`,
      margin: (v) => outside(v) ?? 1 - sum(shares(v).map((x) => x * x)),
    },
    {
      text: `${prefix}${scaled.map((t) => power(t, '(2/3)')).join('+')}<=1`,
      margin: (v) => outside(v) ?? 1 - sum(shares(v).map((x) => x ** (2 / 3))),
    },
    {
      text: oneSided
        ? names.map((n, k) => `0<=${n}<=${bounds[k]!.hiText}`).join(' and ')
        : `${names.map((n, k) => `|${n}|<=${bounds[k]!.hiText}`).join(' and ')}${signs}`,
      margin: (v) => outside(v) ?? 1 - Math.max(...shares(v)),
    },
  ];
}

/** Conditions of the literature on advection with diffusion; l is lambda, r the diffusion number. */
const ADVECTION_DIFFUSION: readonly Region[] = [
  { text: 'lambda^2 <= 2 r <= 1', margin: ([l, r]) => Math.min(2 * r! - l! * l!, 1 - 2 * r!) },
  {
    text: 'lambda^2 <= lambda+2r <= 1 (lambda>=0)',
    margin: ([l, r]) => Math.min(l! + 2 * r! - l! * l!, 1 - l! - 2 * r!),
  },
  {
    text: 'lambda^2 <= 2r-lambda <= 1 (lambda<=0)',
    margin: ([l, r]) => Math.min(2 * r! - l! - l! * l!, 1 + l! - 2 * r!),
  },
  { text: 'lambda^2+2r <= 1', margin: ([l, r]) => 1 - l! * l! - 2 * r! },
  { text: '|lambda|+2r <= 1', margin: ([l, r]) => 1 - Math.abs(l!) - 2 * r! },
  { text: '|lambda|+4r <= 1', margin: ([l, r]) => 1 - Math.abs(l!) - 4 * r! },
  { text: 'lambda^2 <= 2 r, any r>=0', margin: ([l, r]) => 2 * r! - l! * l! },
  { text: 'r <= 1/2, any lambda', margin: ([, r]) => 1 - 2 * r! },
  { text: '|lambda| <= 1, any r>=0', margin: ([l]) => 1 - Math.abs(l!) },
  { text: '|lambda| < 1, r=0', margin: ([l, r]) => (r === 0 ? 1 - Math.abs(l!) : -1) },
  { text: 'all r>=0, all lambda', margin: () => 1 },
];

/** Deterministic points, so that an entry's facts never change without cause. */
function samplePoints(lows: readonly number[], highs: readonly number[], count: number): number[][] {
  const fractions = [Math.SQRT2 - 1, Math.sqrt(3) - 1, Math.sqrt(5) - 2];
  return Array.from({ length: count }, (_, k) =>
    lows.map((lo, d) => {
      const share = (((k + 1) * fractions[d]!) % 1) * 1;
      // Short binary fractions keep exact series at these points cheap.
      return Math.round((lo + share * (highs[d]! - lo)) * 256) / 256;
    }),
  );
}

/**
 * @param scheme  two or three parameters
 * @param bounds  bounds along single directions (several dimensions); empty for advection with diffusion
 * @param isOver  asked between points
 * @returns the first candidate that agrees with the engine at every point, or null
 */
export function knownRegion(
  scheme: ScalarScheme,
  bounds: readonly DirectionBound[],
  isOver: () => boolean,
): Region | null {
  const names = scheme.parameters;
  const candidates = scheme.equation === 'advection-diffusion' ? ADVECTION_DIFFUSION : fromDirections(names, bounds);
  const nonNegative = CONVENTIONS[scheme.equation].nonNegative;
  const reach = (k: number) => Math.min(3, 1.3 * (bounds[k]?.hi ?? 1));
  const highs = names.map((_, k) => reach(k));
  const lows = names.map((name, k) => (nonNegative.includes(name) ? 0 : -reach(k)));
  const points = samplePoints(lows, highs, POINTS);
  const isStableAt = stabilityTest(scheme);
  let alive = [...candidates];
  for (const point of points) {
    if (alive.length === 0 || isOver()) return null;
    if (point.every((x) => x === 0) || alive.every((c) => Math.abs(c.margin(point)) < CLEAR)) continue;
    const isStable = isStableAt(point);
    alive = alive.filter((c) => {
      const margin = c.margin(point);
      return Math.abs(margin) < CLEAR || margin > 0 === isStable;
    });
  }
  return alive[0] ?? null;
}
