/** Work and traffic of one step of an explicit Runge-Kutta method in its stage form, for one scalar field. */
import { trafficCost, type CostResult } from './cost';
import { abs, formatRational, isZero, type Rational } from './rational';

/** Additions and products of one evaluation of the space operator; its step and spacing are in the hoisted weights. */
export function operatorWork(weights: readonly (readonly Rational[])[]): {
  additions: number;
  multiplications: number;
} {
  const terms = weights.flat().filter((w) => !isZero(w)).length;
  const sizes = weights.map((row) => new Set(row.filter((w) => !isZero(w)).map((w) => formatRational(abs(w)))).size);
  return { additions: Math.max(0, terms - 1), multiplications: sizes.reduce((sum, n) => sum + n, 0) };
}

/**
 * Stage i reads its state, evaluates the operator, keeps the slope where a later stage or the result needs it, and
 * writes the next state u + Σ a k. Every sweep streams the arrays it touches.
 */
export function rungeKuttaCost(
  A: readonly (readonly Rational[])[],
  b: readonly Rational[],
  work: { additions: number; multiplications: number },
): CostResult {
  const s = b.length;
  const isUnit = (x: Rational) => x.den === 1n && (x.num === 1n || x.num === -1n);
  let [additions, multiplications, loads, stores] = [0, 0, 0, 0];
  let overwrites = 0;
  for (let i = 0; i < s; i++) {
    const next = i + 1 < s ? A[i + 1]! : b;
    const used = next.slice(0, i + 1).filter((x) => !isZero(x));
    additions += work.additions + used.length;
    multiplications += work.multiplications + used.filter((x) => !isUnit(x)).length;
    const earlier = next.slice(0, i).filter((x) => !isZero(x)).length;
    loads += 1 + (i > 0 ? 1 : 0) + earlier;
    const isKept = [...A.slice(i + 2), b].some((row) => (row === next ? false : !isZero(row[i]!)));
    stores += 1 + (isKept ? 1 : 0);
    // The last stage writes over u, which it has just read.
    if (i + 1 === s && s > 1) overwrites += 1;
  }
  return trafficCost({ additions, multiplications }, loads, stores, overwrites);
}
