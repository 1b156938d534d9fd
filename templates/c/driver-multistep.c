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
void {{prefix}}_rotate(int count, double *array[]);
{{#each starting}}
int {{prefix}}_start(ptrdiff_t n, double t, double dt, double *level[{{levels}}], double *slope[{{slopes}}],
    double *const work[], {{prefix}}_rhs *rhs, void *context);
{{/each}}
int {{prefix}}_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *level[{{levels}}],
    double *slope[{{slopes}}], {{prefix}}_rhs *rhs, void *context);

enum { STEPS = {{steps}}, LEVELS = {{levels}}, SLOPES = {{slopes}}, WORK = {{startWork}} };

static double *level[LEVELS];
static double *slope[SLOPES];
/* The last STEPS levels, the oldest first, for the answer. */
static double *kept[STEPS];

static void new_arrays(ptrdiff_t n)
{
    for (int k = 0; k < LEVELS; ++k)
        level[k] = new_array(n);
    for (int k = 0; k < SLOPES; ++k)
        slope[k] = new_array(n);
    for (int k = 0; k < STEPS; ++k)
        kept[k] = new_array(n);
}

static void free_arrays(void)
{
    for (int k = 0; k < LEVELS; ++k)
        free(level[k]);
    for (int k = 0; k < SLOPES; ++k)
        free(slope[k]);
    for (int k = 0; k < STEPS; ++k)
        free(kept[k]);
}

static void keep(ptrdiff_t n)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        kept[0][i] = level[LEVELS - 1][i];
    {{prefix}}_rotate(STEPS, kept);
}

static void answer(const char *id, ptrdiff_t n, int status)
{
    printf("state %s %d\n", id, status);
    if (status == 0)
        for (int k = 0; k < STEPS; ++k)
            print_points(n, kept[k]);
}

static void march(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t steps = whole("the number of steps is missing");
    read_numbers();
    new_arrays(n);
    for (int k = 0; k < STEPS; ++k) {
        read_points(n, level[0]);
        {{prefix}}_rotate(LEVELS, level);
        keep(n);
        if (k < STEPS - 1) {
            problem(n, 0.0, level[LEVELS - 1], slope[0], NULL);
            {{prefix}}_rotate(SLOPES, slope);
        }
    }
    int status = {{prefix}}_check(n, 0.0, time_step());
    for (ptrdiff_t step = 0; step < steps && status == 0; ++step) {
        status = {{prefix}}_run(1, n, (double)step, 1.0, level, slope, problem, NULL);
        keep(n);
    }
    answer(id, n, status);
    free_arrays();
}

static void start(const char *id)
{
{{#each starting}}
    const ptrdiff_t n = whole("n is missing");
    read_numbers();
    new_arrays(n);
    double *work[WORK];
    for (int k = 0; k < WORK; ++k)
        work[k] = new_array(n);
    read_points(n, level[LEVELS - 1]);
    keep(n);
    int status = {{prefix}}_check(n, 0.0, time_step());
    for (int k = 0; k < STEPS - 1 && status == 0; ++k) {
        status = {{prefix}}_start(n, (double)k, 1.0, level, slope, work, problem, NULL);
        keep(n);
    }
    answer(id, n, status);
    for (int k = 0; k < WORK; ++k)
        free(work[k]);
    free_arrays();
{{/each}}
{{#each startless}}
    (void)id;
    fail("this method has no start-up routine");
{{/each}}
}

static void pace(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t repeats = whole("the number of repeats is missing");
    read_numbers();
    if ({{prefix}}_check(n, 0.0, time_step()) != 0)
        fail("the kernel refuses these arguments");
    new_arrays(n);
    for (int k = 0; k < LEVELS; ++k)
        for (ptrdiff_t i = 0; i < n; ++i)
            level[k][i] = 1.0 + 0.01 * (double)(i % 7);
    const ptrdiff_t steps = 1 + 1000000 / n;
    double best = 1e30;
    for (ptrdiff_t r = 0; r < repeats; ++r) {
        const double begin = seconds();
        if ({{prefix}}_run(steps, n, 0.0, 1.0, level, slope, problem, NULL) != 0)
            fail("the kernel refuses these arguments");
        const double each = (seconds() - begin) / (double)steps / (double)n;
        best = each < best ? each : best;
    }
    free_arrays();
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
