/** Schemes, stencils and time methods whose kernels the tests print, compile and run. */
import { Definition } from '@/lib/entries/definition';
import { analyseDefinition } from '@/lib/facts/analyse-definition';
import type { KernelInput } from '@/lib/codegen/kernel-request';

const central2 = { kind: 'stencil', derivative: 1, offsets: ['-1', '0', '1'], weights: null };
const central4 = { kind: 'stencil', derivative: 1, offsets: ['-2', '-1', '0', '1', '2'], weights: null };
const second2 = { kind: 'stencil', derivative: 2, offsets: ['-1', '0', '1'], weights: null };

const euler = { kind: 'runge-kutta', A: [['0']], b: ['1'] };
const ssp3 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0'],
    ['1', '0', '0'],
    ['1/4', '1/4', '0'],
  ],
  b: ['1/6', '1/6', '2/3'],
};
const rk4 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  b: ['1/6', '1/3', '1/3', '1/6'],
};
const leapfrog = { kind: 'multistep', alpha: ['-1', '0', '1'], beta: ['0', '2', '0'] };
const ab2 = { kind: 'multistep', alpha: ['0', '-1', '1'], beta: ['-1/2', '3/2', '0'] };
const ab3 = { kind: 'multistep', alpha: ['0', '0', '-1', '1'], beta: ['5/12', '-4/3', '23/12', '0'] };

const lines = (equation: string, space: unknown[], time: unknown) => ({
  kind: 'scheme',
  form: 'lines',
  equation,
  space,
  time,
});
const table = (equation: string, terms: [number, number, string][]) => ({
  kind: 'scheme',
  form: 'table',
  equation,
  terms: terms.map(([level, offset, coefficient]) => ({ level, offset, coefficient })),
});

const grid = (equation: string, terms: [number, number[], string][]) => ({
  kind: 'scheme',
  form: 'table',
  equation,
  terms: terms.map(([level, offset, coefficient]) => ({ level, offset: offset.map(String), coefficient })),
});

/** u_tt = c² Lap u with these weights of the second difference along every axis, by leapfrog. */
function waveOn(dims: 2 | 3, weights: readonly [centre: string, ...around: string[]]) {
  const origin = Array<number>(dims).fill(0);
  const [centre, ...around] = weights;
  const neighbours = around.flatMap((weight, k) =>
    origin.flatMap((_, axis) =>
      [-1, 1].map((side): [number, number[], string] => [
        0,
        origin.map((o, at) => (at === axis ? side * (k + 1) : o)),
        `-(${weight})*lambda^2`,
      ]),
    ),
  );
  return grid(`wave-${dims}d`, [
    [1, origin, '1'],
    ...neighbours,
    [0, origin, `-(${dims})*(${centre})*lambda^2 - 2`],
    [-1, origin, '1'],
  ]);
}

const DEFINITIONS = {
  leapfrog2: ['AD 003', 'Leapfrog, central 2', lines('advection', [central2], leapfrog)],
  leapfrog4: ['AD 004', 'Leapfrog, central 4', lines('advection', [central4], leapfrog)],
  upwind: [
    'AD 002',
    'Upwind',
    table('advection', [
      [1, 0, '1'],
      [0, -1, '-lambda'],
      [0, 0, 'lambda - 1'],
    ]),
  ],
  laxWendroff: [
    'AD 005',
    'Lax-Wendroff',
    table('advection', [
      [1, 0, '1'],
      [0, -1, '-lambda^2/2 - lambda/2'],
      [0, 0, 'lambda^2 - 1'],
      [0, 1, '-lambda^2/2 + lambda/2'],
    ]),
  ],
  forwardCentral: ['AD 001', 'Forward Euler, central 2', lines('advection', [central2], euler)],
  heat: ['DI 001', 'Forward Euler, central 2', lines('diffusion', [second2], euler)],
  duFortFrankel: [
    'DI 005',
    'DuFort-Frankel',
    table('diffusion', [
      [1, 0, '1 + 2*r'],
      [0, -1, '-2*r'],
      [0, 1, '-2*r'],
      [-1, 0, '2*r - 1'],
    ]),
  ],
  wave: [
    'WA 001',
    'Leapfrog for the wave equation',
    table('wave', [
      [1, 0, '1'],
      [0, -1, '-lambda^2'],
      [0, 0, '2*lambda^2 - 2'],
      [0, 1, '-lambda^2'],
      [-1, 0, '1'],
    ]),
  ],
  rk4c4: ['AD 010', 'Classical Runge-Kutta, central 4', lines('advection', [central4], rk4)],
  ssp3c2: ['AD 011', 'SSP Runge-Kutta 3, central 2', lines('advection', [central2], ssp3)],
  ab2c2: ['AD 012', 'Adams-Bashforth 2, central 2', lines('advection', [central2], ab2)],
  ab3c2: ['AD 013', 'Adams-Bashforth 3, central 2', lines('advection', [central2], ab3)],
  upwindBiased3: [
    'AD 015',
    'Third-order upwind-biased, one step',
    table('advection', [
      [1, 0, '1'],
      [0, -2, '-lambda^3/6 + lambda/6'],
      [0, -1, 'lambda^3/2 - lambda^2/2 - lambda'],
      [0, 0, '-lambda^3/2 + lambda^2 + lambda/2 - 1'],
      [0, 1, 'lambda^3/6 - lambda^2/2 + lambda/3'],
    ]),
  ],
  airy: [
    'AI 001',
    'Leapfrog for the Airy equation',
    lines('airy', [{ kind: 'stencil', derivative: 3, offsets: ['-2', '-1', '0', '1', '2'], weights: null }], leapfrog),
  ],
  advectionDiffusion: ['AX 001', 'Forward Euler, central 2', lines('advection-diffusion', [central2, second2], euler)],
  heat2d: [
    'DI 013',
    'Forward Euler, five points',
    grid('diffusion-2d', [
      [1, [0, 0], '1'],
      [0, [-1, 0], '-r_x'],
      [0, [1, 0], '-r_x'],
      [0, [0, -1], '-r_y'],
      [0, [0, 1], '-r_y'],
      [0, [0, 0], '2*r_x + 2*r_y - 1'],
    ]),
  ],
  heat3d: [
    'DI 014',
    'Forward Euler, seven points',
    grid('diffusion-3d', [
      [1, [0, 0, 0], '1'],
      [0, [-1, 0, 0], '-r_x'],
      [0, [1, 0, 0], '-r_x'],
      [0, [0, -1, 0], '-r_y'],
      [0, [0, 1, 0], '-r_y'],
      [0, [0, 0, -1], '-r_z'],
      [0, [0, 0, 1], '-r_z'],
      [0, [0, 0, 0], '2*r_x + 2*r_y + 2*r_z - 1'],
    ]),
  ],
  wave2d: ['WA 004', 'Leapfrog, five points', waveOn(2, ['-2', '1'])],
  wave2d4: ['WA 014', 'Leapfrog, nine points in line', waveOn(2, ['-5/2', '4/3', '-1/12'])],
  wave3d: ['WA 005', 'Leapfrog, seven points', waveOn(3, ['-2', '1'])],
  wave3d4: ['WA 015', 'Leapfrog, thirteen points', waveOn(3, ['-5/2', '4/3', '-1/12'])],
  donorCell: [
    'AD 031',
    'Donor cell in the plane',
    grid('advection-2d', [
      [1, [0, 0], '1'],
      [0, [-1, 0], '-lambda_x'],
      [0, [0, -1], '-lambda_y'],
      [0, [0, 0], 'lambda_x + lambda_y - 1'],
    ]),
  ],
  cornerTransport: [
    'AD 032',
    'Corner transport upwind',
    grid('advection-2d', [
      [1, [0, 0], '1'],
      [0, [-1, -1], '-lambda_x*lambda_y'],
      [0, [-1, 0], 'lambda_x*lambda_y - lambda_x'],
      [0, [0, -1], 'lambda_x*lambda_y - lambda_y'],
      [0, [0, 0], 'lambda_x + lambda_y - lambda_x*lambda_y - 1'],
    ]),
  ],
  leapfrog2d: [
    'AD 033',
    'Leapfrog in the plane',
    grid('advection-2d', [
      [1, [0, 0], '1'],
      [0, [1, 0], 'lambda_x'],
      [0, [-1, 0], '-lambda_x'],
      [0, [0, 1], 'lambda_y'],
      [0, [0, -1], '-lambda_y'],
      [-1, [0, 0], '-1'],
    ]),
  ],
  firstCentral4: ['ST 004', 'First derivative, central 4', central4],
  firstStaggered4: [
    'ST 010',
    'First derivative, staggered 4',
    { kind: 'stencil', derivative: 1, offsets: ['-3/2', '-1/2', '1/2', '3/2'], weights: null },
  ],
  secondOneSided: [
    'ST 011',
    'Second derivative, forward 2',
    { kind: 'stencil', derivative: 2, offsets: ['0', '1', '2', '3'], weights: null },
  ],
  rk4: ['TM 004', 'Classical Runge-Kutta', { kind: 'time-method', time: rk4 }],
  ab3: ['TM 013', 'Adams-Bashforth 3', { kind: 'time-method', time: ab3 }],
  leapfrogMethod: ['TM 002', 'Leapfrog', { kind: 'time-method', time: leapfrog }],
} as const;

export type KernelCase = keyof typeof DEFINITIONS;
export const KERNEL_CASES = Object.keys(DEFINITIONS) as KernelCase[];

const known = new Map<KernelCase, KernelInput>();

/** The revision of a case, with the facts that the engine computes. */
export function kernelInput(name: KernelCase): KernelInput {
  const present = known.get(name);
  if (present) return present;
  const [callNumber, title, written] = DEFINITIONS[name];
  const input = inputOf(callNumber, title, written);
  known.set(name, input);
  return input;
}

/** @throws {Error} where the engine has no facts of the definition */
export function inputOf(callNumber: string, title: string, written: unknown): KernelInput {
  const definition = Definition.parse(written);
  const { facts, problems } = analyseDefinition(definition);
  if (!facts) throw new Error(`${title}: ${problems.map((p) => p.message).join('; ')}`);
  return {
    callNumber,
    slug: title.toLowerCase().replace(/[^a-z0-9]+/g, '-'),
    title,
    revision: 2,
    definition,
    facts,
    references: ['A reference, Journal 1 (1970) 1-2.'],
  };
}
