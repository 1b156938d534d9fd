/* WA 015 r2   0 <= lam <= 1/2; keep below   halo 2|2 x 2|2 x 2|2, periodic fill included */
/* levelbook:leapfrog-thirteen-points/2/c/double,periodic:36bc3ccf3f0628b67268e99537528bb3d7b35edab1e03fec8ad51b35e2c3ab19 */
/*
 * Entry       WA 015, revision 2: Leapfrog, thirteen points (double precision).
 * Equation    u_tt = c^2 (u_xx + u_yy + u_zz); lam = c dt/dx = c dt/dy = c dt/dz.
 * Formula     u[n+1,i,j,k] = a0*u[n,i,j,k] + a1*(u[n,i+1,j,k] + u[n,i-1,j,k] + u[n,i,j+1,k] +
 *             u[n,i,j-1,k] + u[n,i,j,k+1] + u[n,i,j,k-1]) - a2*(u[n,i+2,j,k] + u[n,i-2,j,k] +
 *             u[n,i,j+2,k] + u[n,i,j-2,k] + u[n,i,j,k+2] + u[n,i,j,k-2]) - u[n-1,i,j,k]
 *             with a0 = 2 - (15/2)*lam*lam, a1 = (4/3)*lam*lam, a2 = (1/12)*lam*lam
 * Order       2 in time, 4 in space, 2 at fixed lam.
 * Error       At lam = 1/5 the leading error term adds dispersion: short waves run ahead.
 * Stable      for 0 <= lam <= 1/2; keep below.
 *             Advised working value: lam <= 0.45 (nine tenths of the bound).
 *             At the bound itself: double root on the unit circle: growth linear in n for that
 *             wave.
 * Arrays      2 of (nx + 4) x (ny + 4) x (nz + 4) doubles, contiguous; ghost cells: 2 before
 *             and 2 after along x, 2 before and 2 after along y, 2 before and 2 after along z.
 *             x runs fastest: the point (i, j, k) is u[k][j][i].
 *             u: level n
 *             w: level n-1 in, level n+1 out
 * Storage     the oldest level is read only at the point being written and is overwritten in
 *             place: 2 arrays.
 * Work        16 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    start makes the 2 kept levels from u and dt u_t at the initial time, to the
 *             order of the scheme.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_wa015_length(nx, ny, nz) doubles
 *             status = lb_wa015_start(nx, ny, nz, lam, level, v, work);
 *             status = lb_wa015_run(nsteps, nx, ny, nz, lam, level);   result in level[1]
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
    LB_WA015_HALO_X_LEFT = 2,
    LB_WA015_HALO_X_RIGHT = 2,
    LB_WA015_MIN_NX = 2,
    LB_WA015_HALO_Y_LEFT = 2,
    LB_WA015_HALO_Y_RIGHT = 2,
    LB_WA015_MIN_NY = 2,
    LB_WA015_HALO_Z_LEFT = 2,
    LB_WA015_HALO_Z_RIGHT = 2,
    LB_WA015_MIN_NZ = 2,
    LB_WA015_LEVELS = 2,  /* time levels kept between steps */
    LB_WA015_ARRAYS = 2   /* arrays of lb_wa015_length(nx, ny, nz) doubles */
};

enum {
    LB_WA015_OK = 0,
    LB_WA015_BAD_SIZE = 1,       /* a size too small for the halo, or a negative number of steps */
    LB_WA015_BAD_PARAMETER = 2,  /* lam not a finite number */
    LB_WA015_OUTSIDE_BOUND = 3,  /* not within 0 <= lam <= 1/2; keep below */
    LB_WA015_NULL_POINTER = 4,
    LB_WA015_NAN_IN_STATE = 5
};

ptrdiff_t lb_wa015_length(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz);
int lb_wa015_check(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam);
int lb_wa015_check_state(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, const double *u);
void lb_wa015_fill_halo(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double *u);
void lb_wa015_step(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam,
    const double *restrict u, double *restrict w);
int lb_wa015_start(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam,
    double *const level[2], const double *v, double *work);
int lb_wa015_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam,
    double *level[2]);

/* Doubles in every array: the points and their ghost cells. */
ptrdiff_t lb_wa015_length(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz)
{
    return (nx + LB_WA015_HALO_X_LEFT + LB_WA015_HALO_X_RIGHT)
        * (ny + LB_WA015_HALO_Y_LEFT + LB_WA015_HALO_Y_RIGHT)
        * (nz + LB_WA015_HALO_Z_LEFT + LB_WA015_HALO_Z_RIGHT);
}

/* Status of the arguments; O(1). */
int lb_wa015_check(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam)
{
    if (nx < LB_WA015_MIN_NX || ny < LB_WA015_MIN_NY || nz < LB_WA015_MIN_NZ)
        return LB_WA015_BAD_SIZE;
    if (!isfinite(lam))
        return LB_WA015_BAD_PARAMETER;
    if (!(lam >= 0.0 && lam <= 0.5))
        return LB_WA015_OUTSIDE_BOUND;
    return LB_WA015_OK;
}

/* Whether the points of u are finite numbers; as long as a sweep, so not part of a step. */
int lb_wa015_check_state(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, const double *u)
{
    if (!u)
        return LB_WA015_NULL_POINTER;
    const ptrdiff_t row = nx + LB_WA015_HALO_X_LEFT + LB_WA015_HALO_X_RIGHT;
    const ptrdiff_t plane = row*(ny + LB_WA015_HALO_Y_LEFT + LB_WA015_HALO_Y_RIGHT);
    for (ptrdiff_t k = 0; k < nz; ++k) {
        for (ptrdiff_t j = 0; j < ny; ++j) {
            const ptrdiff_t at = (k + LB_WA015_HALO_Z_LEFT)*plane + (j + LB_WA015_HALO_Y_LEFT)*row
                + LB_WA015_HALO_X_LEFT;
            for (ptrdiff_t i = 0; i < nx; ++i)
                if (!isfinite(u[at + i]))
                    return LB_WA015_NAN_IN_STATE;
        }
    }
    return LB_WA015_OK;
}

/* Ghost cells of a periodic grid, those of the corners included. */
void lb_wa015_fill_halo(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double *u)
{
    const ptrdiff_t row = nx + LB_WA015_HALO_X_LEFT + LB_WA015_HALO_X_RIGHT;
    const ptrdiff_t plane = row*(ny + LB_WA015_HALO_Y_LEFT + LB_WA015_HALO_Y_RIGHT);
    for (ptrdiff_t k = 2; k < nz + 2; ++k) {
        double *const p = u + k*plane;
        for (ptrdiff_t j = 2; j < ny + 2; ++j) {
            double *const x = p + j*row;
            x[0] = x[nx];
            x[1] = x[nx + 1];
            x[nx + 2] = x[2];
            x[nx + 3] = x[3];
        }
        memcpy(p, p + ny*row, (size_t)(2*row)*sizeof *u);
        memcpy(p + (ny + 2)*row, p + 2*row, (size_t)(2*row)*sizeof *u);
    }
    memcpy(u, u + nz*plane, (size_t)(2*plane)*sizeof *u);
    memcpy(u + (nz + 2)*plane, u + 2*plane, (size_t)(2*plane)*sizeof *u);
}

/* One row of n points. */
static void lb_wa015_step_row(ptrdiff_t n, ptrdiff_t row, ptrdiff_t plane, double a0,
    double a1, double a2, const double *restrict u, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        w[i] = a0*u[i] + a1*(u[i + 1] + u[i - 1] + u[i + row] + u[i - row] + u[i + plane]
            + u[i - plane]) - a2*(u[i + 2] + u[i - 2] + u[i + 2*row] + u[i - 2*row] + u[i + 2*plane]
            + u[i - 2*plane]) - w[i];
}

/* One step. u: level n; w: level n-1 in, level n+1 out. */
void lb_wa015_step(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam,
    const double *restrict u, double *restrict w)
{
    const double a0 = 2.0 - 7.5*lam*lam;
    const double a1 = (4.0/3.0)*lam*lam;
    const double a2 = (1.0/12.0)*lam*lam;
    const ptrdiff_t row = nx + LB_WA015_HALO_X_LEFT + LB_WA015_HALO_X_RIGHT;
    const ptrdiff_t plane = row*(ny + LB_WA015_HALO_Y_LEFT + LB_WA015_HALO_Y_RIGHT);
    for (ptrdiff_t k = 0; k < nz; ++k) {
        for (ptrdiff_t j = 0; j < ny; ++j) {
            const ptrdiff_t at = (k + LB_WA015_HALO_Z_LEFT)*plane + (j + LB_WA015_HALO_Y_LEFT)*row
                + LB_WA015_HALO_X_LEFT;
            lb_wa015_step_row(nx, row, plane, a0, a1, a2, u + at, w + at);
        }
    }
}

static void lb_wa015_taylor_row(ptrdiff_t n, ptrdiff_t row, ptrdiff_t plane, double b,
    double c, double s1, double s0, double s2, const double *restrict u,
    const double *restrict v, const double *restrict y, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        w[i] = u[i] + b*v[i] + c*(s1*(y[i + 1] + y[i - 1] + y[i + row] + y[i - row] + y[i + plane]
            + y[i - plane]) - s0*y[i] - s2*(y[i + 2] + y[i - 2] + y[i + 2*row] + y[i - 2*row]
            + y[i + 2*plane] + y[i - 2*plane]));
}

/* w = u + b v + c dt^2 L y: one term of the Taylor series in time. */
static void lb_wa015_taylor(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam, double b,
    double c, const double *restrict u, const double *restrict v, const double *restrict y,
    double *restrict w)
{
    const double s0 = 7.5*lam*lam;
    const double s1 = (4.0/3.0)*lam*lam;
    const double s2 = (1.0/12.0)*lam*lam;
    const ptrdiff_t row = nx + LB_WA015_HALO_X_LEFT + LB_WA015_HALO_X_RIGHT;
    const ptrdiff_t plane = row*(ny + LB_WA015_HALO_Y_LEFT + LB_WA015_HALO_Y_RIGHT);
    for (ptrdiff_t k = 0; k < nz; ++k) {
        for (ptrdiff_t j = 0; j < ny; ++j) {
            const ptrdiff_t at = (k + LB_WA015_HALO_Z_LEFT)*plane + (j + LB_WA015_HALO_Y_LEFT)*row
                + LB_WA015_HALO_X_LEFT;
            lb_wa015_taylor_row(nx, row, plane, b, c, s1, s0, s2, u + at, v + at, y + at, w + at);
        }
    }
}

/*
 * Start-up: makes the second level by the Taylor series in time through dt^2, with
 * differences of order 4 in space.
 * In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.
 * work: one more array of the same length.
 */
int lb_wa015_start(ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam, double *const level[2], const double *v, double *work)
{
    const int status = lb_wa015_check(nx, ny, nz, lam);
    if (status != LB_WA015_OK)
        return status;
    if (!level || !work || !v)
        return LB_WA015_NULL_POINTER;
    for (int k = 0; k < LB_WA015_ARRAYS; ++k)
        if (!level[k])
            return LB_WA015_NULL_POINTER;

    double *const u = level[0];
    lb_wa015_fill_halo(nx, ny, nz, u);
    for (int k = 1; k < LB_WA015_LEVELS; ++k) {
        const double *y = u;
        for (int m = 1; m >= 1; --m) {
            double *const w = m % 2 == 1 ? level[0 + k] : work;
            lb_wa015_taylor(nx, ny, nz, lam, (double)k / (2 * m - 1), (double)(k * k) / ((2 * m - 1) * (2 * m)), u, v, y, w);
            lb_wa015_fill_halo(nx, ny, nz, w);
            y = w;
        }
    }
    return LB_WA015_OK;
}

/*
 * nsteps steps. The arrays are the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_wa015_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, ptrdiff_t nz, double lam, double *level[2])
{
    const int status = lb_wa015_check(nx, ny, nz, lam);
    if (status != LB_WA015_OK)
        return status;
    if (nsteps < 0)
        return LB_WA015_BAD_SIZE;
    if (!level)
        return LB_WA015_NULL_POINTER;
    for (int k = 0; k < LB_WA015_ARRAYS; ++k)
        if (!level[k])
            return LB_WA015_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_wa015_fill_halo(nx, ny, nz, level[1]);
        lb_wa015_step(nx, ny, nz, lam, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_WA015_OK;
}
