! WA 001 r2   |lam| <= 1; keep below   halo 1|1, periodic fill included
! levelbook:leapfrog-for-the-wave-equation/2/fortran/double,periodic:c265be667df5363911c8115af4cc070144cd99bf55b432eab3cde93f555dc470
!
! Entry       WA 001, revision 2: Leapfrog for the wave equation (double precision).
! Equation    u_tt = c^2 u_xx; lam = c dt/dx.
! Formula     u[n+1,i] = a0*u[n,i] + a1*(u[n,i+1] + u[n,i-1]) - u[n-1,i]
!             with a0 = 2 - 2*lam*lam, a1 = lam*lam
! Order       2 in time, 2 in space, 2 at fixed lam.
! Error       At lam = 1/2 the leading error term adds dispersion: short waves lag.
! Stable      for |lam| <= 1; keep below.
!             Advised working value: |lam| <= 0.9 (nine tenths of the bound).
!             At the bound itself: double root on the unit circle: growth linear in n for that
!             wave.
! Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
!             the last.
!             u: level n
!             w: level n-1 in, level n+1 out
! Storage     the oldest level is read only at the point being written and is overwritten in
!             place: 2 arrays.
! Work        5 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    start makes the 2 kept levels from u and dt u_t at the initial time, to the
!             order of the scheme.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:n+1, 2)   allocated by the caller
!             call lb_wa001_start(n, lam, u, v, work, status)
!             newest = 2
!             call lb_wa001_run(nsteps, n, lam, u, newest, status)   result in u(1:n, newest)
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
module lb_wa001
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_wa001_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_wa001_halo_right = 1  ! ghost cells after the last point
  integer, parameter, public :: lb_wa001_min_points = 1
  integer, parameter, public :: lb_wa001_levels = 2      ! time levels kept between steps
  integer, parameter, public :: lb_wa001_arrays = 2      ! columns of u in start and run

  integer, parameter, public :: lb_wa001_ok = 0
  integer, parameter, public :: lb_wa001_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_wa001_bad_parameter = 2  ! lam not a finite number
  integer, parameter, public :: lb_wa001_outside_bound = 3  ! not within |lam| <= 1; keep below
  integer, parameter, public :: lb_wa001_nan_in_state = 5

  public :: lb_wa001_check, lb_wa001_check_state, lb_wa001_step, lb_wa001_run
  public :: lb_wa001_fill_halo
  public :: lb_wa001_start

contains

  !> Status of the arguments; O(1).
  pure function lb_wa001_check(n, lam) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    integer :: status
    status = lb_wa001_ok
    if (n < lb_wa001_min_points) then
      status = lb_wa001_bad_size
    else if (.not. ieee_is_finite(lam)) then
      status = lb_wa001_bad_parameter
    else if (.not. (lam >= (-1.0_wp) .and. lam <= 1.0_wp)) then
      status = lb_wa001_outside_bound
    end if
  end function lb_wa001_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_wa001_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+1)
    integer :: status
    status = lb_wa001_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_wa001_nan_in_state
  end function lb_wa001_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_wa001_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+1)
    u(0) = u(n)
    u(n+1) = u(1)
  end subroutine lb_wa001_fill_halo

  !> One step.
  pure subroutine lb_wa001_step(n, lam, u, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(in)    :: u(0:n+1)   ! level n
    real(wp), intent(inout) :: w(0:n+1)   ! level n-1 in, level n+1 out
    real(wp) :: a0, a1
    integer :: i
    a0 = 2.0_wp - 2.0_wp*lam*lam
    a1 = lam*lam
    do i = 1, n
      w(i) = a0*u(i) + a1*(u(i+1) + u(i-1)) - w(i)
    end do
  end subroutine lb_wa001_step

  !> w = u + b v + c dt^2 L y: one term of the Taylor series in time.
  pure subroutine lb_wa001_taylor(n, lam, b, c, u, v, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam, b, c
    real(wp), intent(in)    :: u(0:n+1)
    real(wp), intent(in)    :: v(0:n+1)
    real(wp), intent(in)    :: y(0:n+1)
    real(wp), intent(inout) :: w(0:n+1)
    real(wp) :: s0, s1
    integer :: i
    s0 = 2.0_wp*lam*lam
    s1 = lam*lam
    do i = 1, n
      w(i) = u(i) + b*v(i) + c*(s1*(y(i+1) + y(i-1)) - s0*y(i))
    end do
  end subroutine lb_wa001_taylor

  !> Start-up: makes the second level by the Taylor series in time through dt^2, with
  !> differences of order 2 in space.
  !> In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.
  !> work: one more array of the same length.
  subroutine lb_wa001_start(n, lam, u, v, work, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_wa001_arrays)
    real(wp), intent(in)    :: v(0:n+1)
    real(wp), intent(inout) :: work(0:n+1)
    integer,  intent(out)   :: status
    integer :: k, m
    status = lb_wa001_check(n, lam)
    if (status /= lb_wa001_ok) return
    call lb_wa001_fill_halo(n, u(:, 1))
    do k = 1, lb_wa001_levels - 1
      work = u(:, 1)
      do m = 1, 1, -1
        if (mod(m, 2) == 1) then
          call lb_wa001_taylor(n, lam, real(k, wp)/real(2*m-1, wp), real(k*k, wp)/real((2*m-1)*(2*m), wp), &
            u(:, 1), v, work, u(:, 1+k))
          call lb_wa001_fill_halo(n, u(:, 1+k))
        else
          call lb_wa001_taylor(n, lam, real(k, wp)/real(2*m-1, wp), real(k*k, wp)/real((2*m-1)*(2*m), wp), &
            u(:, 1), v, u(:, 1+k), work)
          call lb_wa001_fill_halo(n, work)
        end if
      end do
    end do
  end subroutine lb_wa001_start

  !> nsteps steps. The arrays are the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_wa001_run(nsteps, n, lam, u, newest, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_wa001_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_wa001_check(n, lam)
    if (status /= lb_wa001_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_wa001_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_wa001_fill_halo(n, u(:, newest))
      call lb_wa001_step(n, lam, u(:, newest), u(:, oldest))
      newest = oldest
    end do
  end subroutine lb_wa001_run

end module lb_wa001
