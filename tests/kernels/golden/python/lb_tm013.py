# TM 013 r2   order 3; stable on the imaginary axis to 0.723627   no halo
# levelbook:adams-bashforth-3/2/python/double,periodic:0636e5213c68ce1634ce2a8763bb151975ddff0cce7e0123bf1106b853522451
#
# Entry       TM 013, revision 2: Adams-Bashforth 3 (double precision).
# Equation    u' = f(t, u) for n unknowns; dt of either sign.
# Formula     f = f(t, u); u = u + b0*f - b1*f1 + b2*f2
#             with b0 = (23.0/12.0)*dt, b1 = (4.0/3.0)*dt, b2 = (5.0/12.0)*dt
# Order       3 on linear problems, 3 on nonlinear ones.
# Stable      dt times the eigenvalues of f within: imaginary axis 12*sqrt(11)/55 = 0.723627,
#             negative real axis 6/11 = 0.545455.
# Callback    rhs(t, u, out=f) writes f = du/dt at (t, u).
# Storage     1 level of u and 3 slopes, n doubles each, the oldest first; rotated after each
#             step, the oldest overwritten.
# Start-up    call start 2 times before the first step, with t advancing by dt: one
#             Runge-Kutta step of order 4 that also keeps its slope.
# Calling     levels, slopes = run(nsteps, levels, slopes, t, dt, rhs)
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

STEPS = 3  # k of a k-step method
LEVELS = 1  # arrays of u, n doubles each, the oldest first
SLOPES = 3  # arrays of slopes, n doubles each, the oldest first


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

    The slope at t takes the place of the oldest slope, the new level that of the oldest level; both lists are
    rotated, the newest last.
    """

    def __init__(self, levels, slopes, dt, rhs):
        self.levels = list(levels)
        self.slopes = list(slopes)
        self.n = _unknowns(self.levels + self.slopes, LEVELS + SLOPES)
        self.rhs = rhs
        self.dt = dt = float(dt)
        self.b0 = (23.0/12.0)*dt
        self.b1 = (4.0/3.0)*dt
        self.b2 = (5.0/12.0)*dt
        self.a2_1 = 0.5*dt
        self.s1 = (1.0/6.0)*dt
        self.a3_2 = 0.5*dt
        self.s2 = (1.0/3.0)*dt
        self.s3 = (1.0/3.0)*dt
        self.s4 = (1.0/6.0)*dt
        self.s = np.empty(self.n)
        self.t = np.empty(self.n)

    def __call__(self, t):
        self.rhs(t, self.levels[-1], out=self.slopes[0])
        self.slopes.append(self.slopes.pop(0))
        (u,) = self.levels
        f2, f1, f = self.slopes
        np.multiply(self.b0, f, out=self.s)
        np.add(u, self.s, out=self.s)
        np.multiply(self.b1, f1, out=self.t)
        np.subtract(self.s, self.t, out=self.s)
        np.multiply(self.b2, f2, out=self.t)
        np.add(self.s, self.t, out=u)
        self.levels.append(self.levels.pop(0))

    def start(self, t):
        """One start-up step: Runge-Kutta of order 4, keeping its first slope. Call it STEPS - 1 times."""
        dt = self.dt
        u = self.levels[-1]
        y, w, k = np.empty(self.n), np.empty(self.n), np.empty(self.n)
        f = self.slopes[0]
        self.rhs(t, u, out=f)
        np.multiply(self.a2_1, f, out=y)
        np.add(u, y, out=y)
        np.multiply(self.s1, f, out=w)
        np.add(u, w, out=w)
        self.rhs(t + 0.5*dt, y, out=k)
        np.multiply(self.a3_2, k, out=y)
        np.add(u, y, out=y)
        np.multiply(self.s2, k, out=self.s)
        np.add(w, self.s, out=w)
        self.rhs(t + 0.5*dt, y, out=k)
        np.multiply(self.dt, k, out=y)
        np.add(u, y, out=y)
        np.multiply(self.s3, k, out=self.s)
        np.add(w, self.s, out=w)
        self.rhs(t + dt, y, out=k)
        np.multiply(self.s4, k, out=u)
        np.add(w, u, out=u)
        self.slopes.append(self.slopes.pop(0))
        self.levels.append(self.levels.pop(0))


def run(nsteps, levels, slopes, t, dt, rhs):
    """Marches nsteps steps from complete levels and slopes and returns both lists, the newest last."""
    step = Step(levels, slopes, dt, rhs)
    check(step.n, t, dt)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for k in range(nsteps):
        step(t + k * dt)
    return step.levels, step.slopes
