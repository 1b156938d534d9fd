import { describe, expect, it } from 'vitest';
import { Definition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { compileScheme, type NumericScheme } from '@/lib/numerics/numeric-scheme';
import { pointsPerWave } from '@/lib/shortlist/points-per-wave';
import { runError } from '@/lib/shortlist/run-error';

const CENTRAL_2 = ['-1', '0', '1'];
const CENTRAL_4 = ['-2', '-1', '0', '1', '2'];
const LEAPFROG = { kind: 'multistep', alpha: ['-1', '0', '1'], beta: ['0', '2', '0'] };
const RK4 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  b: ['1/6', '1/3', '1/3', '1/6'],
};

function lines(offsets: string[], time: unknown): NumericScheme {
  const definition = Definition.parse({
    kind: 'scheme',
    equation: 'advection',
    form: 'lines',
    space: [{ kind: 'stencil', dims: 1, derivative: 1, offsets, weights: null }],
    time,
  });
  if (definition.kind !== 'scheme') throw new Error('not a scheme');
  return compileScheme(canonicalScheme(definition).scheme!);
}

/**
 * H.-O. Kreiss, J. Oliger, Comparison of accurate methods for the integration of hyperbolic equations,
 * Tellus 24 (1972) 199–215: with an exact time step the phase error after j periods is 2πj(1 − κ/θ), with
 * κ/θ ≈ 1 − θ²/6 for the second-order and 1 − θ⁴/30 for the fourth-order centred difference. Solved for θ = 2π/N:
 */
const secondOrder = (periods: number, phase: number) => 2 * Math.PI * Math.sqrt((Math.PI * periods) / (3 * phase));
const fourthOrder = (periods: number, phase: number) => 2 * Math.PI * ((Math.PI * periods) / (15 * phase)) ** 0.25;

/** An error of amplitude-free phase φ is |e^{iφ} − 1| = 2 sin(φ/2). */
const totalOf = (phase: number) => 2 * Math.sin(phase / 2);

const SHORT_STEP = 0.005;

describe('points a wavelength against the classical analysis', () => {
  it.each([
    [1, 0.1],
    [1, 0.01],
    [10, 0.1],
    [20, 0.05],
  ])('leapfrog with second-order space needs 2π√(πj/3e) points for j = %d, e = %d', (periods, phase) => {
    const found = pointsPerWave(lines(CENTRAL_2, LEAPFROG), SHORT_STEP, SHORT_STEP, totalOf(phase), periods);
    expect(found! / secondOrder(periods, phase)).toBeCloseTo(1, 1.9);
  });

  it.each([
    [1, 0.01],
    [10, 0.1],
    [20, 0.05],
  ])('leapfrog with fourth-order space needs 2π(πj/15e)^¼ points for j = %d, e = %d', (periods, phase) => {
    const found = pointsPerWave(lines(CENTRAL_4, LEAPFROG), SHORT_STEP, SHORT_STEP, totalOf(phase), periods);
    expect(found! / fourthOrder(periods, phase)).toBeCloseTo(1, 1.4);
  });

  it('Runge-Kutta 4 with fourth-order space needs as many as the same space with leapfrog, at a long step', () => {
    const found = pointsPerWave(lines(CENTRAL_4, RK4), 0.3, 0.3, totalOf(0.05), 20);
    expect(found! / fourthOrder(20, 0.05)).toBeCloseTo(1, 1.2);
  });

  it('makes a run of twice the distance lose twice the phase', () => {
    const scheme = lines(CENTRAL_2, LEAPFROG);
    const once = runError(scheme, 0.4, 40, 5);
    const twice = runError(scheme, 0.4, 40, 10);
    expect(twice.phase / once.phase).toBeCloseTo(2, 9);
    expect(once.phase).toBeLessThan(0);
  });

  it('loses nothing where the scheme shifts exactly', () => {
    const upwind = Definition.parse({
      kind: 'scheme',
      equation: 'advection',
      form: 'table',
      terms: [
        { level: 1, offset: 0, coefficient: '1' },
        { level: 0, offset: -1, coefficient: '-lambda' },
        { level: 0, offset: 0, coefficient: 'lambda-1' },
      ],
    });
    if (upwind.kind !== 'scheme') throw new Error('not a scheme');
    expect(runError(compileScheme(canonicalScheme(upwind).scheme!), 1, 10, 100).total).toBeLessThan(1e-9);
  });

  it('gives up where no grid reaches the tolerance', () => {
    expect(pointsPerWave(lines(CENTRAL_2, LEAPFROG), 0.5, 0.5, 1e-15, 1e6)).toBeNull();
  });
});
