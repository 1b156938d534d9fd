import math

import numpy as np

# Numbers of ghost cells before the first and after the last point, and the least number of points.
{{#each axes}}
HALO_{{AXIS}}_LEFT = {{left}}
HALO_{{AXIS}}_RIGHT = {{right}}
MIN_N{{AXIS}} = {{least}}
{{/each}}
LEVELS = {{levels}}  # time levels kept between steps
ARRAYS = {{arrays}}  # arrays of shape({{sizes}}), doubles
CHUNK = 24_576  # a sweep takes so many points at a time, in whole rows, so that they stay in cache


def shape({{sizes}}):
    """Shape of every array, points and ghost cells: x runs fastest and comes last."""
    return {{shape}}


def check({{checkArguments}}):
    """Raises ValueError where a size or a parameter cannot be used; O(1)."""
{{#each least}}
    if {{size}} < {{MIN}}:
        raise ValueError(f"{{size}} = {{value}} is too small; accepted: {{size}} >= {{{MIN}}}")
{{/each}}
{{#each refused}}
    if {{condition}}:
        raise ValueError({{message}})
{{/each}}
{{#each bounded}}
    if {{outside}}:
        raise ValueError({{message}})
{{/each}}


def check_state(u):
    """Raises ValueError where a point of u is not a finite number; as long as a sweep, so not part of a step."""
    if not np.isfinite(u[{{interior}}]).all():
        raise ValueError("the state holds a NaN or an infinite value")


{{#each periodic}}
def fill_halo(u):
    """Ghost cells of a periodic grid, those of the corners included."""
    {{fillLines}}


{{/each}}
def _points(arrays, count=ARRAYS):
    """Numbers of points of `count` distinct contiguous float64 arrays of one shape."""
    if len(arrays) != count:
        raise ValueError(f"{len(arrays)} arrays given; accepted: {count}")
    for k, a in enumerate(arrays):
        if not isinstance(a, np.ndarray) or a.dtype != np.float64 or a.ndim != {{dims}} or not a.flags.c_contiguous:
            raise ValueError("accepted: contiguous float64 arrays of {{dims}} dimensions")
        if a.shape != arrays[0].shape:
            raise ValueError(f"shapes differ: {a.shape} and {arrays[0].shape}")
        if any(np.may_share_memory(a, b) for b in arrays[:k]):
            raise ValueError("the arrays overlap in memory; accepted: distinct arrays")
    {{unpackShape}} = arrays[0].shape
    {{sizesFromShape}}
{{#each least}}
    if {{size}} < {{MIN}}:
        raise ValueError(f"{{size}} = {{value}} is too small; accepted: {{size}} >= {{{MIN}}}")
{{/each}}
    return {{sizes}}


def _span({{sizes}}):
    """Strides of neighbouring rows{{planesToo}}, and the flat range from the first point to the last."""
    row = nx + HALO_X_LEFT + HALO_X_RIGHT
    {{planeStride}}
    first = {{first}}
    last = {{last}}
    return {{strides}}, first, last


def _part(a, start, stop, shift):
    """Flat view of a from start to stop, shifted: whole rows, the ghost cells between them included."""
    return a.reshape(-1)[start + shift : stop + shift]


class Step:
    """One step of the scheme on prepared views; nothing is allocated when it is called.

{{#each classAbout}}
    {{line}}
{{/each}}
    """

    def __init__(self, {{initArguments}}):
        self.levels = list(levels)
        {{sizes}} = _points(self.levels)
        {{selfSizes}} = {{sizes}}
        {{initScalars}}
        {{strides}}, first, last = _span({{sizes}})
        size = max(1, CHUNK // row) * row
        parts = [(a, min(a + size, last)) for a in range(first, last, size)]
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

    def __call__(self):
{{#each turning}}
        for {{names}} in self._turns[self._turn]:
            {{lines}}
        self._turn = (self._turn + 1) % ARRAYS
        self.levels.append(self.levels.pop(0))
{{/each}}


{{#each start}}
def start({{startArguments}}):
    """Makes the missing levels in place.

{{#each about}}
    {{line}}
{{/each}}
    """
    {{sizes}} = _points(levels)
    check({{checkArguments}})
{{#each secondOrder}}
    if v.shape != levels[0].shape:
        raise ValueError(f"v has shape {v.shape}; accepted: {levels[0].shape}")
{{/each}}
    work = np.zeros_like(levels[0])
    {{coefficients}}

    {{strides}}, first, last = _span({{sizes}})

    def at(a, shift):
        return _part(a, first, last, shift)

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
