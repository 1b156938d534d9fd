/* AD 032 r2   0 <= lam_x <= 1 and 0 <= lam_y <= 1   halo 1|0 x 1|0, periodic fill included */
/* levelbook:corner-transport-upwind/2/c/double,periodic:8ab3b4110d6cfd6419017ae574bbe955ccdb80c96cfc7cff452b07ff36bbceee */
/*
 * Entry       AD 032, revision 2: Corner transport upwind (double precision).
 * Equation    u_t + c_x u_x + c_y u_y = 0; lam_x = c_x dt/dx, lam_y = c_y dt/dy.
 * Formula     u[n+1,i,j] = a0*u[n,i,j] + a_m1_0*u[n,i-1,j] + a_0_m1*u[n,i,j-1] +
 *             a_m1_m1*u[n,i-1,j-1]
 *             with a0 = 1 - lam_y - lam_x + lam_x*lam_y, a_0_m1 = lam_y - lam_x*lam_y, a_m1_0
 *             = lam_x - lam_x*lam_y, a_m1_m1 = lam_x*lam_y
 * Order       1 in time, 1 in space, 1 at fixed lam_x, lam_y.
 * Error       At lam_x = 1/2, lam_y = 1/2 the leading error term adds diffusion: short waves
 *             are damped; the next one adds dispersion: short waves run ahead.
 * Stable      for 0 <= lam_x <= 1 and 0 <= lam_y <= 1.
 * Arrays      2 of (nx + 1) x (ny + 1) doubles, contiguous; ghost cells: 1 before and 0 after
 *             along x, 1 before and 0 after along y.
 *             x runs fastest: the point (i, j) is u[j][i].
 *             u: level n
 *             w: level n+1 out
 * Storage     1 kept level and one array for the new level; rotate the arrays after each step.
 *             The facts know of 1 array, swept in one direction; this kernel does not use
 *             that.
 * Work        7 operations and 16 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    none: the initial level is enough.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_ad032_length(nx, ny) doubles
 *             status = lb_ad032_run(nsteps, nx, ny, lam_x, lam_y, level);   result in level[1]
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
#include <string.h>

/* Numbers of ghost cells before the first and after the last point, and the least number of points. */
enum {
    LB_AD032_HALO_X_LEFT = 1,
    LB_AD032_HALO_X_RIGHT = 0,
    LB_AD032_MIN_NX = 1,
    LB_AD032_HALO_Y_LEFT = 1,
    LB_AD032_HALO_Y_RIGHT = 0,
    LB_AD032_MIN_NY = 1,
    LB_AD032_LEVELS = 1,  /* time levels kept between steps */
    LB_AD032_ARRAYS = 2   /* arrays of lb_ad032_length(nx, ny) doubles */
};

enum {
    LB_AD032_OK = 0,
    LB_AD032_BAD_SIZE = 1,       /* a size too small for the halo, or a negative number of steps */
    LB_AD032_BAD_PARAMETER = 2,  /* lam_x or lam_y not a finite number */
    LB_AD032_OUTSIDE_BOUND = 3,  /* not within 0 <= lam_x <= 1 and 0 <= lam_y <= 1 */
    LB_AD032_NULL_POINTER = 4,
    LB_AD032_NAN_IN_STATE = 5
};

ptrdiff_t lb_ad032_length(ptrdiff_t nx, ptrdiff_t ny);
int lb_ad032_check(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y);
int lb_ad032_check_state(ptrdiff_t nx, ptrdiff_t ny, const double *u);
void lb_ad032_fill_halo(ptrdiff_t nx, ptrdiff_t ny, double *u);
void lb_ad032_step(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    const double *restrict u, double *restrict w);
int lb_ad032_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    double *level[2]);

/* Doubles in every array: the points and their ghost cells. */
ptrdiff_t lb_ad032_length(ptrdiff_t nx, ptrdiff_t ny)
{
    return (nx + LB_AD032_HALO_X_LEFT + LB_AD032_HALO_X_RIGHT)
        * (ny + LB_AD032_HALO_Y_LEFT + LB_AD032_HALO_Y_RIGHT);
}

/* Status of the arguments; O(1). */
int lb_ad032_check(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y)
{
    if (nx < LB_AD032_MIN_NX || ny < LB_AD032_MIN_NY)
        return LB_AD032_BAD_SIZE;
    if (!isfinite(lam_x) || !isfinite(lam_y))
        return LB_AD032_BAD_PARAMETER;
    if (!(0.0 <= lam_x && lam_x <= 1.0 && 0.0 <= lam_y && lam_y <= 1.0))
        return LB_AD032_OUTSIDE_BOUND;
    return LB_AD032_OK;
}

/* Whether the points of u are finite numbers; as long as a sweep, so not part of a step. */
int lb_ad032_check_state(ptrdiff_t nx, ptrdiff_t ny, const double *u)
{
    if (!u)
        return LB_AD032_NULL_POINTER;
    const ptrdiff_t row = nx + LB_AD032_HALO_X_LEFT + LB_AD032_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_AD032_HALO_Y_LEFT)*row + LB_AD032_HALO_X_LEFT;
        for (ptrdiff_t i = 0; i < nx; ++i)
            if (!isfinite(u[at + i]))
                return LB_AD032_NAN_IN_STATE;
    }
    return LB_AD032_OK;
}

/* Ghost cells of a periodic grid, those of the corners included. */
void lb_ad032_fill_halo(ptrdiff_t nx, ptrdiff_t ny, double *u)
{
    const ptrdiff_t row = nx + LB_AD032_HALO_X_LEFT + LB_AD032_HALO_X_RIGHT;
    for (ptrdiff_t j = 1; j < ny + 1; ++j) {
        double *const x = u + j*row;
        x[0] = x[nx];
    }
    memcpy(u, u + ny*row, (size_t)(row)*sizeof *u);
}

/* One row of n points. */
static void lb_ad032_step_row(ptrdiff_t n, ptrdiff_t row, double a0, double a_m1_0,
    double a_0_m1, double a_m1_m1, const double *restrict u, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        w[i] = a0*u[i] + a_m1_0*u[i - 1] + a_0_m1*u[i - row] + a_m1_m1*u[i - row - 1];
}

/* One step. u: level n; w: level n+1 out. */
void lb_ad032_step(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    const double *restrict u, double *restrict w)
{
    const double a0 = 1.0 - lam_y - lam_x + lam_x*lam_y;
    const double a_0_m1 = lam_y - lam_x*lam_y;
    const double a_m1_0 = lam_x - lam_x*lam_y;
    const double a_m1_m1 = lam_x*lam_y;
    const ptrdiff_t row = nx + LB_AD032_HALO_X_LEFT + LB_AD032_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_AD032_HALO_Y_LEFT)*row + LB_AD032_HALO_X_LEFT;
        lb_ad032_step_row(nx, row, a0, a_m1_0, a_0_m1, a_m1_m1, u + at, w + at);
    }
}

/*
 * nsteps steps. The first array is spare; then come the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_ad032_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y, double *level[2])
{
    const int status = lb_ad032_check(nx, ny, lam_x, lam_y);
    if (status != LB_AD032_OK)
        return status;
    if (nsteps < 0)
        return LB_AD032_BAD_SIZE;
    if (!level)
        return LB_AD032_NULL_POINTER;
    for (int k = 0; k < LB_AD032_ARRAYS; ++k)
        if (!level[k])
            return LB_AD032_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_ad032_fill_halo(nx, ny, level[1]);
        lb_ad032_step(nx, ny, lam_x, lam_y, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_AD032_OK;
}
