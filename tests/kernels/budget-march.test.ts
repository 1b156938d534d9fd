import { afterAll, expect, it } from 'vitest';
import { costOfRun, costOfStep, type Run, spacingFor, type Subject, type Tolerance } from '@/lib/budgets/run';
import { buildKernel, type BuiltKernel } from './build-kernel';
import { kernelInput, type KernelCase } from './kernel-cases';
import { aRun, subjectOfCase } from '../unit/budgets/subjects';

/** Case, parameter, levels kept, error allowed at the end as part of the wave, periods or e-foldings. */
const RUNS: [KernelCase, number, number, number, number][] = [
  ['upwind', 0.6, 1, 0.1, 1],
  ['laxWendroff', 0.8, 1, 0.05, 10],
  ['leapfrog2', 0.7, 2, 0.05, 10],
  ['leapfrog4', 0.4, 2, 0.02, 20],
  ['rk4c4', 1.3, 1, 0.02, 20],
  ['ssp3c2', 0.8, 1, 0.05, 10],
  ['wave', 0.9, 2, 0.05, 20],
  ['heat', 0.4, 1, 0.02, 2],
];
const WAVELENGTH = 1;

const built: BuiltKernel[] = [];
afterAll(() => built.forEach((kernel) => kernel.remove()));

/** One wavelength of speed (or diffusivity) 1 on a periodic grid. */
function runOf(subject: Subject, duration: number): Run {
  const decays = subject.numeric.equation === 'diffusion';
  const time = decays ? duration / (2 * Math.PI) ** 2 : duration;
  return aRun(1, { extents: [WAVELENGTH], wavelength: WAVELENGTH, time });
}

/** The true wave at a time, as its complex amplitude. */
function amplitudeAt(subject: Subject, time: number): [number, number] {
  if (subject.numeric.equation === 'diffusion') return [Math.exp(-((2 * Math.PI) ** 2) * time), 0];
  return [Math.cos(2 * Math.PI * time), -Math.sin(2 * Math.PI * time)];
}

/** Marches the C kernel of a case and measures what the wave has become, against the true one. */
function measuredError(
  name: KernelCase,
  subject: Subject,
  n: number,
  step: number,
  steps: number,
  parameter: number,
  kept: number,
) {
  const levels = Array.from({ length: kept }, (_, k) => {
    const [re, im] = amplitudeAt(subject, (k - kept + 1) * step);
    return Float64Array.from({ length: n }, (_, j) => {
      const angle = (2 * Math.PI * j) / n;
      return re * Math.cos(angle) - im * Math.sin(angle);
    });
  });
  const kernel = buildKernel(kernelInput(name), 'c');
  built.push(kernel);
  const newest = kernel.levels({ kind: 'march', id: 'run', n, steps, parameters: [parameter], levels }).at(-1)!;
  let [re, im] = [0, 0];
  newest.forEach((value, j) => {
    re += (2 / n) * value * Math.cos((2 * Math.PI * j) / n);
    im -= (2 / n) * value * Math.sin((2 * Math.PI * j) / n);
  });
  const [trueRe, trueIm] = amplitudeAt(subject, steps * step);
  return Math.hypot(re - trueRe, im - trueIm) / Math.hypot(trueRe, trueIm);
}

it.each(RUNS)(
  'the budget of %s at %d is what its C kernel does on the grid proposed, within a tenth',
  (name, parameter, kept, allowed, duration) => {
    const subject = subjectOfCase(name);
    const run = runOf(subject, duration);
    const tolerance: Tolerance = { kind: 'part', value: allowed };
    const spacing = spacingFor(run, subject, parameter, tolerance)!;
    const n = Math.ceil(WAVELENGTH / spacing);
    const proposed = costOfRun(run, subject, WAVELENGTH / n, parameter);
    const marched = costOfStep(
      { ...run, time: proposed.steps * proposed.step },
      subject,
      WAVELENGTH / n,
      proposed.step,
    );

    const error = measuredError(name, subject, n, proposed.step, proposed.steps, parameter, kept);
    expect(Math.abs(error / marched.error - 1)).toBeLessThan(0.1);
    expect(error).toBeLessThan(allowed * 1.1);
    expect(error).toBeGreaterThan(allowed * 0.5);
  },
  120_000,
);
