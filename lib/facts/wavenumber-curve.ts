/** The modified wavenumber of a one-dimensional stencil as a curve to be drawn. */
import type { StencilDefinition } from '@/lib/entries/definition';
import { StencilSymbol } from '@/lib/numerics/stencil-symbol';
import { canonicalStencil } from './canonical-stencil';

export interface WavenumberPoint {
  /** Radians, 0 … π. */
  readonly theta: number;
  readonly re: number;
  readonly im: number;
}

/**
 * @param samples number of points over 0 … π, both ends included
 * @returns null where the stencil has several dimensions, or does not hold
 */
export function wavenumberCurve(definition: StencilDefinition, samples = 97): readonly WavenumberPoint[] | null {
  const { stencil } = canonicalStencil(definition);
  if (!stencil || stencil.dims !== 1 || definition.derivative === undefined) return null;
  const row = (offsets: typeof stencil.offsets, weights: typeof stencil.weights) => ({
    offsets: offsets.flatMap((offset) => offset.slice(0, 1)),
    weights,
  });
  const symbol = new StencilSymbol(
    row(stencil.offsets, stencil.weights),
    stencil.lhs ? row(stencil.lhs.offsets, stencil.lhs.weights) : null,
    definition.derivative,
  );
  return Array.from({ length: samples }, (_, k) => {
    const theta = (k * Math.PI) / (samples - 1);
    const [re, im] = symbol.kappa(theta);
    return { theta, re, im };
  });
}
