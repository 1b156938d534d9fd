module {{prefix}}
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: {{prefix}}_steps = {{steps}}   ! k of a k-step method
  integer, parameter, public :: {{prefix}}_levels = {{levels}}  ! columns of u
  integer, parameter, public :: {{prefix}}_slopes = {{slopes}}  ! columns of f

  integer, parameter, public :: {{prefix}}_ok = 0
  integer, parameter, public :: {{prefix}}_bad_size = 1       ! n < 1, a negative number of steps, or no such column
  integer, parameter, public :: {{prefix}}_bad_parameter = 2  ! t or dt is not a finite number
  integer, parameter, public :: {{prefix}}_nan_in_state = 5

  public :: {{prefix}}_rhs, {{prefix}}_check, {{prefix}}_check_state, {{prefix}}_step, {{prefix}}_run
{{#each startPublic}}
  public :: {{prefix}}_start
{{/each}}

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

  !> One step from t to t + dt. The slope at t takes the column of the oldest slope, the new level that of the
  !> oldest level; newest and recent are the columns of the newest level and slope, in and out.
  subroutine {{prefix}}_step(n, t, dt, u, f, newest, recent, rhs)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, {{prefix}}_levels), f(n, {{prefix}}_slopes)
    integer,  intent(inout) :: newest, recent
    procedure({{prefix}}_rhs) :: rhs
    {{locals}}
    {{coefficients}}
    recent = modulo(recent, {{prefix}}_slopes) + 1
    call rhs(n, t, u(:, newest), f(:, recent))
    {{call}}
    newest = modulo(newest, {{prefix}}_levels) + 1
  end subroutine {{prefix}}_step
{{#each starting}}
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

  !> One start-up step from t to t + dt: Runge-Kutta of order {{order}}, keeping its first slope. Call it
  !> {{prefix}}_steps - 1 times before the first step; u(:, newest) is the initial level. work: {{work}} columns.
  subroutine {{prefix}}_start(n, t, dt, u, f, newest, recent, work, rhs, status)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, {{prefix}}_levels), f(n, {{prefix}}_slopes)
    integer,  intent(inout) :: newest, recent
    real(wp), intent(inout) :: work(n, {{work}})
    procedure({{prefix}}_rhs) :: rhs
    integer,  intent(out)   :: status
    status = {{prefix}}_check(n, t, dt)
    if (status /= {{prefix}}_ok) return
    recent = modulo(recent, {{prefix}}_slopes) + 1
    call rhs(n, t, u(:, newest), f(:, recent))
    call start_stages({{arguments}})
    newest = modulo(newest, {{prefix}}_levels) + 1
  end subroutine {{prefix}}_start

  subroutine start_stages({{inner}})
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t, dt
    real(wp), intent({{uIntent}} :: u(n)
    real(wp), intent(in)    :: f(n)
    {{outputs}}
    procedure({{prefix}}_rhs) :: rhs
    {{locals}}
    {{coefficients}}
    {{calls}}
  end subroutine start_stages
{{/each}}

  !> nsteps steps from levels and slopes that are complete.
  subroutine {{prefix}}_run(nsteps, n, t, dt, u, f, newest, recent, rhs, status)
    integer,  intent(in)    :: nsteps, n
    real(wp), intent(in)    :: t, dt
    real(wp), intent(inout) :: u(n, {{prefix}}_levels), f(n, {{prefix}}_slopes)
    integer,  intent(inout) :: newest, recent
    procedure({{prefix}}_rhs) :: rhs
    integer,  intent(out)   :: status
    integer :: k
    status = {{prefix}}_check(n, t, dt)
    if (status /= {{prefix}}_ok) return
    if (nsteps < 0 .or. min(newest, recent) < 1 .or. newest > {{prefix}}_levels .or. recent > {{prefix}}_slopes) then
      status = {{prefix}}_bad_size
      return
    end if
    do k = 0, nsteps - 1
      call {{prefix}}_step(n, t + real(k, wp)*dt, dt, u, f, newest, recent, rhs)
    end do
  end subroutine {{prefix}}_run

end module {{prefix}}
