/** One step of a scheme, or one application of a stencil, in exact rational arithmetic on a periodic grid. */
import type { KernelInput } from '@/lib/codegen/kernel-request';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { canonicalStencil } from '@/lib/facts/canonical-stencil';
import type { Polynomial } from '@/lib/numerics/polynomial';
import { add, div, mul, neg, power, rational, toNumber, ZERO, type Rational } from '@/lib/numerics/rational';

/** The double as the fraction that it is. */
export function exactly(value: number): Rational {
  let scale = 0;
  while (!Number.isInteger(value)) {
    value *= 2;
    scale++;
  }
  return rational(BigInt(value), 2n ** BigInt(scale));
}

function valueOf(polynomial: Polynomial, parameters: readonly Rational[]): Rational {
  return polynomial.reduce(
    (sum, { powers, re }) =>
      add(
        sum,
        powers.reduce((p, k, at) => mul(p, power(parameters[at]!, k)), re),
      ),
    ZERO,
  );
}

export interface ExactValues {
  readonly values: Float64Array;
  /** Sum of the absolute values of all terms at each point: what rounding errors are measured by. */
  readonly sizes: Float64Array;
}

/** Index of the neighbour of point `at`; x runs fastest. */
function periodicNeighbour(grid: readonly number[], at: number, offset: readonly number[]): number {
  const strides = grid.map((_, axis) => grid.slice(0, axis).reduce((product, n) => product * n, 1));
  return grid.reduce((index, n, axis) => {
    const place = Math.floor(at / strides[axis]!) % n;
    return index + strides[axis]! * ((place + offset[axis]! + 8 * n) % n);
  }, 0);
}

/**
 * @param levels kept levels, oldest first
 * @param grid   points along x, y, z; one row where it is not given
 */
export function exactStep(
  input: KernelInput,
  parameters: readonly number[],
  levels: readonly Float64Array[],
  grid: readonly number[] = [levels[0]!.length],
): ExactValues {
  if (input.definition.kind !== 'scheme') throw new RangeError('exactStep: not a scheme');
  const { scheme } = canonicalScheme(input.definition);
  if (scheme?.form !== 'scalar') throw new RangeError('exactStep: not a scalar scheme');
  const numbers = parameters.map(exactly);
  const terms = scheme.terms.map((t) => ({
    level: toNumber(t.level),
    offset: t.offset.map(toNumber),
    coefficient: valueOf(t.coefficient, numbers),
  }));
  const newest = Math.max(...terms.map((t) => t.level));
  const pivot = terms.find((t) => t.level === newest)!;
  const n = levels[0]!.length;
  const exact = levels.map((level) => Array.from(level, exactly));
  const values = new Float64Array(n);
  const sizes = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let sum = ZERO;
    for (const term of terms) {
      if (term === pivot) continue;
      const age = newest - 1 - term.level;
      const at = periodicNeighbour(
        grid,
        i,
        term.offset.map((o, axis) => o - pivot.offset[axis]!),
      );
      const part = neg(div(mul(term.coefficient, exact[levels.length - 1 - age]![at]!), pivot.coefficient));
      sum = add(sum, part);
      sizes[i]! += Math.abs(toNumber(part));
    }
    values[i] = toNumber(sum);
  }
  return { values, sizes };
}

export function exactApplication(input: KernelInput, spacing: number, u: Float64Array): ExactValues {
  if (input.definition.kind !== 'stencil') throw new RangeError('exactApplication: not a stencil');
  const { stencil } = canonicalStencil(input.definition);
  if (!stencil) throw new RangeError('exactApplication: the stencil cannot be read');
  const m = stencil.operator[0]!.powers[0]!;
  const scale = power(exactly(spacing), -m);
  const n = u.length;
  const exact = Array.from(u, exactly);
  const values = new Float64Array(n);
  const sizes = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    let sum = ZERO;
    stencil.offsets.forEach((offset, k) => {
      // Half-integer offsets: the approximation at i stands half a spacing to the right of u at i.
      const at = Math.ceil(toNumber(offset[0]!));
      const part = mul(mul(stencil.weights[k]!, scale), exact[(i + at + n) % n]!);
      sum = add(sum, part);
      sizes[i]! += Math.abs(toNumber(part));
    });
    values[i] = toNumber(sum);
  }
  return { values, sizes };
}
