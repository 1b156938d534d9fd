SIZE, BOUND = 1, 3  # status codes of the compiled kernels


{{#each caller}}
def fill(u):
    """Ghost cells of a periodic grid, those of the corners included."""
    {{fillLines}}


{{/each}}
DIMS = {{dims}}


def interior(u):
    return u[{{interior}}]


def status_of(grid, parameters):
    """The status code that the compiled kernels return for these arguments."""
    try:
        kernel.check(*grid, *parameters)
    except ValueError as error:
        if "too small" in str(error):
            return SIZE
        return BOUND if "outside the stable range" in str(error) else 2
    return 0


def answer(id, status, levels, advanced):
    sys.stdout.write(f"state {id} {status}\n")
    if advanced:
        for u in levels[-kernel.LEVELS :]:
            show(interior(u).ravel())


def new_field(grid):
    return np.zeros(kernel.shape(*(max(n, 0) for n in grid)))


def new_levels(grid):
    return [new_field(grid) for _ in range(kernel.ARRAYS)]


def read_field(tasks, u):
    inside = interior(u)
    inside[...] = tasks.points(inside.size).reshape(inside.shape)


def advance(steps, levels, parameters):
    """Step by step, also outside the stable range."""
    step = kernel.Step(levels, *parameters{{stepFill}})
    {{before}}
    for _ in range(steps):
        {{advance}}
    return step.levels


def march(tasks, id, words, checked):
    if len(words) != DIMS + 1 + {{count}}:
        tasks.fail("accepted: march ID {{sizeWords}} STEPS and {{count}} parameters")
    *grid, steps = map(tasks.whole, words[: DIMS + 1])
    parameters = [tasks.bits(word) for word in words[DIMS + 1 :]]
    levels = new_levels(grid)
    for u in levels[-kernel.LEVELS :]:
        read_field(tasks, u)
    status = status_of(grid, parameters)
    if checked and status == 0 and steps < 0:
        status = SIZE
    usable = status == 0 or (status == BOUND and not checked)
    if usable and checked:
        levels = kernel.run(steps, levels, *parameters{{runFill}})
    elif usable:
        levels = advance(steps, levels, parameters)
    answer(id, status, levels, usable)


def start(tasks, id, words):
{{#each start}}
    if len(words) != DIMS + {{count}}:
        tasks.fail("accepted: start ID {{sizeWords}} and {{count}} parameters")
    grid = [tasks.whole(word) for word in words[:DIMS]]
    parameters = [tasks.bits(word) for word in words[DIMS:]]
    levels = new_levels(grid)
    read_field(tasks, levels[-kernel.LEVELS])
{{#each second}}
    v = new_field(grid)
    read_field(tasks, v)
{{/each}}
    status = status_of(grid, parameters)
    if status == 0:
        kernel.start(levels, *parameters{{startTail}})
    answer(id, status, levels, status == 0)
{{/each}}
{{#each startless}}
    tasks.fail("this scheme has no start-up routine")
{{/each}}


def pace(tasks, id, words):
    if len(words) != DIMS + 1 + {{count}}:
        tasks.fail("accepted: pace ID {{sizeWords}} REPEATS and {{count}} parameters")
    *grid, repeats = map(tasks.whole, words[: DIMS + 1])
    parameters = [tasks.bits(word) for word in words[DIMS + 1 :]]
    if status_of(grid, parameters) not in (0, BOUND):
        tasks.fail("the kernel refuses these arguments")
    levels = new_levels(grid)
    for u in levels:
        interior(u)[...] = 1.0 + 0.01 * (np.arange(grid[0]) % 7)
    n = interior(levels[0]).size
    steps = 1 + 1_000_000 // n
    best = float("inf")
    step = kernel.Step(levels, *parameters{{stepFill}})
    for _ in range(repeats):
        begin = time.perf_counter()
        for _ in range(steps):
            {{advance}}
        best = min(best, (time.perf_counter() - begin) / steps / n)
    sys.stdout.write(f"pace {id} {best:.9e} {triad(n, repeats):.9e}\n")


def main():
    if len(sys.argv) != 2:
        sys.exit("usage: driver TASKS")
    np.seterr(all="ignore")
    tasks = Tasks(sys.argv[1])
    while True:
        words = tasks.next()
        if not words:
            tasks.fail("expected a task")
        if words[0] == "end":
            return
        if len(words) < 2:
            tasks.fail("the task has no name")
        verb, id, rest = words[0], words[1], words[2:]
        if verb in ("march", "run"):
            march(tasks, id, rest, verb == "run")
        elif verb == "start":
            start(tasks, id, rest)
        elif verb == "pace":
            pace(tasks, id, rest)
        else:
            tasks.fail("unknown task; accepted: march, run, start, pace, end")


if __name__ == "__main__":
    main()
