/**
 * The amplification matrix of a system at one wave: the map from one set of stored values to the next.
 *
 * Every unknown counts its levels from its own newest, so that half levels of staggered fields fall on
 * whole steps; the equations then read Σ M_k v^(n−k) = 0, and the matrix is the block companion of M_0⁻¹ M_k.
 */
import type { SystemScheme } from './canonical-scheme';
import { complexMatrix, eigenvalues, matrixProduct, rowNorm, solveMatrix, type ComplexMatrix } from './eigenvalues';
import { cosSin } from './numeric-scheme';
import type { ComplexArray } from './roots';
import { evaluate } from './polynomial';
import { toNumber } from './rational';

/**
 * @param parameters values in the order of `system.parameters`
 * @param theta      one angle per dimension, radians
 * @returns null where the newest values are not determined at this wave
 */
export function amplificationMatrix(
  system: SystemScheme,
  parameters: readonly number[],
  theta: readonly number[],
): ComplexMatrix | null {
  const size = system.unknowns.length;
  const newest = system.unknowns.map((_, k) =>
    Math.max(...system.equations.flatMap((e) => e.terms.filter((t) => t.unknown === k).map((t) => toNumber(t.level)))),
  );
  const blocks: ComplexMatrix[] = [];
  system.equations.forEach((equation, row) => {
    const back = equation.terms.map((t) => newest[t.unknown]! - toNumber(t.level));
    // A row whose newest value is older than its unknown's newest is the same equation one step later.
    const late = Math.min(...back);
    equation.terms.forEach((t, k) => {
      const step = Math.round(back[k]! - late);
      while (blocks.length <= step) blocks.push(complexMatrix(size));
      const block = blocks[step]!;
      const [re, im] = evaluate(t.coefficient, parameters);
      const [c, s] = cosSin(t.offset.reduce((sum, o, d) => sum + toNumber(o) * theta[d]!, 0));
      block.re[row * size + t.unknown]! += re * c - im * s;
      block.im[row * size + t.unknown]! += re * s + im * c;
    });
  });
  const [lead, ...rest] = blocks;
  if (!lead || rest.length === 0) return null;
  const order = size * rest.length;
  const out = complexMatrix(order);
  for (let k = 0; k < rest.length; k++) {
    const solved = solveMatrix(lead, rest[k]!);
    if (!solved) return null;
    for (let i = 0; i < size; i++)
      for (let j = 0; j < size; j++) {
        out.re[i * order + k * size + j] = -solved.re[i * size + j]!;
        out.im[i * order + k * size + j] = -solved.im[i * size + j]!;
      }
  }
  for (let i = size; i < order; i++) out.re[i * order + i - size] = 1;
  return out;
}

/** Nonzero eigenvalues of one step. */
export function systemEigenvalues(
  system: SystemScheme,
  parameters: readonly number[],
  theta: readonly number[],
  count: number,
): ComplexArray | null {
  const matrix = amplificationMatrix(system, parameters, theta);
  if (!matrix) return null;
  const all = eigenvalues(matrix);
  const order = Array.from(all.re.keys()).sort(
    (a, b) => Math.hypot(all.re[b]!, all.im[b]!) - Math.hypot(all.re[a]!, all.im[a]!),
  );
  const kept = order.slice(0, count);
  return { re: Float64Array.from(kept, (k) => all.re[k]!), im: Float64Array.from(kept, (k) => all.im[k]!) };
}

/**
 * Whether powers of the matrix stay bounded, judged from ‖G^n‖ at n = 2^11 and 2^12.
 * A defective eigenvalue on the unit circle doubles the norm; semisimple ones leave it.
 */
export function isPowerBounded(matrix: ComplexMatrix): boolean {
  let power = matrix;
  let before = rowNorm(power);
  for (let k = 1; k <= 12; k++) {
    before = rowNorm(power);
    power = matrixProduct(power, power);
    if (!(rowNorm(power) < 1e100)) return false;
  }
  return rowNorm(power) < 1.5 * before || rowNorm(power) < 1e-3;
}
