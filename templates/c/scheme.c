#include <math.h>
#include <stddef.h>

enum {
    {{PREFIX}}_HALO_LEFT = {{haloLeft}},   /* ghost cells before the first point */
    {{PREFIX}}_HALO_RIGHT = {{haloRight}},  /* ghost cells after the last point */
    {{PREFIX}}_MIN_POINTS = {{minPoints}},
    {{PREFIX}}_LEVELS = {{levels}},      /* time levels kept between steps */
    {{PREFIX}}_ARRAYS = {{arrays}}       /* arrays of {{prefix}}_length(n) doubles */
};

enum {
    {{PREFIX}}_OK = 0,
    {{PREFIX}}_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    {{PREFIX}}_BAD_PARAMETER = 2,  /* {{parameterWords}} not a finite number{{divisorWords}} */
    {{PREFIX}}_OUTSIDE_BOUND = 3,  /* {{boundWords}} */
    {{PREFIX}}_NULL_POINTER = 4,
    {{PREFIX}}_NAN_IN_STATE = 5
};

{{#each caller}}
/* Fills the ghost cells of u; context is what the caller of run or start passed. */
typedef void {{prefix}}_fill(ptrdiff_t n, double *u, void *context);

{{/each}}
{{declarations}}

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t {{prefix}}_length(ptrdiff_t n)
{
    return n + {{PREFIX}}_HALO_LEFT + {{PREFIX}}_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int {{prefix}}_check({{checkParameters}})
{
    if (n < {{PREFIX}}_MIN_POINTS)
        return {{PREFIX}}_BAD_SIZE;
{{#each refused}}
    if ({{condition}})
        return {{PREFIX}}_BAD_PARAMETER;
{{/each}}
{{#each bounded}}
    if ({{outside}})
        return {{PREFIX}}_OUTSIDE_BOUND;
{{/each}}
    return {{PREFIX}}_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int {{prefix}}_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return {{PREFIX}}_NULL_POINTER;
    for (ptrdiff_t i = {{PREFIX}}_HALO_LEFT; i < {{PREFIX}}_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return {{PREFIX}}_NAN_IN_STATE;
    return {{PREFIX}}_OK;
}

{{#each periodic}}
/* Ghost cells of a periodic row. */
void {{prefix}}_fill_halo(ptrdiff_t n, double *u)
{
    {{fillLines}}
}

{{/each}}
{{#each rows}}
{{#each notes}}
/* {{note}} */
{{/each}}
{{signature}}
{
    {{coefficients}}
    for (ptrdiff_t i = {{PREFIX}}_HALO_LEFT; i < {{PREFIX}}_HALO_LEFT + n; ++i){{open}}
        {{body}}
{{#each braces}}
    }
{{/each}}
}

{{/each}}
{{#each staged}}
/* One step: u holds level n before and level n+1 after. The stages fill the ghost cells of what they read. */
{{signature}}
{
    {{coefficients}}
    {{calls}}
}

{{/each}}
{{#each start}}
/* w = {{seriesWords}}: one term of the Taylor series in time. */
{{signature}}
{
    {{coefficients}}
    for (ptrdiff_t i = {{PREFIX}}_HALO_LEFT; i < {{PREFIX}}_HALO_LEFT + n; ++i)
        {{body}}
}

/*
{{#each about}}
 * {{line}}
{{/each}}
 */
int {{prefix}}_start({{parameters}})
{
    const int status = {{prefix}}_check({{checkArguments}});
    if (status != {{PREFIX}}_OK)
        return status;
    if (!level || !work{{alsoNull}})
        return {{PREFIX}}_NULL_POINTER;
    for (int k = 0; k < {{PREFIX}}_ARRAYS; ++k)
        if (!level[k])
            return {{PREFIX}}_NULL_POINTER;

{{#each firstOrder}}
    for (int k = {{second}}; k < {{PREFIX}}_ARRAYS; ++k) {
        double *const u = level[k - 1];
        {{fill_u}}
        const double *y = u;
        for (int m = {{terms}}; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[k] : work;
            {{prefix}}_taylor({{leading}}, 1.0 / m, u, y, w);
            {{fill_w}}
            y = w;
        }
    }
{{/each}}
{{#each secondOrder}}
    double *const u = level[{{oldest}}];
    {{fill_u}}
    for (int k = 1; k < {{PREFIX}}_LEVELS; ++k) {
        const double *y = u;
        for (int m = {{terms}}; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[{{oldest}} + k] : work;
            {{prefix}}_taylor({{leading}}, (double)k / (2 * m - 1), (double)(k * k) / ((2 * m - 1) * (2 * m)), u, v, y, w);
            {{fill_w}}
            y = w;
        }
    }
{{/each}}
    return {{PREFIX}}_OK;
}

{{/each}}
/*
{{#each runAbout}}
 * {{line}}
{{/each}}
 */
int {{prefix}}_run({{runParameters}})
{
    const int status = {{prefix}}_check({{checkArguments}});
    if (status != {{PREFIX}}_OK)
        return status;
    if (nsteps < 0)
        return {{PREFIX}}_BAD_SIZE;
    if (!level)
        return {{PREFIX}}_NULL_POINTER;
    for (int k = 0; k < {{PREFIX}}_ARRAYS; ++k)
        if (!level[k])
            return {{PREFIX}}_NULL_POINTER;

    {{runBefore}}
    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        {{runBody}}
    }
    return {{PREFIX}}_OK;
}
