! ST 004 r2   first derivative, order 4   halo 2|2, periodic fill included
! levelbook:first-derivative-central-4/2/fortran/double,periodic:7ed6eef270f6b79b507da3994f28c14c5160c63f474c878b9b42cdb499d18ecd
!
! Entry       ST 004, revision 2: First derivative, central 4 (double precision).
! Operator    first derivative of u on a uniform grid of spacing h
! Formula     d[i] = a1*(u[i+1] - u[i-1]) - a2*(u[i+2] - u[i-2])
!             with a1 = (2.0/3.0)/h, a2 = (1.0/12.0)/h
! Order       4; leading error -1/30 h^4 u^(5).
! Arrays      u: n + 4 doubles, contiguous; ghost cells: 2 before the first point, 2 after the
!             last. d: the same layout, only its n points are written.
! Boundary    periodic: fill_halo copies the ghost cells; call it before apply.
! Work        5 operations and 24 bytes a point by the facts.
! Units       d in the unit of u over that of h.
! Calling     call lb_st004_apply(n, h, u, d, status)   status 0: done; other values: see the
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
module lb_st004
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_st004_halo_left = 2   ! ghost cells before the first point
  integer, parameter, public :: lb_st004_halo_right = 2  ! ghost cells after the last point
  integer, parameter, public :: lb_st004_min_points = 2

  integer, parameter, public :: lb_st004_ok = 0
  integer, parameter, public :: lb_st004_bad_size = 1       ! n too small for the halo
  integer, parameter, public :: lb_st004_bad_parameter = 2  ! the spacing is not a positive finite number
  integer, parameter, public :: lb_st004_nan_in_state = 5

  public :: lb_st004_check, lb_st004_check_state, lb_st004_apply
  public :: lb_st004_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_st004_check(n, h) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: h
    integer :: status
    status = lb_st004_ok
    if (n < lb_st004_min_points) then
      status = lb_st004_bad_size
    else if (.not. ieee_is_finite(h)) then
      status = lb_st004_bad_parameter
    else if (h <= 0.0_wp) then
      status = lb_st004_bad_parameter
    end if
  end function lb_st004_check

  !> Whether the n points of u are finite numbers; O(n), so not part of apply.
  pure function lb_st004_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(-1:n+2)
    integer :: status
    status = lb_st004_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_st004_nan_in_state
  end function lb_st004_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_st004_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(-1:n+2)
    u(0) = u(n)
    u(-1) = u(n-1)
    u(n+1) = u(1)
    u(n+2) = u(2)
  end subroutine lb_st004_fill_halo

  !> d from u, whose ghost cells are filled.
  pure subroutine lb_st004_apply(n, h, u, d, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: h
    real(wp), intent(in)    :: u(-1:n+2)
    real(wp), intent(inout) :: d(-1:n+2)
    integer,  intent(out)   :: status
    real(wp) :: a1, a2
    integer :: i
    status = lb_st004_check(n, h)
    if (status /= lb_st004_ok) return
    a1 = (2.0_wp/3.0_wp)/h
    a2 = (1.0_wp/12.0_wp)/h
    do i = 1, n
      d(i) = a1*(u(i+1) - u(i-1)) - a2*(u(i+2) - u(i-2))
    end do
  end subroutine lb_st004_apply

end module lb_st004
