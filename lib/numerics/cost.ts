/**
 * Operations and traffic of one point and step. Coefficients are computed once outside the loop; terms that share a
 * coefficient up to its sign are added first and multiplied once; coefficients +1 and −1 cost no product.
 */
import { isZero, neg, type Polynomial } from './polynomial';

export interface CostResult {
  operations: number;
  additions: number;
  multiplications: number;
  /** Arrays read a point and step. */
  loads: number;
  /** Arrays written a point and step. */
  stores: number;
  /** A store to an array that was not loaded moves its line twice. */
  bytesDouble: number;
  bytesSingle: number;
}

/** Text that is the same for a polynomial and its negative. */
export function magnitudeKey(a: Polynomial): string {
  const text = (p: Polynomial) =>
    p.map((m) => `${m.powers.join()}:${m.re.num}/${m.re.den},${m.im.num}/${m.im.den}`).join(';');
  const [first, second] = [text(a), text(neg(a))];
  return first < second ? first : second;
}

export function isUnit(a: Polynomial): boolean {
  const only = a.length === 1 ? a[0]! : null;
  return (
    only !== null &&
    only.powers.every((p) => p === 0) &&
    only.im.num === 0n &&
    only.re.den === 1n &&
    (only.re.num === 1n || only.re.num === -1n)
  );
}

/** Additions and products of Σ coefficient · value. */
export function combinationCost(coefficients: readonly Polynomial[]): { additions: number; multiplications: number } {
  const groups = new Map<string, Polynomial>();
  const nonzero = coefficients.filter((c) => !isZero(c));
  for (const c of nonzero) groups.set(magnitudeKey(c), c);
  return {
    additions: Math.max(0, nonzero.length - 1),
    multiplications: [...groups.values()].filter((c) => !isUnit(c)).length,
  };
}

/** @param overwrites how many of the stored arrays were also loaded (in-place updates) */
export function trafficCost(
  work: { additions: number; multiplications: number },
  loads: number,
  stores: number,
  overwrites: number,
): CostResult {
  const moved = loads + stores + Math.max(0, stores - overwrites);
  return {
    operations: work.additions + work.multiplications,
    ...work,
    loads,
    stores,
    bytesDouble: 8 * moved,
    bytesSingle: 4 * moved,
  };
}
