{{imports}}
import numpy as np

HALO_LEFT = {{haloLeft}}  # ghost cells before the first point
HALO_RIGHT = {{haloRight}}  # ghost cells after the last point
MIN_POINTS = {{minPoints}}
WHOLE = 200_000  # up to here a sweep takes the array whole; beyond, in chunks that stay in cache
CHUNK = 16_384


def length(n):
    """Doubles in every array: n points and their ghost cells."""
    return n + HALO_LEFT + HALO_RIGHT


def check(n{{spacingArgument}}):
    """Raises ValueError where n or the spacing cannot be used; O(1)."""
    if n < MIN_POINTS:
        raise ValueError(f"n = {n} is too small; accepted: n >= {MIN_POINTS}")
{{#each spaced}}
    if not math.isfinite(h) or h <= 0.0:
        raise ValueError(f"h = {h}; accepted: a positive finite spacing")
{{/each}}


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; O(n), so not part of apply."""
    if not np.isfinite(u[HALO_LEFT : u.size - HALO_RIGHT]).all():
        raise ValueError("the state holds a NaN or an infinite value")


{{#each periodic}}
def fill_halo(u):
    """Ghost cells of a periodic row."""
    {{fillLines}}


{{/each}}
def _part(a, start, stop, offset):
    """View of points start ... stop - 1, shifted by offset."""
    return a[HALO_LEFT + start + offset : HALO_LEFT + stop + offset]


class Apply:
    """The stencil on prepared views of u and d; nothing is allocated when it is called.

    u, d: distinct contiguous float64 arrays of length(n). Fill the ghost cells of u before the call.
    """

    def __init__(self, u, d{{spacingArgument}}):
        for a in (u, d):
            if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != 1 or not a.flags.c_contiguous:
                raise ValueError("accepted: contiguous one-dimensional float64 arrays")
        if u.shape != d.shape:
            raise ValueError(f"shapes differ: {u.shape} and {d.shape}")
        if np.may_share_memory(u, d):
            raise ValueError("u and d overlap in memory; accepted: distinct arrays")
        n = u.size - HALO_LEFT - HALO_RIGHT
        check(n{{spacingArgument}})
        {{coefficients}}
        size = n if n <= WHOLE else CHUNK
        {{scratchLines}}
        self._parts = [
            (
                {{views}}
            )
            for a, b in ((a, min(a + size, n)) for a in range(0, n, size))
        ]

    def __call__(self):
        for {{names}} in self._parts:
            {{lines}}


def apply(u, d{{spacingArgument}}):
    """d from u, once. For many calls on the same arrays make an Apply and call it."""
    Apply(u, d{{spacingArgument}})()
