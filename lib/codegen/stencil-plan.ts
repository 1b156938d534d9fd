/** Plans the kernel of an explicit one-dimensional stencil. */
import type { StencilDefinition } from '@/lib/entries/definition';
import { canonicalStencil } from '@/lib/facts/canonical-stencil';
import { constant, type Polynomial } from '@/lib/numerics/polynomial';
import { add, isZero, ONE, rational, toNumber } from '@/lib/numerics/rational';
import { combine } from './combination';
import { none, type Planned, type StencilPlan } from './kernel-plan';

const HALF = rational(1, 2);

export function planStencil(definition: StencilDefinition): Planned<StencilPlan> {
  const { stencil, problems } = canonicalStencil(definition);
  if (!stencil)
    return none(
      `The definition cannot be read: ${problems.find((p) => p.severity === 'error')?.message ?? 'no reason given'}.`,
    );
  if (stencil.dims > 1)
    return none(`Kernels in ${stencil.dims} dimensions are not printed yet; one-dimensional stencils are.`);
  if (stencil.lhs) return none('A compact stencil needs a linear solve; kernels are printed for explicit stencils.');
  const { powers, coefficient: scale } = stencil.operator[0]!;
  if (stencil.operator.length > 1 || scale.num !== scale.den)
    return none('The operator is a sum of derivatives; kernels are printed for a single derivative.');
  const derivative = powers[0]!;
  const used = stencil.offsets
    .map((offset, k) => ({ offset: offset[0]!, weight: stencil.weights[k]! }))
    .filter(({ weight }) => !isZero(weight));
  if (used.length === 0) return none('Every weight is 0.');
  const staggered = used.every(({ offset }) => offset.den === 2n);
  if (!staggered && !used.every(({ offset }) => offset.den === 1n))
    return none(
      'The offsets are not evenly spaced (all integers, or all half-integers), so that there is no index convention for a kernel on a uniform grid.',
    );
  const spacing: Polynomial = [{ powers: [derivative], re: ONE, im: { num: 0n, den: 1n } }];
  const terms = used.map(({ offset, weight }) => ({
    array: 'u',
    offset: toNumber(staggered ? add(offset, HALF) : offset),
    coefficient: { num: constant(1, weight), den: spacing },
  }));
  const { node, coefficients } = combine(terms, new Map([['u', 'a']]), ['h']);
  return {
    kind: 'plan',
    plan: {
      derivative,
      halo: [Math.max(0, ...terms.map((t) => -t.offset)), Math.max(0, ...terms.map((t) => t.offset))],
      node,
      coefficients,
      staggered,
    },
  };
}
