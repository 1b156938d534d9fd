import math

import numpy as np

HALO_LEFT = {{haloLeft}}  # ghost cells before the first point
HALO_RIGHT = {{haloRight}}  # ghost cells after the last point
MIN_POINTS = {{minPoints}}
LEVELS = {{levels}}  # time levels kept between steps
ARRAYS = {{arrays}}  # arrays of length(n) doubles
WHOLE = 200_000  # up to here a sweep takes the array whole; beyond, in chunks that stay in cache
CHUNK = 16_384


def length(n):
    """Doubles in every array: n points and their ghost cells."""
    return n + HALO_LEFT + HALO_RIGHT


def check({{checkArguments}}):
    """Raises ValueError where n or a parameter cannot be used; O(1)."""
    if n < MIN_POINTS:
        raise ValueError(f"n = {n} is too small; accepted: n >= {MIN_POINTS}")
{{#each refused}}
    if {{condition}}:
        raise ValueError({{message}})
{{/each}}
{{#each bounded}}
    if {{outside}}:
        raise ValueError({{message}})
{{/each}}


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; O(n), so not part of a step."""
    if not np.isfinite(u[HALO_LEFT : u.size - HALO_RIGHT]).all():
        raise ValueError("the state holds a NaN or an infinite value")


{{#each periodic}}
def fill_halo(u):
    """Ghost cells of a periodic row."""
    {{fillLines}}


{{/each}}
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

{{#each classAbout}}
    {{line}}
{{/each}}
    """

    def __init__(self, {{initArguments}}):
        self.levels = list(levels)
        self.n = n = _points(self.levels)
        {{initScalars}}
        size = n if n <= WHOLE else CHUNK
        parts = [(a, min(a + size, n)) for a in range(0, n, size)]
        {{scratchLines}}
{{#each turning}}
        self._turn = 0
        self._turns = []
        for _ in range(ARRAYS):
            {{unpack}} = self.levels
            self._turns.append(
                [
                    (
                        {{views}}
                    )
                    for a, b in parts
                ]
            )
            self.levels.append(self.levels.pop(0))
{{/each}}
{{#each staging}}
        {{unpack}} = self.levels
        {{keep}}
{{#each stages}}
        self._{{name}} = [
            (
                {{views}}
            )
            for a, b in parts
        ]
{{/each}}
{{/each}}

    def __call__(self):
{{#each turning}}
        for {{names}} in self._turns[self._turn]:
            {{lines}}
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))
{{/each}}
{{#each staging}}
{{#each stages}}
        {{fill}}
        for {{names}} in self._{{name}}:
            {{lines}}
{{/each}}
{{/each}}


{{#each start}}
def start({{startArguments}}):
    """Makes the missing levels in place.

{{#each about}}
    {{line}}
{{/each}}
    """
    n = _points(levels)
    check({{checkArguments}})
{{#each secondOrder}}
    if v.shape != levels[0].shape:
        raise ValueError(f"v has shape {v.shape}; accepted: {levels[0].shape}")
{{/each}}
    work = np.empty_like(levels[0])
    {{coefficients}}

    def at(a, offset):
        return _part(a, 0, n, offset)

{{#each firstOrder}}
    for k in range({{second}}, ARRAYS):
        u = levels[k - 1]
        {{fill_u}}
        y = u
        for m in range({{terms}}, 0, -1):
            w = levels[k] if m % 2 == 1 else work
            c = 1.0 / m
            at(w, 0)[:] = {{body}}
            {{fill_w}}
            y = w
{{/each}}
{{#each secondOrder}}
    u = levels[{{oldest}}]
    {{fill_u}}
    for k in range(1, LEVELS):
        y = u
        for m in range({{terms}}, 0, -1):
            w = levels[{{oldest}} + k] if m % 2 == 1 else work
            b = k / (2 * m - 1)
            c = (k * k) / ((2 * m - 1) * (2 * m))
            at(w, 0)[:] = {{body}}
            {{fill_w}}
            y = w
{{/each}}


{{/each}}
def run({{runArguments}}):
    """{{runFirst}}

{{#each runAbout}}
    {{line}}
{{/each}}
    """
    step = Step({{stepArguments}})
    check({{checkCall}})
    if nsteps < 0:
        raise ValueError(f"nsteps = {nsteps}; accepted: nsteps >= 0")
    {{runBefore}}
    for _ in range(nsteps):
        {{runBody}}
    return step.levels
