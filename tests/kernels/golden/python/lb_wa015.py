# WA 015 r2   0 <= lam <= 1/2; keep below   halo 2|2 x 2|2 x 2|2, periodic fill included
# levelbook:leapfrog-thirteen-points/2/python/double,periodic:efe002ce3cf46db35823e97c929e09c310037f8be73192fda15b996745659f74
#
# Entry       WA 015, revision 2: Leapfrog, thirteen points (double precision).
# Equation    u_tt = c^2 (u_xx + u_yy + u_zz); lam = c dt/dx = c dt/dy = c dt/dz.
# Formula     u[n+1,i,j,k] = a0*u[n,i,j,k] + a1*(u[n,i+1,j,k] + u[n,i-1,j,k] + u[n,i,j+1,k] +
#             u[n,i,j-1,k] + u[n,i,j,k+1] + u[n,i,j,k-1]) - a2*(u[n,i+2,j,k] + u[n,i-2,j,k] +
#             u[n,i,j+2,k] + u[n,i,j-2,k] + u[n,i,j,k+2] + u[n,i,j,k-2]) - u[n-1,i,j,k]
#             with a0 = 2 - (15/2)*lam*lam, a1 = (4/3)*lam*lam, a2 = (1/12)*lam*lam
# Order       2 in time, 4 in space, 2 at fixed lam.
# Error       At lam = 1/5 the leading error term adds dispersion: short waves run ahead.
# Stable      for 0 <= lam <= 1/2; keep below.
#             Advised working value: lam <= 0.45 (nine tenths of the bound).
#             At the bound itself: double root on the unit circle: growth linear in n for that
#             wave.
# Arrays      2 of (nx + 4) x (ny + 4) x (nz + 4) doubles, contiguous; ghost cells: 2 before
#             and 2 after along x, 2 before and 2 after along y, 2 before and 2 after along z.
#             x runs fastest: the point (i, j, k) is u[k][j][i].
#             u: level n
#             w: level n-1 in, level n+1 out
# Storage     the oldest level is read only at the point being written and is overwritten in
#             place: 2 arrays.
# Work        16 operations and 24 bytes a point and step by the facts.
# Boundary    periodic: fill_halo copies the ghost cells.
# Start-up    start makes the 2 kept levels from u and dt u_t at the initial time, to the
#             order of the scheme.
# Units       u in any unit; time and space enter through the dimensionless numbers only.
# Calling     levels = [numpy.zeros(shape(nx, ny, nz)) for _ in range(2)]
#             start(levels, lam, v)
#             levels = run(nsteps, levels, lam)   result in levels[-1][2:2 + nz, 2:2 + ny, 2:2 + nx]
#             Bad arguments raise ValueError. Step checks shapes when it is made, not at every call.
# Bitwise     C, Fortran and Python agree bit for bit when the compiled ones are built with
#             -ffp-contract=off. A library built with -Ofast in the same process flushes
#             subnormal numbers here too.
# Cautions    Von Neumann analysis holds for constant coefficients on periodic or infinite
#             domains; with boundaries, variable coefficients or nonlinear terms it is
#             necessary but not always sufficient.
#             A passed trial is evidence for this kernel, not for the code that calls it.
#             Where results bear on safety, verification and validation under the applicable
#             codes and by licensed practice remain with the user.
# References  A reference, Journal 1 (1970) 1-2.
# Licence     office internal.
# Generator   release 1.0.0. Generated; change the entry, not this file.
#
import math

import numpy as np

# Numbers of ghost cells before the first and after the last point, and the least number of points.
HALO_X_LEFT = 2
HALO_X_RIGHT = 2
MIN_NX = 2
HALO_Y_LEFT = 2
HALO_Y_RIGHT = 2
MIN_NY = 2
HALO_Z_LEFT = 2
HALO_Z_RIGHT = 2
MIN_NZ = 2
LEVELS = 2  # time levels kept between steps
ARRAYS = 2  # arrays of shape(nx, ny, nz), doubles
CHUNK = 24_576  # a sweep takes so many points at a time, in whole rows, so that they stay in cache


def shape(nx, ny, nz):
    """Shape of every array, points and ghost cells: x runs fastest and comes last."""
    return nz + HALO_Z_LEFT + HALO_Z_RIGHT, ny + HALO_Y_LEFT + HALO_Y_RIGHT, nx + HALO_X_LEFT + HALO_X_RIGHT


def check(nx, ny, nz, lam):
    """Raises ValueError where a size or a parameter cannot be used; O(1)."""
    if nx < MIN_NX:
        raise ValueError(f"nx = {nx} is too small; accepted: nx >= {MIN_NX}")
    if ny < MIN_NY:
        raise ValueError(f"ny = {ny} is too small; accepted: ny >= {MIN_NY}")
    if nz < MIN_NZ:
        raise ValueError(f"nz = {nz} is too small; accepted: nz >= {MIN_NZ}")
    if not math.isfinite(lam):
        raise ValueError(f"lam = {lam} is not a finite number")
    if not (lam >= 0.0 and lam <= 0.5):
        raise ValueError(f"lam = {lam} is outside the stable range 0 <= lam <= 1/2; keep below")


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; as long as a sweep, so not part of a step."""
    if not np.isfinite(u[2:-2, 2:-2, 2:-2]).all():
        raise ValueError("the state holds a NaN or an infinite value")


def fill_halo(u):
    """Ghost cells of a periodic grid, those of the corners included."""
    u[2:-2, 2:-2, :2] = u[2:-2, 2:-2, -4:-2]
    u[2:-2, 2:-2, -2:] = u[2:-2, 2:-2, 2:4]
    u[2:-2, :2, :] = u[2:-2, -4:-2, :]
    u[2:-2, -2:, :] = u[2:-2, 2:4, :]
    u[:2, :, :] = u[-4:-2, :, :]
    u[-2:, :, :] = u[2:4, :, :]


def _points(arrays, count=ARRAYS):
    """Numbers of points of `count` distinct contiguous float64 arrays of one shape."""
    if len(arrays) != count:
        raise ValueError(f"{len(arrays)} arrays given; accepted: {count}")
    for k, a in enumerate(arrays):
        if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != 3 or not a.flags.c_contiguous:
            raise ValueError("accepted: contiguous float64 arrays of 3 dimensions")
        if a.shape != arrays[0].shape:
            raise ValueError(f"shapes differ: {a.shape} and {arrays[0].shape}")
        if any(np.may_share_memory(a, b) for b in arrays[:k]):
            raise ValueError("the arrays overlap in memory; accepted: distinct arrays")
    nz, ny, nx = arrays[0].shape
    nx -= HALO_X_LEFT + HALO_X_RIGHT
    ny -= HALO_Y_LEFT + HALO_Y_RIGHT
    nz -= HALO_Z_LEFT + HALO_Z_RIGHT
    if nx < MIN_NX:
        raise ValueError(f"nx = {nx} is too small; accepted: nx >= {MIN_NX}")
    if ny < MIN_NY:
        raise ValueError(f"ny = {ny} is too small; accepted: ny >= {MIN_NY}")
    if nz < MIN_NZ:
        raise ValueError(f"nz = {nz} is too small; accepted: nz >= {MIN_NZ}")
    return nx, ny, nz


def _span(nx, ny, nz):
    """Strides of neighbouring rows and planes, and the flat range from the first point to the last."""
    row = nx + HALO_X_LEFT + HALO_X_RIGHT
    plane = row * (ny + HALO_Y_LEFT + HALO_Y_RIGHT)
    first = HALO_Z_LEFT * plane + HALO_Y_LEFT * row + HALO_X_LEFT
    last = first + (nz - 1) * plane + (ny - 1) * row + nx
    return row, plane, first, last


def _part(a, start, stop, shift):
    """Flat view of a from start to stop, shifted: whole rows, the ghost cells between them included."""
    return a.reshape(-1)[start + shift : stop + shift]


class Step:
    """One step of the scheme on prepared views; nothing is allocated when it is called.

    levels: arrays of shape(nx, ny, nz), the oldest first; rotated by every call, the newest last.
    u: level n
    w: level n-1 in, level n+1 out
    Fill the ghost cells of levels[-1] before the call.
    """

    def __init__(self, levels, lam):
        self.levels = list(levels)
        nx, ny, nz = _points(self.levels)
        self.nx, self.ny, self.nz = nx, ny, nz
        self.lam = lam = float(lam)
        self.a0 = 2.0 - 7.5*lam*lam
        self.a1 = (4.0/3.0)*lam*lam
        self.a2 = (1.0/12.0)*lam*lam
        row, plane, first, last = _span(nx, ny, nz)
        size = max(1, CHUNK // row) * row
        parts = [(a, min(a + size, last)) for a in range(first, last, size)]
        s = np.empty(size)
        t = np.empty(size)
        self._turn = 0
        self._turns = []
        for _ in range(ARRAYS):
            w, u = self.levels
            self._turns.append(
                [
                    (
                        _part(w, a, b, 0),
                        _part(u, a, b, 0),
                        _part(u, a, b, 1),
                        _part(u, a, b, -1),
                        _part(u, a, b, row),
                        _part(u, a, b, -row),
                        _part(u, a, b, plane),
                        _part(u, a, b, -plane),
                        _part(u, a, b, 2),
                        _part(u, a, b, -2),
                        _part(u, a, b, 2*row),
                        _part(u, a, b, -2*row),
                        _part(u, a, b, 2*plane),
                        _part(u, a, b, -2*plane),
                        s[: b - a],
                        t[: b - a],
                    )
                    for a, b in parts
                ]
            )
            self.levels.append(self.levels.pop(0))

    def __call__(self):
        for w, u, u_p1_0_0, u_m1_0_0, u_0_p1_0, u_0_m1_0, u_0_0_p1, u_0_0_m1, u_p2_0_0, u_m2_0_0, u_0_p2_0, u_0_m2_0, u_0_0_p2, u_0_0_m2, s, t in self._turns[self._turn]:
            np.multiply(self.a0, u, out=s)
            np.add(u_p1_0_0, u_m1_0_0, out=t)
            np.add(t, u_0_p1_0, out=t)
            np.add(t, u_0_m1_0, out=t)
            np.add(t, u_0_0_p1, out=t)
            np.add(t, u_0_0_m1, out=t)
            np.multiply(self.a1, t, out=t)
            np.add(s, t, out=s)
            np.add(u_p2_0_0, u_m2_0_0, out=t)
            np.add(t, u_0_p2_0, out=t)
            np.add(t, u_0_m2_0, out=t)
            np.add(t, u_0_0_p2, out=t)
            np.add(t, u_0_0_m2, out=t)
            np.multiply(self.a2, t, out=t)
            np.subtract(s, t, out=s)
            np.subtract(s, w, out=w)
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))


def start(levels, lam, v):
    """Makes the missing levels in place.

    Makes the second level by the Taylor series in time through dt^2, with
    differences of order 4 in space.
    In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.
    """
    nx, ny, nz = _points(levels)
    check(nx, ny, nz, lam)
    if v.shape != levels[0].shape:
        raise ValueError(f"v has shape {v.shape}; accepted: {levels[0].shape}")
    work = np.zeros_like(levels[0])
    s0 = 7.5*lam*lam
    s1 = (4.0/3.0)*lam*lam
    s2 = (1.0/12.0)*lam*lam

    row, plane, first, last = _span(nx, ny, nz)

    def at(a, shift):
        return _part(a, first, last, shift)

    u = levels[0]
    fill_halo(u)
    for k in range(1, LEVELS):
        y = u
        for m in range(1, 0, -1):
            w = levels[0 + k] if m % 2 == 1 else work
            b = k / (2 * m - 1)
            c = (k * k) / ((2 * m - 1) * (2 * m))
            at(w, 0)[:] = at(u, 0) + b*at(v, 0) + c*(s1*(at(y, 1) + at(y, -1) + at(y, row) + at(y, -row) + at(y, plane) + at(y, -plane)) - s0*at(y, 0) - s2*(at(y, 2) + at(y, -2) + at(y, 2*row) + at(y, -2*row) + at(y, 2*plane) + at(y, -2*plane)))
            fill_halo(w)
            y = w


def run(nsteps, levels, lam):
    """Marches nsteps steps and returns the arrays, the newest level last.

    The arrays are the kept levels, the oldest first.
    They are rotated: on return the last is the newest.
    """
    step = Step(levels, lam)
    check(step.nx, step.ny, step.nz, lam)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for _ in range(nsteps):
        fill_halo(step.levels[-1])
        step()
    return step.levels
