! TM 004 r2   order 4; stable on the imaginary axis to 2.82843   no halo
! levelbook:classical-runge-kutta/2/fortran/double,periodic:b43f8bfb34d7ca7ac8388f3d1e671f0c738751ee7131e96174125178948870c8
!
! Entry       TM 004, revision 2: Classical Runge-Kutta (double precision).
! Equation    u' = f(t, u) for n unknowns; dt of either sign.
! Formula     k = f(t, u); y = u + a2_1*k; w = u + b1*k
!             k = f(t + 0.5*dt, y); y = u + a3_2*k; w = w + b2*k
!             k = f(t + 0.5*dt, y); y = u + dt*k; w = w + b3*k
!             k = f(t + dt, y); u = w + b4*k
!             with a2_1 = 0.5*dt, b1 = (1.0/6.0)*dt, a3_2 = 0.5*dt, b2 = (1.0/3.0)*dt, b3 =
!             (1.0/3.0)*dt, b4 = (1.0/6.0)*dt
! Order       4 on linear problems, 4 on nonlinear ones.
! Stable      dt times the eigenvalues of f within: imaginary axis 2*sqrt(2) = 2.82843,
!             negative real axis 2.78529.
! Callback    call rhs(n, t, u, f) sets f = du/dt at (t, u); use host association for what
!             else it needs.
! Storage     4 arrays of n doubles: u, advanced in place, and y, w, k as work space (first in
!             the list, u last).
! Start-up    none.
! Calling     call lb_tm004_run(nsteps, n, t, dt, u, rhs, status)
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
module lb_tm004
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_tm004_arrays = 4  ! columns of u in run: work space, then u

  integer, parameter, public :: lb_tm004_ok = 0
  integer, parameter, public :: lb_tm004_bad_size = 1       ! n < 1, or a negative number of steps
  integer, parameter, public :: lb_tm004_bad_parameter = 2  ! t or dt is not a finite number
  integer, parameter, public :: lb_tm004_nan_in_state = 5

  public :: lb_tm004_rhs, lb_tm004_check, lb_tm004_check_state, lb_tm004_step, lb_tm004_run

  abstract interface
    !> f = du/dt at (t, u), n unknowns.
    subroutine lb_tm004_rhs(n, t, u, f)
      import :: wp
      integer,  intent(in)    :: n
      real(wp), intent(in)    :: t
      real(wp), intent(in)    :: u(n)
      real(wp), intent(inout) :: f(n)
    end subroutine lb_tm004_rhs
  end interface

contains

  !> Status of the arguments; O(1).
  pure function lb_tm004_check(n, t, dt) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: t, dt
    integer :: status
    status = lb_tm004_ok
    if (n < 1) then
      status = lb_tm004_bad_size
    else if (.not. (ieee_is_finite(t) .and. ieee_is_finite(dt))) then
      status = lb_tm004_bad_parameter
    end if
  end function lb_tm004_check

  !> Whether the n values of u are finite numbers; O(n), so not part of a step.
  pure function lb_tm004_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(n)
    integer :: status
    status = lb_tm004_ok
    if (.not. all(ieee_is_finite(u))) status = lb_tm004_nan_in_state
  end function lb_tm004_check_state

  pure subroutine sum1(n, a2_1, b1, u, k, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a2_1, b1
    real(wp), intent(in)    :: u(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    integer :: i
    do i = 1, n
      y(i) = u(i) + a2_1*k(i)
      w(i) = u(i) + b1*k(i)
    end do
  end subroutine sum1

  pure subroutine sum2(n, a3_2, b2, u, k, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a3_2, b2
    real(wp), intent(in)    :: u(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    integer :: i
    do i = 1, n
      y(i) = u(i) + a3_2*k(i)
      w(i) = w(i) + b2*k(i)
    end do
  end subroutine sum2

  pure subroutine sum3(n, dt, b3, u, k, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: dt, b3
    real(wp), intent(in)    :: u(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: y(n)
    real(wp), intent(inout) :: w(n)
    integer :: i
    do i = 1, n
      y(i) = u(i) + dt*k(i)
      w(i) = w(i) + b3*k(i)
    end do
  end subroutine sum3

  pure subroutine sum4(n, b4, w, k, u)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: b4
    real(wp), intent(in)    :: w(n)
    real(wp), intent(in)    :: k(n)
    real(wp), intent(inout) :: u(n)
    integer :: i
    do i = 1, n
      u(i) = w(i) + b4*k(i)
    end do
  end subroutine sum4

  !> One step from t to t + dt: u is advanced in place.
  subroutine lb_tm004_step(n, t, dt, u, y, w, k, rhs)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n)
    real(wp), intent(inout), dimension(n) :: y, w, k
    procedure(lb_tm004_rhs) :: rhs
    real(wp) :: a2_1, b1, a3_2, b2, b3, b4
    a2_1 = 0.5_wp*dt
    b1 = (1.0_wp/6.0_wp)*dt
    a3_2 = 0.5_wp*dt
    b2 = (1.0_wp/3.0_wp)*dt
    b3 = (1.0_wp/3.0_wp)*dt
    b4 = (1.0_wp/6.0_wp)*dt
    call rhs(n, t, u, k)
    call sum1(n, a2_1, b1, u, k, y, w)
    call rhs(n, t + 0.5_wp*dt, y, k)
    call sum2(n, a3_2, b2, u, k, y, w)
    call rhs(n, t + 0.5_wp*dt, y, k)
    call sum3(n, dt, b3, u, k, y, w)
    call rhs(n, t + dt, y, k)
    call sum4(n, b4, w, k, u)
  end subroutine lb_tm004_step

  !> nsteps steps. The last column is u, advanced in place; the others are work space.
  subroutine lb_tm004_run(nsteps, n, t, dt, u, rhs, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, lb_tm004_arrays)
    procedure(lb_tm004_rhs) :: rhs
    integer,  intent(out)   :: status
    integer :: k
    status = lb_tm004_check(n, t, dt)
    if (status /= lb_tm004_ok) return
    if (nsteps < 0) then
      status = lb_tm004_bad_size
      return
    end if
    do k = 0, nsteps - 1
      call lb_tm004_step(n, t + real(k, wp)*dt, dt, u(:, 4), u(:, 1), u(:, 2), u(:, 3), rhs)
    end do
  end subroutine lb_tm004_run

end module lb_tm004
