#include <math.h>
#include <stddef.h>
#include <string.h>

/* Numbers of ghost cells before the first and after the last point, and the least number of points. */
enum {
{{#each axes}}
    {{PREFIX}}_HALO_{{AXIS}}_LEFT = {{left}},
    {{PREFIX}}_HALO_{{AXIS}}_RIGHT = {{right}},
    {{PREFIX}}_MIN_N{{AXIS}} = {{least}},
{{/each}}
    {{PREFIX}}_LEVELS = {{levels}},  /* time levels kept between steps */
    {{PREFIX}}_ARRAYS = {{arrays}}   /* arrays of {{prefix}}_length({{sizes}}) doubles */
};

enum {
    {{PREFIX}}_OK = 0,
    {{PREFIX}}_BAD_SIZE = 1,       /* a size too small for the halo, or a negative number of steps */
    {{PREFIX}}_BAD_PARAMETER = 2,  /* {{parameterWords}} not a finite number{{divisorWords}} */
    {{PREFIX}}_OUTSIDE_BOUND = 3,  /* {{boundWords}} */
    {{PREFIX}}_NULL_POINTER = 4,
    {{PREFIX}}_NAN_IN_STATE = 5
};

{{#each caller}}
/* Fills the ghost cells of u; context is what the caller of run or start passed. */
typedef void {{prefix}}_fill({{sizeParameters}}, double *u, void *context);

{{/each}}
{{declarations}}

/* Doubles in every array: the points and their ghost cells. */
ptrdiff_t {{prefix}}_length({{sizeParameters}})
{
    return {{lengths}};
}

/* Status of the arguments; O(1). */
int {{prefix}}_check({{checkParameters}})
{
    if ({{tooSmall}})
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

/* Whether the points of u are finite numbers; as long as a sweep, so not part of a step. */
int {{prefix}}_check_state({{sizeParameters}}, const double *u)
{
    if (!u)
        return {{PREFIX}}_NULL_POINTER;
    {{rowStrides}}
    {{stateLoops}}
    return {{PREFIX}}_OK;
}

{{#each periodic}}
/* Ghost cells of a periodic grid, those of the corners included. */
void {{prefix}}_fill_halo({{sizeParameters}}, double *u)
{
    {{rowStrides}}
    {{fillLines}}
}

{{/each}}
{{#each rows}}
/* One row of n points. */
{{rowSignature}}
{
    for (ptrdiff_t i = 0; i < n; ++i)
        {{rowBody}}
}

/* {{about}} */
{{signature}}
{
    {{coefficients}}
    {{strides}}
    {{loops}}
}

{{/each}}
{{#each start}}
{{rowSignature}}
{
    for (ptrdiff_t i = 0; i < n; ++i)
        {{rowBody}}
}

/* w = {{seriesWords}}: one term of the Taylor series in time. */
{{signature}}
{
    {{coefficients}}
    {{strides}}
    {{loops}}
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
