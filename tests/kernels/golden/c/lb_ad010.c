/* AD 010 r2   |lam| <= 2.0612   halo 2|2, periodic fill included */
/* levelbook:classical-runge-kutta-central-4/2/c/double,periodic:884d2b05c9f80f4d02a7bd79719a0fdaca6b1147dc3b0d759241f562c8b7e4cc */
/*
 * Entry       AD 010, revision 2: Classical Runge-Kutta, central 4 (double precision).
 * Equation    u_t + c u_x = 0; lam = c dt/dx.
 * Formula     stage 1: k = a2*(u[n,i+2] - u[n,i-2]) - a1*(u[n,i+1] - u[n,i-1])
 *             y[i] = u[n,i] + (1/2)*k
 *             w[i] = u[n,i] + (1/6)*k
 *             stage 2: k = a2*(y[i+2] - y[i-2]) - a1*(y[i+1] - y[i-1])
 *             z[i] = u[n,i] + (1/2)*k
 *             w[i] = w[i] + (1/3)*k
 *             stage 3: k = a2*(z[i+2] - z[i-2]) - a1*(z[i+1] - z[i-1])
 *             y[i] = u[n,i] + k
 *             w[i] = w[i] + (1/3)*k
 *             stage 4: k = a2*(y[i+2] - y[i-2]) - a1*(y[i+1] - y[i-1])
 *             u[n+1,i] = w[i] + (1/6)*k
 *             with a1 = (2/3)*lam, a2 = (1/12)*lam
 * Order       4 in time, 4 in space, 4 at fixed lam.
 * Error       At lam = 34/33 the leading error term adds dispersion: short waves lag behind;
 *             the next one adds sixth-order diffusion: short waves are damped.
 * Stable      for |lam| <= 2.0612.
 *             Advised working value: |lam| <= 1.85 (nine tenths of the bound).
 * Arrays      4 of n + 4 doubles, contiguous; ghost cells: 2 before the first point, 2 after
 *             the last.
 *             u: level n in, level n+1 out; y, w, z: work space, need not be set.
 * Storage     slopes are not stored: each is added at once to the sums that need it. 4 arrays.
 * Work        33 operations and 184 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    none: the initial level is enough.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[4];   each of lb_ad010_length(n) doubles
 *             status = lb_ad010_run(nsteps, n, lam, level);   result in level[3]
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
    LB_AD010_HALO_LEFT = 2,   /* ghost cells before the first point */
    LB_AD010_HALO_RIGHT = 2,  /* ghost cells after the last point */
    LB_AD010_MIN_POINTS = 2,
    LB_AD010_LEVELS = 1,      /* time levels kept between steps */
    LB_AD010_ARRAYS = 4       /* arrays of lb_ad010_length(n) doubles */
};

enum {
    LB_AD010_OK = 0,
    LB_AD010_BAD_SIZE = 1,       /* n too small for the halo, or a negative number of steps */
    LB_AD010_BAD_PARAMETER = 2,  /* lam not a finite number */
    LB_AD010_OUTSIDE_BOUND = 3,  /* not within |lam| <= 2.0612 */
    LB_AD010_NULL_POINTER = 4,
    LB_AD010_NAN_IN_STATE = 5
};

ptrdiff_t lb_ad010_length(ptrdiff_t n);
int lb_ad010_check(ptrdiff_t n, double lam);
int lb_ad010_check_state(ptrdiff_t n, const double *u);
void lb_ad010_fill_halo(ptrdiff_t n, double *u);
void lb_ad010_step(ptrdiff_t n, double lam, double *u, double *y, double *w, double *z);
int lb_ad010_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *const level[4]);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_ad010_length(ptrdiff_t n)
{
    return n + LB_AD010_HALO_LEFT + LB_AD010_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_ad010_check(ptrdiff_t n, double lam)
{
    if (n < LB_AD010_MIN_POINTS)
        return LB_AD010_BAD_SIZE;
    if (!isfinite(lam))
        return LB_AD010_BAD_PARAMETER;
    if (!(lam >= -2.0612023173914658 && lam <= 2.0612023173914658))
        return LB_AD010_OUTSIDE_BOUND;
    return LB_AD010_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of a step. */
int lb_ad010_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_AD010_NULL_POINTER;
    for (ptrdiff_t i = LB_AD010_HALO_LEFT; i < LB_AD010_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_AD010_NAN_IN_STATE;
    return LB_AD010_OK;
}

/* Ghost cells of a periodic row. */
void lb_ad010_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[1] = u[n + 1];
    u[n + 2] = u[2];
    u[n + 3] = u[3];
}

/* k is dt times the slope; each stage adds it to the sums that need it. */
static void stage1(ptrdiff_t n, double a2, double a1, const double *restrict u,
    double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = LB_AD010_HALO_LEFT; i < LB_AD010_HALO_LEFT + n; ++i) {
        const double k = a2*(u[i + 2] - u[i - 2]) - a1*(u[i + 1] - u[i - 1]);
        y[i] = u[i] + 0.5*k;
        w[i] = u[i] + (1.0/6.0)*k;
    }
}

static void stage2(ptrdiff_t n, double a2, double a1, const double *restrict y,
    const double *restrict u, double *restrict z, double *restrict w)
{
    for (ptrdiff_t i = LB_AD010_HALO_LEFT; i < LB_AD010_HALO_LEFT + n; ++i) {
        const double k = a2*(y[i + 2] - y[i - 2]) - a1*(y[i + 1] - y[i - 1]);
        z[i] = u[i] + 0.5*k;
        w[i] = w[i] + (1.0/3.0)*k;
    }
}

static void stage3(ptrdiff_t n, double a2, double a1, const double *restrict z,
    const double *restrict u, double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = LB_AD010_HALO_LEFT; i < LB_AD010_HALO_LEFT + n; ++i) {
        const double k = a2*(z[i + 2] - z[i - 2]) - a1*(z[i + 1] - z[i - 1]);
        y[i] = u[i] + k;
        w[i] = w[i] + (1.0/3.0)*k;
    }
}

static void stage4(ptrdiff_t n, double a2, double a1, const double *restrict y,
    const double *restrict w, double *restrict u)
{
    for (ptrdiff_t i = LB_AD010_HALO_LEFT; i < LB_AD010_HALO_LEFT + n; ++i) {
        const double k = a2*(y[i + 2] - y[i - 2]) - a1*(y[i + 1] - y[i - 1]);
        u[i] = w[i] + (1.0/6.0)*k;
    }
}

/* One step: u holds level n before and level n+1 after. The stages fill the ghost cells of what they read. */
void lb_ad010_step(ptrdiff_t n, double lam, double *u, double *y, double *w, double *z)
{
    const double a1 = (2.0/3.0)*lam;
    const double a2 = (1.0/12.0)*lam;
    lb_ad010_fill_halo(n, u);
    stage1(n, a2, a1, u, y, w);
    lb_ad010_fill_halo(n, y);
    stage2(n, a2, a1, y, u, z, w);
    lb_ad010_fill_halo(n, z);
    stage3(n, a2, a1, z, u, y, w);
    lb_ad010_fill_halo(n, y);
    stage4(n, a2, a1, y, w, u);
}

/*
 * nsteps steps. The last array is u, advanced in place; the others are work space.
 */
int lb_ad010_run(ptrdiff_t nsteps, ptrdiff_t n, double lam, double *const level[4])
{
    const int status = lb_ad010_check(n, lam);
    if (status != LB_AD010_OK)
        return status;
    if (nsteps < 0)
        return LB_AD010_BAD_SIZE;
    if (!level)
        return LB_AD010_NULL_POINTER;
    for (int k = 0; k < LB_AD010_ARRAYS; ++k)
        if (!level[k])
            return LB_AD010_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_ad010_step(n, lam, level[3], level[0], level[1], level[2]);
    }
    return LB_AD010_OK;
}
