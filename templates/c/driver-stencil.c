ptrdiff_t {{prefix}}_length(ptrdiff_t n);
int {{prefix}}_check(ptrdiff_t n{{spacingParameter}});
{{#each periodic}}
void {{prefix}}_fill_halo(ptrdiff_t n, double *u);
{{/each}}
int {{prefix}}_apply(ptrdiff_t n{{spacingParameter}}, const double *restrict u, double *restrict d);

enum { LEFT = {{haloLeft}} };

{{#each caller}}
/* Ghost cells of a periodic row. */
static void fill(ptrdiff_t n, double *u)
{
    {{fillLines}}
}

{{/each}}
static void apply(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const double h = from_bits(word("the spacing is missing"));
    line_end();
    double *const u = new_array({{prefix}}_length(n > 0 ? n : 0));
    double *const d = new_array({{prefix}}_length(n > 0 ? n : 0));
    read_points(n, u + LEFT);
    int status = {{prefix}}_check(n{{spacingArgument}});
    if (status == 0) {
        {{fill}}
        status = {{prefix}}_apply(n{{spacingArgument}}, u, d);
    }
{{#each unused}}
    (void)h;
{{/each}}
    printf("state %s %d\n", id, status);
    if (status == 0)
        print_points(n, d + LEFT);
    free(u);
    free(d);
}

static void pace(const char *id)
{
    const ptrdiff_t n = whole("n is missing");
    const ptrdiff_t repeats = whole("the number of repeats is missing");
    const double h = 1.0;
    line_end();
    if ({{prefix}}_check(n{{spacingArgument}}) != 0)
        fail("the kernel refuses these arguments");
    double *u = new_array({{prefix}}_length(n));
    double *d = new_array({{prefix}}_length(n));
    for (ptrdiff_t i = 0; i < n; ++i)
        u[LEFT + i] = 1.0 + 0.01 * (double)(i % 7);
{{#each unused}}
    (void)h;
{{/each}}
    const ptrdiff_t sweeps = 1 + 4000000 / n;
    double best = 1e30;
    for (ptrdiff_t r = 0; r < repeats; ++r) {
        const double begin = seconds();
        for (ptrdiff_t k = 0; k < sweeps; ++k) {
            {{fill}}
            if ({{prefix}}_apply(n{{spacingArgument}}, u, d) != 0)
                fail("the kernel refuses these arguments");
        }
        const double each = (seconds() - begin) / (double)sweeps / (double)n;
        best = each < best ? each : best;
    }
    free(u);
    free(d);
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
        if (strcmp(verb, "apply") == 0)
            apply(id);
        else if (strcmp(verb, "pace") == 0)
            pace(id);
        else
            fail("unknown task; accepted: apply, pace, end");
    }
    fclose(tasks);
    return 0;
}
