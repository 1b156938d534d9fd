typedef void {{prefix}}_rhs(ptrdiff_t n, double t, const double *u, double *f, void *context);

/* The periodic test problem u' = -lambda (u_(i+1) - u_(i-1)) / 2 + r (u_(i+1) - 2 u_i + u_(i-1)), with dt = 1. */
static double numbers[2];
static int number_count;

static void problem(ptrdiff_t n, double t, const double *u, double *f, void *context)
{
    const double half = 0.5 * numbers[0];
    const double r = numbers[1];
    (void)t;
    (void)context;
    for (ptrdiff_t i = 0; i < n; ++i) {
        const double left = u[i == 0 ? n - 1 : i - 1];
        const double right = u[i == n - 1 ? 0 : i + 1];
        f[i] = -(half * (right - left));
        if (number_count == 2)
            f[i] = f[i] + r * ((right + left) - 2.0 * u[i]);
    }
}

static void read_numbers(void)
{
    numbers[0] = from_bits(word("accepted: one number (lambda) or two (lambda, r)"));
    numbers[1] = 0.0;
    number_count = 1;
    const char *const second = strtok(NULL, " \t\r\n");
    if (second) {
        numbers[1] = from_bits(second);
        number_count = 2;
        line_end();
    }
}

/* A number of the problem that is not finite is refused as a time step that is not. */
static double time_step(void)
{
    return numbers[0] - numbers[0] + (numbers[1] - numbers[1]) + 1.0;
}

int {{prefix}}_check(ptrdiff_t n, double t, double dt);
int {{prefix}}_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *const level[{{arrays}}],
    {{prefix}}_rhs *rhs, void *context);

enum { ARRAYS = {{arrays}} };

static double *level[ARRAYS];

static void march(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t steps = whole("the number of steps is missing");
    read_numbers();
    for (int k = 0; k < ARRAYS; ++k)
        level[k] = new_array(n);
    read_points(n, level[ARRAYS - 1]);
    const int status = {{prefix}}_run(steps, n, 0.0, time_step(), level, problem, NULL);
    printf("state %s %d\n", id, status);
    if (status == 0)
        print_points(n, level[ARRAYS - 1]);
    for (int k = 0; k < ARRAYS; ++k)
        free(level[k]);
}

static _Noreturn void start(const char *id)
{
    (void)id;
    fail("a one-step method has no start-up routine");
}

static void pace(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t repeats = whole("the number of repeats is missing");
    read_numbers();
    if ({{prefix}}_check(n, 0.0, time_step()) != 0)
        fail("the kernel refuses these arguments");
    for (int k = 0; k < ARRAYS; ++k)
        level[k] = new_array(n);
    for (ptrdiff_t i = 0; i < n; ++i)
        level[ARRAYS - 1][i] = 1.0 + 0.01 * (double)(i % 7);
    const ptrdiff_t steps = 1 + 1000000 / n;
    double best = 1e30;
    for (ptrdiff_t r = 0; r < repeats; ++r) {
        const double begin = seconds();
        if ({{prefix}}_run(steps, n, 0.0, 1.0, level, problem, NULL) != 0)
            fail("the kernel refuses these arguments");
        const double each = (seconds() - begin) / (double)steps / (double)n;
        best = each < best ? each : best;
    }
    for (int k = 0; k < ARRAYS; ++k)
        free(level[k]);
    printf("pace %s %.9e %.9e\n", id, best, triad(n, repeats));
}

int main(int argc, char **argv)
{
    open_tasks(argc, argv);
    for (;;) {
        char id[256];
        char verb[16];
        const char *const first = strtok(next_line(), " \t\r\n");
        if (!first || strlen(first) >= sizeof verb)
            fail("expected a task");
        strcpy(verb, first);
        if (strcmp(verb, "end") == 0)
            break;
        const char *const name = word("the task has no name");
        if (strlen(name) >= sizeof id)
            fail("the name is too long");
        strcpy(id, name);
        if (strcmp(verb, "march") == 0 || strcmp(verb, "run") == 0)
            march(id);
        else if (strcmp(verb, "start") == 0)
            start(id);
        else if (strcmp(verb, "pace") == 0)
            pace(id);
        else
            fail("unknown task; accepted: march, run, start, pace, end");
    }
    fclose(tasks);
    return 0;
}
