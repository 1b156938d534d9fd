/* AD 005 r2   |lam| <= 1   halo 1|1, periodic fill included */
/* levelbook:lax-wendroff/2/c/double,periodic:339f698850c8350214c146b270654cd7ae68c472121a4cb033588b2b9194187a */
/*
 * Entry       AD 005, revision 2: Lax-Wendroff (double precision).
 * Equation    u_t + c u_x = 0; lam = c dt/dx.
 * Formula     u[n+1,i] = a0*u[n,i] - ap1*u[n,i+1] + am1*u[n,i-1]
 *             with a0 = 1 - lam*lam, am1 = (1/2)*lam + (1/2)*lam*lam, ap1 = (1/2)*lam -
 *             (1/2)*lam*lam
 * Order       2 in time, 2 in space, 2 at fixed lam.
 * Error       At lam = 1/2 the leading error term adds dispersion: short waves lag behind; the
 *             next one adds fourth-order diffusion: short waves are damped.
 * Stable      for |lam| <= 1.
 *             Advised working value: |lam| <= 0.9 (nine tenths of the bound).
 * Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
 *             the last.
 *             u: level n
 *             w: level n+1 out
 * Storage     1 kept level and one array for the new level; rotate the arrays after each step.
 * Work        5 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    none: the initial level is enough.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_ad005_length(n) doubles
 *             status = lb_ad005_run(nsteps, n, lam, level);   result in level[1]
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
    LB_AD005_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_AD005_HALO_RIGHT = 1,  /* ghost cells after the last point */
    LB_AD005_MIN_POINTS = 1,
    LB_AD005_LEVELS = 1,      /* time levels kept between steps */
    LB_AD005_ARRAYS = 2       /* arrays of lb_ad005_length(n) doubles */
};

enum {
    LB_AD005_OK = 0,
    LB_AD005_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_AD005_BAD_PARAMETER = 2,  /* lam not a finite number */
    LB_AD005_OUTSIDE_BOUND = 3,  /* not within |lam| <= 1 */
    LB_AD005_NULL_POINTER = 4,
    LB_AD005_NAN_IN_STATE = 5
};

ptrdiff_t lb_ad005_length(ptrdiff_t n);
int lb_ad005_check(ptrdiff_t n, double lam);
int lb_ad005_check_state(ptrdiff_t n, const double *u);
void lb_ad005_fill_halo(ptrdiff_t n, double *u);
void lb_ad005_step(ptrdiff_t n, double lam, const double *restrict u, double *restrict w);
int lb_ad005_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[2]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_ad005_length(ptrdiff_t n)
{
    return n + LB_AD005_HALO_LEFT + LB_AD005_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_ad005_check(ptrdiff_t n, double lam)
{
    if (n < LB_AD005_MIN_POINTS)
        return LB_AD005_BAD_SIZE;
    if (!isfinite(lam))
        return LB_AD005_BAD_PARAMETER;
    if (!(lam >= -1.0 && lam <= 1.0))
        return LB_AD005_OUTSIDE_BOUND;
    return LB_AD005_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_ad005_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_AD005_NULL_POINTER;
    for (ptrdiff_t i = LB_AD005_HALO_LEFT; i < LB_AD005_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_AD005_NAN_IN_STATE;
    return LB_AD005_OK;
}

/* Ghost cells of a periodic row. */
void lb_ad005_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
}

/* One step. u: level n; w: level n+1 out. */
void lb_ad005_step(ptrdiff_t n, double lam, const double *restrict u, double *restrict w)
{
    const double a0 = 1.0 - lam*lam;
    const double am1 = 0.5*lam + 0.5*lam*lam;
    const double ap1 = 0.5*lam - 0.5*lam*lam;
    for (ptrdiff_t i = LB_AD005_HALO_LEFT; i < LB_AD005_HALO_LEFT + n; ++i)
        w[i] = a0*u[i] - ap1*u[i + 1] + am1*u[i - 1];
}

/*
 * nsteps steps. The first array is spare; then come the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_ad005_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *level[2])
{
    const int status = lb_ad005_check(n, lam);
    if (status != LB_AD005_OK)
        return status;
    if (nsteps < 0)
        return LB_AD005_BAD_SIZE;
    if (!level)
        return LB_AD005_NULL_POINTER;
    for (int k = 0; k < LB_AD005_ARRAYS; ++k)
        if (!level[k])
            return LB_AD005_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_ad005_fill_halo(n, level[1]);
        lb_ad005_step(n, lam, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_AD005_OK;
}
