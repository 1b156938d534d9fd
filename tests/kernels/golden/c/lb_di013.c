/* DI 013 r2   r_x + r_y <= 1/2, r_x >= 0, r_y >= 0   halo 1|1 x 1|1, periodic fill included */
/* levelbook:forward-euler-five-points/2/c/double,periodic:68a4e9cbb4e1f9625bfc808d2711132e8e4247631a5313afea11aa6de20822e6 */
/*
 * Entry       DI 013, revision 2: Forward Euler, five points (double precision).
 * Equation    u_t = nu (u_xx + u_yy); r_x = nu dt/dx^2, r_y = nu dt/dy^2.
 * Formula     u[n+1,i,j] = a0*u[n,i,j] + r_x*(u[n,i+1,j] + u[n,i-1,j]) + r_y*(u[n,i,j+1] +
 *             u[n,i,j-1])
 *             with a0 = 1 - 2*r_y - 2*r_x
 * Order       1 in time, 2 in space, 2 at fixed r_x, r_y.
 * Error       At r_x = 1/8, r_y = 1/8 the leading error term strengthens the damping of short
 *             waves (derivative of order 4).
 * Stable      for r_x + r_y <= 1/2, r_x >= 0, r_y >= 0.
 * Arrays      2 of (nx + 2) x (ny + 2) doubles, contiguous; ghost cells: 1 before and 1 after
 *             along x, 1 before and 1 after along y.
 *             x runs fastest: the point (i, j) is u[j][i].
 *             u: level n
 *             w: level n+1 out
 * Storage     1 kept level and one array for the new level; rotate the arrays after each step.
 * Work        7 operations and 24 bytes a point and step by the facts.
 * Boundary    periodic: fill_halo copies the ghost cells.
 * Start-up    none: the initial level is enough.
 * Units       u in any unit; time and space enter through the dimensionless numbers only.
 * Calling     double *level[2];   each of lb_di013_length(nx, ny) doubles
 *             status = lb_di013_run(nsteps, nx, ny, r_x, r_y, level);   result in level[1]
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
    LB_DI013_HALO_X_LEFT = 1,
    LB_DI013_HALO_X_RIGHT = 1,
    LB_DI013_MIN_NX = 1,
    LB_DI013_HALO_Y_LEFT = 1,
    LB_DI013_HALO_Y_RIGHT = 1,
    LB_DI013_MIN_NY = 1,
    LB_DI013_LEVELS = 1,  /* time levels kept between steps */
    LB_DI013_ARRAYS = 2   /* arrays of lb_di013_length(nx, ny) doubles */
};

enum {
    LB_DI013_OK = 0,
    LB_DI013_BAD_SIZE = 1,       /* a size too small for the halo, or a negative number of steps */
    LB_DI013_BAD_PARAMETER = 2,  /* r_x or r_y not a finite number */
    LB_DI013_OUTSIDE_BOUND = 3,  /* not within r_x + r_y <= 1/2, r_x >= 0, r_y >= 0 */
    LB_DI013_NULL_POINTER = 4,
    LB_DI013_NAN_IN_STATE = 5
};

ptrdiff_t lb_di013_length(ptrdiff_t nx, ptrdiff_t ny);
int lb_di013_check(ptrdiff_t nx, ptrdiff_t ny, double r_x, double r_y);
int lb_di013_check_state(ptrdiff_t nx, ptrdiff_t ny, const double *u);
void lb_di013_fill_halo(ptrdiff_t nx, ptrdiff_t ny, double *u);
void lb_di013_step(ptrdiff_t nx, ptrdiff_t ny, double r_x, double r_y,
    const double *restrict u, double *restrict w);
int lb_di013_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, double r_x, double r_y,
    double *level[2]);

/* Doubles in every array: the points and their ghost cells. */
ptrdiff_t lb_di013_length(ptrdiff_t nx, ptrdiff_t ny)
{
    return (nx + LB_DI013_HALO_X_LEFT + LB_DI013_HALO_X_RIGHT)
        * (ny + LB_DI013_HALO_Y_LEFT + LB_DI013_HALO_Y_RIGHT);
}

/* Status of the arguments; O(1). */
int lb_di013_check(ptrdiff_t nx, ptrdiff_t ny, double r_x, double r_y)
{
    if (nx < LB_DI013_MIN_NX || ny < LB_DI013_MIN_NY)
        return LB_DI013_BAD_SIZE;
    if (!isfinite(r_x) || !isfinite(r_y))
        return LB_DI013_BAD_PARAMETER;
    if (!(r_y + r_x <= 0.5 && 0.0 <= r_x && 0.0 <= r_y))
        return LB_DI013_OUTSIDE_BOUND;
    return LB_DI013_OK;
}

/* Whether the points of u are finite numbers; as long as a sweep, so not part of a step. */
int lb_di013_check_state(ptrdiff_t nx, ptrdiff_t ny, const double *u)
{
    if (!u)
        return LB_DI013_NULL_POINTER;
    const ptrdiff_t row = nx + LB_DI013_HALO_X_LEFT + LB_DI013_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_DI013_HALO_Y_LEFT)*row + LB_DI013_HALO_X_LEFT;
        for (ptrdiff_t i = 0; i < nx; ++i)
            if (!isfinite(u[at + i]))
                return LB_DI013_NAN_IN_STATE;
    }
    return LB_DI013_OK;
}

/* Ghost cells of a periodic grid, those of the corners included. */
void lb_di013_fill_halo(ptrdiff_t nx, ptrdiff_t ny, double *u)
{
    const ptrdiff_t row = nx + LB_DI013_HALO_X_LEFT + LB_DI013_HALO_X_RIGHT;
    for (ptrdiff_t j = 1; j < ny + 1; ++j) {
        double *const x = u + j*row;
        x[0] = x[nx];
        x[nx + 1] = x[1];
    }
    memcpy(u, u + ny*row, (size_t)(row)*sizeof *u);
    memcpy(u + (ny + 1)*row, u + row, (size_t)(row)*sizeof *u);
}

/* One row of n points. */
static void lb_di013_step_row(ptrdiff_t n, ptrdiff_t row, double a0, double r_x, double r_y,
    const double *restrict u, double *restrict w)
{
    for (ptrdiff_t i = 0; i < n; ++i)
        w[i] = a0*u[i] + r_x*(u[i + 1] + u[i - 1]) + r_y*(u[i + row] + u[i - row]);
}

/* One step. u: level n; w: level n+1 out. */
void lb_di013_step(ptrdiff_t nx, ptrdiff_t ny, double r_x, double r_y,
    const double *restrict u, double *restrict w)
{
    const double a0 = 1.0 - 2.0*r_y - 2.0*r_x;
    const ptrdiff_t row = nx + LB_DI013_HALO_X_LEFT + LB_DI013_HALO_X_RIGHT;
    for (ptrdiff_t j = 0; j < ny; ++j) {
        const ptrdiff_t at = (j + LB_DI013_HALO_Y_LEFT)*row + LB_DI013_HALO_X_LEFT;
        lb_di013_step_row(nx, row, a0, r_x, r_y, u + at, w + at);
    }
}

/*
 * nsteps steps. The first array is spare; then come the kept levels, the oldest first.
 * They are rotated: on return the last is the newest.
 */
int lb_di013_run(ptrdiff_t nsteps, ptrdiff_t nx, ptrdiff_t ny, double r_x, double r_y, double *level[2])
{
    const int status = lb_di013_check(nx, ny, r_x, r_y);
    if (status != LB_DI013_OK)
        return status;
    if (nsteps < 0)
        return LB_DI013_BAD_SIZE;
    if (!level)
        return LB_DI013_NULL_POINTER;
    for (int k = 0; k < LB_DI013_ARRAYS; ++k)
        if (!level[k])
            return LB_DI013_NULL_POINTER;

    for (ptrdiff_t step = 0; step < nsteps; ++step) {
        lb_di013_fill_halo(nx, ny, level[1]);
        lb_di013_step(nx, ny, r_x, r_y, level[1], level[0]);
        double *const newest = level[0];
        level[0] = level[1];
        level[1] = newest;
    }
    return LB_DI013_OK;
}
