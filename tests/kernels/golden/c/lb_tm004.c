/* TM 004 r2   order 4; stable on the imaginary axis to 2.82843   no halo */
/* levelbook:classical-runge-kutta/2/c/double,periodic:5077f29da812d321b753481db38163ca32f399e725f7e1eca910600a1b683495 */
/*
 * Entry       TM 004, revision 2: Classical Runge-Kutta (double precision).
 * Equation    u' = f(t, u) for n unknowns; dt of either sign.
 * Formula     k = f(t, u); y = u + a2_1*k; w = u + b1*k
 *             k = f(t + 0.5*dt, y); y = u + a3_2*k; w = w + b2*k
 *             k = f(t + 0.5*dt, y); y = u + dt*k; w = w + b3*k
 *             k = f(t + dt, y); u = w + b4*k
 *             with a2_1 = 0.5*dt, b1 = (1.0/6.0)*dt, a3_2 = 0.5*dt, b2 = (1.0/3.0)*dt, b3 =
 *             (1.0/3.0)*dt, b4 = (1.0/6.0)*dt
 * Order       4 on linear problems, 4 on nonlinear ones.
 * Stable      dt times the eigenvalues of f within: imaginary axis 2*sqrt(2) = 2.82843,
 *             negative real axis 2.78529.
 * Callback    rhs(n, t, u, f, context) writes f = du/dt at (t, u); context is handed through.
 * Storage     4 arrays of n doubles: u, advanced in place, and y, w, k as work space (first in
 *             the list, u last).
 * Start-up    none.
 * Calling     status = lb_tm004_run(nsteps, n, t, dt, level, rhs, context);
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

enum { LB_TM004_ARRAYS = 4 };  /* arrays of n doubles: work space, then u */

enum {
    LB_TM004_OK = 0,
    LB_TM004_BAD_SIZE = 1,       /* n < 1, or a negative number of steps */
    LB_TM004_BAD_PARAMETER = 2,  /* t or dt is not a finite number */
    LB_TM004_NULL_POINTER = 4,
    LB_TM004_NAN_IN_STATE = 5
};

/* f = du/dt at (t, u), n unknowns; context is what the caller passed. */
typedef void lb_tm004_rhs(ptrdiff_t n, double t, const double *u, double *f, void *context);

int lb_tm004_check(ptrdiff_t n, double t, double dt);
int lb_tm004_check_state(ptrdiff_t n, const double *u);
void lb_tm004_step(ptrdiff_t n, double t, double dt, double *u, double *y, double *w, double *k,
    lb_tm004_rhs *rhs, void *context);
int lb_tm004_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *const level[4],
    lb_tm004_rhs *rhs, void *context);

/* Status of the arguments; O(1). */
int lb_tm004_check(ptrdiff_t n, double t, double dt)
{
    if (n < 1)
        return LB_TM004_BAD_SIZE;
    if (!isfinite(t) || !isfinite(dt))
        return LB_TM004_BAD_PARAMETER;
    return LB_TM004_OK;
}

/* Whether the n values of u are finite numbers; O(n), so not part of a step. */
int lb_tm004_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_TM004_NULL_POINTER;
    for (ptrdiff_t i = 0; i < n; ++i)
        if (!isfinite(u[i]))
            return LB_TM004_NAN_IN_STATE;
    return LB_TM004_OK;
}

static void sum1(ptrdiff_t n, double a2_1, double b1, const double *restrict u,
    const double *restrict k, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        y[i] = u[i] + a2_1*k[i];
        w[i] = u[i] + b1*k[i];
    }
}

static void sum2(ptrdiff_t n, double a3_2, double b2, const double *restrict u,
    const double *restrict k, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        y[i] = u[i] + a3_2*k[i];
        w[i] = w[i] + b2*k[i];
    }
}

static void sum3(ptrdiff_t n, double dt, double b3, const double *restrict u,
    const double *restrict k, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i) {
        y[i] = u[i] + dt*k[i];
        w[i] = w[i] + b3*k[i];
    }
}

static void sum4(ptrdiff_t n, double b4, const double *restrict w, const double *restrict k,
    double *restrict u)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        u[i] = w[i] + b4*k[i];
}

/* One step from t to t + dt: u is advanced in place. */
void lb_tm004_step(ptrdiff_t n, double t, double dt, double *u, double *y, double *w, double *k,
    lb_tm004_rhs *rhs, void *context)
{
    const double a2_1 = 0.5*dt;
    const double b1 = (1.0/6.0)*dt;
    const double a3_2 = 0.5*dt;
    const double b2 = (1.0/3.0)*dt;
    const double b3 = (1.0/3.0)*dt;
    const double b4 = (1.0/6.0)*dt;
    rhs(n, t, u, k, context);
    sum1(n, a2_1, b1, u, k, y, w);
    rhs(n, t + 0.5*dt, y, k, context);
    sum2(n, a3_2, b2, u, k, y, w);
    rhs(n, t + 0.5*dt, y, k, context);
    sum3(n, dt, b3, u, k, y, w);
    rhs(n, t + dt, y, k, context);
    sum4(n, b4, w, k, u);
}

/* nsteps steps. The last array is u, advanced in place; the others are work space. */
int lb_tm004_run(ptrdiff_t nsteps, ptrdiff_t n, double t, double dt, double *const level[4],
    lb_tm004_rhs *rhs, void *context)
{
    const int status = lb_tm004_check(n, t, dt);
    if (status != LB_TM004_OK)
        return status;
    if (nsteps < 0)
        return LB_TM004_BAD_SIZE;
    if (!level || !rhs)
        return LB_TM004_NULL_POINTER;
    for (int k = 0; k < LB_TM004_ARRAYS; ++k)
        if (!level[k])
            return LB_TM004_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step)
        lb_tm004_step(n, t + (double)step * dt, dt, level[3], level[0], level[1], level[2], rhs, context);
    return LB_TM004_OK;
}
