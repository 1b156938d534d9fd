/** A small seeded generator, so that a failing case can be found again. */
export interface Random {
  /** 0 ≤ value < 1. */
  next(): number;
  integer(lo: number, hi: number): number;
  pick<T>(list: readonly T[]): T;
}

/** Mulberry32. */
export function randomFrom(seed: number): Random {
  let state = seed >>> 0;
  const next = () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const integer = (lo: number, hi: number) => lo + Math.floor(next() * (hi - lo + 1));
  return { next, integer, pick: (list) => list[integer(0, list.length - 1)]! };
}
