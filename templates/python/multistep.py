import math

import numpy as np

STEPS = {{steps}}  # k of a k-step method
LEVELS = {{levels}}  # arrays of u, n doubles each, the oldest first
SLOPES = {{slopes}}  # arrays of slopes, n doubles each, the oldest first


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
        {{coefficients}}
        {{startCoefficients}}
        {{scratchLines}}

    def __call__(self, t):
        self.rhs(t, self.levels[-1], out=self.slopes[0])
        self.slopes.append(self.slopes.pop(0))
        {{unpackLevels}} = self.levels
        {{unpackSlopes}} = self.slopes
        {{lines}}
        self.levels.append(self.levels.pop(0))

{{#each starting}}
    def start(self, t):
        """One start-up step: Runge-Kutta of order {{order}}, keeping its first slope. Call it STEPS - 1 times."""
        dt = self.dt
        {{arrays}}
        f = self.slopes[0]
        self.rhs(t, u, out=f)
        {{calls}}
        self.slopes.append(self.slopes.pop(0))
        self.levels.append(self.levels.pop(0))
{{/each}}


def run(nsteps, levels, slopes, t, dt, rhs):
    """Marches nsteps steps from complete levels and slopes and returns both lists, the newest last."""
    step = Step(levels, slopes, dt, rhs)
    check(step.n, t, dt)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for k in range(nsteps):
        step(t + k * dt)
    return step.levels, step.slopes
