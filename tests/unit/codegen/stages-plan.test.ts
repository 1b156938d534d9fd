import { describe, expect, it } from 'vitest';
import { arrangeStages } from '@/lib/codegen/stages-plan';
import { parseRational } from '@/lib/numerics/rational';

const tableau = (A: string[][], b: string[]) => ({
  A: A.map((row) => row.map(parseRational)),
  b: b.map(parseRational),
});
const rk4 = tableau(
  [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  ['1/6', '1/3', '1/3', '1/6'],
);
const midpoint = tableau(
  [
    ['0', '0'],
    ['1/2', '0'],
  ],
  ['0', '1'],
);
const ssp3 = tableau(
  [
    ['0', '0', '0'],
    ['1', '0', '0'],
    ['1/4', '1/4', '0'],
  ],
  ['1/6', '1/6', '2/3'],
);
const unused = tableau(
  [
    ['0', '0'],
    ['1/2', '0'],
  ],
  ['1', '0'],
);

describe('fused Runge-Kutta stages', () => {
  it.each([
    ['classical RK4', rk4, 3],
    ['the midpoint method', midpoint, 1],
    ['SSP RK3', ssp3, 3],
  ] as const)('of %s keep the level and a few work arrays', (_, method, count) => {
    expect(arrangeStages(method, false)!.work).toHaveLength(count);
  });

  it('never write the array whose neighbours they read', () => {
    for (const method of [rk4, midpoint, ssp3])
      for (const { source, sums } of arrangeStages(method, false)!.stages)
        expect(sums.map((s) => s.target)).not.toContain(source);
  });

  it('reuse a stage state at once where the slope has an array of its own', () => {
    expect(arrangeStages(rk4, true)!.work).toEqual(['y', 'w']);
  });

  it('leave out stages that the new level does not depend on', () => {
    expect(arrangeStages(unused, false)!.stages.map((s) => s.index)).toEqual([0]);
  });
});
