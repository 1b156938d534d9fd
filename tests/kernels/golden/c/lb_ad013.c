/* AD 013 r2   |lam| <= 0.723627   halo 1|1, periodic fill included */
/* levelbook:adams-bashforth-3-central-2/2/c/double,periodic:de7e6992ee2e1065a8d3637602853230bde122c8ffc76352cb4aebcb39d77ab9 */
/*
 * Entry       AD 013, revision 2: Adams-Bashforth 3, central 2 (double precision).
 * Equation    u_t + c u_x = 0; lam = c dt/dx.
 * Formula     u[n+1,i] = u[n,i] - a1*(u[n,i+1] - u[n,i-1]) + b1*(u[n-1,i+1] - u[n-1,i-1]) -
 *             c1*(u[n-2,i+1] - u[n-2,i-1])
 *             with a1 = (23/24)*lam, b1 = (2/3)*lam, c1 = (5/24)*lam
 * Order       3 in time, 2 in space, 2 at fixed lam.
 * Error       At lam = 13/36 the leading error term adds dispersion: short waves lag behind;
 *             the next one adds fourth-order diffusion: short waves are damped.
 * Stable      for |lam| <= 0.723627.
 *             Advised working value: |lam| <= 0.651 (nine tenths of the bound).
 * Arrays      4 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
 *             the last.
 *             u: level n
 *             u1: level n-1
 *             u2: level n-2
 *             w: level n+1 out
 * Storage     3 kept levels and one array for the new level; rotate the arrays after each
 *             step.
 * Work        9 operations and 40 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    start makes the 3 kept levels from the initial level, to the order of the
 *             scheme.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[4];   each of lb_ad013_length(n) doubles
 *             status = lb_ad013_start(n, lam, level, work);
 *             status = lb_ad013_run(nsteps, n, lam, level);   result in level[3]
 *             status 0: done; other values: see the second enum. step itself checks nothing: call check once.
 *             The first array is the spare one.
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
    LB_AD013_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_AD013_HALO_RIGHT = 1,  /* ghost cells after the last point */
    LB_AD013_MIN_POINTS = 1,
    LB_AD013_LEVELS = 3,      /* time levels kept between steps */
    LB_AD013_ARRAYS = 4       /* arrays of lb_ad013_length(n) doubles */
};

enum {
    LB_AD013_OK = 0,
    LB_AD013_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_AD013_BAD_PARAMETER = 2,  /* lam not a finite number */
    LB_AD013_OUTSIDE_BOUND = 3,  /* not within |lam| <= 0.723627 */
    LB_AD013_NULL_POINTER = 4,
    LB_AD013_NAN_IN_STATE = 5
};

ptrdiff_t lb_ad013_length(ptrdiff_t n);
int lb_ad013_check(ptrdiff_t n, double lam);
int lb_ad013_check_state(ptrdiff_t n, const double *u);
void lb_ad013_fill_halo(ptrdiff_t n, double *u);
void lb_ad013_step(ptrdiff_t n, double lam, const double *restrict u,
    const double *restrict u1, const double *restrict u2, double *restrict w);
int lb_ad013_start(ptrdiff_t n, double lam, double *const level[4], double *work);
int lb_ad013_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[4]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_ad013_length(ptrdiff_t n)
{
    return n + LB_AD013_HALO_LEFT + LB_AD013_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_ad013_check(ptrdiff_t n, double lam)
{
    if (n < LB_AD013_MIN_POINTS)
        return LB_AD013_BAD_SIZE;
    if (!isfinite(lam))
        return LB_AD013_BAD_PARAMETER;
    if (!(lam >= -0.7236272269866327 && lam <= 0.7236272269866327))
        return LB_AD013_OUTSIDE_BOUND;
    return LB_AD013_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_ad013_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_AD013_NULL_POINTER;
    for (ptrdiff_t i = LB_AD013_HALO_LEFT; i < LB_AD013_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_AD013_NAN_IN_STATE;
    return LB_AD013_OK;
}

/* Ghost cells of a periodic row. */
void lb_ad013_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
}

/* One step. u: level n; u1: level n-1; u2: level n-2; w: level n+1 out. */
void lb_ad013_step(ptrdiff_t n, double lam, const double *restrict u,
    const double *restrict u1, const double *restrict u2, double *restrict w)
{
    const double a1 = (23.0/24.0)*lam;
    const double b1 = (2.0/3.0)*lam;
    const double c1 = (5.0/24.0)*lam;
    for (ptrdiff_t i = LB_AD013_HALO_LEFT; i < LB_AD013_HALO_LEFT + n; ++i)
        w[i] = u[i] - a1*(u[i + 1] - u[i - 1]) + b1*(u1[i + 1] - u1[i - 1]) - c1*(u2[i + 1]
            - u2[i - 1]);
}

/* w = u + c dt L y: one term of the Taylor series in time. */
static void lb_ad013_taylor(ptrdiff_t n, double lam, double c, const double *restrict u,
    const double *restrict y, double *restrict w)
{
    const double s1 = 0.5*lam;
    for (ptrdiff_t i = LB_AD013_HALO_LEFT; i < LB_AD013_HALO_LEFT + n; ++i)
        w[i] = u[i] - c*(s1*(y[i + 1] - y[i - 1]));
}

/*
 * Start-up: makes 2 further levels by the Taylor series in time with 3 terms (a
 * Runge-Kutta step of 3 stages), with differences of order 2 in space.
 * In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
 * work: one more array of the same length.
 */
int lb_ad013_start(ptrdiff_t n, double lam, double *const level[4], double *work)
{
    const int status = lb_ad013_check(n, lam);
    if (status != LB_AD013_OK)
        return status;
    if (!level || !work)
        return LB_AD013_NULL_POINTER;
    for (int k = 0; k < LB_AD013_ARRAYS; ++k)
        if (!level[k])
            return LB_AD013_NULL_POINTER;

    for (int k = 2; k < LB_AD013_ARRAYS; ++k) {
        double *const u = level[k - 1];
        lb_ad013_fill_halo(n, u);
        const double *y = u;
        for (int m = 3; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[k] : work;
            lb_ad013_taylor(n, lam, 1.0 / m, u, y, w);
            lb_ad013_fill_halo(n, w);
            y = w;
        }
    }
    return LB_AD013_OK;
}

/*
 * nsteps steps. The first array is spare; then come the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_ad013_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[4])
{
    const int status = lb_ad013_check(n, lam);
    if (status != LB_AD013_OK)
        return status;
    if (nsteps < 0)
        return LB_AD013_BAD_SIZE;
    if (!level)
        return LB_AD013_NULL_POINTER;
    for (int k = 0; k < LB_AD013_ARRAYS; ++k)
        if (!level[k])
            return LB_AD013_NULL_POINTER;

    lb_ad013_fill_halo(n, level[2]);
    lb_ad013_fill_halo(n, level[1]);
    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_ad013_fill_halo(n, level[3]);
        lb_ad013_step(n, lam, level[3], level[2], level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = level[2];
        level[2] = level[3];
        level[3] = newest;
    }
    return LB_AD013_OK;
}
