! AD 032 r2   0 <= lam_x <= 1 and 0 <= lam_y <= 1   halo 1|0 x 1|0, periodic fill included
! levelbook:corner-transport-upwind/2/fortran/double,periodic:ec36bc7296c13828e139e52e4317c9dde9bb51d33a8e8feb54fe10257011cdd5
!
! Entry       AD 032, revision 2: Corner transport upwind (double precision).
! Equation    u_t + c_x u_x + c_y u_y = 0; lam_x = c_x dt/dx, lam_y = c_y dt/dy.
! Formula     u[n+1,i,j] = a0*u[n,i,j] + a_m1_0*u[n,i-1,j] + a_0_m1*u[n,i,j-1] +
!             a_m1_m1*u[n,i-1,j-1]
!             with a0 = 1 - lam_y - lam_x + lam_x*lam_y, a_0_m1 = lam_y - lam_x*lam_y, a_m1_0
!             = lam_x - lam_x*lam_y, a_m1_m1 = lam_x*lam_y
! Order       1 in time, 1 in space, 1 at fixed lam_x, lam_y.
! Error       At lam_x = 1/2, lam_y = 1/2 the leading error term adds diffusion: short waves
!             are damped; the next one adds dispersion: short waves run ahead.
! Stable      for 0 <= lam_x <= 1 and 0 <= lam_y <= 1.
! Arrays      2 of (nx + 1) x (ny + 1) doubles, contiguous; ghost cells: 1 before and 0 after
!             along x, 1 before and 0 after along y.
!             x runs fastest: the point (i, j) is u(i, j).
!             u: level n
!             w: level n+1 out
! Storage     1 kept level and one array for the new level; rotate the arrays after each step.
!             The facts know of 1 array, swept in one direction; this kernel does not use
!             that.
! Work        7 operations and 16 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    none: the initial level is enough.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:nx+0, 0:ny+0, 2)   allocated by the caller
!             newest = 2
!             call lb_ad032_run(nsteps, nx, ny, lam_x, lam_y, u, newest, status)   result in u(1:nx, 1:ny, newest)
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
module lb_ad032
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  ! Numbers of ghost cells before the first and after the last point, and the least number of points.
  integer, parameter, public :: lb_ad032_halo_x_left = 1
  integer, parameter, public :: lb_ad032_halo_x_right = 0
  integer, parameter, public :: lb_ad032_min_nx = 1
  integer, parameter, public :: lb_ad032_halo_y_left = 1
  integer, parameter, public :: lb_ad032_halo_y_right = 0
  integer, parameter, public :: lb_ad032_min_ny = 1
  integer, parameter, public :: lb_ad032_levels = 1  ! time levels kept between steps
  integer, parameter, public :: lb_ad032_arrays = 2  ! columns of u in start and run

  integer, parameter, public :: lb_ad032_ok = 0
  integer, parameter, public :: lb_ad032_bad_size = 1       ! a size too small for the halo, or nsteps negative
  integer, parameter, public :: lb_ad032_bad_parameter = 2  ! lam_x or lam_y not a finite number
  integer, parameter, public :: lb_ad032_outside_bound = 3  ! not within 0 <= lam_x <= 1 and 0 <= lam_y <= 1
  integer, parameter, public :: lb_ad032_nan_in_state = 5

  public :: lb_ad032_check, lb_ad032_check_state, lb_ad032_step, lb_ad032_run
  public :: lb_ad032_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_ad032_check(nx, ny, lam_x, lam_y) result(status)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    integer :: status
    status = lb_ad032_ok
    if (nx < lb_ad032_min_nx .or. ny < lb_ad032_min_ny) then
      status = lb_ad032_bad_size
    else if (.not. ieee_is_finite(lam_x) .or. .not. ieee_is_finite(lam_y)) then
      status = lb_ad032_bad_parameter
    else if (.not. (0.0_wp <= lam_x .and. lam_x <= 1.0_wp .and. 0.0_wp <= lam_y .and. lam_y <= 1.0_wp)) then
      status = lb_ad032_outside_bound
    end if
  end function lb_ad032_check

  !> Whether the points of u are finite numbers; as long as a sweep, so not part of a step.
  pure function lb_ad032_check_state(nx, ny, u) result(status)
    integer,  intent(in) :: nx, ny
    real(wp), intent(in) :: u(0:nx, 0:ny)
    integer :: status
    status = lb_ad032_ok
    if (.not. all(ieee_is_finite(u(1:nx, 1:ny)))) status = lb_ad032_nan_in_state
  end function lb_ad032_check_state

  !> Ghost cells of a periodic grid, those of the corners included.
  pure subroutine lb_ad032_fill_halo(nx, ny, u)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(inout) :: u(0:nx, 0:ny)
    u(0, 1:ny) = u(nx, 1:ny)
    u(:, 0) = u(:, ny)
  end subroutine lb_ad032_fill_halo

  !> One step.
  pure subroutine lb_ad032_step(nx, ny, lam_x, lam_y, u, w)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    real(wp), intent(in)    :: u(0:nx, 0:ny)   ! level n
    real(wp), intent(inout) :: w(0:nx, 0:ny)   ! level n+1 out
    real(wp) :: a0, a_0_m1, a_m1_0, a_m1_m1
    integer :: i, j
    a0 = 1.0_wp - lam_y - lam_x + lam_x*lam_y
    a_0_m1 = lam_y - lam_x*lam_y
    a_m1_0 = lam_x - lam_x*lam_y
    a_m1_m1 = lam_x*lam_y
    do j = 1, ny
      do i = 1, nx
        w(i,j) = a0*u(i,j) + a_m1_0*u(i-1,j) + a_0_m1*u(i,j-1) + a_m1_m1*u(i-1,j-1)
      end do
    end do
  end subroutine lb_ad032_step

  !> nsteps steps. The first array is spare; then come the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_ad032_run(nsteps, nx, ny, lam_x, lam_y, u, newest, status)
    integer,  intent(in)    :: nsteps, nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    real(wp), intent(inout) :: u(0:nx, 0:ny, lb_ad032_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_ad032_check(nx, ny, lam_x, lam_y)
    if (status /= lb_ad032_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_ad032_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_ad032_fill_halo(nx, ny, u(:, :, newest))
      call lb_ad032_step(nx, ny, lam_x, lam_y, u(:, :, newest), u(:, :, oldest))
      newest = oldest
    end do
  end subroutine lb_ad032_run

end module lb_ad032
