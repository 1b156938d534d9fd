/** Sturm chains over Z: how many distinct real roots lie in an interval, decided by signs alone. */
import {
  content,
  derivative,
  type IntegerPolynomial,
  leading,
  pseudoRemainder,
  signAt,
} from '@/lib/numerics/integer-polynomial';
import type { Rational } from '@/lib/numerics/rational';

/** The end of an interval: a rational number or an infinity. */
export type End = Rational | 'minus-infinity' | 'infinity';

/** The chain of a and its derivative; its last member is a multiple of their greatest common divisor. */
export function sturmChain(a: IntegerPolynomial): IntegerPolynomial[] {
  const chain: IntegerPolynomial[] = [a, derivative(a)];
  if (chain[1]!.length === 0) return [a];
  for (;;) {
    const rest = pseudoRemainder(chain.at(-2)!, chain.at(-1)!);
    if (rest.length === 0) return chain;
    const divisor = content(rest);
    chain.push(rest.map((c) => -c / divisor));
  }
}

function signAtEnd(a: IntegerPolynomial, end: End): number {
  if (end === 'infinity') return leading(a) > 0n ? 1 : -1;
  if (end === 'minus-infinity') return leading(a) > 0n === (a.length % 2 === 1) ? 1 : -1;
  return signAt(a, end.num, end.den);
}

function variations(chain: readonly IntegerPolynomial[], end: End): number {
  let count = 0;
  let previous = 0;
  for (const member of chain) {
    const sign = signAtEnd(member, end);
    if (sign === 0) continue;
    if (previous !== 0 && sign !== previous) count++;
    previous = sign;
  }
  return count;
}

/**
 * Number of distinct real roots in the half-open interval lo < x ≤ hi.
 * @param chain from `sturmChain` of a nonzero polynomial
 */
export function rootsInHalfOpen(chain: readonly IntegerPolynomial[], lo: End, hi: End): number {
  const last = chain.at(-1)!;
  const isRootOfAll = (end: End) => typeof end !== 'string' && last.length > 1 && signAtEnd(last, end) === 0;
  if (isRootOfAll(lo) || isRootOfAll(hi))
    throw new RangeError('rootsInHalfOpen: an end of the interval is a multiple root; pass a square-free polynomial');
  return variations(chain, lo) - variations(chain, hi);
}

/** Number of distinct real roots in the open interval lo < x < hi. */
export function rootsInOpen(chain: readonly IntegerPolynomial[], lo: End, hi: End): number {
  const atEnd = typeof hi !== 'string' && signAt(chain[0]!, hi.num, hi.den) === 0 ? 1 : 0;
  return rootsInHalfOpen(chain, lo, hi) - atEnd;
}

/** Number of distinct real roots. */
export const realRootCount = (a: IntegerPolynomial) => rootsInHalfOpen(sturmChain(a), 'minus-infinity', 'infinity');
