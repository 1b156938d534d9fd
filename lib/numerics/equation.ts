/**
 * The equations the book knows, with their sign conventions and dimensionless numbers.
 *
 * `spaceOrder` is s, the highest space derivative: at a fixed parameter dt scales as dx^(s / timeOrder).
 * Conventions: advection u_t + c u_x = 0 (lambda = c dt/dx), diffusion u_t = nu u_xx (r = nu dt/dx²),
 * wave u_tt = c² Lap u (lambda = c dt/dx), Schrodinger u_t = i eps u_xx (sigma = eps dt/dx²),
 * Airy u_t + eps u_xxx = 0 (mu = eps dt/dx³), hyperdiffusion u_t = -kappa u_xxxx (q = kappa dt/dx⁴).
 */
export const EQUATIONS = [
  'advection',
  'diffusion',
  'advection-diffusion',
  'wave',
  'schrodinger',
  'airy',
  'hyperdiffusion',
  'advection-2d',
  'diffusion-2d',
  'diffusion-3d',
  'wave-2d',
  'wave-3d',
] as const;
export type Equation = (typeof EQUATIONS)[number];

export interface EquationConvention {
  readonly dims: 1 | 2 | 3;
  /** 1 for u_t = …, 2 for u_tt = … */
  readonly timeOrder: 1 | 2;
  /** Highest space derivative. */
  readonly spaceOrder: 1 | 2 | 3 | 4;
  /** Independent dimensionless numbers, in the order of the equation. */
  readonly parameters: readonly string[];
  /** A single symbol that stands for all parameters being equal (`r`, `lambda`), where there are several. */
  readonly common: string | null;
  /** Whether coefficients may contain the imaginary unit i. */
  readonly complex: boolean;
  /** True where a negative parameter value makes the equation itself ill-posed (diffusion, hyperdiffusion). */
  readonly nonNegative: readonly string[];
  /** Derivative orders of the operator terms, in order; what `space` of the lines form must supply. */
  readonly operators: readonly number[];
}

export const CONVENTIONS: Readonly<Record<Equation, EquationConvention>> = {
  advection: {
    dims: 1,
    timeOrder: 1,
    spaceOrder: 1,
    parameters: ['lambda'],
    common: null,
    complex: false,
    nonNegative: [],
    operators: [1],
  },
  diffusion: {
    dims: 1,
    timeOrder: 1,
    spaceOrder: 2,
    parameters: ['r'],
    common: null,
    complex: false,
    nonNegative: ['r'],
    operators: [2],
  },
  'advection-diffusion': {
    dims: 1,
    timeOrder: 1,
    spaceOrder: 2,
    parameters: ['lambda', 'r'],
    common: null,
    complex: false,
    nonNegative: ['r'],
    operators: [1, 2],
  },
  wave: {
    dims: 1,
    timeOrder: 2,
    spaceOrder: 2,
    parameters: ['lambda'],
    common: null,
    complex: false,
    nonNegative: [],
    operators: [2],
  },
  schrodinger: {
    dims: 1,
    timeOrder: 1,
    spaceOrder: 2,
    parameters: ['sigma'],
    common: null,
    complex: true,
    nonNegative: [],
    operators: [2],
  },
  airy: {
    dims: 1,
    timeOrder: 1,
    spaceOrder: 3,
    parameters: ['mu'],
    common: null,
    complex: false,
    nonNegative: [],
    operators: [3],
  },
  hyperdiffusion: {
    dims: 1,
    timeOrder: 1,
    spaceOrder: 4,
    parameters: ['q'],
    common: null,
    complex: false,
    nonNegative: ['q'],
    operators: [4],
  },
  'advection-2d': {
    dims: 2,
    timeOrder: 1,
    spaceOrder: 1,
    parameters: ['lambda_x', 'lambda_y'],
    common: 'lambda',
    complex: false,
    nonNegative: [],
    operators: [1, 1],
  },
  'diffusion-2d': {
    dims: 2,
    timeOrder: 1,
    spaceOrder: 2,
    parameters: ['r_x', 'r_y'],
    common: 'r',
    complex: false,
    nonNegative: ['r_x', 'r_y'],
    operators: [2, 2],
  },
  'diffusion-3d': {
    dims: 3,
    timeOrder: 1,
    spaceOrder: 2,
    parameters: ['r_x', 'r_y', 'r_z'],
    common: 'r',
    complex: false,
    nonNegative: ['r_x', 'r_y', 'r_z'],
    operators: [2, 2, 2],
  },
  'wave-2d': {
    dims: 2,
    timeOrder: 2,
    spaceOrder: 2,
    parameters: ['lambda'],
    common: null,
    complex: false,
    nonNegative: [],
    operators: [2, 2],
  },
  'wave-3d': {
    dims: 3,
    timeOrder: 2,
    spaceOrder: 2,
    parameters: ['lambda'],
    common: null,
    complex: false,
    nonNegative: [],
    operators: [2, 2, 2],
  },
};
