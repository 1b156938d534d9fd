/* AD 033 r2   |lam_x| + |lam_y| <= 1   halo 1|1 x 1|1, periodic fill included */
/* levelbook:leapfrog-in-the-plane/2/c/double,periodic:5a912082a6c00b14abf6cbcbba3cdad923851d5094c0d99dc2225d4a6d9c55fc */
/*
 * Entry       AD 033, revision 2: Leapfrog in the plane (double precision).
 * Equation    u_t + c_x u_x + c_y u_y = 0; lam_x = c_x dt/dx, lam_y = c_y dt/dy.
 * Formula     u[n+1,i,j] = u[n-1,i,j] - lam_x*(u[n,i+1,j] - u[n,i-1,j]) - lam_y*(u[n,i,j+1] -
 *             u[n,i,j-1])
 * Order       2 in time, 2 in space, 2 at fixed lam_x, lam_y.
 * Error       At lam_x = 1/4, lam_y = 1/4 the leading error term adds dispersion: short waves
 *             lag behind.
 * Stable      for |lam_x| + |lam_y| <= 1.
 * Arrays      2 of (nx + 2) x (ny + 2) doubles, contiguous; ghost cells: 1 before and 1 after
 *             along x, 1 before and 1 after along y.
 *             x runs fastest: the point (i, j) is u[j][i].
 *             u: level n
 *             w: level n-1 in, level n+1 out
 * Storage     the oldest level is read only at the point being written and is overwritten in
 *             place: 2 arrays.
 * Work        6 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    start makes the 2 kept levels from the initial level, to the order of the
 *             scheme.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_ad033_length(nx, ny) doubles
 *             status = lb_ad033_start(nx, ny, lam_x, lam_y, level, work);
 *             status = lb_ad033_run(nsteps, nx, ny, lam_x, lam_y, level);   result in level[1]
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
#include <string.h>

/* Numbers of ghost cells before the first and after the last point, and the least number of points. */
enum {
    LB_AD033_HALO_X_LEFT = 1,
    LB_AD033_HALO_X_RIGHT = 1,
    LB_AD033_MIN_NX = 1,
    LB_AD033_HALO_Y_LEFT = 1,
    LB_AD033_HALO_Y_RIGHT = 1,
    LB_AD033_MIN_NY = 1,
    LB_AD033_LEVELS = 2,  /* time levels kept between steps */
    LB_AD033_ARRAYS = 2   /* arrays of lb_ad033_length(nx, ny) doubles */
};

enum {
    LB_AD033_OK = 0,
    LB_AD033_BAD_SIZE = 1,       /* a size too small for the halo, or a negative number of steps */
    LB_AD033_BAD_PARAMETER = 2,  /* lam_x or lam_y not a finite number */
    LB_AD033_OUTSIDE_BOUND = 3,  /* not within |lam_x| + |lam_y| <= 1 */
    LB_AD033_NULL_POINTER = 4,
    LB_AD033_NAN_IN_STATE = 5
};

ptrdiff_t lb_ad033_length(ptrdiff_t nx, ptrdiff_t ny);
int lb_ad033_check(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y);
int lb_ad033_check_state(ptrdiff_t nx, ptrdiff_t ny, const double *u);
void lb_ad033_fill_halo(ptrdiff_t nx, ptrdiff_t ny, double *u);
void lb_ad033_step(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    const double *restrict u, double *restrict w);
int lb_ad033_start(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    double *const level[2], double *work);
int lb_ad033_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    double *level[2]);

/* Doubles in every array: the points and their ghost cells. */
ptrdiff_t lb_ad033_length(ptrdiff_t nx, ptrdiff_t ny)
{
    return (nx + LB_AD033_HALO_X_LEFT + LB_AD033_HALO_X_RIGHT)
        * (ny + LB_AD033_HALO_Y_LEFT + LB_AD033_HALO_Y_RIGHT);
}

/* Status of the arguments; O(1). */
int lb_ad033_check(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y)
{
    if (nx < LB_AD033_MIN_NX || ny < LB_AD033_MIN_NY)
        return LB_AD033_BAD_SIZE;
    if (!isfinite(lam_x) || !isfinite(lam_y))
        return LB_AD033_BAD_PARAMETER;
    if (!(lam_y + lam_x <= 1.0 && lam_x - lam_y <= 1.0 && lam_y - lam_x <= 1.0 && -lam_y - lam_x <= 1.0))
        return LB_AD033_OUTSIDE_BOUND;
    return LB_AD033_OK;
}

/* Whether the points of u are finite numbers; as long as a sweep, so not part of a step. */
int lb_ad033_check_state(ptrdiff_t nx, ptrdiff_t ny, const double *u)
{
    if (!u)
        return LB_AD033_NULL_POINTER;
    const ptrdiff_t row = nx + LB_AD033_HALO_X_LEFT + LB_AD033_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_AD033_HALO_Y_LEFT)*row + LB_AD033_HALO_X_LEFT;
        for (ptrdiff_t i = 0; i < nx; ++i)
            if (!isfinite(u[at + i]))
                return LB_AD033_NAN_IN_STATE;
    }
    return LB_AD033_OK;
}

/* Ghost cells of a periodic grid, those of the corners included. */
void lb_ad033_fill_halo(ptrdiff_t nx, ptrdiff_t ny, double *u)
{
    const ptrdiff_t row = nx + LB_AD033_HALO_X_LEFT + LB_AD033_HALO_X_RIGHT;
    for (ptrdiff_t j = 1; j < ny + 1; ++j) {
        double *const x = u + j*row;
        x[0] = x[nx];
        x[nx + 1] = x[1];
    }
    memcpy(u, u + ny*row, (size_t)(row)*sizeof *u);
    memcpy(u + (ny + 1)*row, u + row, (size_t)(row)*sizeof *u);
}

/* One row of n points. */
static void lb_ad033_step_row(ptrdiff_t n, ptrdiff_t row, double lam_x, double lam_y,
    const double *restrict u, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        w[i] = w[i] - lam_x*(u[i + 1] - u[i - 1]) - lam_y*(u[i + row] - u[i - row]);
}

/* One step. u: level n; w: level n-1 in, level n+1 out. */
void lb_ad033_step(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y,
    const double *restrict u, double *restrict w)
{
    const ptrdiff_t row = nx + LB_AD033_HALO_X_LEFT + LB_AD033_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_AD033_HALO_Y_LEFT)*row + LB_AD033_HALO_X_LEFT;
        lb_ad033_step_row(nx, row, lam_x, lam_y, u + at, w + at);
    }
}

static void lb_ad033_taylor_row(ptrdiff_t n, ptrdiff_t row, double c, double s1x, double s1y,
    const double *restrict u, const double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        w[i] = u[i] + c*(-s1x*(y[i + 1] - y[i - 1]) - s1y*(y[i + row] - y[i - row]));
}

/* w = u + c dt L y: one term of the Taylor series in time. */
static void lb_ad033_taylor(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y, double c,
    const double *restrict u, const double *restrict y, double *restrict w)
{
    const double s1x = 0.5*lam_x;
    const double s1y = 0.5*lam_y;
    const ptrdiff_t row = nx + LB_AD033_HALO_X_LEFT + LB_AD033_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_AD033_HALO_Y_LEFT)*row + LB_AD033_HALO_X_LEFT;
        lb_ad033_taylor_row(nx, row, c, s1x, s1y, u + at, y + at, w + at);
    }
}

/*
 * Start-up: makes the second level by the Taylor series in time with 2 terms (a
 * Runge-Kutta step of 2 stages), with differences of order 2 in space.
 * In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
 * work: one more array of the same length.
 */
int lb_ad033_start(ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y, double *const level[2], double *work)
{
    const int status = lb_ad033_check(nx, ny, lam_x, lam_y);
    if (status != LB_AD033_OK)
        return status;
    if (!level || !work)
        return LB_AD033_NULL_POINTER;
    for (int k = 0; k < LB_AD033_ARRAYS; ++k)
        if (!level[k])
            return LB_AD033_NULL_POINTER;

    for (int k = 1; k < LB_AD033_ARRAYS; ++k) {
        double *const u = level[k - 1];
        lb_ad033_fill_halo(nx, ny, u);
        const double *y = u;
        for (int m = 2; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[k] : work;
            lb_ad033_taylor(nx, ny, lam_x, lam_y, 1.0 / m, u, y, w);
            lb_ad033_fill_halo(nx, ny, w);
            y = w;
        }
    }
    return LB_AD033_OK;
}

/*
 * nsteps steps. The arrays are the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_ad033_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, double lam_x, double lam_y, double *level[2])
{
    const int status = lb_ad033_check(nx, ny, lam_x, lam_y);
    if (status != LB_AD033_OK)
        return status;
    if (nsteps < 0)
        return LB_AD033_BAD_SIZE;
    if (!level)
        return LB_AD033_NULL_POINTER;
    for (int k = 0; k < LB_AD033_ARRAYS; ++k)
        if (!level[k])
            return LB_AD033_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_ad033_fill_halo(nx, ny, level[1]);
        lb_ad033_step(nx, ny, lam_x, lam_y, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_AD033_OK;
}
