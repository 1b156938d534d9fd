# DI 001 r2   0 <= r <= 1/2   halo 1|1, periodic fill included
# levelbook:forward-euler-central-2/2/python/double,periodic:8b49bcab6fa31ca0d9b0dd6db3518471bc3818577aab3fdbb594c40f998adfa1
#
# Entry       DI 001, revision 2: Forward Euler, central 2 (double precision).
# Equation    u_t = nu u_xx; r = nu dt/dx^2.
# Formula     u[n+1,i] = a0*u[n,i] + r*(u[n,i+1] + u[n,i-1])
#             with a0 = 1 - 2*r
# Order       1 in time, 2 in space, 2 at fixed r.
# Error       At r = 1/4 the leading error term strengthens the damping of short waves
#             (derivative of order 4).
# Stable      for 0 <= r <= 1/2.
#             Advised working value: r <= 0.45 (nine tenths of the bound).
# Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
#             the last.
#             u: level n
#             w: level n+1 out
# Storage     1 kept level and one array for the new level; rotate the arrays after each step.
# Work        4 operations and 24 bytes a point and step by the facts.
# Boundary    periodic: fill_halo copies the ghost cells.
# Start-up    none: the initial level is enough.
# Units       u in any unit; time and space enter through the dimensionless numbers only.
# Calling     levels = [numpy.zeros(length(n)) for _ in range(2)]
#             levels = run(nsteps, levels, r)   result in levels[-1][1:1 + n]
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

HALO_LEFT = 1  # ghost cells before the first point
HALO_RIGHT = 1  # ghost cells after the last point
MIN_POINTS = 1
LEVELS = 1  # time levels kept between steps
ARRAYS = 2  # arrays of length(n) doubles
WHOLE = 200_000  # up to here a sweep takes the array whole; beyond, in chunks that stay in cache
CHUNK = 16_384


def length(n):
    """Doubles in every array: n points and their ghost cells."""
    return n + HALO_LEFT + HALO_RIGHT


def check(n, r):
    """Raises ValueError where n or a parameter cannot be used; O(1)."""
    if n < MIN_POINTS:
        raise ValueError(f"n = {n} is too small; accepted: n >= {MIN_POINTS}")
    if not math.isfinite(r):
        raise ValueError(f"r = {r} is not a finite number")
    if not (r >= 0.0 and r <= 0.5):
        raise ValueError(f"r = {r} is outside the stable range 0 <= r <= 1/2")


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; O(n), so not part of a step."""
    if not np.isfinite(u[HALO_LEFT : u.size - HALO_RIGHT]).all():
        raise ValueError("the state holds a NaN or an infinite value")


def fill_halo(u):
    """Ghost cells of a periodic row."""
    u[0] = u[-2]
    u[-1] = u[1]


def _points(arrays, count=ARRAYS):
    """Number of points of `count` distinct contiguous float64 arrays of one length."""
    if len(arrays) != count:
        raise ValueError(f"{len(arrays)} arrays given; accepted: {count}")
    for k, a in enumerate(arrays):
        if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != 1 or not a.flags.c_contiguous:
            raise ValueError("accepted: contiguous one-dimensional float64 arrays")
        if a.shape != arrays[0].shape:
            raise ValueError(f"shapes differ: {a.shape} and {arrays[0].shape}")
        if any(np.may_share_memory(a, b) for b in arrays[:k]):
            raise ValueError("the arrays overlap in memory; accepted: distinct arrays")
    n = arrays[0].size - HALO_LEFT - HALO_RIGHT
    if n < MIN_POINTS:
        raise ValueError(f"n = {n} is too small; accepted: n >= {MIN_POINTS}")
    return n


def _part(a, start, stop, offset):
    """View of points start ... stop - 1, shifted by offset."""
    return a[HALO_LEFT + start + offset : HALO_LEFT + stop + offset]


class Step:
    """One step of the scheme on prepared views; nothing is allocated when it is called.

    levels: arrays of length(n), the oldest first; rotated by every call, the newest last.
    u: level n
    w: level n+1 out
    Fill the ghost cells of levels[-1] before the call.
    """

    def __init__(self, levels, r):
        self.levels = list(levels)
        self.n = n = _points(self.levels)
        self.r = r = float(r)
        self.a0 = 1.0 - 2.0*r
        size = n if n <= WHOLE else CHUNK
        parts = [(a, min(a + size, n)) for a in range(0, n, size)]
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
                        s[: b - a],
                    )
                    for a, b in parts
                ]
            )
            self.levels.append(self.levels.pop(0))

    def __call__(self):
        for w, u, u_p1, u_m1, s in self._turns[self._turn]:
            np.multiply(self.a0, u, out=w)
            np.add(u_p1, u_m1, out=s)
            np.multiply(self.r, s, out=s)
            np.add(w, s, out=w)
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))


def run(nsteps, levels, r):
    """Marches nsteps steps and returns the arrays, the newest level last.

    The first array is spare; then come the kept levels, the oldest first.
    They are rotated: on return the last is the newest.
    """
    step = Step(levels, r)
    check(step.n, r)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for _ in range(nsteps):
        fill_halo(step.levels[-1])
        step()
    return step.levels
