import { describe, expect, it } from 'vitest';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { exactIntervals, UNSOLVABLE } from '@/lib/numerics/stability/exact-stability';
import { rootsOf } from '@/lib/numerics/stability/limit-behaviour';
import { provenIntervals } from '@/lib/numerics/stability/proven-stability';
import type { StabilityResult } from '@/lib/numerics/stability/stability-result';
import { sampled, wavePolynomial } from '@/lib/numerics/stability/wave-polynomial';
import { dice, type Row, scalarScheme } from '../scalar-scheme-maker';

function bounds(scheme: ScalarScheme): StabilityResult {
  const outcome = exactIntervals(scheme, { timeLimitMs: 20_000 });
  if (outcome.kind !== 'decided') throw new Error(outcome.why);
  return outcome.result;
}
const ends = (result: StabilityResult) => result.intervals.map(({ lo, hi }) => [lo, hi]);

/** [level, offset, powers of p] */
const UPWIND: Row[] = [
  [1, 0, ['1']],
  [0, 0, ['-1', '1']],
  [0, -1, ['0', '-1']],
];
const LEAPFROG: Row[] = [
  [1, 0, ['1']],
  [0, 1, ['0', '1']],
  [0, -1, ['0', '-1']],
  [-1, 0, ['-1']],
];

describe('levels staggered by half a grid spacing', () => {
  it('have exact bounds: Lax-Friedrichs on a staggered grid, |lambda| <= 1/2', () => {
    const { method, intervals } = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [0, '-1/2', ['-1/2', '-1']],
        [0, '1/2', ['-1/2', '1']],
      ]),
    );
    expect(method).toBe('exact');
    expect(intervals.map(({ loExact, hiExact }) => [loExact, hiExact])).toEqual([['-1/2', '1/2']]);
  });

  it('have exact bounds over two steps: leapfrog between staggered points, a double root at the bound', () => {
    const [interval] = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [0, '-1/2', ['0', '-2']],
        [0, '1/2', ['0', '2']],
        [-1, 0, ['-1']],
      ]),
    ).intervals;
    expect([interval!.loExact, interval!.hiExact, interval!.hiIncluded]).toEqual(['-1/2', '1/2', false]);
    expect(interval!.hiBehaviour?.theta).toEqual([Math.PI]);
  });
});

describe('pitfalls of stability bounds', () => {
  it('finds conservative schemes stable, not degenerate: leapfrog up to its double root', () => {
    const result = bounds(scalarScheme(LEAPFROG));
    expect(ends(result)).toEqual([['-1', '1']]);
    expect(result.intervals[0]!.hiIncluded).toBe(false);
  });

  it('reports every stable interval and single stable values, not only the first', () => {
    // Forward Euler for diffusion with r = p (p − 1) (p − 2): stable where 0 <= r <= 1/2.
    const minusR = ['0', '-2', '3', '-1'];
    const twice = ['-1', '4', '-6', '2'];
    const result = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [0, -1, minusR],
        [0, 0, twice],
        [0, 1, minusR],
      ]),
    );
    expect(result.intervals).toHaveLength(2);
    const [first, second] = result.intervals;
    // The largest r on (0, 1) is 2 sqrt(3)/9 < 1/2.
    expect([first!.lo, first!.hi]).toEqual(['0', '1']);
    expect(second!.lo).toBe('2');
    // 2 (p³ − 3 p² + 2 p) = 1 beyond 2
    expect(second!.hiMinimalPolynomial).toBe('2*lambda**3 - 6*lambda**2 + 4*lambda - 1');
  });

  it('includes exact shifts outside the interval as single values', () => {
    const result = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [0, -1, ['0', '1', '-2', '1']],
        [0, 0, ['-1', '-2', '4', '-2']],
        [0, 1, ['0', '1', '-2', '1']],
      ]),
    );
    // Diffusion with r = −p (p − 1)²: of the wrong sign for p > 0, except at p = 1 where nothing moves.
    expect(result.isolatedStablePoints).toEqual(['1']);
    expect(result.intervals).toHaveLength(1);
    expect(result.intervals[0]!.hi).toBe('0');
  });

  it('does not count the trivial value 0', () => {
    const result = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [0, 0, ['-1']],
        [0, 1, ['0', '1/2']],
        [0, -1, ['0', '-1/2']],
      ]),
    );
    expect(result).toMatchObject({
      verdict: 'unstable for all nonzero values',
      intervals: [],
      isolatedStablePoints: [],
    });
  });

  it('rejects a zero-unstable multistep method whatever the step: rho = (z − 1)(z + 1)²', () => {
    const result = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [0, 0, ['1']],
        [-1, 0, ['-1']],
        [-2, 0, ['-1']],
        [-2, 1, ['0', '2']],
        [-2, -1, ['0', '-2']],
      ]),
    );
    expect(result.verdict).toBe('unstable for all nonzero values');
  });

  it('exempts the double root z = 1 of u_tt at θ = 0, and that one only', () => {
    const wave = (reach: number): Row[] => [
      [1, 0, ['1']],
      [0, -reach, ['0', '0', '-1']],
      [0, 0, ['-2', '0', '2']],
      [0, reach, ['0', '0', '-1']],
      [-1, 0, ['1']],
    ];
    const options = { equation: 'wave', timeOrder: 2 } as const;
    expect(ends(bounds(scalarScheme(wave(1), options)))).toEqual([['-1', '1']]);
    // On every second point only, θ = π behaves like θ = 0 without being it: growth linear in n at every value.
    const skipping = bounds(scalarScheme(wave(2), options));
    expect(skipping.intervals).toEqual([]);
    expect(skipping.note).toMatch(/linear/);
  });

  it('marks a double root on the circle strictly inside the interval', () => {
    // z² − (2 − 16 p (1 − p) sin²(θ/2)) z + 1: at p = 1/2 and θ = π the roots meet at −1 and part again along the circle.
    const result = bounds(
      scalarScheme(
        [
          [1, 0, ['1']],
          [0, -1, ['0', '-4', '4']],
          [0, 0, ['-2', '8', '-8']],
          [0, 1, ['0', '-4', '4']],
          [-1, 0, ['1']],
        ],
        { equation: 'wave', timeOrder: 2 },
      ),
    );
    expect(ends(result)).toEqual([['0', '1']]);
    expect(result.intervals[0]!.interiorDefects).toEqual([
      { at: '0.5', theta: expect.closeTo(Math.PI, 8), why: expect.stringContaining('double root') },
    ]);
  });

  it('tells a newest level that cannot be solved for: for all values, at one value, or as a factor that cancels', () => {
    const average = (level: number, sign: string): Row[] => [
      [level, -1, [sign + '1']],
      [level, 1, [sign + '1']],
    ];
    const never = bounds(scalarScheme([...average(1, ''), [0, 0, ['-2', '-1']], [0, 1, ['0', '1']]]));
    expect(never.intervals).toEqual([]);
    // The box scheme divides by cos(θ/2) at λ = 0 only, where it cancels: nothing is lost.
    const box = bounds(
      scalarScheme([
        [1, 0, ['1', '-1']],
        [1, 1, ['1', '1']],
        [0, 0, ['-1', '-1']],
        [0, 1, ['-1', '1']],
      ]),
    );
    expect(box.verdict).toBe('unconditionally stable');
    // Implicit upwind cannot be solved at λ = −1/2, θ = π; with its mirror image, stable for λ ≤ −1.
    const implicit = bounds(
      scalarScheme([
        [1, 0, ['1', '1']],
        [1, -1, ['0', '-1']],
        [0, 0, ['-1']],
      ]),
    );
    expect(ends(implicit)).toEqual([
      [null, '-1'],
      ['0', null],
    ]);
    // Upwind times (w + 1/w) on both levels is upwind.
    const doubled = UPWIND.flatMap(([level, offset, powers]): Row[] => [
      [level, Number(offset) - 1, powers],
      [level, Number(offset) + 1, powers],
    ]);
    expect(ends(bounds(scalarScheme(doubled)))).toEqual([['0', '1']]);
  });

  it('reports a value inside the interval at which the step cannot be solved', () => {
    // Crank-Nicolson for a sum that vanishes at θ = π, p = 1: a_1 = (1 + p cos θ) …, |g| = 1 elsewhere.
    const result = bounds(
      scalarScheme([
        [1, 0, ['1']],
        [1, 1, ['0', '1/2']],
        [1, -1, ['0', '1/2']],
        [0, 0, ['-1']],
        [0, 1, ['0', '-1/2']],
        [0, -1, ['0', '-1/2']],
      ]),
    );
    expect(ends(result)).toEqual([['-1', '1']]);
    expect(result.intervals[0]!.hiBehaviour).toMatchObject({ stableAtLimit: false, why: UNSOLVABLE });
  });

  it('keeps complex coefficients apart from their conjugates where the stencil is not symmetric', () => {
    // u(n+1) = (1 − i p (w − 1)) u: |g|² = 1 + 2 p sin θ + p² |w − 1|² > 1 on one side of θ for either sign of p.
    const result = bounds(
      scalarScheme(
        [
          [1, 0, ['1']],
          [0, 0, ['-1', 'i -1']],
          [0, 1, ['0', 'i 1']],
        ],
        { equation: 'schrodinger', parameter: 'sigma' },
      ),
    );
    expect(result.verdict).toBe('unstable for all nonzero values');
    expect(result.lostAt!.modulus).toBeGreaterThan(1);
  });

  it('bounds a three-level scheme with complex coefficients by the wave at π', () => {
    const result = bounds(
      scalarScheme(
        [
          [1, 0, ['1']],
          [0, 0, ['0', 'i 4']],
          [0, 1, ['0', 'i -2']],
          [0, -1, ['0', 'i -2']],
          [-1, 0, ['-1']],
        ],
        { equation: 'schrodinger', parameter: 'sigma' },
      ),
    );
    expect(ends(result)).toEqual([['-0.25', '0.25']]);
    expect(result.intervals[0]!.hiExact).toBe('1/4');
  });

  it('leaves multiple unit roots of a system to its matrix: two uncoupled leapfrogs are as stable as one', () => {
    // The characteristic polynomial is the square (z² + 2 p i sin θ z − 1)².
    const pair: Row[] = [
      [1, 0, ['1']],
      [0, 1, ['0', '2']],
      [0, -1, ['0', '-2']],
      [-1, 0, ['-2', '0', '-2']],
      [-1, 2, ['0', '0', '1']],
      [-1, -2, ['0', '0', '1']],
      [-2, 1, ['0', '-2']],
      [-2, -1, ['0', '2']],
      [-3, 0, ['1']],
    ];
    expect(bounds(scalarScheme(pair)).intervals).toEqual([]);
    const outcome = exactIntervals(scalarScheme(pair), { timeLimitMs: 20_000 }, 'allowed');
    if (outcome.kind !== 'decided') throw new Error(outcome.why);
    expect(ends(outcome.result)).toEqual([['-1', '1']]);
  });

  it('answers within its budget that it needs more time, and says what it cannot do', () => {
    expect(exactIntervals(scalarScheme(LEAPFROG), { timeLimitMs: 0 })).toMatchObject({ kind: 'work-limit' });
    expect(provenIntervals(scalarScheme(LEAPFROG), { timeLimitMs: 9, isCancelled: () => true })).toMatchObject({
      kind: 'work-limit',
    });
    expect(exactIntervals({ ...scalarScheme(LEAPFROG), dims: 2 }, { timeLimitMs: 9 })).toMatchObject({
      kind: 'unsupported',
    });
    expect(exactIntervals(scalarScheme([...LEAPFROG, [0, '1/2', ['0', '1']]]), { timeLimitMs: 9 })).toMatchObject({
      kind: 'unsupported',
    });
  });
});

describe('laws', () => {
  const random = dice(20);
  const whole = (lo: number, hi: number) => lo + Math.floor(random() * (hi - lo + 1));

  /** Random averaging: positive weights at p = 0 pushed about by p, over two to four levels; consistent in sum. */
  function randomRows(complex: boolean): Row[] {
    const levels = whole(2, 4);
    const rows: [number, number, string[]][] = [];
    let [total, drift] = [0, 0];
    for (let back = 1; back < levels; back++)
      for (let offset = -1; offset <= 1; offset++) {
        const weight = back === 1 ? whole(0, 3) : whole(0, 1);
        const push = whole(-3, 3);
        rows.push([1 - back, offset, [String(-weight), `${complex ? 'i ' : ''}${push}`]]);
        total += weight;
        drift += push;
      }
    rows.push([0, 0, ['-1', `${complex ? 'i ' : ''}${-drift}`]]);
    return [[1, 0, [String(total + 1)]], ...rows];
  }

  const inside = (result: StabilityResult, p: number, margin: number) =>
    result.intervals.some(
      ({ lo, hi }) => (lo === null || Number(lo) + margin < p) && (hi === null || p < Number(hi) - margin),
    );

  it('never disagrees with sampled roots: no growth inside, growth outside', { timeout: 120_000 }, () => {
    let [stable, unstable] = [0, 0];
    for (let round = 0; round < 40; round++) {
      const scheme = scalarScheme(randomRows(round % 5 === 4), round % 5 === 4 ? { equation: 'schrodinger' } : {});
      const result = bounds(scheme);
      const wave = wavePolynomial(scheme);
      if (typeof wave === 'string') throw new Error(wave);
      const at = sampled(wave);
      for (let k = 0; k < 10; k++) {
        const p = (random() - 0.5) * 4;
        const levelsAt = at(p);
        let modulus = 0;
        for (let j = 0; j <= 240; j++)
          for (const [re, im] of rootsOf(levelsAt(Math.PI * (j / 120 - 1))))
            modulus = Math.max(modulus, Math.hypot(re, im));
        if (inside(result, p, 0)) {
          expect(modulus).toBeLessThan(1 + 1e-6);
          stable++;
        } else if (modulus > 1 + 1e-6) unstable++;
        // A root outside can hide between samples, but never where all are strictly inside.
        else expect(modulus).toBeGreaterThan(1 - 1e-9);
      }
    }
    expect(Math.min(stable, unstable)).toBeGreaterThan(20);
  });

  it(
    'mirrors the interval of a mirrored scheme, and keeps that of a shifted or scaled one',
    { timeout: 60_000 },
    () => {
      for (let round = 0; round < 6; round++) {
        const rows = randomRows(false);
        const original = bounds(scalarScheme(rows));
        const reflected = bounds(
          scalarScheme(rows.map(([level, offset, powers]): Row => [level, -Number(offset), powers])),
        );
        expect(ends(reflected)).toEqual(ends(original));
        const negated = bounds(
          scalarScheme(
            rows.map(([level, offset, [a, b]]): Row => [
              level,
              offset,
              b === undefined ? [a!] : [a!, b.startsWith('-') ? b.slice(1) : `-${b}`],
            ]),
          ),
        );
        const minus = (text: string | null) =>
          text === null || text === '0' ? text : text.startsWith('-') ? text.slice(1) : `-${text}`;
        expect(ends(negated)).toEqual(
          ends(original)
            .map(([lo, hi]) => [minus(hi!), minus(lo!)])
            .reverse(),
        );
        const shifted = bounds(
          scalarScheme(rows.map(([level, offset, powers]): Row => [level, Number(offset) + 3, powers])),
        );
        expect(ends(shifted)).toEqual(ends(original));
      }
    },
  );
});
