/* WA 001 r2   |lam| <= 1; keep below   halo 1|1, periodic fill included */
/* levelbook:leapfrog-for-the-wave-equation/2/c/double,periodic:41b1d15060acaa4a11d5d7eeb24baa50489e1bbe67addbc84ed0073ed8c920ae */
/*
 * Entry       WA 001, revision 2: Leapfrog for the wave equation (double precision).
 * Equation    u_tt = c^2 u_xx; lam = c dt/dx.
 * Formula     u[n+1,i] = a0*u[n,i] + a1*(u[n,i+1] + u[n,i-1]) - u[n-1,i]
 *             with a0 = 2 - 2*lam*lam, a1 = lam*lam
 * Order       2 in time, 2 in space, 2 at fixed lam.
 * Error       At lam = 1/2 the leading error term adds dispersion: short waves lag.
 * Stable      for |lam| <= 1; keep below.
 *             Advised working value: |lam| <= 0.9 (nine tenths of the bound).
 *             At the bound itself: double root on the unit circle: growth linear in n for that
 *             wave.
 * Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
 *             the last.
 *             u: level n
 *             w: level n-1 in, level n+1 out
 * Storage     the oldest level is read only at the point being written and is overwritten in
 *             place: 2 arrays.
 * Work        5 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    start makes the 2 kept levels from u and dt u_t at the initial time, to the
 *             order of the scheme.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_wa001_length(n) doubles
 *             status = lb_wa001_start(n, lam, level, v, work);
 *             status = lb_wa001_run(nsteps, n, lam, level);   result in level[1]
 *             status 0: done; other values: see the second enum. step itself checks nothing: call check once.
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
    LB_WA001_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_WA001_HALO_RIGHT = 1,  /* ghost cells after the last point */
    LB_WA001_MIN_POINTS = 1,
    LB_WA001_LEVELS = 2,      /* time levels kept between steps */
    LB_WA001_ARRAYS = 2       /* arrays of lb_wa001_length(n) doubles */
};

enum {
    LB_WA001_OK = 0,
    LB_WA001_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_WA001_BAD_PARAMETER = 2,  /* lam not a finite number */
    LB_WA001_OUTSIDE_BOUND = 3,  /* not within |lam| <= 1; keep below */
    LB_WA001_NULL_POINTER = 4,
    LB_WA001_NAN_IN_STATE = 5
};

ptrdiff_t lb_wa001_length(ptrdiff_t n);
int lb_wa001_check(ptrdiff_t n, double lam);
int lb_wa001_check_state(ptrdiff_t n, const double *u);
void lb_wa001_fill_halo(ptrdiff_t n, double *u);
void lb_wa001_step(ptrdiff_t n, double lam, const double *restrict u, double *restrict w);
int lb_wa001_start(ptrdiff_t n, double lam, double *const level[2], const double *v,
    double *work);
int lb_wa001_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[2]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_wa001_length(ptrdiff_t n)
{
    return n + LB_WA001_HALO_LEFT + LB_WA001_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_wa001_check(ptrdiff_t n, double lam)
{
    if (n < LB_WA001_MIN_POINTS)
        return LB_WA001_BAD_SIZE;
    if (!isfinite(lam))
        return LB_WA001_BAD_PARAMETER;
    if (!(lam >= -1.0 && lam <= 1.0))
        return LB_WA001_OUTSIDE_BOUND;
    return LB_WA001_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_wa001_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_WA001_NULL_POINTER;
    for (ptrdiff_t i = LB_WA001_HALO_LEFT; i < LB_WA001_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_WA001_NAN_IN_STATE;
    return LB_WA001_OK;
}

/* Ghost cells of a periodic row. */
void lb_wa001_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
}

/* One step. u: level n; w: level n-1 in, level n+1 out. */
void lb_wa001_step(ptrdiff_t n, double lam, const double *restrict u, double *restrict w)
{
    const double a0 = 2.0 - 2.0*lam*lam;
    const double a1 = lam*lam;
    for (ptrdiff_t i = LB_WA001_HALO_LEFT; i < LB_WA001_HALO_LEFT + n; ++i)
        w[i] = a0*u[i] + a1*(u[i + 1] + u[i - 1]) - w[i];
}

/* w = u + b v + c dt^2 L y: one term of the Taylor series in time. */
static void lb_wa001_taylor(ptrdiff_t n, double lam, double b, double c,
    const double *restrict u, const double *restrict v, const double *restrict y,
    double *restrict w)
{
    const double s0 = 2.0*lam*lam;
    const double s1 = lam*lam;
    for (ptrdiff_t i = LB_WA001_HALO_LEFT; i < LB_WA001_HALO_LEFT + n; ++i)
        w[i] = u[i] + b*v[i] + c*(s1*(y[i + 1] + y[i - 1]) - s0*y[i]);
}

/*
 * Start-up: makes the second level by the Taylor series in time through dt^2, with
 * differences of order 2 in space.
 * In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.
 * work: one more array of the same length.
 */
int lb_wa001_start(ptrdiff_t n, double lam, double *const level[2], const double *v, double *work)
{
    const int status = lb_wa001_check(n, lam);
    if (status != LB_WA001_OK)
        return status;
    if (!level || !work || !v)
        return LB_WA001_NULL_POINTER;
    for (int k = 0; k < LB_WA001_ARRAYS; ++k)
        if (!level[k])
            return LB_WA001_NULL_POINTER;

    double *const u = level[0];
    lb_wa001_fill_halo(n, u);
    for (int k = 1; k < LB_WA001_LEVELS; ++k) {
        const double *y = u;
        for (int m = 1; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[0 + k] : work;
            lb_wa001_taylor(n, lam, (double)k / (2 * m - 1), (double)(k * k) / ((2 * m - 1) * (2 * m)), u, v, y, w);
            lb_wa001_fill_halo(n, w);
            y = w;
        }
    }
    return LB_WA001_OK;
}

/*
 * nsteps steps. The arrays are the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_wa001_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[2])
{
    const int status = lb_wa001_check(n, lam);
    if (status != LB_WA001_OK)
        return status;
    if (nsteps < 0)
        return LB_WA001_BAD_SIZE;
    if (!level)
        return LB_WA001_NULL_POINTER;
    for (int k = 0; k < LB_WA001_ARRAYS; ++k)
        if (!level[k])
            return LB_WA001_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_wa001_fill_halo(n, level[1]);
        lb_wa001_step(n, lam, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_WA001_OK;
}
