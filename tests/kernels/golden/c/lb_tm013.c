/* TM 013 r2   order 3; stable on the imaginary axis to 0.723627   no halo */
/* levelbook:adams-bashforth-3/2/c/double,periodic:b15435a17bf4c87413930f57bea4fbb0022db6109d2a3f9a498e6896a36595fb */
/*
 * Entry       TM 013, revision 2: Adams-Bashforth 3 (double precision).
 * Equation    u' = f(t, u) for n unknowns; dt of either sign.
 * Formula     f = f(t, u); u = u + b0*f - b1*f1 + b2*f2
 *             with b0 = (23.0/12.0)*dt, b1 = (4.0/3.0)*dt, b2 = (5.0/12.0)*dt
 * Order       3 on linear problems, 3 on nonlinear ones.
 * Stable      dt times the eigenvalues of f within: imaginary axis 12*sqrt(11)/55 = 0.723627,
 *             negative real axis 6/11 = 0.545455.
 * Callback    rhs(n, t, u, f, context) writes f = du/dt at (t, u); context is handed through.
 * Storage     1 level of u and 3 slopes, n doubles each, the oldest first; rotated after each
 *             step, the oldest overwritten.
 * Start-up    call start 2 times before the first step, with t advancing by dt: one
 *             Runge-Kutta step of order 4 that also keeps its slope.
 * Calling     status = lb_tm013_run(nsteps, n, t, dt, level, slope, rhs, context);
 *             The eigenvalues are the caller's, so that no bound is checked here.
 * Bitwise     C, Fortran and Python agree bit for bit when built with -ffp-contract=off (as
 *             here: -std=c11 -O3 -march=native -ffp-contract=off). Contraction to fused
 *             multiply-add, -Ofast and -ffast-math break it.
 * Cautions    Von Neumann analysis holds for constant coefficients on periodic or infinite
 *             domains; with boundaries, variable coefficients or nonlinear terms it is
 *             necessary but not always sufficient.
 *             A passed trial is evidence for this kernel, not for the code that calls it.
 *             Where results bear on safety, verification and validation under the applicable
 *             codes and by licensed practice remain with the user.
 * References  A reference, Journal 1 (1970) 1-2.
 * Licence     office internal.
 * Generator   release 1.0.0. Generated; change the entry, not this file.
 */
#include <math.h>
#include <stddef.h>

enum {
    LB_TM013_STEPS = 3,   /* k of a k-step method */
    LB_TM013_LEVELS = 1,  /* arrays of u, n doubles each, the oldest first */
    LB_TM013_SLOPES = 3   /* arrays of slopes, n doubles each, the oldest first */
};

enum {
    LB_TM013_OK = 0,
    LB_TM013_BAD_SIZE = 1,       /* n < 1, or a negative number of steps */
    LB_TM013_BAD_PARAMETER = 2,  /* t or dt is not a finite number */
    LB_TM013_NULL_POINTER = 4,
    LB_TM013_NAN_IN_STATE = 5
};

/* f = du/dt at (t, u), n unknowns; context is what the caller passed. */
typedef void lb_tm013_rhs(ptrdiff_t n, double t, const double *u, double *f, void *context);

int lb_tm013_check(ptrdiff_t n, double t, double dt);
int lb_tm013_check_state(ptrdiff_t n, const double *u);
void lb_tm013_rotate(int count, double *array[]);
void lb_tm013_step(ptrdiff_t n, double t, double dt, double *level[1], double *slope[3],
    lb_tm013_rhs *rhs, void *context);
int lb_tm013_start(ptrdiff_t n, double t, double dt, double *level[1], double *slope[3],
    double *const work[], lb_tm013_rhs *rhs, void *context);
int lb_tm013_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *level[1],
    double *slope[3], lb_tm013_rhs *rhs, void *context);

/* Status of the arguments; O(1). */
int lb_tm013_check(ptrdiff_t n, double t, double dt)
{
    if (n < 1)
        return LB_TM013_BAD_SIZE;
    if (!isfinite(t) || !isfinite(dt))
        return LB_TM013_BAD_PARAMETER;
    return LB_TM013_OK;
}

/* Whether the n values of u are finite numbers; O(n), so not part of a step. */
int lb_tm013_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_TM013_NULL_POINTER;
    for (ptrdiff_t i = 0; i < n; ++i)
        if (!isfinite(u[i]))
            return LB_TM013_NAN_IN_STATE;
    return LB_TM013_OK;
}

static int lb_tm013_pointers(double *const level[], double *const slope[])
{
    if (!level || !slope)
        return LB_TM013_NULL_POINTER;
    for (int k = 0; k < LB_TM013_LEVELS; ++k)
        if (!level[k])
            return LB_TM013_NULL_POINTER;
    for (int k = 0; k < LB_TM013_SLOPES; ++k)
        if (!slope[k])
            return LB_TM013_NULL_POINTER;
    return LB_TM013_OK;
}

/* Makes the first of `count` arrays the last. */
void lb_tm013_rotate(int count, double *array[])
{
    double *const first = array[0];
    for (int k = 1; k < count; ++k)
        array[k - 1] = array[k];
    array[count - 1] = first;
}

static void sum(ptrdiff_t n, double b0, double b1, double b2, const double *restrict f,
    const double *restrict f1, const double *restrict f2, double *restrict u)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        u[i] = u[i] + b0*f[i] - b1*f1[i] + b2*f2[i];
}

/*
 * One step from t to t + dt. The slope at t takes the place of the oldest slope, the new level that of the oldest
 * level; both lists are rotated, the newest last.
 */
void lb_tm013_step(ptrdiff_t n, double t, double dt, double *level[1], double *slope[3],
    lb_tm013_rhs *rhs, void *context)
{
    const double b0 = (23.0/12.0)*dt;
    const double b1 = (4.0/3.0)*dt;
    const double b2 = (5.0/12.0)*dt;
    rhs(n, t, level[0], slope[0], context);
    lb_tm013_rotate(LB_TM013_SLOPES, slope);
    sum(n, b0, b1, b2, slope[2], slope[1], slope[0], level[0]);
    lb_tm013_rotate(LB_TM013_LEVELS, level);
}

static void start1(ptrdiff_t n, double a2_1, double s1, const double *restrict u,
    const double *restrict f, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        y[i] = u[i] + a2_1*f[i];
        w[i] = u[i] + s1*f[i];
    }
}

static void start2(ptrdiff_t n, double a3_2, double s2, const double *restrict u,
    const double *restrict k, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        y[i] = u[i] + a3_2*k[i];
        w[i] = w[i] + s2*k[i];
    }
}

static void start3(ptrdiff_t n, double dt, double s3, const double *restrict u,
    const double *restrict k, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        y[i] = u[i] + dt*k[i];
        w[i] = w[i] + s3*k[i];
    }
}

static void start4(ptrdiff_t n, double s4, const double *restrict w, const double *restrict k,
    double *restrict u)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        u[i] = w[i] + s4*k[i];
}

/*
 * One start-up step from t to t + dt: Runge-Kutta of order 4, keeping its first slope. Call it
 * LB_TM013_STEPS - 1 times before the first step; the initial level is the last of level[]. work: 3 arrays of n doubles.
 */
int lb_tm013_start(ptrdiff_t n, double t, double dt, double *level[1], double *slope[3],
    double *const work[], lb_tm013_rhs *rhs, void *context)
{
    const int status = lb_tm013_check(n, t, dt);
    if (status != LB_TM013_OK)
        return status;
    if (lb_tm013_pointers(level, slope) != LB_TM013_OK || !work || !rhs)
        return LB_TM013_NULL_POINTER;
    for (int k = 0; k < 3; ++k)
        if (!work[k])
            return LB_TM013_NULL_POINTER;

    double *const u = level[0];
    double *const f = slope[0];
    double *const y = work[0];
    double *const w = work[1];
    double *const k = work[2];
    const double a2_1 = 0.5*dt;
    const double s1 = (1.0/6.0)*dt;
    const double a3_2 = 0.5*dt;
    const double s2 = (1.0/3.0)*dt;
    const double s3 = (1.0/3.0)*dt;
    const double s4 = (1.0/6.0)*dt;
    rhs(n, t, u, f, context);
    start1(n, a2_1, s1, u, f, y, w);
    rhs(n, t + 0.5*dt, y, k, context);
    start2(n, a3_2, s2, u, k, y, w);
    rhs(n, t + 0.5*dt, y, k, context);
    start3(n, dt, s3, u, k, y, w);
    rhs(n, t + dt, y, k, context);
    start4(n, s4, w, k, u);
    lb_tm013_rotate(LB_TM013_SLOPES, slope);
    lb_tm013_rotate(LB_TM013_LEVELS, level);
    return LB_TM013_OK;
}

/* nsteps steps from levels and slopes that are complete. On return the newest level is the last of level[]. */
int lb_tm013_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *level[1],
    double *slope[3], lb_tm013_rhs *rhs, void *context)
{
    const int status = lb_tm013_check(n, t, dt);
    if (status != LB_TM013_OK)
        return status;
    if (nsteps < 0)
        return LB_TM013_BAD_SIZE;
    if (lb_tm013_pointers(level, slope) != LB_TM013_OK || !rhs)
        return LB_TM013_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step)
        lb_tm013_step(n, t + (double)step * dt, dt, level, slope, rhs, context);
    return LB_TM013_OK;
}
