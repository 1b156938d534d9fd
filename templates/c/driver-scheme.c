{{#each caller}}
typedef void {{prefix}}_fill(ptrdiff_t n, double *u, void *context);
{{/each}}
{{declarations}}

enum { ARRAYS = {{arrays}}, LEVELS = {{levels}}, LEFT = {{haloLeft}}, OUTSIDE_BOUND = 3 };

static double *level[ARRAYS];
{{#each parameters}}
static double {{name}};
{{/each}}
{{#each caller}}
static void *const context = NULL;

/* Ghost cells of a periodic row. */
static void fill(ptrdiff_t n, double *u, void *unused)
{
    (void)unused;
    {{fillLines}}
}
{{/each}}

static void read_parameters(void)
{
{{#each parameters}}
    {{name}} = from_bits(word("a parameter is missing"));
{{/each}}
    line_end();
}

static void new_levels(ptrdiff_t n)
{
    for (int k = 0; k < ARRAYS; ++k)
        level[k] = new_array({{prefix}}_length(n > 0 ? n : 0));
}

static void free_levels(void)
{
    for (int k = 0; k < ARRAYS; ++k)
        free(level[k]);
}

static void answer(const char *id, ptrdiff_t n, int status, int advanced)
{
    printf("state %s %d\n", id, status);
    if (advanced)
        for (int k = ARRAYS - LEVELS; k < ARRAYS; ++k)
            print_points(n, level[k] + LEFT);
}

/* Step by step, also outside the stable range. */
static void advance(ptrdiff_t steps, ptrdiff_t n)
{
    {{before}}
    for (ptrdiff_t step = 0; step < steps; ++step) {
        {{advance}}
    }
}

static void march(const char *id, int checked)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t steps = whole("the number of steps is missing");
    read_parameters();
    new_levels(n);
    for (int k = ARRAYS - LEVELS; k < ARRAYS; ++k)
        read_points(n, level[k] + LEFT);
    if (checked) {
        const int status = {{prefix}}_run(steps, {{checkArguments}}, level{{fillArguments}});
        answer(id, n, status, status == 0);
    } else {
        const int status = {{prefix}}_check({{checkArguments}});
        const int usable = status == 0 || status == OUTSIDE_BOUND;
        if (usable)
            advance(steps, n);
        answer(id, n, status, usable);
    }
    free_levels();
}

static void start(const char *id)
{
{{#each start}}
    const ptrdiff_t n = whole("n is missing");
    read_parameters();
    new_levels(n);
    double *const work = new_array({{prefix}}_length(n > 0 ? n : 0));
    read_points(n, level[ARRAYS - LEVELS] + LEFT);
{{#each second}}
    double *const v = new_array({{prefix}}_length(n > 0 ? n : 0));
    read_points(n, v + LEFT);
{{/each}}
    const int status = {{prefix}}_start({{arguments}});
    answer(id, n, status, status == 0);
    free(work);
{{#each second}}
    free(v);
{{/each}}
    free_levels();
{{/each}}
{{#each startless}}
    (void)id;
    fail("this scheme has no start-up routine");
{{/each}}
}

static void pace(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t repeats = whole("the number of repeats is missing");
    read_parameters();
    const int status = {{prefix}}_check({{checkArguments}});
    if (status != 0 && status != OUTSIDE_BOUND)
        fail("the kernel refuses these arguments");
    new_levels(n);
    for (int k = 0; k < ARRAYS; ++k)
        for (ptrdiff_t i = 0; i < n; ++i)
            level[k][LEFT + i] = 1.0 + 0.01 * (double)(i % 7);
    const ptrdiff_t steps = 1 + 4000000 / n;
    double best = 1e30;
    for (ptrdiff_t r = 0; r < repeats; ++r) {
        const double begin = seconds();
        advance(steps, n);
        const double each = (seconds() - begin) / (double)steps / (double)n;
        best = each < best ? each : best;
    }
    free_levels();
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
        if (strcmp(verb, "march") == 0)
            march(id, 0);
        else if (strcmp(verb, "run") == 0)
            march(id, 1);
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
