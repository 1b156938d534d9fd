# AD 033 r2   |lam_x| + |lam_y| <= 1   halo 1|1 x 1|1, periodic fill included
# levelbook:leapfrog-in-the-plane/2/python/double,periodic:dd349a9314ff23a923d0760c1b1496904981993d10e53cd770b6757e7100588e
#
# Entry       AD 033, revision 2: Leapfrog in the plane (double precision).
# Equation    u_t + c_x u_x + c_y u_y = 0; lam_x = c_x dt/dx, lam_y = c_y dt/dy.
# Formula     u[n+1,i,j] = u[n-1,i,j] - lam_x*(u[n,i+1,j] - u[n,i-1,j]) - lam_y*(u[n,i,j+1] -
#             u[n,i,j-1])
# Order       2 in time, 2 in space, 2 at fixed lam_x, lam_y.
# Error       At lam_x = 1/4, lam_y = 1/4 the leading error term adds dispersion: short waves
#             lag behind.
# Stable      for |lam_x| + |lam_y| <= 1.
# Arrays      2 of (nx + 2) x (ny + 2) doubles, contiguous; ghost cells: 1 before and 1 after
#             along x, 1 before and 1 after along y.
#             x runs fastest: the point (i, j) is u[j][i].
#             u: level n
#             w: level n-1 in, level n+1 out
# Storage     the oldest level is read only at the point being written and is overwritten in
#             place: 2 arrays.
# Work        6 operations and 24 bytes a point and step by the facts.
# Boundary    periodic: fill_halo copies the ghost cells.
# Start-up    start makes the 2 kept levels from the initial level, to the order of the
#             scheme.
# Units       u in any unit; time and space enter through the dimensionless numbers only.
# Calling     levels = [numpy.zeros(shape(nx, ny)) for _ in range(2)]
#             start(levels, lam_x, lam_y)
#             levels = run(nsteps, levels, lam_x, lam_y)   result in levels[-1][1:1 + ny, 1:1 + nx]
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
HALO_X_LEFT = 1
HALO_X_RIGHT = 1
MIN_NX = 1
HALO_Y_LEFT = 1
HALO_Y_RIGHT = 1
MIN_NY = 1
LEVELS = 2  # time levels kept between steps
ARRAYS = 2  # arrays of shape(nx, ny), doubles
CHUNK = 24_576  # a sweep takes so many points at a time, in whole rows, so that they stay in cache


def shape(nx, ny):
    """Shape of every array, points and ghost cells: x runs fastest and comes last."""
    return ny + HALO_Y_LEFT + HALO_Y_RIGHT, nx + HALO_X_LEFT + HALO_X_RIGHT


def check(nx, ny, lam_x, lam_y):
    """Raises ValueError where a size or a parameter cannot be used; O(1)."""
    if nx < MIN_NX:
        raise ValueError(f"nx = {nx} is too small; accepted: nx >= {MIN_NX}")
    if ny < MIN_NY:
        raise ValueError(f"ny = {ny} is too small; accepted: ny >= {MIN_NY}")
    if not math.isfinite(lam_x):
        raise ValueError(f"lam_x = {lam_x} is not a finite number")
    if not math.isfinite(lam_y):
        raise ValueError(f"lam_y = {lam_y} is not a finite number")
    if not (lam_y + lam_x <= 1.0 and lam_x - lam_y <= 1.0 and lam_y - lam_x <= 1.0 and -lam_y
    - lam_x <= 1.0):
        raise ValueError(f"lam_x = {lam_x}, lam_y = {lam_y} is outside the stable range |lam_x| + |lam_y| <= 1")


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
    w: level n-1 in, level n+1 out
    Fill the ghost cells of levels[-1] before the call.
    """

    def __init__(self, levels, lam_x, lam_y):
        self.levels = list(levels)
        nx, ny = _points(self.levels)
        self.nx, self.ny = nx, ny
        self.lam_x = lam_x = float(lam_x)
        self.lam_y = lam_y = float(lam_y)
        row, first, last = _span(nx, ny)
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
                        _part(u, a, b, 1),
                        _part(u, a, b, -1),
                        _part(u, a, b, row),
                        _part(u, a, b, -row),
                        s[: b - a],
                        t[: b - a],
                    )
                    for a, b in parts
                ]
            )
            self.levels.append(self.levels.pop(0))

    def __call__(self):
        for w, u_p1_0, u_m1_0, u_0_p1, u_0_m1, s, t in self._turns[self._turn]:
            np.subtract(u_p1_0, u_m1_0, out=s)
            np.multiply(self.lam_x, s, out=s)
            np.subtract(w, s, out=s)
            np.subtract(u_0_p1, u_0_m1, out=t)
            np.multiply(self.lam_y, t, out=t)
            np.subtract(s, t, out=w)
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))


def start(levels, lam_x, lam_y):
    """Makes the missing levels in place.

    Makes the second level by the Taylor series in time with 2 terms (a
    Runge-Kutta step of 2 stages), with differences of order 2 in space.
    In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
    """
    nx, ny = _points(levels)
    check(nx, ny, lam_x, lam_y)
    work = np.zeros_like(levels[0])
    s1x = 0.5*lam_x
    s1y = 0.5*lam_y

    row, first, last = _span(nx, ny)

    def at(a, shift):
        return _part(a, first, last, shift)

    for k in range(1, ARRAYS):
        u = levels[k - 1]
        fill_halo(u)
        y = u
        for m in range(2, 0, -1):
            w = levels[k] if m % 2 == 1 else work
            c = 1.0 / m
            at(w, 0)[:] = at(u, 0) + c*(-s1x*(at(y, 1) - at(y, -1)) - s1y*(at(y, row) - at(y, -row)))
            fill_halo(w)
            y = w


def run(nsteps, levels, lam_x, lam_y):
    """Marches nsteps steps and returns the arrays, the newest level last.

    The arrays are the kept levels, the oldest first.
    They are rotated: on return the last is the newest.
    """
    step = Step(levels, lam_x, lam_y)
    check(step.nx, step.ny, lam_x, lam_y)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for _ in range(nsteps):
        fill_halo(step.levels[-1])
        step()
    return step.levels
