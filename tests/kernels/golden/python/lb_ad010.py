# AD 010 r2   |lam| <= 2.0612   halo 2|2, periodic fill included
# levelbook:classical-runge-kutta-central-4/2/python/double,periodic:d0fd965151b1698d2943941b92e7ca611365c2e1d1352778766625007d416090
#
# Entry       AD 010, revision 2: Classical Runge-Kutta, central 4 (double precision).
# Equation    u_t + c u_x = 0; lam = c dt/dx.
# Formula     stage 1: k = a2*(u[n,i+2] - u[n,i-2]) - a1*(u[n,i+1] - u[n,i-1])
#             y[i] = u[n,i] + (1/2)*k
#             w[i] = u[n,i] + (1/6)*k
#             stage 2: k = a2*(y[i+2] - y[i-2]) - a1*(y[i+1] - y[i-1])
#             z[i] = u[n,i] + (1/2)*k
#             w[i] = w[i] + (1/3)*k
#             stage 3: k = a2*(z[i+2] - z[i-2]) - a1*(z[i+1] - z[i-1])
#             y[i] = u[n,i] + k
#             w[i] = w[i] + (1/3)*k
#             stage 4: k = a2*(y[i+2] - y[i-2]) - a1*(y[i+1] - y[i-1])
#             u[n+1,i] = w[i] + (1/6)*k
#             with a1 = (2/3)*lam, a2 = (1/12)*lam
# Order       4 in time, 4 in space, 4 at fixed lam.
# Error       At lam = 34/33 the leading error term adds dispersion: short waves lag behind;
#             the next one adds sixth-order diffusion: short waves are damped.
# Stable      for |lam| <= 2.0612.
#             Advised working value: |lam| <= 1.85 (nine tenths of the bound).
# Arrays      4 of n + 4 doubles, contiguous; ghost cells: 2 before the first point, 2 after
#             the last.
#             u: level n in, level n+1 out; y, w, z: work space, need not be set.
# Storage     slopes are not stored: each is added at once to the sums that need it. 4 arrays.
# Work        33 operations and 184 bytes a point and step by the facts.
# Boundary    periodic: fill_halo copies the ghost cells.
# Start-up    none: the initial level is enough.
# Units       u in any unit; time and space enter through the dimensionless numbers only.
# Calling     levels = [numpy.zeros(length(n)) for _ in range(4)]
#             levels = run(nsteps, levels, lam)   result in levels[-1][2:2 + n]
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

HALO_LEFT = 2  # ghost cells before the first point
HALO_RIGHT = 2  # ghost cells after the last point
MIN_POINTS = 2
LEVELS = 1  # time levels kept between steps
ARRAYS = 4  # arrays of length(n) doubles
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
    if not (lam >= -2.0612023173914658 and lam <= 2.0612023173914658):
        raise ValueError(f"lam = {lam} is outside the stable range |lam| <= 2.0612")


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; O(n), so not part of a step."""
    if not np.isfinite(u[HALO_LEFT : u.size - HALO_RIGHT]).all():
        raise ValueError("the state holds a NaN or an infinite value")


def fill_halo(u):
    """Ghost cells of a periodic row."""
    u[:2] = u[-4:-2]
    u[-2:] = u[2:4]


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

    levels: work arrays, then u, which is advanced in place; all of length(n).
    The stages fill the ghost cells of what they read.
    """

    def __init__(self, levels, lam):
        self.levels = list(levels)
        self.n = n = _points(self.levels)
        self.lam = lam = float(lam)
        self.a1 = (2.0/3.0)*lam
        self.a2 = (1.0/12.0)*lam
        size = n if n <= WHOLE else CHUNK
        parts = [(a, min(a + size, n)) for a in range(0, n, size)]
        s = np.empty(size)
        t = np.empty(size)
        y, w, z, u = self.levels
        self._u = u
        self._y = y
        self._z = z
        self._stage1 = [
            (
                _part(y, a, b, 0),
                _part(w, a, b, 0),
                _part(u, a, b, 2),
                _part(u, a, b, -2),
                _part(u, a, b, 1),
                _part(u, a, b, -1),
                _part(u, a, b, 0),
                s[: b - a],
                t[: b - a],
            )
            for a, b in parts
        ]
        self._stage2 = [
            (
                _part(z, a, b, 0),
                _part(w, a, b, 0),
                _part(y, a, b, 2),
                _part(y, a, b, -2),
                _part(y, a, b, 1),
                _part(y, a, b, -1),
                _part(u, a, b, 0),
                s[: b - a],
                t[: b - a],
            )
            for a, b in parts
        ]
        self._stage3 = [
            (
                _part(y, a, b, 0),
                _part(w, a, b, 0),
                _part(z, a, b, 2),
                _part(z, a, b, -2),
                _part(z, a, b, 1),
                _part(z, a, b, -1),
                _part(u, a, b, 0),
                s[: b - a],
                t[: b - a],
            )
            for a, b in parts
        ]
        self._stage4 = [
            (
                _part(u, a, b, 0),
                _part(y, a, b, 2),
                _part(y, a, b, -2),
                _part(y, a, b, 1),
                _part(y, a, b, -1),
                _part(w, a, b, 0),
                s[: b - a],
                t[: b - a],
            )
            for a, b in parts
        ]

    def __call__(self):
        fill_halo(self._u)
        for y, w, u_p2, u_m2, u_p1, u_m1, u, s, t in self._stage1:
            np.subtract(u_p2, u_m2, out=s)
            np.multiply(self.a2, s, out=s)
            np.subtract(u_p1, u_m1, out=t)
            np.multiply(self.a1, t, out=t)
            np.subtract(s, t, out=s)
            np.multiply(0.5, s, out=y)
            np.add(u, y, out=y)
            np.multiply((1.0/6.0), s, out=w)
            np.add(u, w, out=w)
        fill_halo(self._y)
        for z, w, y_p2, y_m2, y_p1, y_m1, u, s, t in self._stage2:
            np.subtract(y_p2, y_m2, out=s)
            np.multiply(self.a2, s, out=s)
            np.subtract(y_p1, y_m1, out=t)
            np.multiply(self.a1, t, out=t)
            np.subtract(s, t, out=s)
            np.multiply(0.5, s, out=z)
            np.add(u, z, out=z)
            np.multiply((1.0/3.0), s, out=t)
            np.add(w, t, out=w)
        fill_halo(self._z)
        for y, w, z_p2, z_m2, z_p1, z_m1, u, s, t in self._stage3:
            np.subtract(z_p2, z_m2, out=s)
            np.multiply(self.a2, s, out=s)
            np.subtract(z_p1, z_m1, out=t)
            np.multiply(self.a1, t, out=t)
            np.subtract(s, t, out=s)
            np.add(u, s, out=y)
            np.multiply((1.0/3.0), s, out=t)
            np.add(w, t, out=w)
        fill_halo(self._y)
        for u, y_p2, y_m2, y_p1, y_m1, w, s, t in self._stage4:
            np.subtract(y_p2, y_m2, out=s)
            np.multiply(self.a2, s, out=s)
            np.subtract(y_p1, y_m1, out=t)
            np.multiply(self.a1, t, out=t)
            np.subtract(s, t, out=s)
            np.multiply((1.0/6.0), s, out=u)
            np.add(w, u, out=u)


def run(nsteps, levels, lam):
    """Marches nsteps steps and returns the arrays, the newest level last.

    The last array is u, advanced in place; the others are work space.
    """
    step = Step(levels, lam)
    check(step.n, lam)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for _ in range(nsteps):
        step()
    return step.levels
