/* Driver of {{file}} for a trial: reads tasks from the file named by its first argument, answers on standard output. */
#include <errno.h>
#include <inttypes.h>
#include <stddef.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <time.h>

static FILE *tasks;
static char line[4096];
static long line_number;

static _Noreturn void fail(const char *what)
{
    fprintf(stderr, "line %ld of the tasks: %s\n", line_number, what);
    exit(2);
}

static char *next_line(void)
{
    ++line_number;
    if (!fgets(line, sizeof line, tasks))
        fail("the file ends before 'end'");
    if (!strchr(line, '\n') && !feof(tasks))
        fail("the line is too long");
    return line;
}

static char *word(const char *what)
{
    char *const found = strtok(NULL, " \t\r\n");
    if (!found)
        fail(what);
    return found;
}

static ptrdiff_t whole(const char *what)
{
    char *end;
    const char *const text = word(what);
    errno = 0;
    const long long value = strtoll(text, &end, 10);
    if (*end != '\0' || errno != 0)
        fail(what);
    return (ptrdiff_t)value;
}

/* A double from the 16 hexadecimal digits of its bits. */
static double from_bits(const char *text)
{
    if (!text || strlen(text) != 16 || strspn(text, "0123456789abcdefABCDEF") != 16)
        fail("expected the 16 hexadecimal digits of a double");
    const uint64_t bits = strtoull(text, NULL, 16);
    double value;
    memcpy(&value, &bits, sizeof value);
    return value;
}

static void line_end(void)
{
    if (strtok(NULL, " \t\r\n"))
        fail("there are more words than this task has");
}

static void read_points(ptrdiff_t n, double *u)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        u[i] = from_bits(strtok(next_line(), " \t\r\n"));
}

static void print_points(ptrdiff_t n, const double *u)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        uint64_t bits;
        memcpy(&bits, &u[i], sizeof bits);
        printf("%016" PRIx64 "\n", bits);
    }
}

static double *new_array(ptrdiff_t length)
{
    double *const a = calloc(length > 0 ? (size_t)length : 1, sizeof *a);
    if (!a)
        fail("there is not enough memory");
    return a;
}

static double seconds(void)
{
    struct timespec now;
    timespec_get(&now, TIME_UTC);
    return (double)now.tv_sec + 1e-9 * (double)now.tv_nsec;
}

/* Best rate of an own triad a = b + s c on arrays of n doubles, in bytes a second; the store counts twice. */
static double triad(ptrdiff_t n, ptrdiff_t repeats)
{
    double *a = new_array(n), *const b = new_array(n), *c = new_array(n);
    const ptrdiff_t sweeps = 1 + 4000000 / n;
    double best = 1e30;
    for (ptrdiff_t i = 0; i < n; ++i)
        b[i] = 1.0;
    for (ptrdiff_t r = 0; r < repeats; ++r) {
        const double begin = seconds();
        for (ptrdiff_t k = 0; k < sweeps; ++k) {
            double *const restrict out = a;
            for (ptrdiff_t i = 0; i < n; ++i)
                out[i] = b[i] + 0.5 * c[i];
            double *const other = a;
            a = c;
            c = other;
        }
        const double each = (seconds() - begin) / (double)sweeps;
        best = each < best ? each : best;
    }
    const double rate = 32.0 * (double)n / best;
    free(a);
    free(b);
    free(c);
    return rate;
}

static void open_tasks(int argc, char **argv)
{
    if (argc != 2) {
        fprintf(stderr, "usage: %s TASKS\n", argc > 0 ? argv[0] : "driver");
        exit(2);
    }
    tasks = fopen(argv[1], "r");
    if (!tasks) {
        fprintf(stderr, "%s: cannot be read\n", argv[1]);
        exit(2);
    }
}

