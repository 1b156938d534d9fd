! AD 005 r2   |lam| <= 1   halo 1|1, periodic fill included
! levelbook:lax-wendroff/2/fortran/double,periodic:9c6bd7583dffc31137aa427fe37d391505983d3fdd683b765e7cc84032ba5901
!
! Entry       AD 005, revision 2: Lax-Wendroff (double precision).
! Equation    u_t + c u_x = 0; lam = c dt/dx.
! Formula     u[n+1,i] = a0*u[n,i] - ap1*u[n,i+1] + am1*u[n,i-1]
!             with a0 = 1 - lam*lam, am1 = (1/2)*lam + (1/2)*lam*lam, ap1 = (1/2)*lam -
!             (1/2)*lam*lam
! Order       2 in time, 2 in space, 2 at fixed lam.
! Error       At lam = 1/2 the leading error term adds dispersion: short waves lag behind; the
!             next one adds fourth-order diffusion: short waves are damped.
! Stable      for |lam| <= 1.
!             Advised working value: |lam| <= 0.9 (nine tenths of the bound).
! Arrays      2 of n + 2 doubles, contiguous; ghost cells: 1 before the first point, 1 after
!             the last.
!             u: level n
!             w: level n+1 out
! Storage     1 kept level and one array for the new level; rotate the arrays after each step.
! Work        5 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    none: the initial level is enough.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:n+1, 2)   allocated by the caller
!             newest = 2
!             call lb_ad005_run(nsteps, n, lam, u, newest, status)   result in u(1:n, newest)
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
module lb_ad005
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: lb_ad005_halo_left = 1   ! ghost cells before the first point
  integer, parameter, public :: lb_ad005_halo_right = 1  ! ghost cells after the last point
  integer, parameter, public :: lb_ad005_min_points = 1
  integer, parameter, public :: lb_ad005_levels = 1      ! time levels kept between steps
  integer, parameter, public :: lb_ad005_arrays = 2      ! columns of u in start and run

  integer, parameter, public :: lb_ad005_ok = 0
  integer, parameter, public :: lb_ad005_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: lb_ad005_bad_parameter = 2  ! lam not a finite number
  integer, parameter, public :: lb_ad005_outside_bound = 3  ! not within |lam| <= 1
  integer, parameter, public :: lb_ad005_nan_in_state = 5

  public :: lb_ad005_check, lb_ad005_check_state, lb_ad005_step, lb_ad005_run
  public :: lb_ad005_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_ad005_check(n, lam) result(status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    integer :: status
    status = lb_ad005_ok
    if (n < lb_ad005_min_points) then
      status = lb_ad005_bad_size
    else if (.not. ieee_is_finite(lam)) then
      status = lb_ad005_bad_parameter
    else if (.not. (lam >= (-1.0_wp) .and. lam <= 1.0_wp)) then
      status = lb_ad005_outside_bound
    end if
  end function lb_ad005_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function lb_ad005_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(0:n+1)
    integer :: status
    status = lb_ad005_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = lb_ad005_nan_in_state
  end function lb_ad005_check_state

  !> Ghost cells of a periodic row.
  pure subroutine lb_ad005_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u(0:n+1)
    u(0) = u(n)
    u(n+1) = u(1)
  end subroutine lb_ad005_fill_halo

  !> One step.
  pure subroutine lb_ad005_step(n, lam, u, w)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: lam
    real(wp), intent(in)    :: u(0:n+1)   ! level n
    real(wp), intent(inout) :: w(0:n+1)   ! level n+1 out
    real(wp) :: a0, am1, ap1
    integer :: i
    a0 = 1.0_wp - lam*lam
    am1 = 0.5_wp*lam + 0.5_wp*lam*lam
    ap1 = 0.5_wp*lam - 0.5_wp*lam*lam
    do i = 1, n
      w(i) = a0*u(i) - ap1*u(i+1) + am1*u(i-1)
    end do
  end subroutine lb_ad005_step

  !> nsteps steps. The first array is spare; then come the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_ad005_run(nsteps, n, lam, u, newest, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(0:n+1, lb_ad005_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_ad005_check(n, lam)
    if (status /= lb_ad005_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_ad005_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_ad005_fill_halo(n, u(:, newest))
      call lb_ad005_step(n, lam, u(:, newest), u(:, oldest))
      newest = oldest
    end do
  end subroutine lb_ad005_run

end module lb_ad005
