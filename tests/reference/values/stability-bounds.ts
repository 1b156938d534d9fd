/** Stability bounds from the literature, with the source of each. */

export interface BoundCase {
  readonly name: string;
  readonly source: string;
  /** A definition in the language of definitions. */
  readonly definition: Record<string, unknown>;
  readonly verdict: 'conditionally stable' | 'unconditionally stable' | 'unstable for all nonzero values';
  /** [lo, hi] of each interval: decimal, closed form, or null where there is no end. */
  readonly intervals: readonly (readonly [string | null, string | null])[];
  /** Closed form of the last end, where one is known. */
  readonly exact?: string;
  /** Whether the ends other than 0 are power-bounded. */
  readonly closed?: boolean;
  /** Wave of the double root at the end. */
  readonly theta?: number;
  readonly isolated?: readonly string[];
}

type Terms = readonly (readonly [level: number, offset: number, coefficient: string])[];

const table = (equation: string, terms: Terms) => ({
  kind: 'scheme',
  equation,
  form: 'table',
  terms: terms.map(([level, offset, coefficient]) => ({ level: String(level), offset: String(offset), coefficient })),
});
const stencil = (derivative: number, offsets: readonly number[]) => ({
  kind: 'stencil',
  dims: 1,
  derivative,
  offsets: offsets.map(String),
  weights: null,
});
const multistep = (alpha: readonly string[], beta: readonly string[]) => ({ kind: 'multistep', alpha, beta });
const lines = (equation: string, space: ReturnType<typeof stencil>, time: Record<string, unknown>) => ({
  kind: 'scheme',
  equation,
  form: 'lines',
  space: [space],
  time,
});

const CENTRAL2 = stencil(1, [-1, 0, 1]);
const CENTRAL4 = stencil(1, [-2, -1, 0, 1, 2]);
const CENTRAL6 = stencil(1, [-3, -2, -1, 0, 1, 2, 3]);
const UPWIND1 = stencil(1, [-1, 0]);
const UPWIND3 = stencil(1, [-2, -1, 0, 1]);
const UPWIND5 = stencil(1, [-3, -2, -1, 0, 1, 2]);
const SECOND = stencil(2, [-1, 0, 1]);

const EULER = { kind: 'runge-kutta', A: [['0']], b: ['1'], c: ['0'] };
const RK2 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0'],
    ['1/2', '0'],
  ],
  b: ['0', '1'],
  c: ['0', '1/2'],
};
const RK3 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0'],
    ['1', '0', '0'],
    ['1/4', '1/4', '0'],
  ],
  b: ['1/6', '1/6', '2/3'],
  c: ['0', '1', '1/2'],
};
const RK4 = {
  kind: 'runge-kutta',
  A: [
    ['0', '0', '0', '0'],
    ['1/2', '0', '0', '0'],
    ['0', '1/2', '0', '0'],
    ['0', '0', '1', '0'],
  ],
  b: ['1/6', '1/3', '1/3', '1/6'],
  c: ['0', '1/2', '1/2', '1'],
};
const LEAPFROG = multistep(['-1', '0', '1'], ['0', '2', '0']);
const BACKWARD_EULER = multistep(['-1', '1'], ['0', '1']);
const TRAPEZOIDAL = multistep(['-1', '1'], ['1/2', '1/2']);
const AB2 = multistep(['0', '-1', '1'], ['-1/2', '3/2', '0']);
const AB3 = multistep(['0', '0', '-1', '1'], ['5/12', '-4/3', '23/12', '0']);
const BDF2 = multistep(['1/2', '-2', '3/2'], ['0', '0', '1']);

const STRIKWERDA = 'J. C. Strikwerda, Finite Difference Schemes and Partial Differential Equations, 2nd ed., SIAM 2004';
const DURRAN = 'D. R. Durran, Numerical Methods for Fluid Dynamics, 2nd ed., Springer 2010, ch. 2-3';
const RICHTMYER =
  'R. D. Richtmyer & K. W. Morton, Difference Methods for Initial-Value Problems, 2nd ed., Interscience 1967';
const DERIVED = 'the scalar bound of the time method over the largest modified wavenumber of the stencil';

export const BOUNDS: readonly BoundCase[] = [
  {
    name: 'forward Euler with central differences',
    source: `${STRIKWERDA}, ch. 2`,
    definition: lines('advection', CENTRAL2, EULER),
    verdict: 'unstable for all nonzero values',
    intervals: [],
  },
  {
    name: 'upwind',
    source: `${STRIKWERDA}, ch. 2`,
    definition: lines('advection', UPWIND1, EULER),
    verdict: 'conditionally stable',
    intervals: [['0', '1']],
    exact: '1',
    closed: true,
  },
  {
    name: 'Lax-Friedrichs',
    source: `${STRIKWERDA}, ch. 1-2`,
    definition: table('advection', [
      [1, 0, '1'],
      [0, -1, '-(1+lambda)/2'],
      [0, 1, '-(1-lambda)/2'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['-1', '1']],
    exact: '1',
    closed: true,
  },
  {
    name: 'Lax-Wendroff',
    source: `P. Lax & B. Wendroff, Comm. Pure Appl. Math. 13 (1960) 217-237; ${STRIKWERDA}, ch. 3`,
    definition: table('advection', [
      [1, 0, '1'],
      [0, -1, '-lambda/2-lambda^2/2'],
      [0, 0, '-1+lambda^2'],
      [0, 1, 'lambda/2-lambda^2/2'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['-1', '1']],
    exact: '1',
    closed: true,
  },
  {
    name: 'Beam-Warming',
    source: 'R. F. Warming & R. M. Beam, AIAA J. 14 (1976) 1241-1249',
    definition: table('advection', [
      [1, 0, '1'],
      [0, -2, 'lambda/2-lambda^2/2'],
      [0, -1, 'lambda^2-2*lambda'],
      [0, 0, '-1+3*lambda/2-lambda^2/2'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['0', '2']],
    exact: '2',
    closed: true,
  },
  {
    name: 'Fromm',
    source: 'J. E. Fromm, J. Comput. Phys. 3 (1968) 176-189',
    definition: table('advection', [
      [1, 0, '1'],
      [0, -2, '(lambda-lambda^2)/4'],
      [0, -1, '(lambda^2-5*lambda)/4'],
      [0, 0, 'lambda^2/4+3*lambda/4-1'],
      [0, 1, '(lambda-lambda^2)/4'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['0', '1']],
    exact: '1',
    closed: true,
  },
  {
    name: 'third-order interpolation (QUICKEST), with its exact shifts',
    source:
      'B. P. Leonard, Comput. Methods Appl. Mech. Eng. 19 (1979) 59-98; an exact shift at -1 and 2 by interpolation at a node',
    definition: table('advection', [
      [1, 0, '1'],
      [0, -2, '(lambda-lambda^3)/6'],
      [0, -1, 'lambda^3/2-lambda^2/2-lambda'],
      [0, 0, '-lambda^3/2+lambda^2+lambda/2-1'],
      [0, 1, 'lambda^3/6-lambda^2/2+lambda/3'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['0', '1']],
    exact: '1',
    closed: true,
    isolated: ['-1', '2'],
  },
  {
    name: 'leapfrog of order (2, 2)',
    source: `${STRIKWERDA}, ch. 4: strict inequality`,
    definition: lines('advection', CENTRAL2, LEAPFROG),
    verdict: 'conditionally stable',
    intervals: [['-1', '1']],
    exact: '1',
    closed: false,
    theta: Math.PI / 2,
  },
  {
    name: 'leapfrog of order (2, 4)',
    source: `${STRIKWERDA}, ch. 4: 1/kappa_max with cos(theta) = 1 - sqrt(6)/2`,
    definition: lines('advection', CENTRAL4, LEAPFROG),
    verdict: 'conditionally stable',
    intervals: [['-0.7287450680124659294', '0.7287450680124659294']],
    closed: false,
    theta: Math.acos(1 - Math.sqrt(6) / 2),
  },
  {
    name: 'leapfrog of order (2, 6)',
    source: DERIVED,
    definition: lines('advection', CENTRAL6, LEAPFROG),
    verdict: 'conditionally stable',
    intervals: [['-0.63052561267833784398', '0.63052561267833784398']],
    exact: '1/kappa_max',
    closed: false,
  },
  {
    name: 'backward Euler with central differences, negative numbers included',
    source: `${STRIKWERDA}, ch. 2`,
    definition: lines('advection', CENTRAL2, BACKWARD_EULER),
    verdict: 'unconditionally stable',
    intervals: [[null, null]],
  },
  {
    name: 'backward Euler with upwind differences',
    source: 'from memory: |1 + lambda - lambda exp(-i theta)| >= 1',
    definition: lines('advection', UPWIND1, BACKWARD_EULER),
    verdict: 'conditionally stable',
    intervals: [
      [null, '-1'],
      ['0', null],
    ],
  },
  {
    name: 'Crank-Nicolson with central differences',
    source: `${STRIKWERDA}, ch. 3`,
    definition: lines('advection', CENTRAL2, TRAPEZOIDAL),
    verdict: 'unconditionally stable',
    intervals: [[null, null]],
  },
  {
    name: 'box scheme',
    source: 'H. B. Keller, in Numerical Solution of PDEs II, 1971; |g| = 1',
    definition: table('advection', [
      [1, 0, '1-lambda'],
      [1, 1, '1+lambda'],
      [0, 0, '-1-lambda'],
      [0, 1, '-1+lambda'],
    ]),
    verdict: 'unconditionally stable',
    intervals: [[null, null]],
  },
  {
    name: 'second-order Adams-Bashforth with central differences',
    source: `${DURRAN}: weakly unstable`,
    definition: lines('advection', CENTRAL2, AB2),
    verdict: 'unstable for all nonzero values',
    intervals: [],
  },
  {
    name: 'third-order Adams-Bashforth with central differences',
    source: `${DURRAN}: 0.724`,
    definition: lines('advection', CENTRAL2, AB3),
    verdict: 'conditionally stable',
    intervals: [['-0.72362722698663269435', '0.72362722698663269435']],
    exact: '12*sqrt(11)/55',
    closed: true,
  },
  {
    name: 'two-stage Runge-Kutta with central differences',
    source: `${DURRAN}: weakly unstable`,
    definition: lines('advection', CENTRAL2, RK2),
    verdict: 'unstable for all nonzero values',
    intervals: [],
  },
  {
    name: 'three-stage Runge-Kutta with central differences',
    source: `${DURRAN}: sqrt(3)`,
    definition: lines('advection', CENTRAL2, RK3),
    verdict: 'conditionally stable',
    intervals: [['-1.7320508075688772935', '1.7320508075688772935']],
    exact: 'sqrt(3)',
    closed: true,
  },
  {
    name: 'four-stage Runge-Kutta with central differences',
    source: `${DURRAN}: 2 sqrt(2)`,
    definition: lines('advection', CENTRAL2, RK4),
    verdict: 'conditionally stable',
    intervals: [['-2.8284271247461900976', '2.8284271247461900976']],
    exact: '2*sqrt(2)',
    closed: true,
  },
  {
    name: 'four-stage Runge-Kutta with sixth-order differences',
    source: DERIVED,
    definition: lines('advection', CENTRAL6, RK4),
    verdict: 'conditionally stable',
    intervals: [['-1.7833957457466210136', '1.7833957457466210136']],
    exact: '2*sqrt(2)/kappa_max',
    closed: true,
  },
  {
    name: 'two-stage Runge-Kutta with third-order upwind differences: a low band that sampling overlooks',
    source:
      'L. J. Wicker & W. C. Skamarock, Mon. Wea. Rev. 130 (2002) 2088-2097 give 0.88; the exact value is the root of 3 lambda^3 = 2',
    definition: lines('advection', UPWIND3, RK2),
    verdict: 'conditionally stable',
    intervals: [['0', '0.87358046473629886905']],
    exact: '(2/3)^(1/3)',
    closed: true,
  },
  {
    name: 'two-stage Runge-Kutta with fifth-order upwind differences: unstable however small the step',
    source: 'Wicker & Skamarock (2002) list 0.30; the growth is (25/24) lambda^10',
    definition: lines('advection', UPWIND5, RK2),
    verdict: 'unstable for all nonzero values',
    intervals: [],
  },
  {
    name: 'three-stage Runge-Kutta with third-order upwind differences',
    source: 'Wicker & Skamarock (2002): 1.61, rounded',
    definition: lines('advection', UPWIND3, RK3),
    verdict: 'conditionally stable',
    intervals: [['0', '1.6258906661547432099']],
    closed: true,
  },
  {
    name: 'three-stage Runge-Kutta with fifth-order upwind differences',
    source: 'Wicker & Skamarock (2002): 1.42, rounded',
    definition: lines('advection', UPWIND5, RK3),
    verdict: 'conditionally stable',
    intervals: [['0', '1.434983629333']],
    closed: true,
  },
  {
    name: 'BDF2 with central differences',
    source: 'E. Hairer & G. Wanner, Solving Ordinary Differential Equations II, V.1: A-stable',
    definition: lines('advection', CENTRAL2, BDF2),
    verdict: 'unconditionally stable',
    intervals: [[null, null]],
  },
  {
    name: 'forward Euler for diffusion',
    source: `${RICHTMYER}, ch. 8`,
    definition: lines('diffusion', SECOND, EULER),
    verdict: 'conditionally stable',
    intervals: [['0', '0.5']],
    exact: '1/2',
    closed: true,
  },
  {
    name: 'forward Euler with fourth-order differences for diffusion',
    source: DERIVED,
    definition: lines('diffusion', stencil(2, [-2, -1, 0, 1, 2]), EULER),
    verdict: 'conditionally stable',
    intervals: [['0', '0.375']],
    exact: '3/8',
    closed: true,
  },
  {
    name: 'the theta method with theta = 1/4',
    source: `${RICHTMYER}, ch. 8: 2 r (1 - 2 theta) <= 1`,
    definition: lines('diffusion', SECOND, multistep(['-1', '1'], ['3/4', '1/4'])),
    verdict: 'conditionally stable',
    intervals: [['0', '1']],
    exact: '1',
    closed: true,
  },
  {
    name: 'Crandall',
    source: 'S. H. Crandall, Quart. Appl. Math. 13 (1955) 318-320',
    definition: table('diffusion', [
      [1, -1, '1/12-r/2'],
      [1, 0, '5/6+r'],
      [1, 1, '1/12-r/2'],
      [0, -1, '-1/12-r/2'],
      [0, 0, '-5/6+r'],
      [0, 1, '-1/12-r/2'],
    ]),
    verdict: 'unconditionally stable',
    intervals: [['0', null]],
  },
  {
    name: 'DuFort-Frankel',
    source: 'E. C. Du Fort & S. P. Frankel, Math. Tables Aids Comput. 7 (1953) 135-152',
    definition: table('diffusion', [
      [1, 0, '1+2*r'],
      [0, -1, '-2*r'],
      [0, 1, '-2*r'],
      [-1, 0, '-1+2*r'],
    ]),
    verdict: 'unconditionally stable',
    intervals: [['0', null]],
  },
  {
    name: 'Richardson',
    source: `${RICHTMYER}, ch. 8`,
    definition: lines('diffusion', SECOND, LEAPFROG),
    verdict: 'unstable for all nonzero values',
    intervals: [],
  },
  {
    name: 'second-order Adams-Bashforth for diffusion',
    source: `${DURRAN}: real-axis limit 1`,
    definition: lines('diffusion', SECOND, AB2),
    verdict: 'conditionally stable',
    intervals: [['0', '0.25']],
    exact: '1/4',
    closed: true,
  },
  {
    name: 'four-stage Runge-Kutta for diffusion',
    source: `${DURRAN}: real-axis limit 2.785293563405282`,
    definition: lines('diffusion', SECOND, RK4),
    verdict: 'conditionally stable',
    intervals: [['0', '0.69632339085132040588']],
    closed: true,
  },
  {
    name: 'forward Euler for hyperdiffusion',
    source: 'from memory: 16 q <= 2',
    definition: lines('hyperdiffusion', stencil(4, [-2, -1, 0, 1, 2]), EULER),
    verdict: 'conditionally stable',
    intervals: [['0', '0.125']],
    exact: '1/8',
    closed: true,
  },
  {
    name: 'leapfrog for the wave equation',
    source: 'R. Courant, K. Friedrichs & H. Lewy, Math. Ann. 100 (1928) 32-74; double root at the limit',
    definition: table('wave', [
      [1, 0, '1'],
      [0, -1, '-lambda^2'],
      [0, 0, '-2+2*lambda^2'],
      [0, 1, '-lambda^2'],
      [-1, 0, '1'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['-1', '1']],
    exact: '1',
    closed: false,
    theta: Math.PI,
  },
  {
    name: 'leapfrog of order (2, 4) for the wave equation',
    source: 'from memory: lambda^2 (16/3) <= 4 at theta = pi',
    definition: table('wave', [
      [1, 0, '1'],
      [0, -2, 'lambda^2/12'],
      [0, -1, '-4*lambda^2/3'],
      [0, 0, '-2+5*lambda^2/2'],
      [0, 1, '-4*lambda^2/3'],
      [0, 2, 'lambda^2/12'],
      [-1, 0, '1'],
    ]),
    verdict: 'conditionally stable',
    intervals: [['-0.86602540378443864676', '0.86602540378443864676']],
    exact: 'sqrt(3)/2',
    closed: false,
    theta: Math.PI,
  },
  {
    name: 'leapfrog for the Schrodinger equation',
    source: 'T. F. Chan, D. Lee & L. Shen, SIAM J. Numer. Anal. 23 (1986) 274-281',
    definition: lines('schrodinger', SECOND, LEAPFROG),
    verdict: 'conditionally stable',
    intervals: [['-0.25', '0.25']],
    exact: '1/4',
    closed: false,
    theta: Math.PI,
  },
  {
    name: 'four-stage Runge-Kutta for the Schrodinger equation',
    source: DERIVED,
    definition: lines('schrodinger', SECOND, RK4),
    verdict: 'conditionally stable',
    intervals: [['-0.7071067811865475244', '0.7071067811865475244']],
    exact: 'sqrt(2)/2',
    closed: true,
  },
  {
    name: 'leapfrog for u_t + eps u_xxx = 0',
    source:
      'from memory: N. J. Zabusky & M. D. Kruskal, Phys. Rev. Lett. 15 (1965) 240-243, dt <= 2 dx^3 / (3 sqrt(3) eps)',
    definition: lines('airy', stencil(3, [-2, -1, 0, 1, 2]), LEAPFROG),
    verdict: 'conditionally stable',
    intervals: [['-0.38490017945975050967', '0.38490017945975050967']],
    exact: '2*sqrt(3)/9',
    closed: false,
    theta: (2 * Math.PI) / 3,
  },
  {
    name: 'Crank-Nicolson for u_t + eps u_xxx = 0',
    source: 'from memory: |g| = 1',
    definition: lines('airy', stencil(3, [-2, -1, 0, 1, 2]), TRAPEZOIDAL),
    verdict: 'unconditionally stable',
    intervals: [[null, null]],
  },
];
