! DI 013 r2   r_x + r_y <= 1/2, r_x >= 0, r_y >= 0   halo 1|1 x 1|1, periodic fill included
! levelbook:forward-euler-five-points/2/fortran/double,periodic:01b2e872f93432944cc347ff6673de4abb106bb5d7915d40203acfcb908490ec
!
! Entry       DI 013, revision 2: Forward Euler, five points (double precision).
! Equation    u_t = nu (u_xx + u_yy); r_x = nu dt/dx^2, r_y = nu dt/dy^2.
! Formula     u[n+1,i,j] = a0*u[n,i,j] + r_x*(u[n,i+1,j] + u[n,i-1,j]) + r_y*(u[n,i,j+1] +
!             u[n,i,j-1])
!             with a0 = 1 - 2*r_y - 2*r_x
! Order       1 in time, 2 in space, 2 at fixed r_x, r_y.
! Error       At r_x = 1/8, r_y = 1/8 the leading error term strengthens the damping of short
!             waves (derivative of order 4).
! Stable      for r_x + r_y <= 1/2, r_x >= 0, r_y >= 0.
! Arrays      2 of (nx + 2) x (ny + 2) doubles, contiguous; ghost cells: 1 before and 1 after
!             along x, 1 before and 1 after along y.
!             x runs fastest: the point (i, j) is u(i, j).
!             u: level n
!             w: level n+1 out
! Storage     1 kept level and one array for the new level; rotate the arrays after each step.
! Work        7 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    none: the initial level is enough.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(0:nx+1, 0:ny+1, 2)   allocated by the caller
!             newest = 2
!             call lb_di013_run(nsteps, nx, ny, r_x, r_y, u, newest, status)   result in u(1:nx, 1:ny, newest)
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
module lb_di013
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  ! Numbers of ghost cells before the first and after the last point, and the least number of points.
  integer, parameter, public :: lb_di013_halo_x_left = 1
  integer, parameter, public :: lb_di013_halo_x_right = 1
  integer, parameter, public :: lb_di013_min_nx = 1
  integer, parameter, public :: lb_di013_halo_y_left = 1
  integer, parameter, public :: lb_di013_halo_y_right = 1
  integer, parameter, public :: lb_di013_min_ny = 1
  integer, parameter, public :: lb_di013_levels = 1  ! time levels kept between steps
  integer, parameter, public :: lb_di013_arrays = 2  ! columns of u in start and run

  integer, parameter, public :: lb_di013_ok = 0
  integer, parameter, public :: lb_di013_bad_size = 1       ! a size too small for the halo, or nsteps negative
  integer, parameter, public :: lb_di013_bad_parameter = 2  ! r_x or r_y not a finite number
  integer, parameter, public :: lb_di013_outside_bound = 3  ! not within r_x + r_y <= 1/2, r_x >= 0, r_y >= 0
  integer, parameter, public :: lb_di013_nan_in_state = 5

  public :: lb_di013_check, lb_di013_check_state, lb_di013_step, lb_di013_run
  public :: lb_di013_fill_halo

contains

  !> Status of the arguments; O(1).
  pure function lb_di013_check(nx, ny, r_x, r_y) result(status)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: r_x, r_y
    integer :: status
    status = lb_di013_ok
    if (nx < lb_di013_min_nx .or. ny < lb_di013_min_ny) then
      status = lb_di013_bad_size
    else if (.not. ieee_is_finite(r_x) .or. .not. ieee_is_finite(r_y)) then
      status = lb_di013_bad_parameter
    else if (.not. (r_y + r_x <= 0.5_wp .and. 0.0_wp <= r_x .and. 0.0_wp <= r_y)) then
      status = lb_di013_outside_bound
    end if
  end function lb_di013_check

  !> Whether the points of u are finite numbers; as long as a sweep, so not part of a step.
  pure function lb_di013_check_state(nx, ny, u) result(status)
    integer,  intent(in) :: nx, ny
    real(wp), intent(in) :: u(0:nx+1, 0:ny+1)
    integer :: status
    status = lb_di013_ok
    if (.not. all(ieee_is_finite(u(1:nx, 1:ny)))) status = lb_di013_nan_in_state
  end function lb_di013_check_state

  !> Ghost cells of a periodic grid, those of the corners included.
  pure subroutine lb_di013_fill_halo(nx, ny, u)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(inout) :: u(0:nx+1, 0:ny+1)
    u(0, 1:ny) = u(nx, 1:ny)
    u(nx+1, 1:ny) = u(1, 1:ny)
    u(:, 0) = u(:, ny)
    u(:, ny+1) = u(:, 1)
  end subroutine lb_di013_fill_halo

  !> One step.
  pure subroutine lb_di013_step(nx, ny, r_x, r_y, u, w)
    integer,  intent(in)    :: nx, ny
    real(wp), intent(in)    :: r_x, r_y
    real(wp), intent(in)    :: u(0:nx+1, 0:ny+1)   ! level n
    real(wp), intent(inout) :: w(0:nx+1, 0:ny+1)   ! level n+1 out
    real(wp) :: a0
    integer :: i, j
    a0 = 1.0_wp - 2.0_wp*r_y - 2.0_wp*r_x
    do j = 1, ny
      do i = 1, nx
        w(i,j) = a0*u(i,j) + r_x*(u(i+1,j) + u(i-1,j)) + r_y*(u(i,j+1) + u(i,j-1))
      end do
    end do
  end subroutine lb_di013_step

  !> nsteps steps. The first array is spare; then come the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_di013_run(nsteps, nx, ny, r_x, r_y, u, newest, status)
    integer,  intent(in)    :: nsteps, nx, ny
    real(wp), intent(in)    :: r_x, r_y
    real(wp), intent(inout) :: u(0:nx+1, 0:ny+1, lb_di013_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_di013_check(nx, ny, r_x, r_y)
    if (status /= lb_di013_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_di013_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_di013_fill_halo(nx, ny, u(:, :, newest))
      call lb_di013_step(nx, ny, r_x, r_y, u(:, :, newest), u(:, :, oldest))
      newest = oldest
    end do
  end subroutine lb_di013_run

end module lb_di013
