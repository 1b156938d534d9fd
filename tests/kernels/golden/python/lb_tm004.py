# TM 004 r2   order 4; stable on the imaginary axis to 2.82843   no halo
# levelbook:classical-runge-kutta/2/python/double,periodic:da70e5bc78127011b38ac1b6c956ad4c0bc50f62f5fa5903531af4469f45e551
#
# Entry       TM 004, revision 2: Classical Runge-Kutta (double precision).
# Equation    u' = f(t, u) for n unknowns; dt of either sign.
# Formula     k = f(t, u); y = u + a2_1*k; w = u + b1*k
#             k = f(t + 0.5*dt, y); y = u + a3_2*k; w = w + b2*k
#             k = f(t + 0.5*dt, y); y = u + dt*k; w = w + b3*k
#             k = f(t + dt, y); u = w + b4*k
#             with a2_1 = 0.5*dt, b1 = (1.0/6.0)*dt, a3_2 = 0.5*dt, b2 = (1.0/3.0)*dt, b3 =
#             (1.0/3.0)*dt, b4 = (1.0/6.0)*dt
# Order       4 on linear problems, 4 on nonlinear ones.
# Stable      dt times the eigenvalues of f within: imaginary axis 2*sqrt(2) = 2.82843,
#             negative real axis 2.78529.
# Callback    rhs(t, u, out=f) writes f = du/dt at (t, u).
# Storage     4 arrays of n doubles: u, advanced in place, and y, w, k as work space (first in
#             the list, u last).
# Start-up    none.
# Calling     levels = run(nsteps, levels, t, dt, rhs)
#             The eigenvalues are the caller's, so that no bound is checked here.
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

ARRAYS = 4  # arrays of n doubles: work space, then u


def check(n, t, dt):
    """Raises ValueError where n, t or dt cannot be used; O(1)."""
    if n < 1:
        raise ValueError(f"n = {n} is too small; accepted: n >= 1")
    if not math.isfinite(t) or not math.isfinite(dt):
        raise ValueError(f"t = {t}, dt = {dt}; accepted: finite numbers")


def check_state(u):
    """Raises ValueError where a value of u is not a finite number; O(n), so not part of a step."""
    if not np.isfinite(u).all():
        raise ValueError("the state holds a NaN or an infinite value")


def _unknowns(arrays, count):
    """Number of unknowns of `count` distinct contiguous float64 arrays of one length."""
    if len(arrays) != count:
        raise ValueError(f"{len(arrays)} arrays given; accepted: {count}")
    for k, a in enumerate(arrays):
        if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != 1 or not a.flags.c_contiguous:
            raise ValueError("accepted: contiguous one-dimensional float64 arrays")
        if a.shape != arrays[0].shape:
            raise ValueError(f"shapes differ: {a.shape} and {arrays[0].shape}")
        if any(np.may_share_memory(a, b) for b in arrays[:k]):
            raise ValueError("the arrays overlap in memory; accepted: distinct arrays")
    return arrays[0].size


class Step:
    """One step from t to t + dt; nothing is allocated when it is called.

    levels: work arrays, then u, which is advanced in place.
    """

    def __init__(self, levels, dt, rhs):
        self.levels = list(levels)
        self.n = _unknowns(self.levels, ARRAYS)
        self.rhs = rhs
        self.dt = dt = float(dt)
        self.a2_1 = 0.5*dt
        self.b1 = (1.0/6.0)*dt
        self.a3_2 = 0.5*dt
        self.b2 = (1.0/3.0)*dt
        self.b3 = (1.0/3.0)*dt
        self.b4 = (1.0/6.0)*dt
        self.s = np.empty(self.n)

    def __call__(self, t):
        y, w, k, u = self.levels
        dt = self.dt
        self.rhs(t, u, out=k)
        np.multiply(self.a2_1, k, out=y)
        np.add(u, y, out=y)
        np.multiply(self.b1, k, out=w)
        np.add(u, w, out=w)
        self.rhs(t + 0.5*dt, y, out=k)
        np.multiply(self.a3_2, k, out=y)
        np.add(u, y, out=y)
        np.multiply(self.b2, k, out=self.s)
        np.add(w, self.s, out=w)
        self.rhs(t + 0.5*dt, y, out=k)
        np.multiply(self.dt, k, out=y)
        np.add(u, y, out=y)
        np.multiply(self.b3, k, out=self.s)
        np.add(w, self.s, out=w)
        self.rhs(t + dt, y, out=k)
        np.multiply(self.b4, k, out=u)
        np.add(w, u, out=u)


def run(nsteps, levels, t, dt, rhs):
    """Marches nsteps steps and returns the arrays; the last is u."""
    step = Step(levels, dt, rhs)
    check(step.n, t, dt)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for k in range(nsteps):
        step(t + k * dt)
    return step.levels
