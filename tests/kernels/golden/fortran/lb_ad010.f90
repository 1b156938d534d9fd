! AD 010 r2   |lam| <= 2.0612   halo 2|2, periodic fill included
! levelbook:classical-runge-kutta-central-4/2/fortran/double,periodic:bd0ea6b43b577de7cb4fae98f320af2eb93f553dd4acead332cc06bfac319f4b
!
! Entry       AD 010, revision 2: Classical Runge-Kutta, central 4 (double precision).
! Equation    u_t + c u_x = 0; lam = c dt/dx.
! Formula     stage 1: k = a2*(u[n,i+2] - u[n,i-2]) - a1*(u[n,i+1] - u[n,i-1])
!             y[i] = u[n,i] + (1/2)*k
!             w[i] = u[n,i] + (1/6)*k
!             stage 2: k = a2*(y[i+2] - y[i-2]) - a1*(y[i+1] - y[i-1])
!             z[i] = u[n,i] + (1/2)*k
!             w[i] = w[i] + (1/3)*k
!             stage 3: k = a2*(z[i+2] - z[i-2]) - a1*(z[i+1] - z[i-1])
!             y[i] = u[n,i] + k
!             w[i] = w[i] + (1/3)*k
!             stage 4: k = a2*(y[i+2] - y[i-2]) - a1*(y[i+1] - y[i-1])
!             u[n+1,i] = w[i] + (1/6)*k
!             with a1 = (2/3)*lam, a2 = (1/12)*lam
! Order       4 in time, 4 in space, 4 at fixed lam.
! Error       At lam = 34/33 the leading error term adds dispersion: short waves lag behind;
!             the next one adds sixth-order diffusion: short waves are damped.
! Stable      for |lam| <= 2.0612.
!             Advised working value: |lam| <= 1.85 (nine tenths of the bound).
! Arrays      4 of n + 4 doubles, contiguous; ghost cells: 2 before the first point, 2 after
!             the last.
!             u: level n in, level n+1 out; y, w, z: work space, need not be set.
! Storage     slopes are not stored: each is added at once to the sums that need it. 4 arrays.
! Work        33 operations and 184 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    none: the initial level is enough.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(-1:n+2, 4)   allocated by the caller
!             newest = 4
!             call lb_ad010_run(nsteps, n, lam, u, newest, status)   result in u(1:n, newest)
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
module lb_ad010
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_ad010_halo_left = 2   ! ghost cells before the first point
  integer, parameter, public :: lb_ad010_halo_right = 2  ! ghost cells after the last point
  integer, parameter, public :: lb_ad010_min_points = 2
  integer, parameter, public :: lb_ad010_levels = 1      ! time levels kept between steps
  integer, parameter, public :: lb_ad010_arrays = 4      ! columns of u in start and run

  integer, parameter, public :: lb_ad010_ok = 0
  integer, parameter, public :: lb_ad010_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_ad010_bad_parameter = 2  ! lam not a finite number
  integer, parameter, public :: lb_ad010_outside_bound = 3  ! not within |lam| <= 2.0612
  integer, parameter, public :: lb_ad010_nan_in_state = 5

  public :: lb_ad010_check, lb_ad010_check_state, lb_ad010_step, lb_ad010_run
  public :: lb_ad010_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_ad010_check(n, lam) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    integer :: status
    status = lb_ad010_ok
    if (n < lb_ad010_min_points) then
      status = lb_ad010_bad_size
    else if (.not. ieee_is_finite(lam)) then
      status = lb_ad010_bad_parameter
    else if (.not. (lam >= (-2.0612023173914658_wp) .and. lam <= 2.0612023173914658_wp)) then
      status = lb_ad010_outside_bound
    end if
  end function lb_ad010_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_ad010_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(-1:n+2)
    integer :: status
    status = lb_ad010_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_ad010_nan_in_state
  end function lb_ad010_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_ad010_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(-1:n+2)
    u(0) = u(n)
    u(-1) = u(n-1)
    u(n+1) = u(1)
    u(n+2) = u(2)
  end subroutine lb_ad010_fill_halo

  !> k is dt times the slope; each stage adds it to the sums that need it.
  pure subroutine stage1(n, a2, a1, u, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a2, a1
    real(wp), intent(in)    :: u(-1:n+2)
    real(wp), intent(inout) :: y(-1:n+2)
    real(wp), intent(inout) :: w(-1:n+2)
    real(wp) :: k
    integer :: i
    do i = 1, n
      k = a2*(u(i+2) - u(i-2)) - a1*(u(i+1) - u(i-1))
      y(i) = u(i) + 0.5_wp*k
      w(i) = u(i) + (1.0_wp/6.0_wp)*k
    end do
  end subroutine stage1

  pure subroutine stage2(n, a2, a1, y, u, z, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a2, a1
    real(wp), intent(in)    :: y(-1:n+2)
    real(wp), intent(in)    :: u(-1:n+2)
    real(wp), intent(inout) :: z(-1:n+2)
    real(wp), intent(inout) :: w(-1:n+2)
    real(wp) :: k
    integer :: i
    do i = 1, n
      k = a2*(y(i+2) - y(i-2)) - a1*(y(i+1) - y(i-1))
      z(i) = u(i) + 0.5_wp*k
      w(i) = w(i) + (1.0_wp/3.0_wp)*k
    end do
  end subroutine stage2

  pure subroutine stage3(n, a2, a1, z, u, y, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a2, a1
    real(wp), intent(in)    :: z(-1:n+2)
    real(wp), intent(in)    :: u(-1:n+2)
    real(wp), intent(inout) :: y(-1:n+2)
    real(wp), intent(inout) :: w(-1:n+2)
    real(wp) :: k
    integer :: i
    do i = 1, n
      k = a2*(z(i+2) - z(i-2)) - a1*(z(i+1) - z(i-1))
      y(i) = u(i) + k
      w(i) = w(i) + (1.0_wp/3.0_wp)*k
    end do
  end subroutine stage3

  pure subroutine stage4(n, a2, a1, y, w, u)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: a2, a1
    real(wp), intent(in)    :: y(-1:n+2)
    real(wp), intent(in)    :: w(-1:n+2)
    real(wp), intent(inout) :: u(-1:n+2)
    real(wp) :: k
    integer :: i
    do i = 1, n
      k = a2*(y(i+2) - y(i-2)) - a1*(y(i+1) - y(i-1))
      u(i) = w(i) + (1.0_wp/6.0_wp)*k
    end do
  end subroutine stage4

  !> One step: u holds level n before and level n+1 after. The stages fill the ghost cells of what they read.
  pure subroutine lb_ad010_step(n, lam, u, y, w, z)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(-1:n+2)
    real(wp), intent(inout) :: y(-1:n+2)
    real(wp), intent(inout) :: w(-1:n+2)
    real(wp), intent(inout) :: z(-1:n+2)
    real(wp) :: a1, a2
    a1 = (2.0_wp/3.0_wp)*lam
    a2 = (1.0_wp/12.0_wp)*lam
    call lb_ad010_fill_halo(n, u)
    call stage1(n, a2, a1, u, y, w)
    call lb_ad010_fill_halo(n, y)
    call stage2(n, a2, a1, y, u, z, w)
    call lb_ad010_fill_halo(n, z)
    call stage3(n, a2, a1, z, u, y, w)
    call lb_ad010_fill_halo(n, y)
    call stage4(n, a2, a1, y, w, u)
  end subroutine lb_ad010_step

  !> nsteps steps. The last array is u, advanced in place; the others are work space.
  subroutine lb_ad010_run(nsteps, n, lam, u, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(-1:n+2, lb_ad010_arrays)
    integer,  intent(out)   :: status
    integer :: k
    status = lb_ad010_check(n, lam)
    if (status /= lb_ad010_ok) return
    if (nsteps < 0) then
      status = lb_ad010_bad_size
      return
    end if
    do k = 1, nsteps
      call lb_ad010_step(n, lam, u(:, 4), u(:, 1), u(:, 2), u(:, 3))
    end do
  end subroutine lb_ad010_run

end module lb_ad010
