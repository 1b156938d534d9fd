module {{prefix}}
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use, intrinsic :: ieee_arithmetic, only: ieee_is_finite
  implicit none
  private

  integer, parameter, public :: {{prefix}}_halo_left = {{haloLeft}}   ! ghost cells before the first point
  integer, parameter, public :: {{prefix}}_halo_right = {{haloRight}}  ! ghost cells after the last point
  integer, parameter, public :: {{prefix}}_min_points = {{minPoints}}

  integer, parameter, public :: {{prefix}}_ok = 0
  integer, parameter, public :: {{prefix}}_bad_size = 1       ! n too small for the halo
  integer, parameter, public :: {{prefix}}_bad_parameter = 2  ! the spacing is not a positive finite number
  integer, parameter, public :: {{prefix}}_nan_in_state = 5

  public :: {{prefix}}_check, {{prefix}}_check_state, {{prefix}}_apply
{{#each periodicPublic}}
  public :: {{prefix}}_fill_halo
{{/each}}

contains

  !> Status of the arguments; O(1).
  pure function {{prefix}}_check(n{{spacingArgument}}) result(status)
    integer,  intent(in) :: n
{{#each spaced}}
    real(wp), intent(in) :: h
{{/each}}
    integer :: status
    status = {{prefix}}_ok
    if (n < {{prefix}}_min_points) then
      status = {{prefix}}_bad_size
{{#each spaced}}
    else if (.not. ieee_is_finite(h)) then
      status = {{prefix}}_bad_parameter
    else if (h <= 0.0_wp) then
      status = {{prefix}}_bad_parameter
{{/each}}
    end if
  end function {{prefix}}_check

  !> Whether the n points of u are finite numbers; O(n), so not part of apply.
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

  !> d from u, whose ghost cells are filled.
  pure subroutine {{prefix}}_apply(n{{spacingArgument}}, u, d, status)
    integer,  intent(in)    :: n
{{#each spaced}}
    real(wp), intent(in)    :: h
{{/each}}
    real(wp), intent(in)    :: u({{extent}})
    real(wp), intent(inout) :: d({{extent}})
    integer,  intent(out)   :: status
    {{locals}}
    integer :: i
    status = {{prefix}}_check(n{{spacingArgument}})
    if (status /= {{prefix}}_ok) return
    {{coefficients}}
    do i = 1, n
      {{body}}
    end do
  end subroutine {{prefix}}_apply

end module {{prefix}}
