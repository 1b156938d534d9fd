! AD 013 r2   |lam| <= 0.723627   halo 1|1, periodic fill included
! levelbook:adams-bashforth-3-central-2/2/fortran/double,periodic:7518e1de6e1b01a3af943b5164ec73898334dc8e950cf063615b753e63d9f04b
!
! Entry       AD 013, revision 2: Adams-Bashforth 3, central 2 (double precision).
! Equation    u_t + c u_x = 0; lam = c dt/dx.
! Formula     u[n+1,i] = u[n,i] - a1*(u[n,i+1] - u[n,i-1]) + b1*(u[n-1,i+1] - u[n-1,i-1]) -
!             c1*(u[n-2,i+1] - u[n-2,i-1])
!             with a1 = (23/24)*lam, b1 = (2/3)*lam, c1 = (5/24)*lam
! Order       3 in time, 2 in space, 2 at fixed lam.
! Error       At lam = 13/36 the leading error term adds dispersion: short waves lag behind;
!             the next one adds fourth-order diffusion: short waves are damped.
! Stable      for |lam| <= 0.723627.
!             Advised working value: |lam| <= 0.651 (nine tenths of the bound).
! Arrays      4 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
!             the last.
!             u: level n
!             u1: level n-1
!             u2: level n-2
!             w: level n+1 out
! Storage     3 kept levels and one array for the new level; rotate the arrays after each
!             step.
! Work        9 operations and 40 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    start makes the 3 kept levels from the initial level, to the order of the
!             scheme.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:n+1, 4)   allocated by the caller
!             call lb_ad013_start(n, lam, u, work, status)
!             newest = 4
!             call lb_ad013_run(nsteps, n, lam, u, newest, status)   result in u(1:n, newest)
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
module lb_ad013
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_ad013_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_ad013_halo_right = 1  ! ghost cells after the last point
  integer, parameter, public :: lb_ad013_min_points = 1
  integer, parameter, public :: lb_ad013_levels = 3      ! time levels kept between steps
  integer, parameter, public :: lb_ad013_arrays = 4      ! columns of u in start and run

  integer, parameter, public :: lb_ad013_ok = 0
  integer, parameter, public :: lb_ad013_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_ad013_bad_parameter = 2  ! lam not a finite number
  integer, parameter, public :: lb_ad013_outside_bound = 3  ! not within |lam| <= 0.723627
  integer, parameter, public :: lb_ad013_nan_in_state = 5

  public :: lb_ad013_check, lb_ad013_check_state, lb_ad013_step, lb_ad013_run
  public :: lb_ad013_fill_halo
  public :: lb_ad013_start

contains

  !> Status of the arguments; O(1).
  pure function lb_ad013_check(n, lam) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    integer :: status
    status = lb_ad013_ok
    if (n < lb_ad013_min_points) then
      status = lb_ad013_bad_size
    else if (.not. ieee_is_finite(lam)) then
      status = lb_ad013_bad_parameter
    else if (.not. (lam >= (-0.7236272269866327_wp) .and. lam <= 0.7236272269866327_wp)) then
      status = lb_ad013_outside_bound
    end if
  end function lb_ad013_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_ad013_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+1)
    integer :: status
    status = lb_ad013_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_ad013_nan_in_state
  end function lb_ad013_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_ad013_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+1)
    u(0) = u(n)
    u(n+1) = u(1)
  end subroutine lb_ad013_fill_halo

  !> One step.
  pure subroutine lb_ad013_step(n, lam, u, u1, u2, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(in)    :: u(0:n+1)   ! level n
    real(wp), intent(in)    :: u1(0:n+1)   ! level n-1
    real(wp), intent(in)    :: u2(0:n+1)   ! level n-2
    real(wp), intent(inout) :: w(0:n+1)   ! level n+1 out
    real(wp) :: a1, b1, c1
    integer :: i
    a1 = (23.0_wp/24.0_wp)*lam
    b1 = (2.0_wp/3.0_wp)*lam
    c1 = (5.0_wp/24.0_wp)*lam
    do i = 1, n
      w(i) = u(i) - a1*(u(i+1) - u(i-1)) + b1*(u1(i+1) - u1(i-1)) - c1*(u2(i+1) - u2(i-1))
    end do
  end subroutine lb_ad013_step

  !> w = u + c dt L y: one term of the Taylor series in time.
  pure subroutine lb_ad013_taylor(n, lam, c, u, y, w)
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
  end subroutine lb_ad013_taylor

  !> Start-up: makes 2 further levels by the Taylor series in time with 3 terms (a
  !> Runge-Kutta step of 3 stages), with differences of order 2 in space.
  !> In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
  !> work: one more array of the same length.
  subroutine lb_ad013_start(n, lam, u, work, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_ad013_arrays)
    real(wp), intent(inout) :: work(0:n+1)
    integer,  intent(out)   :: status
    integer :: k, m
    status = lb_ad013_check(n, lam)
    if (status /= lb_ad013_ok) return
    do k = 3, lb_ad013_arrays
      call lb_ad013_fill_halo(n, u(:, k-1))
      work = u(:, k-1)
      do m = 3, 1, -1
        if (mod(m, 2) == 1) then
          call lb_ad013_taylor(n, lam, 1.0_wp/real(m, wp), u(:, k-1), work, u(:, k))
          call lb_ad013_fill_halo(n, u(:, k))
        else
          call lb_ad013_taylor(n, lam, 1.0_wp/real(m, wp), u(:, k-1), u(:, k), work)
          call lb_ad013_fill_halo(n, work)
        end if
      end do
    end do
  end subroutine lb_ad013_start

  !> nsteps steps. The first array is spare; then come the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_ad013_run(nsteps, n, lam, u, newest, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_ad013_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_ad013_check(n, lam)
    if (status /= lb_ad013_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 4) then
      status = lb_ad013_bad_size
      return
    end if
    call lb_ad013_fill_halo(n, u(:, modulo(newest-2, 4)+1))
    call lb_ad013_fill_halo(n, u(:, modulo(newest-3, 4)+1))
    do k = 1, nsteps
      oldest = modulo(newest, 4) + 1
      call lb_ad013_fill_halo(n, u(:, newest))
      call lb_ad013_step(n, lam, u(:, newest), u(:, modulo(newest-2, 4)+1), u(:, modulo(newest-3, 4)+1), &
          u(:, oldest))
      newest = oldest
    end do
  end subroutine lb_ad013_run

end module lb_ad013
