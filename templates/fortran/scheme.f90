module {{prefix}}
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: {{prefix}}_halo_left = {{haloLeft}}   ! ghost cells before the first point
  integer, parameter, public :: {{prefix}}_halo_right = {{haloRight}}  ! ghost cells after the last point
  integer, parameter, public :: {{prefix}}_min_points = {{minPoints}}
  integer, parameter, public :: {{prefix}}_levels = {{levels}}      ! time levels kept between steps
  integer, parameter, public :: {{prefix}}_arrays = {{arrays}}      ! columns of u in start and run

  integer, parameter, public :: {{prefix}}_ok = 0
  integer, parameter, public :: {{prefix}}_bad_size = 1       ! n too small for the halo, or nsteps negative
  integer, parameter, public :: {{prefix}}_bad_parameter = 2  ! {{parameterWords}} not a finite number{{divisorWords}}
  integer, parameter, public :: {{prefix}}_outside_bound = 3  ! {{boundWords}}
  integer, parameter, public :: {{prefix}}_nan_in_state = 5

  public :: {{prefix}}_check, {{prefix}}_check_state, {{prefix}}_step, {{prefix}}_run
{{#each publics}}
  public :: {{name}}
{{/each}}
{{#each caller}}

  abstract interface
    !> Fills the ghost cells of u.
    subroutine {{prefix}}_fill(n, u)
      import :: wp
      integer,  intent(in)    :: n
      real(wp), intent(inout) :: u({{extent}})
    end subroutine {{prefix}}_fill
  end interface
{{/each}}

contains

  !> Status of the arguments; O(1).
  pure function {{prefix}}_check({{checkArguments}}) result(status)
    integer,  intent(in)    :: n
    {{parameterDeclarations}}
    integer :: status
    status = {{prefix}}_ok
    if (n < {{prefix}}_min_points) then
      status = {{prefix}}_bad_size
{{#each refused}}
    else if ({{condition}}) then
      status = {{prefix}}_bad_parameter
{{/each}}
{{#each bounded}}
    else if ({{outside}}) then
      status = {{prefix}}_outside_bound
{{/each}}
    end if
  end function {{prefix}}_check

  !> Whether the n points of u are finite numbers; O(n), so not part of a step.
  pure function {{prefix}}_check_state(n, u) result(status)
    integer,  intent(in) :: n
    real(wp), intent(in) :: u({{extent}})
    integer :: status
    status = {{prefix}}_ok
    if (.not. all(ieee_is_finite(u(1:n)))) status = {{prefix}}_nan_in_state
  end function {{prefix}}_check_state
{{#each periodic}}

  !> Ghost cells of a periodic row.
  pure subroutine {{prefix}}_fill_halo(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u({{extent}})
    {{fillLines}}
  end subroutine {{prefix}}_fill_halo
{{/each}}
{{#each rows}}

{{#each notes}}
  !> {{note}}
{{/each}}
  pure subroutine {{signature}}
    integer,  intent(in)    :: n
    {{scalars}}
    {{arrayDeclarations}}
    {{locals}}
    integer :: i
    {{coefficients}}
    do i = 1, n
      {{body}}
    end do
  end subroutine {{name}}
{{/each}}
{{#each staged}}

  !> One step: u holds level n before and level n+1 after. The stages fill the ghost cells of what they read.
  {{pure}}subroutine {{signature}}
    integer,  intent(in)    :: n
    {{scalars}}
    {{arrayDeclarations}}
    {{fillDeclaration}}
    {{locals}}
    {{coefficients}}
    {{calls}}
  end subroutine {{name}}
{{/each}}
{{#each start}}

  !> w = {{seriesWords}}: one term of the Taylor series in time.
  pure subroutine {{signature}}
    integer,  intent(in)    :: n
    {{scalars}}
    {{arrayDeclarations}}
    {{locals}}
    integer :: i
    {{coefficients}}
    do i = 1, n
      {{body}}
    end do
  end subroutine {{prefix}}_taylor

{{#each about}}
  !> {{line}}
{{/each}}
  subroutine {{startSignature}}
    integer,  intent(in)    :: n
    {{parameterDeclarations}}
    real(wp), intent(inout) :: u({{extent}}, {{prefix}}_arrays)
{{#each secondOrder}}
    real(wp), intent(in)    :: v({{extent}})
{{/each}}
    real(wp), intent(inout) :: work({{extent}})
    {{fillDeclaration}}
    integer,  intent(out)   :: status
    integer :: k, m
    status = {{prefix}}_check({{checkArguments}})
    if (status /= {{prefix}}_ok) return
{{#each firstOrder}}
    do k = {{second}}, {{prefix}}_arrays
      {{fill_u}}
      {{first}} = {{older}}
      do m = {{terms}}, 1, -1
        if (mod(m, 2) == 1) then
          call {{prefix}}_taylor({{leading}}, 1.0_wp/real(m, wp), {{older}}, work, {{newer}})
          {{fill_k}}
        else
          call {{prefix}}_taylor({{leading}}, 1.0_wp/real(m, wp), {{older}}, {{newer}}, work)
          {{fill_work}}
        end if
      end do
    end do
{{/each}}
{{#each secondOrder}}
    {{fill_u}}
    do k = 1, {{prefix}}_levels - 1
      {{first}} = {{older}}
      do m = {{terms}}, 1, -1
        if (mod(m, 2) == 1) then
          call {{prefix}}_taylor({{leading}}, {{b}}, {{c}}, &
            {{older}}, v, work, {{newer}})
          {{fill_k}}
        else
          call {{prefix}}_taylor({{leading}}, {{b}}, {{c}}, &
            {{older}}, v, {{newer}}, work)
          {{fill_work}}
        end if
      end do
    end do
{{/each}}
  end subroutine {{prefix}}_start
{{/each}}

{{#each runAbout}}
  !> {{line}}
{{/each}}
  subroutine {{runSignature}}
    integer,  intent(in)    :: nsteps, n
    {{parameterDeclarations}}
    real(wp), intent(inout) :: u({{extent}}, {{prefix}}_arrays)
{{#each rotating}}
    integer,  intent(inout) :: newest
{{/each}}
    {{fillDeclaration}}
    integer,  intent(out)   :: status
    integer :: {{runLocals}}
    status = {{prefix}}_check({{checkArguments}})
    if (status /= {{prefix}}_ok) return
    if (nsteps < 0{{newestCheck}}) then
      status = {{prefix}}_bad_size
      return
    end if
    {{runBefore}}
    do k = 1, nsteps
      {{runBody}}
    end do
  end subroutine {{prefix}}_run

end module {{prefix}}
