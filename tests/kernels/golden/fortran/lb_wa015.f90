! WA 015 r2   0 <= lam <= 1/2; keep below   halo 2|2 x 2|2 x 2|2, periodic fill included
! levelbook:leapfrog-thirteen-points/2/fortran/double,periodic:49fc7e3c6b22a77cecc950f54a5b53e260bef7cb2ef430d26482e294c9fb7b1a
!
! Entry       WA 015, revision 2: Leapfrog, thirteen points (double precision).
! Equation    u_tt = c^2 (u_xx + u_yy + u_zz); lam = c dt/dx = c dt/dy = c dt/dz.
! Formula     u[n+1,i,j,k] = a0*u[n,i,j,k] + a1*(u[n,i+1,j,k] + u[n,i-1,j,k] + u[n,i,j+1,k] +
!             u[n,i,j-1,k] + u[n,i,j,k+1] + u[n,i,j,k-1]) - a2*(u[n,i+2,j,k] + u[n,i-2,j,k] +
!             u[n,i,j+2,k] + u[n,i,j-2,k] + u[n,i,j,k+2] + u[n,i,j,k-2]) - u[n-1,i,j,k]
!             with a0 = 2 - (15/2)*lam*lam, a1 = (4/3)*lam*lam, a2 = (1/12)*lam*lam
! Order       2 in time, 4 in space, 2 at fixed lam.
! Error       At lam = 1/5 the leading error term adds dispersion: short waves run ahead.
! Stable      for 0 <= lam <= 1/2; keep below.
!             Advised working value: lam <= 0.45 (nine tenths of the bound).
!             At the bound itself: double root on the unit circle: growth linear in n for that
!             wave.
! Arrays      2 of (nx + 4) x (ny + 4) x (nz + 4) doubles, contiguous; ghost cells: 2 before
!             and 2 after along x, 2 before and 2 after along y, 2 before and 2 after along z.
!             x runs fastest: the point (i, j, k) is u(i, j, k).
!             u: level n
!             w: level n-1 in, level n+1 out
! Storage     the oldest level is read only at the point being written and is overwritten in
!             place: 2 arrays.
! Work        16 operations and 24 bytes a point and step by the facts.
! Boundary    periodic: fill_halo copies the ghost cells.
! Start-up    start makes the 2 kept levels from u and dt u_t at the initial time, to the
!             order of the scheme.
! Units       u in any unit; time and space enter through the dimensionless numbers only.
! Calling     real(real64) :: u(-1:nx+2, -1:ny+2, -1:nz+2, 2)   allocated by the caller
!             call lb_wa015_start(nx, ny, nz, lam, u, v, work, status)
!             newest = 2
!             call lb_wa015_run(nsteps, nx, ny, nz, lam, u, newest, status)   result in u(1:nx, 1:ny, 1:nz, newest)
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
module lb_wa015
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  ! Numbers of ghost cells before the first and after the last point, and the least number of points.
  integer, parameter, public :: lb_wa015_halo_x_left = 2
  integer, parameter, public :: lb_wa015_halo_x_right = 2
  integer, parameter, public :: lb_wa015_min_nx = 2
  integer, parameter, public :: lb_wa015_halo_y_left = 2
  integer, parameter, public :: lb_wa015_halo_y_right = 2
  integer, parameter, public :: lb_wa015_min_ny = 2
  integer, parameter, public :: lb_wa015_halo_z_left = 2
  integer, parameter, public :: lb_wa015_halo_z_right = 2
  integer, parameter, public :: lb_wa015_min_nz = 2
  integer, parameter, public :: lb_wa015_levels = 2  ! time levels kept between steps
  integer, parameter, public :: lb_wa015_arrays = 2  ! columns of u in start and run

  integer, parameter, public :: lb_wa015_ok = 0
  integer, parameter, public :: lb_wa015_bad_size = 1       ! a size too small for the halo, or nsteps negative
  integer, parameter, public :: lb_wa015_bad_parameter = 2  ! lam not a finite number
  integer, parameter, public :: lb_wa015_outside_bound = 3  ! not within 0 <= lam <= 1/2; keep below
  integer, parameter, public :: lb_wa015_nan_in_state = 5

  public :: lb_wa015_check, lb_wa015_check_state, lb_wa015_step, lb_wa015_run
  public :: lb_wa015_fill_halo
  public :: lb_wa015_start

contains

  !> Status of the arguments; O(1).
  pure function lb_wa015_check(nx, ny, nz, lam) result(status)
    integer,  intent(in)    :: nx, ny, nz
    real(wp), intent(in)    :: lam
    integer :: status
    status = lb_wa015_ok
    if (nx < lb_wa015_min_nx .or. ny < lb_wa015_min_ny .or. nz < lb_wa015_min_nz) then
      status = lb_wa015_bad_size
    else if (.not. ieee_is_finite(lam)) then
      status = lb_wa015_bad_parameter
    else if (.not. (lam >= 0.0_wp .and. lam <= 0.5_wp)) then
      status = lb_wa015_outside_bound
    end if
  end function lb_wa015_check

  !> Whether the points of u are finite numbers; as long as a sweep, so not part of a step.
  pure function lb_wa015_check_state(nx, ny, nz, u) result(status)
    integer,  intent(in) :: nx, ny, nz
    real(wp), intent(in) :: u(-1:nx+2, -1:ny+2, -1:nz+2)
    integer :: status
    status = lb_wa015_ok
    if (.not. all(ieee_is_finite(u(1:nx, 1:ny, 1:nz)))) status = lb_wa015_nan_in_state
  end function lb_wa015_check_state

  !> Ghost cells of a periodic grid, those of the corners included.
  pure subroutine lb_wa015_fill_halo(nx, ny, nz, u)
    integer,  intent(in)    :: nx, ny, nz
    real(wp), intent(inout) :: u(-1:nx+2, -1:ny+2, -1:nz+2)
    u(-1:0, 1:ny, 1:nz) = u(nx-1:nx, 1:ny, 1:nz)
    u(nx+1:nx+2, 1:ny, 1:nz) = u(1:2, 1:ny, 1:nz)
    u(:, -1:0, 1:nz) = u(:, ny-1:ny, 1:nz)
    u(:, ny+1:ny+2, 1:nz) = u(:, 1:2, 1:nz)
    u(:, :, -1:0) = u(:, :, nz-1:nz)
    u(:, :, nz+1:nz+2) = u(:, :, 1:2)
  end subroutine lb_wa015_fill_halo

  !> One step.
  pure subroutine lb_wa015_step(nx, ny, nz, lam, u, w)
    integer,  intent(in)    :: nx, ny, nz
    real(wp), intent(in)    :: lam
    real(wp), intent(in)    :: u(-1:nx+2, -1:ny+2, -1:nz+2)   ! level n
    real(wp), intent(inout) :: w(-1:nx+2, -1:ny+2, -1:nz+2)   ! level n-1 in, level n+1 out
    real(wp) :: a0, a1, a2
    integer :: i, j, k
    a0 = 2.0_wp - 7.5_wp*lam*lam
    a1 = (4.0_wp/3.0_wp)*lam*lam
    a2 = (1.0_wp/12.0_wp)*lam*lam
    do k = 1, nz
      do j = 1, ny
        do i = 1, nx
          w(i,j,k) = a0*u(i,j,k) + a1*(u(i+1,j,k) + u(i-1,j,k) + u(i,j+1,k) + u(i,j-1,k) + u(i,j,k+1) &
              + u(i,j,k-1)) - a2*(u(i+2,j,k) + u(i-2,j,k) + u(i,j+2,k) + u(i,j-2,k) + u(i,j,k+2) &
              + u(i,j,k-2)) - w(i,j,k)
        end do
      end do
    end do
  end subroutine lb_wa015_step

  !> w = u + b v + c dt^2 L y: one term of the Taylor series in time.
  pure subroutine lb_wa015_taylor(nx, ny, nz, lam, b, c, u, v, y, w)
    integer,  intent(in)    :: nx, ny, nz
    real(wp), intent(in)    :: lam, b, c
    real(wp), intent(in)    :: u(-1:nx+2, -1:ny+2, -1:nz+2)
    real(wp), intent(in)    :: v(-1:nx+2, -1:ny+2, -1:nz+2)
    real(wp), intent(in)    :: y(-1:nx+2, -1:ny+2, -1:nz+2)
    real(wp), intent(inout) :: w(-1:nx+2, -1:ny+2, -1:nz+2)
    real(wp) :: s0, s1, s2
    integer :: i, j, k
    s0 = 7.5_wp*lam*lam
    s1 = (4.0_wp/3.0_wp)*lam*lam
    s2 = (1.0_wp/12.0_wp)*lam*lam
    do k = 1, nz
      do j = 1, ny
        do i = 1, nx
          w(i,j,k) = u(i,j,k) + b*v(i,j,k) + c*(s1*(y(i+1,j,k) + y(i-1,j,k) + y(i,j+1,k) + y(i,j-1,k) &
              + y(i,j,k+1) + y(i,j,k-1)) - s0*y(i,j,k) - s2*(y(i+2,j,k) + y(i-2,j,k) + y(i,j+2,k) &
              + y(i,j-2,k) + y(i,j,k+2) + y(i,j,k-2)))
        end do
      end do
    end do
  end subroutine lb_wa015_taylor

  !> Start-up: makes the second level by the Taylor series in time through dt^2, with
  !> differences of order 4 in space.
  !> In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.
  !> work: one more array of the same length.
  subroutine lb_wa015_start(nx, ny, nz, lam, u, v, work, status)
    integer,  intent(in)    :: nx, ny, nz
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(-1:nx+2, -1:ny+2, -1:nz+2, lb_wa015_arrays)
    real(wp), intent(in)    :: v(-1:nx+2, -1:ny+2, -1:nz+2)
    real(wp), intent(inout) :: work(-1:nx+2, -1:ny+2, -1:nz+2)
    integer,  intent(out)   :: status
    integer :: k, m
    status = lb_wa015_check(nx, ny, nz, lam)
    if (status /= lb_wa015_ok) return
    call lb_wa015_fill_halo(nx, ny, nz, u(:, :, :, 1))
    do k = 1, lb_wa015_levels - 1
      work = u(:, :, :, 1)
      do m = 1, 1, -1
        if (mod(m, 2) == 1) then
          call lb_wa015_taylor(nx, ny, nz, lam, real(k, wp)/real(2*m-1, wp), real(k*k, wp)/real((2*m-1)*(2*m), wp), &
            u(:, :, :, 1), v, work, u(:, :, :, 1+k))
          call lb_wa015_fill_halo(nx, ny, nz, u(:, :, :, 1+k))
        else
          call lb_wa015_taylor(nx, ny, nz, lam, real(k, wp)/real(2*m-1, wp), real(k*k, wp)/real((2*m-1)*(2*m), wp), &
            u(:, :, :, 1), v, u(:, :, :, 1+k), work)
          call lb_wa015_fill_halo(nx, ny, nz, work)
        end if
      end do
    end do
  end subroutine lb_wa015_start

  !> nsteps steps. The arrays are the kept levels, the oldest first.
  !> They are rotated: newest is the column of the newest level, in and out.
  subroutine lb_wa015_run(nsteps, nx, ny, nz, lam, u, newest, status)
    integer,  intent(in)    :: nsteps, nx, ny, nz
    real(wp), intent(in)    :: lam
    real(wp), intent(inout) :: u(-1:nx+2, -1:ny+2, -1:nz+2, lb_wa015_arrays)
    integer,  intent(inout) :: newest
    integer,  intent(out)   :: status
    integer :: k, oldest
    status = lb_wa015_check(nx, ny, nz, lam)
    if (status /= lb_wa015_ok) return
    if (nsteps < 0 .or. newest < 1 .or. newest > 2) then
      status = lb_wa015_bad_size
      return
    end if
    do k = 1, nsteps
      oldest = modulo(newest, 2) + 1
      call lb_wa015_fill_halo(nx, ny, nz, u(:, :, :, newest))
      call lb_wa015_step(nx, ny, nz, lam, u(:, :, :, newest), u(:, :, :, oldest))
      newest = oldest
    end do
  end subroutine lb_wa015_run

end module lb_wa015
