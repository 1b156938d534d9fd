/** Schemes with their facts, for tests of budgets. */
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { compileScheme } from '@/lib/numerics/numeric-scheme';
import { subjectOf } from '@/lib/budgets/other-ways';
import type { Run, Subject } from '@/lib/budgets/run';
import type { Equation } from '@/lib/numerics/equation';
import { kernelInput, type KernelCase } from '../../kernels/kernel-cases';

export function subjectOfCase(name: KernelCase): Subject {
  const { definition, facts } = kernelInput(name);
  if (definition.kind !== 'scheme' || facts.kind !== 'scheme') throw new Error('not a scheme');
  const subject = subjectOf({ numeric: compileScheme(canonicalScheme(definition).scheme!), facts });
  if (!subject) throw new Error('no stable step');
  return subject;
}

/** Forward Euler for u_t = −κ u_xxxx. */
export const HYPERDIFFUSION = {
  kind: 'scheme',
  form: 'table',
  equation: 'hyperdiffusion',
  terms: [
    { level: 1, offset: 0, coefficient: '1' },
    { level: 0, offset: -2, coefficient: 'q' },
    { level: 0, offset: -1, coefficient: '-4*q' },
    { level: 0, offset: 0, coefficient: '6*q - 1' },
    { level: 0, offset: 1, coefficient: '-4*q' },
    { level: 0, offset: 2, coefficient: 'q' },
  ],
};

export const CASE_OF: Readonly<Partial<Record<Equation, KernelCase>>> = {
  advection: 'leapfrog2',
  diffusion: 'heat',
  airy: 'airy',
  wave: 'wave',
  'wave-2d': 'wave2d',
  'wave-3d': 'wave3d',
  'diffusion-2d': 'heat2d',
  'diffusion-3d': 'heat3d',
};

/** A run with large grids, so that whole points and steps do not show in ratios. */
export const aRun = (dims: number, more: Partial<Run> = {}): Run => ({
  extents: Array<number>(dims).fill(1000),
  speeds: [1],
  wavelength: 20,
  time: 1e6,
  smallest: 1,
  diffusion: null,
  bandwidth: 1e11,
  memory: 1e11,
  nodes: 1,
  ...more,
});
