{{#each caller}}
def fill(u):
    """Ghost cells of a periodic row."""
    {{fillLines}}


{{/each}}
def interior(u, n):
    return u[kernel.HALO_LEFT : kernel.HALO_LEFT + n]


def status_of(n, h):
    """The status code that the compiled kernels return for these arguments."""
    try:
        {{checked}}
    except ValueError as error:
        return 1 if "too small" in str(error) else 2
    return 0


def apply(tasks, id, words):
    if len(words) != 2:
        tasks.fail("accepted: apply ID N SPACING")
    n, h = tasks.whole(words[0]), tasks.bits(words[1])
    u, d = np.zeros(kernel.length(max(n, 0))), np.zeros(kernel.length(max(n, 0)))
    interior(u, max(n, 0))[:] = tasks.points(n)
    status = status_of(n, h)
    sys.stdout.write(f"state {id} {status}\n")
    if status == 0:
        {{fill}}
        kernel.apply(u, d{{spacingArgument}})
        show(interior(d, n))


def pace(tasks, id, words):
    if len(words) != 2:
        tasks.fail("accepted: pace ID N REPEATS")
    n, repeats, h = tasks.whole(words[0]), tasks.whole(words[1]), 1.0
    if status_of(n, h) != 0:
        tasks.fail("the kernel refuses these arguments")
    u, d = np.zeros(kernel.length(n)), np.zeros(kernel.length(n))
    interior(u, n)[:] = h + 0.01 * (np.arange(n) % 7)
    sweeps = 1 + 1_000_000 // n
    step = kernel.Apply(u, d{{spacingArgument}})
    best = float("inf")
    for _ in range(repeats):
        begin = time.perf_counter()
        for _ in range(sweeps):
            {{fill}}
            step()
        best = min(best, (time.perf_counter() - begin) / sweeps / n)
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
        if verb == "apply":
            apply(tasks, id, rest)
        elif verb == "pace":
            pace(tasks, id, rest)
        else:
            tasks.fail("unknown task; accepted: apply, pace, end")


if __name__ == "__main__":
    main()
