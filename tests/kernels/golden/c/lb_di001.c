/* DI 001 r2   0 <= r <= 1/2   halo 1|1, periodic fill included */
/* levelbook:forward-euler-central-2/2/c/double,periodic:cbb444d082b56e29e30afb7cc2287d1be400c3eb047790f5e20c9dde4b3375b4 */
/*
 * Entry       DI 001, revision 2: Forward Euler, central 2 (double precision).
 * Equation    u_t = nu u_xx; r = nu dt/dx^2.
 * Formula     u[n+1,i] = a0*u[n,i] + r*(u[n,i+1] + u[n,i-1])
 *             with a0 = 1 - 2*r
 * Order       1 in time, 2 in space, 2 at fixed r.
 * Error       At r = 1/4 the leading error term strengthens the damping of short waves
 *             (derivative of order 4).
 * Stable      for 0 <= r <= 1/2.
 *             Advised working value: r <= 0.45 (nine tenths of the bound).
 * Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
 *             the last.
 *             u: level n
 *             w: level n+1 out
 * Storage     1 kept level and one array for the new level; rotate the arrays after each step.
 * Work        4 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    none: the initial level is enough.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_di001_length(n) doubles
 *             status = lb_di001_run(nsteps, n, r, level);   result in level[1]
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
    LB_DI001_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_DI001_HALO_RIGHT = 1,  /* ghost cells after the last point */
    LB_DI001_MIN_POINTS = 1,
    LB_DI001_LEVELS = 1,      /* time levels kept between steps */
    LB_DI001_ARRAYS = 2       /* arrays of lb_di001_length(n) doubles */
};

enum {
    LB_DI001_OK = 0,
    LB_DI001_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_DI001_BAD_PARAMETER = 2,  /* r not a finite number */
    LB_DI001_OUTSIDE_BOUND = 3,  /* not within 0 <= r <= 1/2 */
    LB_DI001_NULL_POINTER = 4,
    LB_DI001_NAN_IN_STATE = 5
};

ptrdiff_t lb_di001_length(ptrdiff_t n);
int lb_di001_check(ptrdiff_t n, double r);
int lb_di001_check_state(ptrdiff_t n, const double *u);
void lb_di001_fill_halo(ptrdiff_t n, double *u);
void lb_di001_step(ptrdiff_t n, double r, const double *restrict u, double *restrict w);
int lb_di001_run(ptrdiff_t nsteps, ptrdiff_t n, double r, double *level[2]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_di001_length(ptrdiff_t n)
{
    return n + LB_DI001_HALO_LEFT + LB_DI001_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_di001_check(ptrdiff_t n, double r)
{
    if (n < LB_DI001_MIN_POINTS)
        return LB_DI001_BAD_SIZE;
    if (!isfinite(r))
        return LB_DI001_BAD_PARAMETER;
    if (!(r >= 0.0 && r <= 0.5))
        return LB_DI001_OUTSIDE_BOUND;
    return LB_DI001_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_di001_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_DI001_NULL_POINTER;
    for (ptrdiff_t i = LB_DI001_HALO_LEFT; i < LB_DI001_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_DI001_NAN_IN_STATE;
    return LB_DI001_OK;
}

/* Ghost cells of a periodic row. */
void lb_di001_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
}

/* One step. u: level n; w: level n+1 out. */
void lb_di001_step(ptrdiff_t n, double r, const double *restrict u, double *restrict w)
{
    const double a0 = 1.0 - 2.0*r;
    for (ptrdiff_t i = LB_DI001_HALO_LEFT; i < LB_DI001_HALO_LEFT + n; ++i)
        w[i] = a0*u[i] + r*(u[i + 1] + u[i - 1]);
}

/*
 * nsteps steps. The first array is spare; then come the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_di001_run(ptrdiff_t nsteps, ptrdiff_t n, double r, double *level[2])
{
    const int status = lb_di001_check(n, r);
    if (status != LB_DI001_OK)
        return status;
    if (nsteps < 0)
        return LB_DI001_BAD_SIZE;
    if (!level)
        return LB_DI001_NULL_POINTER;
    for (int k = 0; k < LB_DI001_ARRAYS; ++k)
        if (!level[k])
            return LB_DI001_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_di001_fill_halo(n, level[1]);
        lb_di001_step(n, r, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_DI001_OK;
}
