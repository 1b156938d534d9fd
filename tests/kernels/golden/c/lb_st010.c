/* ST 010 r2   first derivative, order 4   halo 1|2, periodic fill included */
/* levelbook:first-derivative-staggered-4/2/c/double,periodic:440b9f0eed41dcc7826bb2e58f2469e7b32d4c29586c86ea246ec83bff56af15 */
/*
 * Entry       ST 010, revision 2: First derivative, staggered 4 (double precision).
 * Operator    first derivative of u on a uniform grid of spacing h
 * Formula     d[i] = ap1*(u[i+1] - u[i]) - ap2*(u[i+2] - u[i-1])
 *             with ap1 = 1.125/h, ap2 = (1.0/24.0)/h
 * Order       4; leading error -3/640 h^4 u^(5).
 * Index       staggered: u[i] stands at x_i, d[i] at x_i + h/2, so that u[i] and u[i+1] are
 *             its neighbours.
 * Arrays      u: n + 3 doubles, contiguous; ghost cells: 1 before the first point, 2 after the
 *             last. d: the same layout, only its n points are written.
 * Boundary    periodic: fill_halo copies the ghost cells; call it before apply.
 * Work        5 operations and 24 bytes a point by the facts.
 * Units       d in the unit of u over that of h.
 * Calling     status = lb_st010_apply(n, h, u, d);   u, d: lb_st010_length(n) doubles each,
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
    LB_ST010_HALO_LEFT = 1,   /* ghost cells before the first point */
    LB_ST010_HALO_RIGHT = 2,  /* ghost cells after the last point */
    LB_ST010_MIN_POINTS = 2
};

enum {
    LB_ST010_OK = 0,
    LB_ST010_BAD_SIZE = 1,       /* n too small for the halo */
    LB_ST010_BAD_PARAMETER = 2,  /* the spacing is not a positive finite number */
    LB_ST010_NULL_POINTER = 4,
    LB_ST010_NAN_IN_STATE = 5
};

ptrdiff_t lb_st010_length(ptrdiff_t n);
int lb_st010_check(ptrdiff_t n, double h);
int lb_st010_check_state(ptrdiff_t n, const double *u);
void lb_st010_fill_halo(ptrdiff_t n, double *u);
int lb_st010_apply(ptrdiff_t n, double h, const double *restrict u, double *restrict d);

/* Doubles in every array: n points and their ghost cells. */
ptrdiff_t lb_st010_length(ptrdiff_t n)
{
    return n + LB_ST010_HALO_LEFT + LB_ST010_HALO_RIGHT;
}

/* Status of the arguments; O(1). */
int lb_st010_check(ptrdiff_t n, double h)
{
    if (n < LB_ST010_MIN_POINTS)
        return LB_ST010_BAD_SIZE;
    if (!isfinite(h) || h <= 0.0)
        return LB_ST010_BAD_PARAMETER;
    return LB_ST010_OK;
}

/* Whether the n points of u are finite numbers; O(n), so not part of apply. */
int lb_st010_check_state(ptrdiff_t n, const double *u)
{
    if (!u)
        return LB_ST010_NULL_POINTER;
    for (ptrdiff_t i = LB_ST010_HALO_LEFT; i < LB_ST010_HALO_LEFT + n; ++i)
        if (!isfinite(u[i]))
            return LB_ST010_NAN_IN_STATE;
    return LB_ST010_OK;
}

/* Ghost cells of a periodic row. */
void lb_st010_fill_halo(ptrdiff_t n, double *u)
{
    u[0] = u[n];
    u[n + 1] = u[1];
    u[n + 2] = u[2];
}

/* d from u, whose ghost cells are filled. */
int lb_st010_apply(ptrdiff_t n, double h, const double *restrict u, double *restrict d)
{
    const int status = lb_st010_check(n, h);
    if (status != LB_ST010_OK)
        return status;
    if (!u || !d)
        return LB_ST010_NULL_POINTER;

    const double ap1 = 1.125/h;
    const double ap2 = (1.0/24.0)/h;
    for (ptrdiff_t i = LB_ST010_HALO_LEFT; i < LB_ST010_HALO_LEFT + n; ++i)
        d[i] = ap1*(u[i + 1] - u[i]) - ap2*(u[i + 2] - u[i - 1]);
    return LB_ST010_OK;
}
