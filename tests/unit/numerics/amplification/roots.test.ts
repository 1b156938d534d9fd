import { describe, expect, it } from 'vitest';
import { complexArray, polynomialRoots, rootTolerance, type ComplexArray } from '@/lib/numerics/roots';
import { complexMatrix, eigenvalues } from '@/lib/numerics/eigenvalues';
import { dice } from '../scalar-scheme-maker';

function fromRoots(roots: readonly [number, number][]): ComplexArray {
  let c = { re: Float64Array.of(1), im: Float64Array.of(0) };
  for (const [x, y] of roots) {
    const next = { re: new Float64Array(c.re.length + 1), im: new Float64Array(c.re.length + 1) };
    for (let k = 0; k < c.re.length; k++) {
      next.re[k + 1]! += c.re[k]!;
      next.im[k + 1]! += c.im[k]!;
      next.re[k]! -= c.re[k]! * x - c.im[k]! * y;
      next.im[k]! -= c.re[k]! * y + c.im[k]! * x;
    }
    c = next;
  }
  return c;
}

function worstDistance(expected: readonly [number, number][], found: ComplexArray): number {
  return Math.max(
    ...expected.map(([x, y]) => Math.min(...Array.from(found.re, (re, k) => Math.hypot(re - x, found.im[k]! - y)))),
  );
}

describe('roots of complex polynomials', () => {
  it('come back from the polynomial they make, for degrees 1 to 8', () => {
    const roll = dice(7);
    for (let degree = 1; degree <= 8; degree++)
      for (let trial = 0; trial < 40; trial++) {
        const roots = Array.from({ length: degree }, (_, k): [number, number] => {
          // Spread over the unit circle's neighbourhood, so that none nearly coincide.
          const angle = (2 * Math.PI * (k + 0.6 * roll())) / degree;
          const radius = 0.7 + 0.6 * roll();
          return [radius * Math.cos(angle), radius * Math.sin(angle)];
        });
        expect(worstDistance(roots, polynomialRoots(fromRoots(roots)))).toBeLessThan(1e-12);
      }
  });

  it('are found to the square root of rounding where two coincide, and the tolerance says so', () => {
    const c = fromRoots([
      [0, 1],
      [0, 1],
      [0.3, 0],
    ]);
    const found = polynomialRoots(c);
    const distance = worstDistance(
      [
        [0, 1],
        [0.3, 0],
      ],
      found,
    );
    expect(distance).toBeLessThan(1e-6);
    const k = found.im.indexOf(Math.max(...found.im));
    expect(rootTolerance(c, found.re[k]!, found.im[k]!)).toBeGreaterThan(
      Math.abs(Math.hypot(found.re[k]!, found.im[k]!) - 1),
    );
  });

  it('go to infinity where the leading coefficient vanishes and to 0 where the last does', () => {
    const found = polynomialRoots({ re: Float64Array.of(0, -2, 1, 0), im: new Float64Array(4) });
    expect([...found.re].sort((a, b) => a - b)).toEqual([0, 2, Infinity]);
    expect(polynomialRoots(complexArray(1)).re).toHaveLength(0);
  });

  it('start well from the roots of a neighbouring polynomial', () => {
    const near = fromRoots([
      [0.9, 0.1],
      [-0.8, 0.2],
      [0.1, -0.5],
    ]);
    const warm = polynomialRoots(
      fromRoots(
        [
          [0.9, 0.1],
          [-0.8, 0.2],
          [0.1, -0.5],
        ].map(([x, y]) => [x! + 0.01, y!]),
      ),
    );
    expect(
      worstDistance(
        [
          [0.9, 0.1],
          [-0.8, 0.2],
          [0.1, -0.5],
        ],
        polynomialRoots(near, warm),
      ),
    ).toBeLessThan(1e-13);
  });
});

describe('eigenvalues', () => {
  it('are the roots of the characteristic polynomial of a companion matrix', () => {
    const roots: [number, number][] = [
      [0.5, 0.5],
      [-0.3, 0.9],
      [1, 0],
      [0.2, -0.7],
      [-0.9, -0.1],
    ];
    const c = fromRoots(roots);
    const n = roots.length;
    const companion = complexMatrix(n);
    for (let k = 0; k < n; k++) {
      companion.re[k] = -c.re[n - 1 - k]!;
      companion.im[k] = -c.im[n - 1 - k]!;
      if (k > 0) companion.re[k * n + k - 1] = 1;
    }
    expect(worstDistance(roots, eigenvalues(companion))).toBeLessThan(1e-12);
  });

  it('keep a semisimple double eigenvalue whole', () => {
    // A rotation of diag(1, 1, 1/2): no splitting by 1e-8 as roots of the determinant would show.
    const [c, s] = [Math.cos(0.7), Math.sin(0.7)];
    const m = complexMatrix(3);
    m.re.set([1, 0, 0, 0, c * c + (s * s) / 2, (c * s) / 2, 0, (c * s) / 2, s * s + (c * c) / 2]);
    const found = [...eigenvalues(m).re].sort((a, b) => a - b);
    [0.5, 1, 1].forEach((expected, k) => expect(found[k]).toBeCloseTo(expected, 14));
  });
});
