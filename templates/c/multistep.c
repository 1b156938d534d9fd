#include <math.h>
#include <stddef.h>

enum {
    {{PREFIX}}_STEPS = {{steps}},   /* k of a k-step method */
    {{PREFIX}}_LEVELS = {{levels}},  /* arrays of u, n doubles each, the oldest first */
    {{PREFIX}}_SLOPES = {{slopes}}   /* arrays of slopes, n doubles each, the oldest first */
};

enum {
    {{PREFIX}}_OK = 0,
    {{PREFIX}}_BAD_SIZE = 1,       /* n < 1, or a negative number of steps */
    {{PREFIX}}_BAD_PARAMETER = 2,  /* t or dt is not a finite number */
    {{PREFIX}}_NULL_POINTER = 4,
    {{PREFIX}}_NAN_IN_STATE = 5
};

/* f = du/dt at (t, u), n unknowns; context is what the caller passed. */
typedef void {{prefix}}_rhs(ptrdiff_t n, double t, const double *u, double *f, void *context);

int {{prefix}}_check(ptrdiff_t n, double t, double dt);
int {{prefix}}_check_state(ptrdiff_t n, const double *u);
void {{prefix}}_rotate(int count, double *array[]);
void {{prefix}}_step(ptrdiff_t n, double t, double dt, double *level[{{levels}}], double *slope[{{slopes}}],
    {{prefix}}_rhs *rhs, void *context);
{{#each startDeclaration}}
int {{prefix}}_start(ptrdiff_t n, double t, double dt, double *level[{{levels}}], double *slope[{{slopes}}],
    double *const work[], {{prefix}}_rhs *rhs, void *context);
{{/each}}
int {{prefix}}_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *level[{{levels}}],
    double *slope[{{slopes}}], {{prefix}}_rhs *rhs, void *context);

/* Status of the arguments; O(1). */
int {{prefix}}_check(ptrdiff_t n, double t, double dt)
{
    if (n < 1)
        return {{PREFIX}}_BAD_SIZE;
    if (!isfinite(t) || !isfinite(dt))
        return {{PREFIX}}_BAD_PARAMETER;
    return {{PREFIX}}_OK;
}

/* Whether the n values of u are finite numbers; O(n), so not part of a step. */
int {{prefix}}_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return {{PREFIX}}_NULL_POINTER;
    for (ptrdiff_t i = 0; i < n; ++i)
        if (!isfinite(u[i]))
            return {{PREFIX}}_NAN_IN_STATE;
    return {{PREFIX}}_OK;
}

static int {{prefix}}_pointers(double *const level[], double *const slope[])
{
    if (!level || !slope)
        return {{PREFIX}}_NULL_POINTER;
    for (int k = 0; k < {{PREFIX}}_LEVELS; ++k)
        if (!level[k])
            return {{PREFIX}}_NULL_POINTER;
    for (int k = 0; k < {{PREFIX}}_SLOPES; ++k)
        if (!slope[k])
            return {{PREFIX}}_NULL_POINTER;
    return {{PREFIX}}_OK;
}

/* Makes the first of `count` arrays the last. */
void {{prefix}}_rotate(int count, double *array[])
{
    double *const first = array[0];
    for (int k = 1; k < count; ++k)
        array[k - 1] = array[k];
    array[count - 1] = first;
}

{{#each rows}}
{{signature}}
{
    for (ptrdiff_t i = 0; i < n; ++i){{open}}
        {{body}}
{{#each braces}}
    }
{{/each}}
}
{{/each}}

/*
 * One step from t to t + dt. The slope at t takes the place of the oldest slope, the new level that of the oldest
 * level; both lists are rotated, the newest last.
 */
void {{prefix}}_step(ptrdiff_t n, double t, double dt, double *level[{{levels}}], double *slope[{{slopes}}],
    {{prefix}}_rhs *rhs, void *context)
{
    {{coefficients}}
    rhs(n, t, level[{{newest}}], slope[0], context);
    {{prefix}}_rotate({{PREFIX}}_SLOPES, slope);
    sum({{rowArguments}});
    {{prefix}}_rotate({{PREFIX}}_LEVELS, level);
}

{{#each starting}}
{{#each rows}}
{{signature}}
{
    for (ptrdiff_t i = 0; i < n; ++i){{open}}
        {{body}}
{{#each braces}}
    }
{{/each}}
}

{{/each}}
/*
 * One start-up step from t to t + dt: Runge-Kutta of order {{order}}, keeping its first slope. Call it
 * {{PREFIX}}_STEPS - 1 times before the first step; the initial level is the last of level[]. work: {{work}} arrays of n doubles.
 */
int {{prefix}}_start(ptrdiff_t n, double t, double dt, double *level[{{levels}}], double *slope[{{slopes}}],
    double *const work[], {{prefix}}_rhs *rhs, void *context)
{
    const int status = {{prefix}}_check(n, t, dt);
    if (status != {{PREFIX}}_OK)
        return status;
    if ({{prefix}}_pointers(level, slope) != {{PREFIX}}_OK || !work || !rhs)
        return {{PREFIX}}_NULL_POINTER;
    for (int k = 0; k < {{work}}; ++k)
        if (!work[k])
            return {{PREFIX}}_NULL_POINTER;

    {{arrays}}
    {{coefficients}}
    rhs(n, t, u, f, context);
    {{calls}}
    {{prefix}}_rotate({{PREFIX}}_SLOPES, slope);
    {{prefix}}_rotate({{PREFIX}}_LEVELS, level);
    return {{PREFIX}}_OK;
}

{{/each}}
/* nsteps steps from levels and slopes that are complete. On return the newest level is the last of level[]. */
int {{prefix}}_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *level[{{levels}}],
    double *slope[{{slopes}}], {{prefix}}_rhs *rhs, void *context)
{
    const int status = {{prefix}}_check(n, t, dt);
    if (status != {{PREFIX}}_OK)
        return status;
    if (nsteps < 0)
        return {{PREFIX}}_BAD_SIZE;
    if ({{prefix}}_pointers(level, slope) != {{PREFIX}}_OK || !rhs)
        return {{PREFIX}}_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step)
        {{prefix}}_step(n, t + (double)step * dt, dt, level, slope, rhs, context);
    return {{PREFIX}}_OK;
}
