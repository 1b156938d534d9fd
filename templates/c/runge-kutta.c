#include <math.h>
#include <stddef.h>

enum { {{PREFIX}}_ARRAYS = {{arrays}} };  /* arrays of n doubles: work space, then u */

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
void {{prefix}}_step(ptrdiff_t n, double t, double dt, double *u, {{workParameters}},
    {{prefix}}_rhs *rhs, void *context);
int {{prefix}}_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *const level[{{arrays}}],
    {{prefix}}_rhs *rhs, void *context);

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
/* One step from t to t + dt: u is advanced in place. */
void {{prefix}}_step(ptrdiff_t n, double t, double dt, double *u, {{workParameters}},
    {{prefix}}_rhs *rhs, void *context)
{
    {{coefficients}}
    {{calls}}
}

/* nsteps steps. The last array is u, advanced in place; the others are work space. */
int {{prefix}}_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *const level[{{arrays}}],
    {{prefix}}_rhs *rhs, void *context)
{
    const int status = {{prefix}}_check(n, t, dt);
    if (status != {{PREFIX}}_OK)
        return status;
    if (nsteps < 0)
        return {{PREFIX}}_BAD_SIZE;
    if (!level || !rhs)
        return {{PREFIX}}_NULL_POINTER;
    for (int k = 0; k < {{PREFIX}}_ARRAYS; ++k)
        if (!level[k])
            return {{PREFIX}}_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step)
        {{prefix}}_step(n, t + (double)step * dt, dt, level[{{newest}}], {{workArguments}}, rhs, context);
    return {{PREFIX}}_OK;
}
