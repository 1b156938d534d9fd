! AD 003 r2   |lam| <= 1; keep below   halo 1|1, periodic fill included
! levelbook:leapfrog-central-2/2/fortran/double,periodic:c087af1dfe51637a271b441fbe0c76c714bb4f2235f5398e0c6e0c85636c5203
!
! Entry       AD 003, revision 2: Leapfrog, central 2 (double precision).
! Equation    u_t + c u_x = 0; lam = c dt/dx.
! Formula     u[n+1,i] = u[n-1,i] - lam*(u[n,i+1] - u[n,i-1])
! Order       2 in time, 2 in space, 2 at fixed lam.
! Error       At lam = 1/2 the leading error term adds dispersion: short waves lag behind.
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
! Work        3 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    start makes the 2 kept levels from the initial level, to the order of the
!             scheme.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:n+1, 2)   allocated by the caller
!             call lb_ad003_start(n, lam, u, work, status)
!             newest = 2
!             call lb_ad003_run(nsteps, n, lam, u, newest, status)   result in u(1:n, newest)
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
module lb_ad003
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_ad003_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_ad003_halo_right = 1  ! ghost cells after the last point
  integer, parameter, public :: lb_ad003_min_points = 1
  integer, parameter, public :: lb_ad003_levels = 2      ! time levels kept between steps
  integer, parameter, public :: lb_ad003_arrays = 2      ! columns of u in start and run

  integer, parameter, public :: lb_ad003_ok = 0
  integer, parameter, public :: lb_ad003_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_ad003_bad_parameter = 2  ! lam not a finite number
  integer, parameter, public :: lb_ad003_outside_bound = 3  ! not within |lam| <= 1; keep below
  integer, parameter, public :: lb_ad003_nan_in_state = 5

  public :: lb_ad003_check, lb_ad003_check_state, lb_ad003_step, lb_ad003_run
  public :: lb_ad003_fill_halo
  public :: lb_ad003_start

contains

  !> Status of the arguments; O(1).
  pure function lb_ad003_check(n, lam) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    integer :: status
    status = lb_ad003_ok
    if (n < lb_ad003_min_points) then
      status = lb_ad003_bad_size
    else if (.not. ieee_is_finite(lam)) then
      status = lb_ad003_bad_parameter
    else if (.not. (lam >= (-1.0_wp) .and. lam <= 1.0_wp)) then
      status = lb_ad003_outside_bound
    end if
  end function lb_ad003_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_ad003_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+1)
    integer :: status
    status = lb_ad003_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_ad003_nan_in_state
  end function lb_ad003_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_ad003_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+1)
    u(0) = u(n)
    u(n+1) = u(1)
  end subroutine lb_ad003_fill_halo

  !> One step.
  pure subroutine lb_ad003_step(n, lam, u, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(in)    :: u(0:n+1)   ! level n
    real(wp), intent(inout) :: w(0:n+1)   ! level n-1 in, level n+1 out
    integer :: i
    do i = 1, n
      w(i) = w(i) - lam*(u(i+1) - u(i-1))
    end do
  end subroutine lb_ad003_step

  !> w = u + c dt L y: one term of the Taylor series in time.
  pure subroutine lb_ad003_taylor(n, lam, c, u, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam, c
    real(wp), intent(in)    :: u(0:n+1)
    real(wp), intent(in)    :: y(0:n+1)
    real(wp), intent(inout) :: w(0:n+1)
    real(wp) :: s1
    integer :: i
    s1 = 0.5_wp*lam
    do i = 1, n
      w(i) = u(i) - c*(s1*(y(i+1) - y(i-1)))
    end do
  end subroutine lb_ad003_taylor

  !> Start-up: makes the second level by the Taylor series in time with 2 terms (a
  !> Runge-Kutta step of 2 stages), with differences of order 2 in space.
  !> In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
  !> work: one more array of the same length.
  subroutine lb_ad003_start(n, lam, u, work, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_ad003_arrays)
    real(wp), intent(inout) :: work(0:n+1)
    integer,  intent(out)   :: status
    integer :: k, m
    status = lb_ad003_check(n, lam)
    if (status /= lb_ad003_ok) return
    do k = 2, lb_ad003_arrays
      call lb_ad003_fill_halo(n, u(:, k-1))
      u(:, k) = u(:, k-1)
      do m = 2, 1, -1
        if (mod(m, 2) == 1) then
          call lb_ad003_taylor(n, lam, 1.0_wp/real(m, wp), u(:, k-1), work, u(:, k))
          call lb_ad003_fill_halo(n, u(:, k))
        else
          call lb_ad003_taylor(n, lam, 1.0_wp/real(m, wp), u(:, k-1), u(:, k), work)
          call lb_ad003_fill_halo(n, work)
        end if
      end do
    end do
  end subroutine lb_ad003_start

  !> nsteps steps. The arrays are the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_ad003_run(nsteps, n, lam, u, newest, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_ad003_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_ad003_check(n, lam)
    if (status /= lb_ad003_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_ad003_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_ad003_fill_halo(n, u(:, newest))
      call lb_ad003_step(n, lam, u(:, newest), u(:, oldest))
      newest = oldest
    end do
  end subroutine lb_ad003_run

end module lb_ad003
