class Problem:
    """The periodic test problem u' = -lambda (u[i+1] - u[i-1])/2 + r (u[i+1] - 2 u[i] + u[i-1]), with dt = 1."""

    def __init__(self, tasks, numbers):
        if len(numbers) not in (1, 2):
            tasks.fail("accepted: one number (lambda) or two (lambda, r)")
        self.half = 0.5 * numbers[0]
        self.r = numbers[1] if len(numbers) == 2 else None
        # A number that is not finite is refused as a time step that is not.
        self.dt = 1.0 + sum(number - number for number in numbers)

    def __call__(self, t, u, out):
        right, left = np.roll(u, -1), np.roll(u, 1)
        out[:] = -(self.half * (right - left))
        if self.r is not None:
            out += self.r * ((right + left) - 2.0 * u)


def status_of(n, dt):
    """The status code that the compiled kernels return for these arguments."""
    try:
        kernel.check(n, 0.0, dt)
    except ValueError as error:
        return 1 if "too small" in str(error) else 2
    return 0


def answer(id, status, levels):
    sys.stdout.write(f"state {id} {status}\n")
    if status == 0:
        for u in levels:
            show(u)


def march(tasks, id, words):
    n, steps = tasks.whole(words[0]), tasks.whole(words[1] if len(words) > 1 else "")
    problem = Problem(tasks, [tasks.bits(word) for word in words[2:]])
    levels = [np.zeros(max(n, 0)) for _ in range(kernel.ARRAYS)]
    levels[-1][:] = tasks.points(n)
    status = status_of(n, problem.dt)
    if status == 0 and steps < 0:
        status = 1
    if status == 0:
        levels = kernel.run(steps, levels, 0.0, problem.dt, problem)
    answer(id, status, levels[-1:])


def start(tasks, id, words):
    tasks.fail("a one-step method has no start-up routine")


def pace(tasks, id, words):
    n, repeats = tasks.whole(words[0]), tasks.whole(words[1] if len(words) > 1 else "")
    problem = Problem(tasks, [tasks.bits(word) for word in words[2:]])
    if status_of(n, problem.dt) != 0:
        tasks.fail("the kernel refuses these arguments")
    levels = [np.zeros(n) for _ in range(kernel.ARRAYS)]
    levels[-1][:] = 1.0 + 0.01 * (np.arange(n) % 7)
    steps = 1 + 300_000 // n
    best = float("inf")
    for _ in range(repeats):
        begin = time.perf_counter()
        levels = kernel.run(steps, levels, 0.0, 1.0, problem)
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
        if len(words) < 3:
            tasks.fail("the task has no name or no n")
        verb, id, rest = words[0], words[1], words[2:]
        if verb in ("march", "run"):
            march(tasks, id, rest)
        elif verb == "start":
            start(tasks, id, rest)
        elif verb == "pace":
            pace(tasks, id, rest)
        else:
            tasks.fail("unknown task; accepted: march, run, start, pace, end")


if __name__ == "__main__":
    main()
