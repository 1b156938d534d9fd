import { describe, expect, it } from 'vitest';
import {
  add,
  equals,
  formatRational,
  mul,
  neg,
  parseRational,
  power,
  rational,
  ZERO,
  type Rational,
} from '@/lib/numerics/rational';
import { analyseStencil, type ExactStencil } from '@/lib/numerics/stencil';
import { factorial, stencilWeights } from '@/lib/numerics/stencil-weights';
import { randomFrom } from '../../support/random';

function randomNodes(seed: number): { nodes: Rational[]; derivative: number } {
  const random = randomFrom(seed);
  const count = random.integer(2, 9);
  const texts = new Set<string>();
  while (texts.size < count) texts.add(formatRational(rational(random.integer(-12, 12), random.pick([1, 1, 2, 3]))));
  return { nodes: [...texts].map(parseRational), derivative: random.integer(0, Math.min(8, count - 1)) };
}

const stencil = (nodes: readonly Rational[], weights: readonly Rational[], derivative: number): ExactStencil => ({
  dims: 1,
  operator: [{ powers: [derivative], coefficient: rational(1) }],
  offsets: nodes.map((x) => [x]),
  weights,
  lhs: null,
  ulps: nodes.map(() => ZERO),
  lhsUlps: [],
});
const SEEDS = Array.from({ length: 40 }, (_, k) => k + 1);

describe('derived weights', () => {
  it('differentiate every polynomial that they have points for, exactly', () => {
    for (const seed of SEEDS) {
      const { nodes, derivative } = randomNodes(seed);
      const weights = stencilWeights(nodes, derivative);
      for (let k = 0; k < nodes.length; k++) {
        const sum = nodes.reduce((s, x, j) => add(s, mul(weights[j]!, k === 0 ? rational(1) : power(x, k))), ZERO);
        expect(formatRational(sum)).toBe(k === derivative ? String(factorial(derivative)) : '0');
      }
    }
  });

  it('change by the power of the scale when all offsets are scaled', () => {
    for (const seed of SEEDS) {
      const { nodes, derivative } = randomNodes(seed);
      const factor = rational(3, 2);
      const scaled = stencilWeights(
        nodes.map((x) => mul(x, factor)),
        derivative,
      );
      stencilWeights(nodes, derivative).forEach((w, j) =>
        expect(equals(w, mul(scaled[j]!, power(factor, derivative)))).toBe(true),
      );
    }
  });

  it('are refused where two nodes coincide or too few are given', () => {
    expect(() => stencilWeights([ZERO, ZERO], 1)).toThrow(RangeError);
    expect(() => stencilWeights([ZERO], 1)).toThrow(RangeError);
  });
});

describe('facts of a stencil', () => {
  it('mirror with the stencil: same order, error turned by the parity of its derivative, extents exchanged', () => {
    for (const seed of SEEDS) {
      const { nodes, derivative } = randomNodes(seed);
      const weights = stencilWeights(nodes, derivative);
      const facts = analyseStencil(stencil(nodes, weights, derivative));
      const sign = derivative % 2 === 0 ? (w: Rational) => w : neg;
      const mirrored = analyseStencil(stencil(nodes.map(neg), weights.map(sign), derivative));
      expect(mirrored.order).toBe(facts.order);
      expect(mirrored.extent).toEqual(facts.extent && [...facts.extent].reverse());
      if (!facts.leadingError?.coefficient) continue;
      const turned =
        facts.leadingError.hPower % 2 === 0
          ? facts.leadingError.coefficient
          : formatRational(neg(parseRational(facts.leadingError.coefficient)));
      expect(mirrored.leadingError?.coefficient).toBe(turned);
    }
  });

  it('call interpolation at a node exact instead of giving it an order', () => {
    const nodes = [rational(-1), ZERO, rational(1)];
    const facts = analyseStencil(stencil(nodes, stencilWeights(nodes, 0), 0));
    expect(facts).toMatchObject({ consistent: true, order: null, leadingError: null });
  });

  it('keep looking for the first residual: a symmetric second derivative is one order better than its points', () => {
    const nodes = [-1, 0, 1].map((x) => rational(x));
    expect(analyseStencil(stencil(nodes, stencilWeights(nodes, 2), 2)).order).toBe(2);
  });

  it('take the error of the modified wavenumber from its series where direct evaluation would cancel', () => {
    // (x² − x)-type first-order error of u''': the 1e-3 bandwidth lies near theta = 7e-4, where cos sums cancel.
    const nodes = [0, 1, 2, 3].map((x) => rational(x));
    const { modifiedWavenumber, leadingError } = analyseStencil(stencil(nodes, stencilWeights(nodes, 3), 3));
    const expected = (1e-3 / Number(parseRational(leadingError!.coefficient!).num / 1n)) * 2;
    expect(modifiedWavenumber!.resolvedBandwidthComplex!['0.001']).toBeCloseTo(expected, 6);
  });
});
