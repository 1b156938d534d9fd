import math

import numpy as np

ARRAYS = {{arrays}}  # arrays of n doubles: work space, then u


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
        {{coefficients}}
        {{scratchLines}}

    def __call__(self, t):
        {{unpack}} = self.levels
        {{calls}}


def run(nsteps, levels, t, dt, rhs):
    """Marches nsteps steps and returns the arrays; the last is u."""
    step = Step(levels, dt, rhs)
    check(step.n, t, dt)
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    for k in range(nsteps):
        step(t + k * dt)
    return step.levels
