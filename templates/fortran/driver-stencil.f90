!> Driver of {{file}} for a trial: reads tasks from the file named by its first argument, answers on standard output.
module driver_state
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use {{prefix}}
  use task_file
  implicit none
  private
  public :: apply, pace

contains
{{#each caller}}

  !> Ghost cells of a periodic row.
  subroutine fill(n, u)
    integer,  intent(in)    :: n
    real(wp), intent(inout) :: u({{extent}})
    {{fillLines}}
  end subroutine fill
{{/each}}

  subroutine apply(id)
    character(len=*), intent(in) :: id
    integer  :: n, status
    real(wp) :: h
    real(wp), allocatable :: u(:), d(:)
    n = whole('n is missing')
    h = bits('the spacing is missing')
    call line_end()
    allocate (u({{lower}}:max(n, 0)+{{haloRight}}), d({{lower}}:max(n, 0)+{{haloRight}}))
    u = 0.0_wp
    d = 0.0_wp
    call read_points(u(1:n))
    status = {{prefix}}_check(n{{spacingArgument}})
    if (status == 0) then
      {{fill}}
      call {{prefix}}_apply(n{{spacingArgument}}, u, d, status)
    end if
    write (*, '(3a,i0)') 'state ', trim(id), ' ', status
    if (status == 0) call print_points(d(1:n))
  end subroutine apply

  subroutine pace(id)
    character(len=*), intent(in) :: id
    integer  :: n, repeats, i, k, round, sweeps, status
    real(wp) :: h, best, begin
    real(wp), allocatable :: u(:), d(:)
    n = whole('n is missing')
    repeats = whole('the number of repeats is missing')
    call line_end()
    h = 1.0_wp
    if ({{prefix}}_check(n{{spacingArgument}}) /= 0) call fail('the kernel refuses these arguments')
    allocate (u({{lower}}:n+{{haloRight}}), d({{lower}}:n+{{haloRight}}))
    do i = 1, n
      u(i) = h + 0.01_wp*real(mod(i - 1, 7), wp)
    end do
    d = 0.0_wp
    sweeps = 1 + 4000000/n
    best = huge(best)
    do round = 1, repeats
      begin = seconds()
      do k = 1, sweeps
        {{fill}}
        call {{prefix}}_apply(n{{spacingArgument}}, u, d, status)
      end do
      best = min(best, (seconds() - begin)/real(sweeps, wp)/real(n, wp))
    end do
    if (status /= 0) call fail('the kernel refuses these arguments')
    deallocate (u, d)
    write (*, '(3a,es23.15,es24.15)') 'pace ', trim(id), ' ', best, triad(n, repeats)
  end subroutine pace

end module driver_state

program driver
  use task_file
  use driver_state
  implicit none
  character(len=256) :: verb, id
  call open_tasks()
  do
    call next_line()
    verb = word('expected a task')
    if (verb == 'end') exit
    id = word('the task has no name')
    select case (verb)
    case ('apply')
      call apply(id)
    case ('pace')
      call pace(id)
    case default
      call fail('unknown task; accepted: apply, pace, end')
    end select
  end do
end program driver
