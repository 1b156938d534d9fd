/** Equations and their dimensionless numbers in plain characters, for the header of a kernel. */
import type { Equation } from '@/lib/numerics/equation';

export const EQUATION_TEXT: Readonly<
  Record<Equation, { readonly equation: string; readonly numbers: readonly string[] }>
> = {
  advection: { equation: 'u_t + c u_x = 0', numbers: ['lam = c dt/dx'] },
  diffusion: { equation: 'u_t = nu u_xx', numbers: ['r = nu dt/dx^2'] },
  'advection-diffusion': { equation: 'u_t + c u_x = nu u_xx', numbers: ['lam = c dt/dx', 'r = nu dt/dx^2'] },
  wave: { equation: 'u_tt = c^2 u_xx', numbers: ['lam = c dt/dx'] },
  schrodinger: { equation: 'u_t = i eps u_xx', numbers: ['sigma = eps dt/dx^2'] },
  airy: { equation: 'u_t + eps u_xxx = 0', numbers: ['mu = eps dt/dx^3'] },
  hyperdiffusion: { equation: 'u_t = -kappa u_xxxx', numbers: ['q = kappa dt/dx^4'] },
  'advection-2d': { equation: 'u_t + c_x u_x + c_y u_y = 0', numbers: ['lam_x = c_x dt/dx', 'lam_y = c_y dt/dy'] },
  'diffusion-2d': { equation: 'u_t = nu (u_xx + u_yy)', numbers: ['r_x = nu dt/dx^2', 'r_y = nu dt/dy^2'] },
  'diffusion-3d': {
    equation: 'u_t = nu (u_xx + u_yy + u_zz)',
    numbers: ['r_x = nu dt/dx^2', 'r_y = nu dt/dy^2', 'r_z = nu dt/dz^2'],
  },
  'wave-2d': { equation: 'u_tt = c^2 (u_xx + u_yy)', numbers: ['lam = c dt/dx = c dt/dy'] },
  'wave-3d': { equation: 'u_tt = c^2 (u_xx + u_yy + u_zz)', numbers: ['lam = c dt/dx = c dt/dy = c dt/dz'] },
};
