! TM 013 r2   order 3; stable on the imaginary axis to 0.723627   no halo
! levelbook:adams-bashforth-3/2/fortran/double,periodic:ded00c696ae2c68be776aabd4abbfa0b896a48210edb0503f5915a24b52e0d33
!
! Entry       TM 013, revision 2: Adams-Bashforth 3 (double precision).
! Equation    u' = f(t, u) for n unknowns; dt of either sign.
! Formula     f = f(t, u); u = u + b0*f - b1*f1 + b2*f2
!             with b0 = (23.0/12.0)*dt, b1 = (4.0/3.0)*dt, b2 = (5.0/12.0)*dt
! Order       3 on linear problems, 3 on nonlinear ones.
! Stable      dt times the eigenvalues of f within: imaginary axis 12*sqrt(11)/55 = 0.723627,
!             negative real axis 6/11 = 0.545455.
! Callback    call rhs(n, t, u, f) sets f = du/dt at (t, u); use host association for what
!             else it needs.
! Storage     1 level of u and 3 slopes, n doubles each, the oldest first; rotated after each
!             step, the oldest overwritten.
! Start-up    call start 2 times before the first step, with t advancing by dt: one
!             Runge-Kutta step of order 4 that also keeps its slope.
! Calling     call lb_tm013_run(nsteps, n, t, dt, u, f, newest, recent, rhs, status)
!             The eigenvalues are the caller's, so that no bound is checked here.
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
module lb_tm013
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_tm013_steps = 3   ! k of a k-step method
  integer, parameter, public :: lb_tm013_levels = 1  ! columns of u
  integer, parameter, public :: lb_tm013_slopes = 3  ! columns of f

  integer, parameter, public :: lb_tm013_ok = 0
  integer, parameter, public :: lb_tm013_bad_size = 1       ! n < 1, a negative number of steps, or no such column
  integer, parameter, public :: lb_tm013_bad_parameter = 2  ! t or dt is not a finite number
  integer, parameter, public :: lb_tm013_nan_in_state = 5

  public :: lb_tm013_rhs, lb_tm013_check, lb_tm013_check_state, lb_tm013_step, lb_tm013_run
  public :: lb_tm013_start

  abstract interface
    !> f = du/dt at (t, u), n unknowns.
    subroutine lb_tm013_rhs(n, t, u, f)
      import :: wp
      integer,  intent(in)    :: n
      real(wp), intent(in)    :: t
      real(wp), intent(in)    :: u(n)
      real(wp), intent(inout) :: f(n)
    end subroutine lb_tm013_rhs
  end interface

contains

  !> Status of the arguments; O(1).
  pure function lb_tm013_check(n, t, dt) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: t, dt
    integer :: status
    status = lb_tm013_ok
    if (n < 1) then
      status = lb_tm013_bad_size
    else if (.not. (ieee_is_finite(t) .and. ieee_is_finite(dt))) then
      status = lb_tm013_bad_parameter
    end if
  end function lb_tm013_check

  !> Whether the n values of u are finite numbers; O(n), so not part of a step.
  pure function lb_tm013_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(n)
    integer :: status
    status = lb_tm013_ok
    if (.not. all(ieee_is_finite(u))) status = lb_tm013_nan_in_state
  end function lb_tm013_check_state

  pure subroutine sum(n, b0, b1, b2, f, f1, f2, u)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: b0, b1, b2
    real(wp), intent(in)    :: f(n)
    real(wp), intent(in)    :: f1(n)
    real(wp), intent(in)    :: f2(n)
    real(wp), intent(inout) :: u(n)
    integer :: i
    do i = 1, n
      u(i) = u(i) + b0*f(i) - b1*f1(i) + b2*f2(i)
    end do
  end subroutine sum

  !> One step from t to t + dt. The slope at t takes the column of the oldest slope, the new level that of the
  !> oldest level; newest and recent are the columns of the newest level and slope, in and out.
  subroutine lb_tm013_step(n, t, dt, u, f, newest, recent, rhs)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, lb_tm013_levels), f(n, lb_tm013_slopes)
    integer,  intent(inout) :: newest, recent
    procedure(lb_tm013_rhs) :: rhs
    real(wp) :: b0, b1, b2
    b0 = (23.0_wp/12.0_wp)*dt
    b1 = (4.0_wp/3.0_wp)*dt
    b2 = (5.0_wp/12.0_wp)*dt
    recent = modulo(recent, lb_tm013_slopes) + 1
    call rhs(n, t, u(:, newest), f(:, recent))
    call sum(n, b0, b1, b2, f(:, modulo(recent-1, 3)+1), f(:, modulo(recent-2, 3)+1), f(:, &
        modulo(recent-3, 3)+1), u(:, 1))
    newest = modulo(newest, lb_tm013_levels) + 1
  end subroutine lb_tm013_step

  pure subroutine start1(n, a2_1, s1, u, f, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a2_1, s1
    real(wp), intent(in)    :: u(n)
    real(wp), intent(in)    :: f(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    integer :: i
    do i = 1, n
      y(i) = u(i) + a2_1*f(i)
      w(i) = u(i) + s1*f(i)
    end do
  end subroutine start1

  pure subroutine start2(n, a3_2, s2, u, k, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a3_2, s2
    real(wp), intent(in)    :: u(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    integer :: i
    do i = 1, n
      y(i) = u(i) + a3_2*k(i)
      w(i) = w(i) + s2*k(i)
    end do
  end subroutine start2

  pure subroutine start3(n, dt, s3, u, k, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: dt, s3
    real(wp), intent(in)    :: u(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    integer :: i
    do i = 1, n
      y(i) = u(i) + dt*k(i)
      w(i) = w(i) + s3*k(i)
    end do
  end subroutine start3

  pure subroutine start4(n, s4, w, k, u)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: s4
    real(wp), intent(in)    :: w(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: u(n)
    integer :: i
    do i = 1, n
      u(i) = w(i) + s4*k(i)
    end do
  end subroutine start4

  !> One start-up step from t to t + dt: Runge-Kutta of order 4, keeping its first slope. Call it
  !> lb_tm013_steps - 1 times before the first step; u(:, newest) is the initial level. work: 3 columns.
  subroutine lb_tm013_start(n, t, dt, u, f, newest, recent, work, rhs, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, lb_tm013_levels), f(n, lb_tm013_slopes)
    integer,  intent(inout) :: newest, recent
    real(wp), intent(inout) :: work(n, 3)
    procedure(lb_tm013_rhs) :: rhs
    integer,  intent(out)   :: status
    status = lb_tm013_check(n, t, dt)
    if (status /= lb_tm013_ok) return
    recent = modulo(recent, lb_tm013_slopes) + 1
    call rhs(n, t, u(:, newest), f(:, recent))
    call start_stages(n, t, dt, u(:, newest), f(:, recent), work(:, 1), work(:, 2), work(:, 3), rhs)
    newest = modulo(newest, lb_tm013_levels) + 1
  end subroutine lb_tm013_start

  subroutine start_stages(n, t, dt, u, f, y, w, k, rhs)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n)
    real(wp), intent(in)    :: f(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    real(wp), intent(inout) :: k(n)
    procedure(lb_tm013_rhs) :: rhs
    real(wp) :: a2_1, s1, a3_2, s2, s3, s4
    a2_1 = 0.5_wp*dt
    s1 = (1.0_wp/6.0_wp)*dt
    a3_2 = 0.5_wp*dt
    s2 = (1.0_wp/3.0_wp)*dt
    s3 = (1.0_wp/3.0_wp)*dt
    s4 = (1.0_wp/6.0_wp)*dt
    call start1(n, a2_1, s1, u, f, y, w)
    call rhs(n, t + 0.5_wp*dt, y, k)
    call start2(n, a3_2, s2, u, k, y, w)
    call rhs(n, t + 0.5_wp*dt, y, k)
    call start3(n, dt, s3, u, k, y, w)
    call rhs(n, t + dt, y, k)
    call start4(n, s4, w, k, u)
  end subroutine start_stages

  !> nsteps steps from levels and slopes that are complete.
  subroutine lb_tm013_run(nsteps, n, t, dt, u, f, newest, recent, rhs, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, lb_tm013_levels), f(n, lb_tm013_slopes)
    integer,  intent(inout) :: newest, recent
    procedure(lb_tm013_rhs) :: rhs
    integer,  intent(out)   :: status
    integer :: k
    status = lb_tm013_check(n, t, dt)
    if (status /= lb_tm013_ok) return
    if (nsteps < 0 .or. min(newest, recent) < 1 .or. newest > lb_tm013_levels .or. recent > lb_tm013_slopes) then
      status = lb_tm013_bad_size
      return
    end if
    do k = 0, nsteps - 1
      call lb_tm013_step(n, t + real(k, wp)*dt, dt, u, f, newest, recent, rhs)
    end do
  end subroutine lb_tm013_run

end module lb_tm013
