/** The equations of the book and their dimensionless numbers, as LaTeX by the conventions of lib/numerics/equation. */
import type { Equation } from '@/lib/numerics/equation';

interface EquationLatex {
  /** With fractions of partials, for the head of a group. */
  readonly written: string;
  /** On one line, with subscripts. */
  readonly short: string;
  readonly parameters: readonly string[];
}

const d = (of: string, by: string, power = 1) =>
  power === 1
    ? `\\frac{\\partial ${of}}{\\partial ${by}}`
    : `\\frac{\\partial^{${power}} ${of}}{\\partial ${by}^{${power}}}`;
const ratio = (symbol: string, factor: string, power: number, axis = 'x') =>
  `${symbol} = ${factor}\\,\\mathrm{\\Delta} t / \\mathrm{\\Delta} ${axis}${power === 1 ? '' : `^{${power}}`}`;
const laplacian = (factor: string, axes: readonly string[], left: string): string =>
  `${left} = ${factor}\\left(${axes.map((axis) => d('u', axis, 2)).join(' + ')}\\right)`;

export const EQUATION_LATEX: Readonly<Record<Equation, EquationLatex>> = {
  advection: {
    written: `${d('u', 't')} + c${d('u', 'x')} = 0`,
    short: 'u_t + c\\,u_x = 0',
    parameters: [ratio('\\lambda', 'c', 1)],
  },
  diffusion: {
    written: `${d('u', 't')} = \\nu${d('u', 'x', 2)}`,
    short: 'u_t = \\nu\\,u_{xx}',
    parameters: [ratio('r', '\\nu', 2)],
  },
  'advection-diffusion': {
    written: `${d('u', 't')} + c${d('u', 'x')} = \\nu${d('u', 'x', 2)}`,
    short: 'u_t + c\\,u_x = \\nu\\,u_{xx}',
    parameters: [ratio('\\lambda', 'c', 1), ratio('r', '\\nu', 2)],
  },
  wave: {
    written: `${d('u', 't', 2)} = c^2${d('u', 'x', 2)}`,
    short: 'u_{tt} = c^2 u_{xx}',
    parameters: [ratio('\\lambda', 'c', 1)],
  },
  schrodinger: {
    written: `${d('u', 't')} = i\\varepsilon${d('u', 'x', 2)}`,
    short: 'u_t = i\\varepsilon\\,u_{xx}',
    parameters: [ratio('\\sigma', '\\varepsilon', 2)],
  },
  airy: {
    written: `${d('u', 't')} + \\varepsilon${d('u', 'x', 3)} = 0`,
    short: 'u_t + \\varepsilon\\,u_{xxx} = 0',
    parameters: [ratio('\\mu', '\\varepsilon', 3)],
  },
  hyperdiffusion: {
    written: `${d('u', 't')} = -\\kappa${d('u', 'x', 4)}`,
    short: 'u_t = -\\kappa\\,u_{xxxx}',
    parameters: [ratio('q', '\\kappa', 4)],
  },
  'advection-2d': {
    written: `${d('u', 't')} + c_x${d('u', 'x')} + c_y${d('u', 'y')} = 0`,
    short: 'u_t + c_x u_x + c_y u_y = 0',
    parameters: [ratio('\\lambda_x', 'c_x', 1), ratio('\\lambda_y', 'c_y', 1, 'y')],
  },
  'diffusion-2d': {
    written: laplacian('\\nu', ['x', 'y'], d('u', 't')),
    short: 'u_t = \\nu\\,(u_{xx} + u_{yy})',
    parameters: [ratio('r_x', '\\nu', 2), ratio('r_y', '\\nu', 2, 'y')],
  },
  'diffusion-3d': {
    written: laplacian('\\nu', ['x', 'y', 'z'], d('u', 't')),
    short: 'u_t = \\nu\\,(u_{xx} + u_{yy} + u_{zz})',
    parameters: [ratio('r_x', '\\nu', 2), ratio('r_y', '\\nu', 2, 'y'), ratio('r_z', '\\nu', 2, 'z')],
  },
  'wave-2d': {
    written: laplacian('c^2', ['x', 'y'], d('u', 't', 2)),
    short: 'u_{tt} = c^2 (u_{xx} + u_{yy})',
    parameters: [ratio('\\lambda', 'c', 1)],
  },
  'wave-3d': {
    written: laplacian('c^2', ['x', 'y', 'z'], d('u', 't', 2)),
    short: 'u_{tt} = c^2 (u_{xx} + u_{yy} + u_{zz})',
    parameters: [ratio('\\lambda', 'c', 1)],
  },
};
