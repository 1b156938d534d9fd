! DI 001 r2   0 <= r <= 1/2   halo 1|1, periodic fill included
! levelbook:forward-euler-central-2/2/fortran/double,periodic:49ea666c1f868d5267605dde3b1edc9ee05ecd9d864b397d2766843a72463847
!
! Entry       DI 001, revision 2: Forward Euler, central 2 (double precision).
! Equation    u_t = nu u_xx; r = nu dt/dx^2.
! Formula     u[n+1,i] = a0*u[n,i] + r*(u[n,i+1] + u[n,i-1])
!             with a0 = 1 - 2*r
! Order       1 in time, 2 in space, 2 at fixed r.
! Error       At r = 1/4 the leading error term strengthens the damping of short waves
!             (derivative of order 4).
! Stable      for 0 <= r <= 1/2.
!             Advised working value: r <= 0.45 (nine tenths of the bound).
! Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
!             the last.
!             u: level n
!             w: level n+1 out
! Storage     1 kept level and one array for the new level; rotate the arrays after each step.
! Work        4 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    none: the initial level is enough.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:n+1, 2)   allocated by the caller
!             newest = 2
!             call lb_di001_run(nsteps, n, r, u, newest, status)   result in u(1:n, newest)
!             status 0: done; other values: see the parameters below. step itself checks nothing: call check once.
!             The first array is the spare one.
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
module lb_di001
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_di001_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_di001_halo_right = 1  ! ghost cells after the last point
  integer, parameter, public :: lb_di001_min_points = 1
  integer, parameter, public :: lb_di001_levels = 1      ! time levels kept between steps
  integer, parameter, public :: lb_di001_arrays = 2      ! columns of u in start and run

  integer, parameter, public :: lb_di001_ok = 0
  integer, parameter, public :: lb_di001_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_di001_bad_parameter = 2  ! r not a finite number
  integer, parameter, public :: lb_di001_outside_bound = 3  ! not within 0 <= r <= 1/2
  integer, parameter, public :: lb_di001_nan_in_state = 5

  public :: lb_di001_check, lb_di001_check_state, lb_di001_step, lb_di001_run
  public :: lb_di001_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_di001_check(n, r) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: r
    integer :: status
    status = lb_di001_ok
    if (n < lb_di001_min_points) then
      status = lb_di001_bad_size
    else if (.not. ieee_is_finite(r)) then
      status = lb_di001_bad_parameter
    else if (.not. (r >= 0.0_wp .and. r <= 0.5_wp)) then
      status = lb_di001_outside_bound
    end if
  end function lb_di001_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_di001_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+1)
    integer :: status
    status = lb_di001_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_di001_nan_in_state
  end function lb_di001_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_di001_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+1)
    u(0) = u(n)
    u(n+1) = u(1)
  end subroutine lb_di001_fill_halo

  !> One step.
  pure subroutine lb_di001_step(n, r, u, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: r
    real(wp), intent(in)    :: u(0:n+1)   ! level n
    real(wp), intent(inout) :: w(0:n+1)   ! level n+1 out
    real(wp) :: a0
    integer :: i
    a0 = 1.0_wp - 2.0_wp*r
    do i = 1, n
      w(i) = a0*u(i) + r*(u(i+1) + u(i-1))
    end do
  end subroutine lb_di001_step

  !> nsteps steps. The first array is spare; then come the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_di001_run(nsteps, n, r, u, newest, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: r
    real(wp), intent(inout) :: u(0:n+1, lb_di001_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_di001_check(n, r)
    if (status /= lb_di001_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_di001_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_di001_fill_halo(n, u(:, newest))
      call lb_di001_step(n, r, u(:, newest), u(:, oldest))
      newest = oldest
    end do
  end subroutine lb_di001_run

end module lb_di001
