# DI 013 r2   r_x + r_y <= 1/2, r_x >= 0, r_y >= 0   halo 1|1 x 1|1, periodic fill included
# levelbook:forward-euler-five-points/2/python/double,periodic:2f26612a0a1e8c3f23e5e13fc29854c93e507a763af45eb302e2e9e42994d5b6
#
# Entry       DI 013, revision 2: Forward Euler, five points (double precision).
# Equation    u_t = nu (u_xx + u_yy); r_x = nu dt/dx^2, r_y = nu dt/dy^2.
# Formula     u[n+1,i,j] = a0*u[n,i,j] + r_x*(u[n,i+1,j] + u[n,i-1,j]) + r_y*(u[n,i,j+1] +
#             u[n,i,j-1])
#             with a0 = 1 - 2*r_y - 2*r_x
# Order       1 in time, 2 in space, 2 at fixed r_x, r_y.
# Error       At r_x = 1/8, r_y = 1/8 the leading error term strengthens the damping of short
#             waves (derivative of order 4).
# Stable      for r_x + r_y <= 1/2, r_x >= 0, r_y >= 0.
# Arrays      2 of (nx + 2) x (ny + 2) doubles, contiguous; ghost cells: 1 before and 1 after
#             along x, 1 before and 1 after along y.
#             x runs fastest: the point (i, j) is u[j][i].
#             u: level n
#             w: level n+1 out
# Storage     1 kept level and one array for the new level; rotate the arrays after each step.
# Work        7 operations and 24 bytes a point and step by the facts.
# Boundary    periodic: fill_halo copies the ghost cells.
# Start-up    none: the initial level is enough.
# Units       u in any unit; time and space enter through the dimensionless numbers only.
# Calling     levels = [numpy.zeros(shape(nx, ny)) for _ in range(2)]
#             levels = run(nsteps, levels, r_x, r_y)   result in levels[-1][1:1 + ny, 1:1 + nx]
#             Bad arguments raise ValueError. Step checks shapes when it is made, not at every call.
#             The first array is the spare one.
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
HALO_X_LEFT = 1
HALO_X_RIGHT = 1
MIN_NX = 1
HALO_Y_LEFT = 1
HALO_Y_RIGHT = 1
MIN_NY = 1
LEVELS = 1  # time levels kept between steps
ARRAYS = 2  # arrays of shape(nx, ny), doubles
CHUNK = 24_576  # a sweep takes so many points at a time, in whole rows, so that they stay in cache


def shape(nx, ny):
    """Shape of every array, points and ghost cells: x runs fastest and comes last."""
    return ny + HALO_Y_LEFT + HALO_Y_RIGHT, nx + HALO_X_LEFT + HALO_X_RIGHT


def check(nx, ny, r_x, r_y):
    """Raises ValueError where a size or a parameter cannot be used; O(1)."""
    if nx < MIN_NX:
        raise ValueError(f"nx = {nx} is too small; accepted: nx >= {MIN_NX}")
    if ny < MIN_NY:
        raise ValueError(f"ny = {ny} is too small; accepted: ny >= {MIN_NY}")
    if not math.isfinite(r_x):
        raise ValueError(f"r_x = {r_x} is not a finite number")
    if not math.isfinite(r_y):
        raise ValueError(f"r_y = {r_y} is not a finite number")
    if not (r_y + r_x <= 0.5 and 0.0 <= r_x and 0.0 <= r_y):
        raise ValueError(f"r_x = {r_x}, r_y = {r_y} is outside the stable range r_x + r_y <= 1/2, r_x >= 0, r_y >= 0")


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; as long as a sweep, so not part of a step."""
    if not np.isfinite(u[1:-1, 1:-1]).all():
        raise ValueError("the state holds a NaN or an infinite value")


def fill_halo(u):
    """Ghost cells of a periodic grid, those of the corners included."""
    u[1:-1, :1] = u[1:-1, -2:-1]
    u[1:-1, -1:] = u[1:-1, 1:2]
    u[:1, :] = u[-2:-1, :]
    u[-1:, :] = u[1:2, :]


def _points(arrays, count=ARRAYS):
    """Numbers of points of `count` distinct contiguous float64 arrays of one shape."""
    if len(arrays) != count:
        raise ValueError(f"{len(arrays)} arrays given; accepted: {count}")
    for k, a in enumerate(arrays):
        if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != 2 or not a.flags.c_contiguous:
            raise ValueError("accepted: contiguous float64 arrays of 2 dimensions")
        if a.shape != arrays[0].shape:
            raise ValueError(f"shapes differ: {a.shape} and {arrays[0].shape}")
        if any(np.may_share_memory(a, b) for b in arrays[:k]):
            raise ValueError("the arrays overlap in memory; accepted: distinct arrays")
    ny, nx = arrays[0].shape
    nx -= HALO_X_LEFT + HALO_X_RIGHT
    ny -= HALO_Y_LEFT + HALO_Y_RIGHT
    if nx < MIN_NX:
        raise ValueError(f"nx = {nx} is too small; accepted: nx >= {MIN_NX}")
    if ny < MIN_NY:
        raise ValueError(f"ny = {ny} is too small; accepted: ny >= {MIN_NY}")
    return nx, ny


def _span(nx, ny):
    """Strides of neighbouring rows, and the flat range from the first point to the last."""
    row = nx + HALO_X_LEFT + HALO_X_RIGHT
    first = HALO_Y_LEFT * row + HALO_X_LEFT
    last = first + (ny - 1) * row + nx
    return row, first, last


def _part(a, start, stop, shift):
    """Flat view of a from start to stop, shifted: whole rows, the ghost cells between them included."""
    return a.reshape(-1)[start + shift : stop + shift]


class Step:
    """One step of the scheme on prepared views; nothing is allocated when it is called.

    levels: arrays of shape(nx, ny), the oldest first; rotated by every call, the newest last.
    u: level n
    w: level n+1 out
    Fill the ghost cells of levels[-1] before the call.
    """

    def __init__(self, levels, r_x, r_y):
        self.levels = list(levels)
        nx, ny = _points(self.levels)
        self.nx, self.ny = nx, ny
        self.r_x = r_x = float(r_x)
        self.r_y = r_y = float(r_y)
        self.a0 = 1.0 - 2.0*r_y - 2.0*r_x
        row, first, last = _span(nx, ny)
        size = max(1, CHUNK // row) * row
        parts = [(a, min(a + size, last)) for a in range(first, last, size)]
        s = np.empty(size)
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
                        s[: b - a],
                    )
                    for a, b in parts
                ]
            )
            self.levels.append(self.levels.pop(0))

    def __call__(self):
        for w, u, u_p1_0, u_m1_0, u_0_p1, u_0_m1, s in self._turns[self._turn]:
            np.multiply(self.a0, u, out=w)
            np.add(u_p1_0, u_m1_0, out=s)
            np.multiply(self.r_x, s, out=s)
            np.add(w, s, out=w)
            np.add(u_0_p1, u_0_m1, out=s)
            np.multiply(self.r_y, s, out=s)
            np.add(w, s, out=w)
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))


def run(nsteps, levels, r_x, r_y):
    """Marches nsteps steps and returns the arrays, the newest level last.

    The first array is spare; then come the kept levels, the oldest first.
    They are rotated: on return the last is the newest.
    """
    step = Step(levels, r_x, r_y)
    check(step.nx, step.ny, r_x, r_y)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for _ in range(nsteps):
        fill_halo(step.levels[-1])
        step()
    return step.levels
