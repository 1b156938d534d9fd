SIZE, BOUND = 1, 3  # status codes of the compiled kernels


{{#each caller}}
def fill(u):
    """Ghost cells of a periodic row."""
    {{fillLines}}


{{/each}}
def interior(u, n):
    return u[kernel.HALO_LEFT : kernel.HALO_LEFT + n]


def status_of(n, parameters):
    """The status code that the compiled kernels return for these arguments."""
    try:
        kernel.check(n, *parameters)
    except ValueError as error:
        if "too small" in str(error):
            return SIZE
        return BOUND if "outside the stable range" in str(error) else 2
    return 0


def answer(id, n, status, levels, advanced):
    sys.stdout.write(f"state {id} {status}\n")
    if advanced:
        for u in levels[-kernel.LEVELS :]:
            show(interior(u, n))


def new_levels(n):
    return [np.zeros(kernel.length(max(n, 0))) for _ in range(kernel.ARRAYS)]


def advance(steps, n, levels, parameters):
    """Step by step, also outside the stable range."""
    step = kernel.Step(levels, *parameters{{stepFill}})
    {{before}}
    for _ in range(steps):
        {{advance}}
    return step.levels


def march(tasks, id, words, checked):
    if len(words) != 2 + {{count}}:
        tasks.fail("accepted: march ID N STEPS and {{count}} parameters")
    n, steps = tasks.whole(words[0]), tasks.whole(words[1])
    parameters = [tasks.bits(word) for word in words[2:]]
    levels = new_levels(n)
    for u in levels[-kernel.LEVELS :]:
        interior(u, max(n, 0))[:] = tasks.points(n)
    status = status_of(n, parameters)
    if checked and status == 0 and steps < 0:
        status = SIZE
    usable = status == 0 or (status == BOUND and not checked)
    if usable and checked:
        levels = kernel.run(steps, levels, *parameters{{runFill}})
    elif usable:
        levels = advance(steps, n, levels, parameters)
    answer(id, n, status, levels, usable)


def start(tasks, id, words):
{{#each start}}
    if len(words) != 1 + {{count}}:
        tasks.fail("accepted: start ID N and {{count}} parameters")
    n = tasks.whole(words[0])
    parameters = [tasks.bits(word) for word in words[1:]]
    levels = new_levels(n)
    interior(levels[-kernel.LEVELS], max(n, 0))[:] = tasks.points(n)
{{#each second}}
    v = np.zeros(kernel.length(max(n, 0)))
    interior(v, max(n, 0))[:] = tasks.points(n)
{{/each}}
    status = status_of(n, parameters)
    if status == 0:
        kernel.start(levels, *parameters{{startTail}})
    answer(id, n, status, levels, status == 0)
{{/each}}
{{#each startless}}
    tasks.fail("this scheme has no start-up routine")
{{/each}}


def pace(tasks, id, words):
    if len(words) != 2 + {{count}}:
        tasks.fail("accepted: pace ID N REPEATS and {{count}} parameters")
    n, repeats = tasks.whole(words[0]), tasks.whole(words[1])
    parameters = [tasks.bits(word) for word in words[2:]]
    if status_of(n, parameters) not in (0, BOUND):
        tasks.fail("the kernel refuses these arguments")
    levels = new_levels(n)
    for u in levels:
        interior(u, n)[:] = 1.0 + 0.01 * (np.arange(n) % 7)
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
