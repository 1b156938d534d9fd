# ST 010 r2   first derivative, order 4   halo 1|2, periodic fill included
# levelbook:first-derivative-staggered-4/2/python/double,periodic:87318dfb8fa764e71dd2d04bfea38105109198a300425a3740321f8a69445578
#
# Entry       ST 010, revision 2: First derivative, staggered 4 (double precision).
# Operator    first derivative of u on a uniform grid of spacing h
# Formula     d[i] = ap1*(u[i+1] - u[i]) - ap2*(u[i+2] - u[i-1])
#             with ap1 = 1.125/h, ap2 = (1.0/24.0)/h
# Order       4; leading error -3/640 h^4 u^(5).
# Index       staggered: u[i] stands at x_i, d[i] at x_i + h/2, so that u[i] and u[i+1] are
#             its neighbours.
# Arrays      u: n + 3 doubles, contiguous; ghost cells: 1 before the first point, 2 after the
#             last. d: the same layout, only its n points are written.
# Boundary    periodic: fill_halo copies the ghost cells; call it before apply.
# Work        5 operations and 24 bytes a point by the facts.
# Units       d in the unit of u over that of h.
# Calling     apply(u, d, h), or step = Apply(u, d, h) once and step() often. u, d: length(n)
#             doubles each, distinct. Bad arguments raise ValueError.
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
HALO_RIGHT = 2  # ghost cells after the last point
MIN_POINTS = 2
WHOLE = 200_000  # up to here a sweep takes the array whole; beyond, in chunks that stay in cache
CHUNK = 16_384


def length(n):
    """Doubles in every array: n points and their ghost cells."""
    return n + HALO_LEFT + HALO_RIGHT


def check(n, h):
    """Raises ValueError where n or the spacing cannot be used; O(1)."""
    if n < MIN_POINTS:
        raise ValueError(f"n = {n} is too small; accepted: n >= {MIN_POINTS}")
    if not math.isfinite(h) or h <= 0.0:
        raise ValueError(f"h = {h}; accepted: a positive finite spacing")


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; O(n), so not part of apply."""
    if not np.isfinite(u[HALO_LEFT : u.size - HALO_RIGHT]).all():
        raise ValueError("the state holds a NaN or an infinite value")


def fill_halo(u):
    """Ghost cells of a periodic row."""
    u[0] = u[-3]
    u[-2:] = u[1:3]


def _part(a, start, stop, offset):
    """View of points start ... stop - 1, shifted by offset."""
    return a[HALO_LEFT + start + offset : HALO_LEFT + stop + offset]


class Apply:
    """The stencil on prepared views of u and d; nothing is allocated when it is called.

    u, d: distinct contiguous float64 arrays of length(n). Fill the ghost cells of u before the call.
    """

    def __init__(self, u, d, h):
        for a in (u, d):
            if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != 1 or not a.flags.c_contiguous:
                raise ValueError("accepted: contiguous one-dimensional float64 arrays")
        if u.shape != d.shape:
            raise ValueError(f"shapes differ: {u.shape} and {d.shape}")
        if np.may_share_memory(u, d):
            raise ValueError("u and d overlap in memory; accepted: distinct arrays")
        n = u.size - HALO_LEFT - HALO_RIGHT
        check(n, h)
        self.ap1 = 1.125/h
        self.ap2 = (1.0/24.0)/h
        size = n if n <= WHOLE else CHUNK
        s = np.empty(size)
        self._parts = [
            (
                _part(d, a, b, 0),
                _part(u, a, b, 1),
                _part(u, a, b, 0),
                _part(u, a, b, 2),
                _part(u, a, b, -1),
                s[: b - a],
            )
            for a, b in ((a, min(a + size, n)) for a in range(0, n, size))
        ]

    def __call__(self):
        for d, u_p1, u, u_p2, u_m1, s in self._parts:
            np.subtract(u_p1, u, out=d)
            np.multiply(self.ap1, d, out=d)
            np.subtract(u_p2, u_m1, out=s)
            np.multiply(self.ap2, s, out=s)
            np.subtract(d, s, out=d)


def apply(u, d, h):
    """d from u, once. For many calls on the same arrays make an Apply and call it."""
    Apply(u, d, h)()
