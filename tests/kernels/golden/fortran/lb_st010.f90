! ST 010 r2   first derivative, order 4   halo 1|2, periodic fill included
! levelbook:first-derivative-staggered-4/2/fortran/double,periodic:1d6eb911a1453d679a93e48558535fc7a0d7e916c3a0c922eab67458fb7ecf20
!
! Entry       ST 010, revision 2: First derivative, staggered 4 (double precision).
! Operator    first derivative of u on a uniform grid of spacing h
! Formula     d[i] = ap1*(u[i+1] - u[i]) - ap2*(u[i+2] - u[i-1])
!             with ap1 = 1.125/h, ap2 = (1.0/24.0)/h
! Order       4; leading error -3/640 h^4 u^(5).
! Index       staggered: u[i] stands at x_i, d[i] at x_i + h/2, so that u[i] and u[i+1] are
!             its neighbours.
! Arrays      u: n + 3 doubles, contiguous; ghost cells: 1 before the first point, 2 after the
!             last. d: the same layout, only its n points are written.
! Boundary    periodic: fill_halo copies the ghost cells; call it before apply.
! Work        5 operations and 24 bytes a point by the facts.
! Units       d in the unit of u over that of h.
! Calling     call lb_st010_apply(n, h, u, d, status)   status 0: done; other values: see the
!             parameters below.
! Bitwise     C, Fortran and Python agree bit for bit when built with -ffp-contract=off (as
!             here: -std=f2018 -O3 -march=native -ffp-contract=off). Contraction to fused
!             multiply-add, -Ofast and -ffast-math break it.
! Cautions    Von Neumann analysis holds for constant coefficients on periodic or infinite
!             domains; with boundaries, variable coefficients or nonlinear terms it is
!             necessary but not always sufficient.
!             A passed trial is evidence for this kernel, not for the code that calls it.
!             Where results bear on safety, verification and validation under the applicable
!             codes and by licensed practice remain with the user.
! References  A reference, Journal 1 (1970) 1-2.
! Licence     office internal.
! Generator   release 1.0.0. Generated; change the entry, not this file.
!
module lb_st010
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_st010_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_st010_halo_right = 2  ! ghost cells after the last point
  integer, parameter, public :: lb_st010_min_points = 2

  integer, parameter, public :: lb_st010_ok = 0
  integer, parameter, public :: lb_st010_bad_size = 1       ! n too small for the halo
  integer, parameter, public :: lb_st010_bad_parameter = 2  ! the spacing is not a positive finite number
  integer, parameter, public :: lb_st010_nan_in_state = 5

  public :: lb_st010_check, lb_st010_check_state, lb_st010_apply
  public :: lb_st010_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_st010_check(n, h) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: h
    integer :: status
    status = lb_st010_ok
    if (n < lb_st010_min_points) then
      status = lb_st010_bad_size
    else if (.not. ieee_is_finite(h)) then
      status = lb_st010_bad_parameter
    else if (h <= 0.0_wp) then
      status = lb_st010_bad_parameter
    end if
  end function lb_st010_check

  !> Whether the n points of u are finite numbers; O(n), so not part of apply.
  pure function lb_st010_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+2)
    integer :: status
    status = lb_st010_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_st010_nan_in_state
  end function lb_st010_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_st010_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+2)
    u(0) = u(n)
    u(n+1) = u(1)
    u(n+2) = u(2)
  end subroutine lb_st010_fill_halo

  !> d from u, whose ghost cells are filled.
  pure subroutine lb_st010_apply(n, h, u, d, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: h
    real(wp), intent(in)    :: u(0:n+2)
    real(wp), intent(inout) :: d(0:n+2)
    integer,  intent(out)   :: status
    real(wp) :: ap1, ap2
    integer :: i
    status = lb_st010_check(n, h)
    if (status /= lb_st010_ok) return
    ap1 = 1.125_wp/h
    ap2 = (1.0_wp/24.0_wp)/h
    do i = 1, n
      d(i) = ap1*(u(i+1) - u(i)) - ap2*(u(i+2) - u(i-1))
    end do
  end subroutine lb_st010_apply

end module lb_st010
