/* AD 003 r2   |lam| <= 1; keep below   halo 1|1, periodic fill included */
/* levelbook:leapfrog-central-2/2/c/double,periodic:f8f96eb3f68286aea91b20c3dd410f10b04bbea27fd356604f06057719c8b303 */
/*
 * Entry       AD 003, revision 2: Leapfrog, central 2 (double precision).
 * Equation    u_t + c u_x = 0; lam = c dt/dx.
 * Formula     u[n+1,i] = u[n-1,i] - lam*(u[n,i+1] - u[n,i-1])
 * Order       2 in time, 2 in space, 2 at fixed lam.
 * Error       At lam = 1/2 the leading error term adds dispersion: short waves lag behind.
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
 * Work        3 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    start makes the 2 kept levels from the initial level, to the order of the
 *             scheme.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_ad003_length(n) doubles
 *             status = lb_ad003_start(n, lam, level, work);
 *             status = lb_ad003_run(nsteps, n, lam, level);   result in level[1]
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
    LB_AD003_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_AD003_HALO_RIGHT = 1,  /* ghost cells after the last point */
    LB_AD003_MIN_POINTS = 1,
    LB_AD003_LEVELS = 2,      /* time levels kept between steps */
    LB_AD003_ARRAYS = 2       /* arrays of lb_ad003_length(n) doubles */
};

enum {
    LB_AD003_OK = 0,
    LB_AD003_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_AD003_BAD_PARAMETER = 2,  /* lam not a finite number */
    LB_AD003_OUTSIDE_BOUND = 3,  /* not within |lam| <= 1; keep below */
    LB_AD003_NULL_POINTER = 4,
    LB_AD003_NAN_IN_STATE = 5
};

ptrdiff_t lb_ad003_length(ptrdiff_t n);
int lb_ad003_check(ptrdiff_t n, double lam);
int lb_ad003_check_state(ptrdiff_t n, const double *u);
void lb_ad003_fill_halo(ptrdiff_t n, double *u);
void lb_ad003_step(ptrdiff_t n, double lam, const double *restrict u, double *restrict w);
int lb_ad003_start(ptrdiff_t n, double lam, double *const level[2], double *work);
int lb_ad003_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[2]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_ad003_length(ptrdiff_t n)
{
    return n + LB_AD003_HALO_LEFT + LB_AD003_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_ad003_check(ptrdiff_t n, double lam)
{
    if (n < LB_AD003_MIN_POINTS)
        return LB_AD003_BAD_SIZE;
    if (!isfinite(lam))
        return LB_AD003_BAD_PARAMETER;
    if (!(lam >= -1.0 && lam <= 1.0))
        return LB_AD003_OUTSIDE_BOUND;
    return LB_AD003_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_ad003_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_AD003_NULL_POINTER;
    for (ptrdiff_t i = LB_AD003_HALO_LEFT; i < LB_AD003_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_AD003_NAN_IN_STATE;
    return LB_AD003_OK;
}

/* Ghost cells of a periodic row. */
void lb_ad003_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
}

/* One step. u: level n; w: level n-1 in, level n+1 out. */
void lb_ad003_step(ptrdiff_t n, double lam, const double *restrict u, double *restrict w)
{
    for (ptrdiff_t i = LB_AD003_HALO_LEFT; i < LB_AD003_HALO_LEFT + n; ++i)
        w[i] = w[i] - lam*(u[i + 1] - u[i - 1]);
}

/* w = u + c dt L y: one term of the Taylor series in time. */
static void lb_ad003_taylor(ptrdiff_t n, double lam, double c, const double *restrict u,
    const double *restrict y, double *restrict w)
{
    const double s1 = 0.5*lam;
    for (ptrdiff_t i = LB_AD003_HALO_LEFT; i < LB_AD003_HALO_LEFT + n; ++i)
        w[i] = u[i] - c*(s1*(y[i + 1] - y[i - 1]));
}

/*
 * Start-up: makes the second level by the Taylor series in time with 2 terms (a
 * Runge-Kutta step of 2 stages), with differences of order 2 in space.
 * In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
 * work: one more array of the same length.
 */
int lb_ad003_start(ptrdiff_t n, double lam, double *const level[2], double *work)
{
    const int status = lb_ad003_check(n, lam);
    if (status != LB_AD003_OK)
        return status;
    if (!level || !work)
        return LB_AD003_NULL_POINTER;
    for (int k = 0; k < LB_AD003_ARRAYS; ++k)
        if (!level[k])
            return LB_AD003_NULL_POINTER;

    for (int k = 1; k < LB_AD003_ARRAYS; ++k) {
        double *const u = level[k - 1];
        lb_ad003_fill_halo(n, u);
        const double *y = u;
        for (int m = 2; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[k] : work;
            lb_ad003_taylor(n, lam, 1.0 / m, u, y, w);
            lb_ad003_fill_halo(n, w);
            y = w;
        }
    }
    return LB_AD003_OK;
}

/*
 * nsteps steps. The arrays are the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_ad003_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[2])
{
    const int status = lb_ad003_check(n, lam);
    if (status != LB_AD003_OK)
        return status;
    if (nsteps < 0)
        return LB_AD003_BAD_SIZE;
    if (!level)
        return LB_AD003_NULL_POINTER;
    for (int k = 0; k < LB_AD003_ARRAYS; ++k)
        if (!level[k])
            return LB_AD003_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_ad003_fill_halo(n, level[1]);
        lb_ad003_step(n, lam, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_AD003_OK;
}
