#include <math.h>
#include <stddef.h>

enum {
    {{PREFIX}}_HALO_LEFT = {{haloLeft}},   /* ghost cells before the first point */
    {{PREFIX}}_HALO_RIGHT = {{haloRight}},  /* ghost cells after the last point */
    {{PREFIX}}_MIN_POINTS = {{minPoints}}
};

enum {
    {{PREFIX}}_OK = 0,
    {{PREFIX}}_BAD_SIZE = 1,       /* n too small for the halo */
    {{PREFIX}}_BAD_PARAMETER = 2,  /* the spacing is not a positive finite number */
    {{PREFIX}}_NULL_POINTER = 4,
    {{PREFIX}}_NAN_IN_STATE = 5
};

ptrdiff_t {{prefix}}_length(ptrdiff_t n);
int {{prefix}}_check(ptrdiff_t n{{spacingParameter}});
int {{prefix}}_check_state(ptrdiff_t n, const double *u);
{{#each periodicDeclaration}}
void {{prefix}}_fill_halo(ptrdiff_t n, double *u);
{{/each}}
int {{prefix}}_apply(ptrdiff_t n{{spacingParameter}}, const double *restrict u, double *restrict d);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t {{prefix}}_length(ptrdiff_t n)
{
    return n + {{PREFIX}}_HALO_LEFT + {{PREFIX}}_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int {{prefix}}_check(ptrdiff_t n{{spacingParameter}})
{
    if (n < {{PREFIX}}_MIN_POINTS)
        return {{PREFIX}}_BAD_SIZE;
{{#each spaced}}
    if (!isfinite(h) || h <= 0.0)
        return {{PREFIX}}_BAD_PARAMETER;
{{/each}}
    return {{PREFIX}}_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of apply. */
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
/* d from u, whose ghost cells are filled. */
int {{prefix}}_apply(ptrdiff_t n{{spacingParameter}}, const double *restrict u, double *restrict d)
{
    const int status = {{prefix}}_check(n{{spacingArgument}});
    if (status != {{PREFIX}}_OK)
        return status;
    if (!u || !d)
        return {{PREFIX}}_NULL_POINTER;

    {{coefficients}}
    for (ptrdiff_t i = {{PREFIX}}_HALO_LEFT; i < {{PREFIX}}_HALO_LEFT + n; ++i)
        {{body}}
    return {{PREFIX}}_OK;
}
