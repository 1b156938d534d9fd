module {{prefix}}
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: {{prefix}}_arrays = {{arrays}}  ! columns of u in run: work space, then u

  integer, parameter, public :: {{prefix}}_ok = 0
  integer, parameter, public :: {{prefix}}_bad_size = 1       ! n < 1, or a negative number of steps
  integer, parameter, public :: {{prefix}}_bad_parameter = 2  ! t or dt is not a finite number
  integer, parameter, public :: {{prefix}}_nan_in_state = 5

  public :: {{prefix}}_rhs, {{prefix}}_check, {{prefix}}_check_state, {{prefix}}_step, {{prefix}}_run

  abstract interface
    !> f = du/dt at (t, u), n unknowns.
    subroutine {{prefix}}_rhs(n, t, u, f)
      import :: wp
      integer,  intent(in)    :: n
      real(wp), intent(in)    :: t
      real(wp), intent(in)    :: u(n)
      real(wp), intent(inout) :: f(n)
    end subroutine {{prefix}}_rhs
  end interface

contains

  !> Status of the arguments; O(1).
  pure function {{prefix}}_check(n, t, dt) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: t, dt
    integer :: status
    status = {{prefix}}_ok
    if (n < 1) then
      status = {{prefix}}_bad_size
    else if (.not. (ieee_is_finite(t) .and. ieee_is_finite(dt))) then
      status = {{prefix}}_bad_parameter
    end if
  end function {{prefix}}_check

  !> Whether the n values of u are finite numbers; O(n), so not part of a step.
  pure function {{prefix}}_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u(n)
    integer :: status
    status = {{prefix}}_ok
    if (.not. all(ieee_is_finite(u))) status = {{prefix}}_nan_in_state
  end function {{prefix}}_check_state
{{#each rows}}

  pure subroutine {{signature}}
    integer,  intent(in)    :: n
    {{scalars}}
    {{arrays}}
    integer :: i
    do i = 1, n
      {{body}}
    end do
  end subroutine {{name}}
{{/each}}

  !> One step from t to t + dt: u is advanced in place.
  subroutine {{prefix}}_step(n, t, dt, u, {{work}}, rhs)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n)
    real(wp), intent(inout), dimension(n) :: {{work}}
    procedure({{prefix}}_rhs) :: rhs
    {{locals}}
    {{coefficients}}
    {{calls}}
  end subroutine {{prefix}}_step

  !> nsteps steps. The last column is u, advanced in place; the others are work space.
  subroutine {{prefix}}_run(nsteps, n, t, dt, u, rhs, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, {{prefix}}_arrays)
    procedure({{prefix}}_rhs) :: rhs
    integer,  intent(out)   :: status
    integer :: k
    status = {{prefix}}_check(n, t, dt)
    if (status /= {{prefix}}_ok) return
    if (nsteps < 0) then
      status = {{prefix}}_bad_size
      return
    end if
    do k = 0, nsteps - 1
      call {{prefix}}_step(n, t + real(k, wp)*dt, dt, u(:, {{newest}}), {{workColumns}}, rhs)
    end do
  end subroutine {{prefix}}_run

end module {{prefix}}
