/* DI 005 r2   every r >= 0   halo 1|1, periodic fill included */
/* levelbook:dufort-frankel/2/c/double,periodic:fe91ac5d8dccfdfba9c02002e55ff231ce8f8c27990bb807ff26fca3318b373b */
/*
 * Entry       DI 005, revision 2: DuFort-Frankel (double precision).
 * Equation    u_t = nu u_xx; r = nu dt/dx^2.
 * Formula     u[n+1,i] = a1*(u[n,i+1] + u[n,i-1]) + b0*u[n-1,i]
 *             with a1 = 2*r/(1 + 2*r), b0 = (1 - 2*r)/(1 + 2*r)
 * Order       2 in time, 2 in space, 2 at fixed r.
 *             Consistent only while dt^2/dx^2 goes to 0 with the grid.
 * Error       At r = 30 the leading error term strengthens the damping of short waves
 *             (derivative of order 4).
 * Stable      for every r >= 0.
 * Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
 *             the last.
 *             u: level n
 *             w: level n-1 in, level n+1 out
 * Storage     the oldest level is read only at the point being written and is overwritten in
 *             place: 2 arrays.
 * Work        4 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    start makes the 2 kept levels from the initial level, to the order of the
 *             scheme.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_di005_length(n) doubles
 *             status = lb_di005_start(n, r, level, work);
 *             status = lb_di005_run(nsteps, n, r, level);   result in level[1]
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
    LB_DI005_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_DI005_HALO_RIGHT = 1,  /* ghost cells after the last point */
    LB_DI005_MIN_POINTS = 1,
    LB_DI005_LEVELS = 2,      /* time levels kept between steps */
    LB_DI005_ARRAYS = 2       /* arrays of lb_di005_length(n) doubles */
};

enum {
    LB_DI005_OK = 0,
    LB_DI005_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_DI005_BAD_PARAMETER = 2,  /* r not a finite number, or the coefficient of the new level is 0 */
    LB_DI005_OUTSIDE_BOUND = 3,  /* not within every r >= 0 */
    LB_DI005_NULL_POINTER = 4,
    LB_DI005_NAN_IN_STATE = 5
};

ptrdiff_t lb_di005_length(ptrdiff_t n);
int lb_di005_check(ptrdiff_t n, double r);
int lb_di005_check_state(ptrdiff_t n, const double *u);
void lb_di005_fill_halo(ptrdiff_t n, double *u);
void lb_di005_step(ptrdiff_t n, double r, const double *restrict u, double *restrict w);
int lb_di005_start(ptrdiff_t n, double r, double *const level[2], double *work);
int lb_di005_run(ptrdiff_t nsteps, ptrdiff_t n, double r, double *level[2]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_di005_length(ptrdiff_t n)
{
    return n + LB_DI005_HALO_LEFT + LB_DI005_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_di005_check(ptrdiff_t n, double r)
{
    if (n < LB_DI005_MIN_POINTS)
        return LB_DI005_BAD_SIZE;
    if (!isfinite(r) || !(fabs(1.0 + 2.0*r) > 0.0))
        return LB_DI005_BAD_PARAMETER;
    if (!(r >= 0.0))
        return LB_DI005_OUTSIDE_BOUND;
    return LB_DI005_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_di005_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_DI005_NULL_POINTER;
    for (ptrdiff_t i = LB_DI005_HALO_LEFT; i < LB_DI005_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_DI005_NAN_IN_STATE;
    return LB_DI005_OK;
}

/* Ghost cells of a periodic row. */
void lb_di005_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
}

/* One step. u: level n; w: level n-1 in, level n+1 out. */
void lb_di005_step(ptrdiff_t n, double r, const double *restrict u, double *restrict w)
{
    const double a1 = 2.0*r/(1.0 + 2.0*r);
    const double b0 = (1.0 - 2.0*r)/(1.0 + 2.0*r);
    for (ptrdiff_t i = LB_DI005_HALO_LEFT; i < LB_DI005_HALO_LEFT + n; ++i)
        w[i] = a1*(u[i + 1] + u[i - 1]) + b0*w[i];
}

/* w = u + c dt L y: one term of the Taylor series in time. */
static void lb_di005_taylor(ptrdiff_t n, double r, double c, const double *restrict u,
    const double *restrict y, double *restrict w)
{
    const double s0 = 2.0*r;
    for (ptrdiff_t i = LB_DI005_HALO_LEFT; i < LB_DI005_HALO_LEFT + n; ++i)
        w[i] = u[i] + c*(r*(y[i + 1] + y[i - 1]) - s0*y[i]);
}

/*
 * Start-up: makes the second level by the Taylor series in time with 2 terms (a
 * Runge-Kutta step of 2 stages), with differences of order 2 in space.
 * In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
 * work: one more array of the same length.
 */
int lb_di005_start(ptrdiff_t n, double r, double *const level[2], double *work)
{
    const int status = lb_di005_check(n, r);
    if (status != LB_DI005_OK)
        return status;
    if (!level || !work)
        return LB_DI005_NULL_POINTER;
    for (int k = 0; k < LB_DI005_ARRAYS; ++k)
        if (!level[k])
            return LB_DI005_NULL_POINTER;

    for (int k = 1; k < LB_DI005_ARRAYS; ++k) {
        double *const u = level[k - 1];
        lb_di005_fill_halo(n, u);
        const double *y = u;
        for (int m = 2; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[k] : work;
            lb_di005_taylor(n, r, 1.0 / m, u, y, w);
            lb_di005_fill_halo(n, w);
            y = w;
        }
    }
    return LB_DI005_OK;
}

/*
 * nsteps steps. The arrays are the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_di005_run(ptrdiff_t nsteps, ptrdiff_t n, double r, double *level[2])
{
    const int status = lb_di005_check(n, r);
    if (status != LB_DI005_OK)
        return status;
    if (nsteps < 0)
        return LB_DI005_BAD_SIZE;
    if (!level)
        return LB_DI005_NULL_POINTER;
    for (int k = 0; k < LB_DI005_ARRAYS; ++k)
        if (!level[k])
            return LB_DI005_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_di005_fill_halo(n, level[1]);
        lb_di005_step(n, r, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_DI005_OK;
}
