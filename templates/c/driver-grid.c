{{#each caller}}
typedef void {{prefix}}_fill({{sizeParameters}}, double *u, void *context);
{{/each}}
{{declarations}}

enum { ARRAYS = {{arrays}}, LEVELS = {{levels}}, OUTSIDE_BOUND = 3 };
enum {
    X_LEFT = {{xLeft}},
    X_RIGHT = {{xRight}},
    Y_LEFT = {{yLeft}},
    Y_RIGHT = {{yRight}},
    Z_LEFT = {{zLeft}},
    Z_RIGHT = {{zRight}}
};

static ptrdiff_t nx, ny, nz;

static double *level[ARRAYS];
{{#each parameters}}
static double {{name}};
{{/each}}
{{#each caller}}
static void *const context = NULL;

/* Ghost cells of a periodic grid, those of the corners included. */
static void fill({{sizeParameters}}, double *u, void *unused)
{
    (void)unused;
    {{rowStrides}}
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

static void read_sizes(void)
{
    {{readSizes}}
{{#each flat}}
    nz = 1;
{{/each}}
}

static double *new_field(void)
{
    const int usable = nx > 0 && ny > 0 && nz > 0;
    return new_array(usable ? {{prefix}}_length({{sizes}}) : 0);
}

static void new_levels(void)
{
    for (int k = 0; k < ARRAYS; ++k)
        level[k] = new_field();
}

/* Place of the first point of row j in plane k. */
static ptrdiff_t row_start(ptrdiff_t j, ptrdiff_t k)
{
    return ((k + Z_LEFT)*(ny + Y_LEFT + Y_RIGHT) + j + Y_LEFT)*(nx + X_LEFT + X_RIGHT) + X_LEFT;
}

static void read_field(double *u)
{
    for (ptrdiff_t k = 0; k < nz; ++k)
        for (ptrdiff_t j = 0; j < ny; ++j)
            read_points(nx, u + row_start(j, k));
}

static void free_levels(void)
{
    for (int k = 0; k < ARRAYS; ++k)
        free(level[k]);
}

static void answer(const char *id, int status, int advanced)
{
    printf("state %s %d\n", id, status);
    if (advanced)
        for (int l = ARRAYS - LEVELS; l < ARRAYS; ++l)
            for (ptrdiff_t k = 0; k < nz; ++k)
                for (ptrdiff_t j = 0; j < ny; ++j)
                    print_points(nx, level[l] + row_start(j, k));
}

/* Step by step, also outside the stable range. */
static void advance(ptrdiff_t steps)
{
    {{before}}
    for (ptrdiff_t step = 0; step < steps; ++step) {
        {{advance}}
    }
}

static void march(const char *id, int checked)
{
    read_sizes();
    const ptrdiff_t steps = whole("the number of steps is missing");
    read_parameters();
    new_levels();
    for (int k = ARRAYS - LEVELS; k < ARRAYS; ++k)
        read_field(level[k]);
    if (checked) {
        const int status = {{prefix}}_run(steps, {{checkArguments}}, level{{fillArguments}});
        answer(id, status, status == 0);
    } else {
        const int status = {{prefix}}_check({{checkArguments}});
        const int usable = status == 0 || status == OUTSIDE_BOUND;
        if (usable)
            advance(steps);
        answer(id, status, usable);
    }
    free_levels();
}

static void start(const char *id)
{
{{#each start}}
    read_sizes();
    read_parameters();
    new_levels();
    double *const work = new_field();
    read_field(level[ARRAYS - LEVELS]);
{{#each second}}
    double *const v = new_field();
    read_field(v);
{{/each}}
    const int status = {{prefix}}_start({{arguments}});
    answer(id, status, status == 0);
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
    read_sizes();
    const ptrdiff_t repeats = whole("the number of repeats is missing");
    read_parameters();
    const int status = {{prefix}}_check({{checkArguments}});
    if (status != 0 && status != OUTSIDE_BOUND)
        fail("the kernel refuses these arguments");
    new_levels();
    const ptrdiff_t n = nx * ny * nz;
    for (int l = 0; l < ARRAYS; ++l)
        for (ptrdiff_t k = 0; k < nz; ++k)
            for (ptrdiff_t j = 0; j < ny; ++j)
                for (ptrdiff_t i = 0; i < nx; ++i)
                    level[l][row_start(j, k) + i] = 1.0 + 0.01 * (double)(i % 7);
    const ptrdiff_t steps = 1 + 4000000 / n;
    double best = 1e30;
    for (ptrdiff_t r = 0; r < repeats; ++r) {
        const double begin = seconds();
        advance(steps);
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
