! AD 033 r2   |lam_x| + |lam_y| <= 1   halo 1|1 x 1|1, periodic fill included
! levelbook:leapfrog-in-the-plane/2/fortran/double,periodic:fbf10e698a13acf6b08d5808ea7cff9a19f211861a94e505b20c6d61f337ead7
!
! Entry       AD 033, revision 2: Leapfrog in the plane (double precision).
! Equation    u_t + c_x u_x + c_y u_y = 0; lam_x = c_x dt/dx, lam_y = c_y dt/dy.
! Formula     u[n+1,i,j] = u[n-1,i,j] - lam_x*(u[n,i+1,j] - u[n,i-1,j]) - lam_y*(u[n,i,j+1] -
!             u[n,i,j-1])
! Order       2 in time, 2 in space, 2 at fixed lam_x, lam_y.
! Error       At lam_x = 1/4, lam_y = 1/4 the leading error term adds dispersion: short waves
!             lag behind.
! Stable      for |lam_x| + |lam_y| <= 1.
! Arrays      2 of (nx + 2) x (ny + 2) doubles, contiguous; ghost cells: 1 before and 1 after
!             along x, 1 before and 1 after along y.
!             x runs fastest: the point (i, j) is u(i, j).
!             u: level n
!             w: level n-1 in, level n+1 out
! Storage     the oldest level is read only at the point being written and is overwritten in
!             place: 2 arrays.
! Work        6 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    start makes the 2 kept levels from the initial level, to the order of the
!             scheme.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:nx+1, 0:ny+1, 2)   allocated by the caller
!             call lb_ad033_start(nx, ny, lam_x, lam_y, u, work, status)
!             newest = 2
!             call lb_ad033_run(nsteps, nx, ny, lam_x, lam_y, u, newest, status)   result in u(1:nx, 1:ny, newest)
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
module lb_ad033
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  ! Numbers of ghost cells before the first and after the last point, and the least number of points.
  integer, parameter, public :: lb_ad033_halo_x_left = 1
  integer, parameter, public :: lb_ad033_halo_x_right = 1
  integer, parameter, public :: lb_ad033_min_nx = 1
  integer, parameter, public :: lb_ad033_halo_y_left = 1
  integer, parameter, public :: lb_ad033_halo_y_right = 1
  integer, parameter, public :: lb_ad033_min_ny = 1
  integer, parameter, public :: lb_ad033_levels = 2  ! time levels kept between steps
  integer, parameter, public :: lb_ad033_arrays = 2  ! columns of u in start and run

  integer, parameter, public :: lb_ad033_ok = 0
  integer, parameter, public :: lb_ad033_bad_size = 1       ! a size too small for the halo, or nsteps negative
  integer, parameter, public :: lb_ad033_bad_parameter = 2  ! lam_x or lam_y not a finite number
  integer, parameter, public :: lb_ad033_outside_bound = 3  ! not within |lam_x| + |lam_y| <= 1
  integer, parameter, public :: lb_ad033_nan_in_state = 5

  public :: lb_ad033_check, lb_ad033_check_state, lb_ad033_step, lb_ad033_run
  public :: lb_ad033_fill_halo
  public :: lb_ad033_start

contains

  !> Status of the arguments; O(1).
  pure function lb_ad033_check(nx, ny, lam_x, lam_y) result(status)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    integer :: status
    status = lb_ad033_ok
    if (nx < lb_ad033_min_nx .or. ny < lb_ad033_min_ny) then
      status = lb_ad033_bad_size
    else if (.not. ieee_is_finite(lam_x) .or. .not. ieee_is_finite(lam_y)) then
      status = lb_ad033_bad_parameter
    else if (.not. (lam_y + lam_x <= 1.0_wp .and. lam_x - lam_y <= 1.0_wp .and. lam_y &
    - lam_x <= 1.0_wp .and. -lam_y - lam_x <= 1.0_wp)) then
      status = lb_ad033_outside_bound
    end if
  end function lb_ad033_check

  !> Whether the points of u are finite numbers; as long as a sweep, so not part of a step.
  pure function lb_ad033_check_state(nx, ny, u) result(status)
    integer,  intent(in) :: nx, ny
    real(wp), intent(in) :: u(0:nx+1, 0:ny+1)
    integer :: status
    status = lb_ad033_ok
    if (.not. all(ieee_is_finite(u(1:nx, 1:ny)))) status = lb_ad033_nan_in_state
  end function lb_ad033_check_state

  !> Ghost cells of a periodic grid, those of the corners included.
  pure subroutine lb_ad033_fill_halo(nx, ny, u)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(inout) :: u(0:nx+1, 0:ny+1)
    u(0, 1:ny) = u(nx, 1:ny)
    u(nx+1, 1:ny) = u(1, 1:ny)
    u(:, 0) = u(:, ny)
    u(:, ny+1) = u(:, 1)
  end subroutine lb_ad033_fill_halo

  !> One step.
  pure subroutine lb_ad033_step(nx, ny, lam_x, lam_y, u, w)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    real(wp), intent(in)    :: u(0:nx+1, 0:ny+1)   ! level n
    real(wp), intent(inout) :: w(0:nx+1, 0:ny+1)   ! level n-1 in, level n+1 out
    integer :: i, j
    do j = 1, ny
      do i = 1, nx
        w(i,j) = w(i,j) - lam_x*(u(i+1,j) - u(i-1,j)) - lam_y*(u(i,j+1) - u(i,j-1))
      end do
    end do
  end subroutine lb_ad033_step

  !> w = u + c dt L y: one term of the Taylor series in time.
  pure subroutine lb_ad033_taylor(nx, ny, lam_x, lam_y, c, u, y, w)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: lam_x, lam_y, c
    real(wp), intent(in)    :: u(0:nx+1, 0:ny+1)
    real(wp), intent(in)    :: y(0:nx+1, 0:ny+1)
    real(wp), intent(inout) :: w(0:nx+1, 0:ny+1)
    real(wp) :: s1x, s1y
    integer :: i, j
    s1x = 0.5_wp*lam_x
    s1y = 0.5_wp*lam_y
    do j = 1, ny
      do i = 1, nx
        w(i,j) = u(i,j) + c*(-s1x*(y(i+1,j) - y(i-1,j)) - s1y*(y(i,j+1) - y(i,j-1)))
      end do
    end do
  end subroutine lb_ad033_taylor

  !> Start-up: makes the second level by the Taylor series in time with 2 terms (a
  !> Runge-Kutta step of 2 stages), with differences of order 2 in space.
  !> In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.
  !> work: one more array of the same length.
  subroutine lb_ad033_start(nx, ny, lam_x, lam_y, u, work, status)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    real(wp), intent(inout) :: u(0:nx+1, 0:ny+1, lb_ad033_arrays)
    real(wp), intent(inout) :: work(0:nx+1, 0:ny+1)
    integer,  intent(out)   :: status
    integer :: k, m
    status = lb_ad033_check(nx, ny, lam_x, lam_y)
    if (status /= lb_ad033_ok) return
    do k = 2, lb_ad033_arrays
      call lb_ad033_fill_halo(nx, ny, u(:, :, k-1))
      u(:, :, k) = u(:, :, k-1)
      do m = 2, 1, -1
        if (mod(m, 2) == 1) then
          call lb_ad033_taylor(nx, ny, lam_x, lam_y, 1.0_wp/real(m, wp), u(:, :, k-1), work, u(:, :, k))
          call lb_ad033_fill_halo(nx, ny, u(:, :, k))
        else
          call lb_ad033_taylor(nx, ny, lam_x, lam_y, 1.0_wp/real(m, wp), u(:, :, k-1), u(:, :, k), work)
          call lb_ad033_fill_halo(nx, ny, work)
        end if
      end do
    end do
  end subroutine lb_ad033_start

  !> nsteps steps. The arrays are the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_ad033_run(nsteps, nx, ny, lam_x, lam_y, u, newest, status)
    integer,  intent(in)    :: nsteps, nx, ny
    real(wp), intent(in)    :: lam_x, lam_y
    real(wp), intent(inout) :: u(0:nx+1, 0:ny+1, lb_ad033_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_ad033_check(nx, ny, lam_x, lam_y)
    if (status /= lb_ad033_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_ad033_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_ad033_fill_halo(nx, ny, u(:, :, newest))
      call lb_ad033_step(nx, ny, lam_x, lam_y, u(:, :, newest), u(:, :, oldest))
      newest = oldest
    end do
  end subroutine lb_ad033_run

end module lb_ad033
