/* ST 004 r2   first derivative, order 4   halo 2|2, periodic fill included */
/* levelbook:first-derivative-central-4/2/c/double,periodic:02e69c77dce7c68a1af93c946c6cab65f831f884fb126d4c41f3a82cd8cbf758 */
/*
 * Entry       ST 004, revision 2: First derivative, central 4 (double precision).
 * Operator    first derivative of u on a uniform grid of spacing h
 * Formula     d[i] = a1*(u[i+1] - u[i-1]) - a2*(u[i+2] - u[i-2])
 *             with a1 = (2.0/3.0)/h, a2 = (1.0/12.0)/h
 * Order       4; leading error -1/30 h^4 u^(5).
 * Arrays      u: n + 4 doubles, contiguous; ghost cells: 2 before the first point, 2 after the
 *             last. d: the same layout, only its n points are written.
 * Boundary    periodic: fill_halo copies the ghost cells; call it before apply.
 * Work        5 operations and 24 bytes a point by the facts.
 * Units       d in the unit of u over that of h.
 * Calling     status = lb_st004_apply(n, h, u, d);   u, d: lb_st004_length(n) doubles each,
 *             distinct; status 0: done, other values: see the second enum.
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
    LB_ST004_HALO_LEFT = 2,   /* ghost cells before the first point */
    LB_ST004_HALO_RIGHT = 2,  /* ghost cells after the last point */
    LB_ST004_MIN_POINTS = 2
};

enum {
    LB_ST004_OK = 0,
    LB_ST004_BAD_SIZE = 1,       /* n too small for the halo */
    LB_ST004_BAD_PARAMETER = 2,  /* the spacing is not a positive finite number */
    LB_ST004_NULL_POINTER = 4,
    LB_ST004_NAN_IN_STATE = 5
};

ptrdiff_t lb_st004_length(ptrdiff_t n);
int lb_st004_check(ptrdiff_t n, double h);
int lb_st004_check_state(ptrdiff_t n, const double *u);
void lb_st004_fill_halo(ptrdiff_t n, double *u);
int lb_st004_apply(ptrdiff_t n, double h, const double *restrict u, double *restrict d);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_st004_length(ptrdiff_t n)
{
    return n + LB_ST004_HALO_LEFT + LB_ST004_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_st004_check(ptrdiff_t n, double h)
{
    if (n < LB_ST004_MIN_POINTS)
        return LB_ST004_BAD_SIZE;
    if (!isfinite(h) || h <= 0.0)
        return LB_ST004_BAD_PARAMETER;
    return LB_ST004_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of apply. */
int lb_st004_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_ST004_NULL_POINTER;
    for (ptrdiff_t i = LB_ST004_HALO_LEFT; i < LB_ST004_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_ST004_NAN_IN_STATE;
    return LB_ST004_OK;
}

/* Ghost cells of a periodic row. */
void lb_st004_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[1] = u[n + 1];
    u[n + 2] = u[2];
    u[n + 3] = u[3];
}

/* d from u, whose ghost cells are filled. */
int lb_st004_apply(ptrdiff_t n, double h, const double *restrict u, double *restrict d)
{
    const int status = lb_st004_check(n, h);
    if (status != LB_ST004_OK)
        return status;
    if (!u || !d)
        return LB_ST004_NULL_POINTER;

    const double a1 = (2.0/3.0)/h;
    const double a2 = (1.0/12.0)/h;
    for (ptrdiff_t i = LB_ST004_HALO_LEFT; i < LB_ST004_HALO_LEFT + n; ++i)
        d[i] = a1*(u[i + 1] - u[i - 1]) - a2*(u[i + 2] - u[i - 2]);
    return LB_ST004_OK;
}
