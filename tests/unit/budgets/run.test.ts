import { describe, expect, it } from 'vitest';
import { quickestRun } from '@/lib/budgets/other-ways';
import {
  costOfRun,
  finestSpacing,
  keptPoints,
  ladder,
  rulingLimit,
  shareOf,
  spacingFor,
  timeLimits,
} from '@/lib/budgets/run';
import { worstGrowth } from '@/lib/budgets/worst-growth';
import { aRun, subjectOfCase } from './subjects';

const wave2d = subjectOfCase('wave2d');
const leapfrog = subjectOfCase('leapfrog2');
const DRIFT = { kind: 'angle', value: 30 } as const;

describe('the cost of a run', () => {
  it('is points × steps × bytes over bandwidth, and halves with twice the nodes', () => {
    const costing = costOfRun(aRun(2), wave2d, 10, 0.5);
    // 100 × 100 points; dt = 0.5 · 10 / 1 = 5 s; 1e6 / 5 steps.
    expect(costing).toMatchObject({ points: 1e4, step: 5, steps: 2e5, pointsPerWave: 2 });
    expect(costing.bytes).toBe(1e4 * 2e5 * wave2d.facts.cost.bytesDouble);
    expect(costing.seconds).toBe(costing.bytes / 1e11);
    expect(costOfRun(aRun(2, { nodes: 2 }), wave2d, 10, 0.5).seconds).toBe(costing.seconds / 2);
  });

  it('keeps halos: one on each side of the whole grid, and of every block where nodes share it', () => {
    expect(keptPoints(aRun(2), wave2d.facts, 10)).toEqual({ points: 1e4, kept: 102 * 102 });
    expect(keptPoints(aRun(2, { nodes: 4 }), wave2d.facts, 10).kept).toBe(104 * 104);
  });

  it('finds the coarsest spacing that holds the drift, and hardly a coarser one', () => {
    const run = aRun(2, { wavelength: 15, time: 4000, speeds: [1.5] });
    const spacing = spacingFor(run, wave2d, 0.64, DRIFT)!;
    expect(shareOf(costOfRun(run, wave2d, spacing, 0.64), DRIFT)).toBeLessThanOrEqual(1);
    expect(shareOf(costOfRun(run, wave2d, spacing * 1.002, 0.64), DRIFT)).toBeGreaterThan(1);
  });

  it('says that no grid holds a drift below what rounding leaves', () => {
    expect(spacingFor(aRun(1, { time: 1e9 }), leapfrog, 0.5, { kind: 'part', value: 1e-15 })).toBeNull();
  });

  it('takes a shorter step where order 4 in space makes the error of the step rule', () => {
    const fourth = subjectOfCase('leapfrog4');
    const run = aRun(1, { wavelength: 15, time: 6000 });
    const best = quickestRun(run, fourth, DRIFT)!;
    expect(best.parameter).toBeLessThan(fourth.bound * 0.5);
    const long = spacingFor(run, fourth, fourth.bound * 0.9, DRIFT)!;
    expect(best.seconds).toBeLessThan(costOfRun(run, fourth, long, fourth.bound * 0.9).seconds);
  });

  it('fills the memory with the finest spacing, and no finer one fits', () => {
    const run = aRun(2, { memory: 1e6 });
    const finest = finestSpacing(run, wave2d.facts)!;
    const bytes = (spacing: number) => costOfRun(run, wave2d, spacing, 0.5).memory;
    expect(bytes(finest)).toBeLessThanOrEqual(1e6);
    expect(bytes(finest * 0.98)).toBeGreaterThan(1e6);
    expect(finestSpacing(aRun(2, { memory: 100 }), wave2d.facts)).toBeNull();
  });
});

describe('several limits', () => {
  it('take the smaller step: diffusion on fine grids, the speed on coarse ones', () => {
    const run = aRun(1, { speeds: [1], diffusion: { diffusivity: 1, bound: 0.5 } });
    const ruling = (spacing: number) => rulingLimit(timeLimits(run, leapfrog, spacing, leapfrog.bound))!;
    // dx/c against dx²/2ν: equal at dx = 2ν/c = 2.
    expect(ruling(1)).toEqual({ name: 'the diffusion', step: 0.5 });
    expect(ruling(4).name).not.toBe('the diffusion');
  });

  it('step by the fastest speed and the smallest cell', () => {
    const run = aRun(1, { speeds: [4, 1], smallest: 0.5 });
    expect(rulingLimit(timeLimits(run, leapfrog, 1, 0.8))!.step).toBeCloseTo((0.8 * 0.5) / 4, 12);
    expect(costOfRun(run, leapfrog, 1, 0.8).parameter).toBeCloseTo(0.4, 12);
  });

  it('mark the rung at which a kept step passes the bound, and the worst wave there grows', () => {
    const rungs = ladder(aRun(1), leapfrog, 1, 0.8);
    expect(rungs.map(({ stepKept }) => stepKept.stable)).toEqual([true, true, false, false]);
    expect(rungs.every(({ scaled }) => scaled.stable)).toBe(true);
    // Leapfrog at θ = π/2: |z| = λ + √(λ² − 1).
    expect(worstGrowth(leapfrog.numeric, 1.6)).toBeCloseTo(1.6 + Math.sqrt(1.6 ** 2 - 1), 9);
  });
});
