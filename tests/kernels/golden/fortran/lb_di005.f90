! DI 005 r2   every r >= 0   halo 1|1, periodic fill included
! levelbook:dufort-frankel/2/fortran/double,periodic:b009f58467d60d13997a253a62f258b1228f2ff36df7373d9f1afe0ecfff1731
!
! Entry       DI 005, revision 2: DuFort-Frankel (double precision).
! Equation    u_t = nu u_xx; r = nu dt/dx^2.
! Formula     u[n+1,i] = a1*(u[n,i+1] + u[n,i-1]) + b0*u[n-1,i]
!             with a1 = 2*r/(1 + 2*r), b0 = (1 - 2*r)/(1 + 2*r)
! Order       2 in time, 2 in space, 2 at fixed r.
!             Consistent only while dt^2/dx^2 goes to 0 with the grid.
! Error       At r = 30 the leading error term strengthens the damping of short waves
!             (derivative of order 4).
! Stable      for every r >= 0.
! Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
!             the last.
!             u: level n
!             w: level n-1 in, level n+1 out
! Storage     the oldest level is read only at the point being written and is overwritten in
!             place: 2 arrays.
! Work        4 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    start makes the 2 kept levels from the initial level, to the order of the
!             scheme.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:n+1, 2)   allocated by the caller
!             call lb_di005_start(n, r, u, work, status)
!             newest = 2
!             call lb_di005_run(nsteps, n, r, u, newest, status)   result in u(1:n, newest)
!             status 0: done; other values: see the parameters below. step itself checks nothing: call check once.
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
module lb_di005
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_di005_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_di005_halo_right = 1  ! ghost cells after the last point
  integer, parameter, public :: lb_di005_min_points = 1
  integer, parameter, public :: lb_di005_levels = 2      ! time levels kept between steps
  integer, parameter, public :: lb_di005_arrays = 2      ! columns of u in start and run

  integer, parameter, public :: lb_di005_ok = 0
  integer, parameter, public :: lb_di005_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_di005_bad_parameter = 2  ! r not a finite number, or the coefficient of the new level is 0
  integer, parameter, public :: lb_di005_outside_bound = 3  ! not within every r >= 0
  integer, parameter, public :: lb_di005_nan_in_state = 5

  public :: lb_di005_check, lb_di005_check_state, lb_di005_step, lb_di005_run
  public :: lb_di005_fill_halo
  public :: lb_di005_start

contains

  !> Status of the arguments; O(1).
  pure function lb_di005_check(n, r) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: r
    integer :: status
    status = lb_di005_ok
    if (n < lb_di005_min_points) then
      status = lb_di005_bad_size
    else if (.not. ieee_is_finite(r) .or. .not. abs(1.0_wp + 2.0_wp*r) > 0.0_wp) then
      status = lb_di005_bad_parameter
    else if (.not. (r >= 0.0_wp)) then
      status = lb_di005_outside_bound
    end if
  end function lb_di005_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_di005_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+1)
    integer :: status
    status = lb_di005_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_di005_nan_in_state
  end function lb_di005_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_di005_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+1)
    u(0) = u(n)
    u(n+1) = u(1)
  end subroutine lb_di005_fill_halo

  !> One step.
  pure subroutine lb_di005_step(n, r, u, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: r
    real(wp), intent(in)    :: u(0:n+1)   ! level n
    real(wp), intent(inout) :: w(0:n+1)   ! level n-1 in, level n+1 out
    real(wp) :: a1, b0
    integer :: i
    a1 = 2.0_wp*r/(1.0_wp + 2.0_wp*r)
    b0 = (1.0_wp - 2.0_wp*r)/(1.0_wp + 2.0_wp*r)
    do i = 1, n
      w(i) = a1*(u(i+1) + u(i-1)) + b0*w(i)
    end do
  end subroutine lb_di005_step

  !> w = u + c dt L y: one term of the Taylor series in time.
  pure subroutine lb_di005_taylor(n, r, c, u, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: r, c
    real(wp), intent(in)    :: u(0:n+1)
    real(wp), intent(in)    :: y(0:n+1)
    real(wp), intent(inout) :: w(0:n+1)
    real(wp) :: s0
    integer :: i
    s0 = 2.0_wp*r
    do i = 1, n
      w(i) = u(i) + c*(r*(y(i+1) + y(i-1)) - s0*y(i))
    end do
  end subroutine lb_di005_taylor

  !> Start-up: makes the second level by the Taylor series in time with 2 terms (a
  !> Runge-Kutta step of 2 stages), with differences of order 2 in space.
  !> In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
  !> work: one more array of the same length.
  subroutine lb_di005_start(n, r, u, work, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: r
    real(wp), intent(inout) :: u(0:n+1, lb_di005_arrays)
    real(wp), intent(inout) :: work(0:n+1)
    integer,  intent(out)   :: status
    integer :: k, m
    status = lb_di005_check(n, r)
    if (status /= lb_di005_ok) return
    do k = 2, lb_di005_arrays
      call lb_di005_fill_halo(n, u(:, k-1))
      u(:, k) = u(:, k-1)
      do m = 2, 1, -1
        if (mod(m, 2) == 1) then
          call lb_di005_taylor(n, r, 1.0_wp/real(m, wp), u(:, k-1), work, u(:, k))
          call lb_di005_fill_halo(n, u(:, k))
        else
          call lb_di005_taylor(n, r, 1.0_wp/real(m, wp), u(:, k-1), u(:, k), work)
          call lb_di005_fill_halo(n, work)
        end if
      end do
    end do
  end subroutine lb_di005_start

  !> nsteps steps. The arrays are the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_di005_run(nsteps, n, r, u, newest, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: r
    real(wp), intent(inout) :: u(0:n+1, lb_di005_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_di005_check(n, r)
    if (status /= lb_di005_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_di005_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_di005_fill_halo(n, u(:, newest))
      call lb_di005_step(n, r, u(:, newest), u(:, oldest))
      newest = oldest
    end do
  end subroutine lb_di005_run

end module lb_di005
