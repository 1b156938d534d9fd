/** Amplification factors against NumPy: eigenvalues of one step on a periodic grid, for random explicit schemes. */
import { spawnSync } from 'node:child_process';
import { describe, expect, it } from 'vitest';
import { amplificationFactors } from '@/lib/numerics/amplification';
import { compileScheme } from '@/lib/numerics/numeric-scheme';
import { dice, scalarScheme, type Row } from '../unit/numerics/scalar-scheme-maker';

const POINTS = 12;
const TRIALS = 12;

const NUMPY = `
import json, sys
import numpy as np
answers = []
for case in json.load(sys.stdin):
    n, depth = case["points"], case["depth"]
    step = np.zeros((n * depth, n * depth))
    for back, offset, weight in case["weights"]:
        for i in range(n):
            step[i, back * n + (i + offset) % n] += weight
    for k in range(1, depth):
        step[k * n:(k + 1) * n, (k - 1) * n:k * n] = np.eye(n)
    z = np.linalg.eigvals(step)
    answers.append([[w.real, w.imag] for w in z])
json.dump(answers, sys.stdout)
`;

function randomScheme(roll: () => number) {
  const depth = 1 + Math.floor(3 * roll());
  const weights: [number, number, number][] = [];
  for (let back = 0; back < depth; back++)
    for (let offset = -2; offset <= 2; offset++)
      if (roll() < 0.6) weights.push([back, offset, Math.round(16 * (roll() - 0.5)) / 8]);
  // The oldest level must be present, or the number of roots is smaller.
  weights.push([depth - 1, 0, 0.3125]);
  return { points: POINTS, depth, weights };
}

describe('roots over all waves of a periodic grid', () => {
  it('are the spectrum of the step matrix that NumPy computes', { timeout: 60_000 }, () => {
    const roll = dice(2024);
    const cases = Array.from({ length: TRIALS }, () => randomScheme(roll));
    const run = spawnSync('/usr/bin/python3', ['-c', NUMPY], { input: JSON.stringify(cases), encoding: 'utf8' });
    expect(run.status).toBe(0);
    const spectra = JSON.parse(run.stdout) as [number, number][][];
    cases.forEach(({ depth, weights }, k) => {
      const rows: Row[] = [
        [1, 0, ['1']],
        ...weights.map(([back, offset, weight]): Row => [-back, offset, [String(-weight)]]),
      ];
      const numeric = compileScheme(scalarScheme(rows));
      expect(numeric.degree).toBe(depth);
      const left = [...spectra[k]!];
      for (let wave = 0; wave < POINTS; wave++) {
        const { re, im } = amplificationFactors(numeric, [0], [(2 * Math.PI * wave) / POINTS]);
        re.forEach((x, j) => {
          const distances = left.map(([a, b]) => Math.hypot(a - x, b - im[j]!));
          const nearest = distances.indexOf(Math.min(...distances));
          expect(distances[nearest]).toBeLessThan(1e-6);
          left.splice(nearest, 1);
        });
      }
      expect(left).toHaveLength(0);
    });
  });
});
