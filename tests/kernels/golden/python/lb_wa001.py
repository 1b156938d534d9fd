# WA 001 r2   |lam| <= 1; keep below   halo 1|1, periodic fill included
# levelbook:leapfrog-for-the-wave-equation/2/python/double,periodic:c9a515a8043f12d8a7faa1499fc441a7f376f63bd06e1dbf9eb90d384db76c19
#
# Entry       WA 001, revision 2: Leapfrog for the wave equation (double precision).
# Equation    u_tt = c^2 u_xx; lam = c dt/dx.
# Formula     u[n+1,i] = a0*u[n,i] + a1*(u[n,i+1] + u[n,i-1]) - u[n-1,i]
#             with a0 = 2 - 2*lam*lam, a1 = lam*lam
# Order       2 in time, 2 in space, 2 at fixed lam.
# Error       At lam = 1/2 the leading error term adds dispersion: short waves lag.
# Stable      for |lam| <= 1; keep below.
#             Advised working value: |lam| <= 0.9 (nine tenths of the bound).
#             At the bound itself: double root on the unit circle: growth linear in n for that
#             wave.
# Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
#             the last.
#             u: level n
#             w: level n-1 in, level n+1 out
# Storage     the oldest level is read only at the point being written and is overwritten in
#             place: 2 arrays.
# Work        5 operations and 24 bytes a point and step by the facts.
# Boundary    periodic: fill_halo copies the ghost cells.
# Start-up    start makes the 2 kept levels from u and dt u_t at the initial time, to the
#             order of the scheme.
# Units       u in any unit; time and space enter through the dimensionless numbers only.
# Calling     levels = [numpy.zeros(length(n)) for _ in range(2)]
#             start(levels, lam, v)
#             levels = run(nsteps, levels, lam)   result in levels[-1][1:1 + n]
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

HALO_LEFT = 1  # ghost cells before the first point
HALO_RIGHT = 1  # ghost cells after the last point
MIN_POINTS = 1
LEVELS = 2  # time levels kept between steps
ARRAYS = 2  # arrays of length(n) doubles
WHOLE = 200_000  # up to here a sweep takes the array whole; beyond, in chunks that stay in cache
CHUNK = 16_384


def length(n):
    """Doubles in every array: n points and their ghost cells."""
    return n + HALO_LEFT + HALO_RIGHT


def check(n, lam):
    """Raises ValueError where n or a parameter cannot be used; O(1)."""
    if n < MIN_POINTS:
        raise ValueError(f"n = {n} is too small; accepted: n >= {MIN_POINTS}")
    if not math.isfinite(lam):
        raise ValueError(f"lam = {lam} is not a finite number")
    if not (lam >= -1.0 and lam <= 1.0):
        raise ValueError(f"lam = {lam} is outside the stable range |lam| <= 1; keep below")


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
    w: level n-1 in, level n+1 out
    Fill the ghost cells of levels[-1] before the call.
    """

    def __init__(self, levels, lam):
        self.levels = list(levels)
        self.n = n = _points(self.levels)
        self.lam = lam = float(lam)
        self.a0 = 2.0 - 2.0*lam*lam
        self.a1 = lam*lam
        size = n if n <= WHOLE else CHUNK
        parts = [(a, min(a + size, n)) for a in range(0, n, size)]
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
                        s[: b - a],
                        t[: b - a],
                    )
                    for a, b in parts
                ]
            )
            self.levels.append(self.levels.pop(0))

    def __call__(self):
        for w, u, u_p1, u_m1, s, t in self._turns[self._turn]:
            np.multiply(self.a0, u, out=s)
            np.add(u_p1, u_m1, out=t)
            np.multiply(self.a1, t, out=t)
            np.add(s, t, out=s)
            np.subtract(s, w, out=w)
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))


def start(levels, lam, v):
    """Makes the missing levels in place.

    Makes the second level by the Taylor series in time through dt^2, with
    differences of order 2 in space.
    In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.
    """
    n = _points(levels)
    check(n, lam)
    if v.shape != levels[0].shape:
        raise ValueError(f"v has shape {v.shape}; accepted: {levels[0].shape}")
    work = np.empty_like(levels[0])
    s0 = 2.0*lam*lam
    s1 = lam*lam

    def at(a, offset):
        return _part(a, 0, n, offset)

    u = levels[0]
    fill_halo(u)
    for k in range(1, LEVELS):
        y = u
        for m in range(1, 0, -1):
            w = levels[0 + k] if m % 2 == 1 else work
            b = k / (2 * m - 1)
            c = (k * k) / ((2 * m - 1) * (2 * m))
            at(w, 0)[:] = at(u, 0) + b*at(v, 0) + c*(s1*(at(y, 1) + at(y, -1)) - s0*at(y, 0))
            fill_halo(w)
            y = w


def run(nsteps, levels, lam):
    """Marches nsteps steps and returns the arrays, the newest level last.

    The arrays are the kept levels, the oldest first.
    They are rotated: on return the last is the newest.
    """
    step = Step(levels, lam)
    check(step.n, lam)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for _ in range(nsteps):
        fill_halo(step.levels[-1])
        step()
    return step.levels
