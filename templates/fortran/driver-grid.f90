!> Driver of {{file}} for a trial: reads tasks from the file named by its first argument, answers on standard output.
module driver_state
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use {{prefix}}
  use task_file
  implicit none
  private
  public :: march, start, pace

  integer, parameter :: arrays = {{arrays}}, levels = {{levels}}

contains
{{#each caller}}

  !> Ghost cells of a periodic grid, those of the corners included.
  subroutine fill({{sizes}}, u)
    integer,  intent(in)    :: {{sizes}}
    real(wp), intent(inout) :: u({{extent}})
    {{fillLines}}
  end subroutine fill
{{/each}}

  subroutine answer(id, {{sizes}}, u, newest, status, advanced)
    character(len=*), intent(in) :: id
    integer,  intent(in) :: {{sizes}}, newest, status
    logical,  intent(in) :: advanced
    real(wp), intent(in) :: u({{extent}}, arrays)
    integer :: age, column
    write (*, '(3a,i0)') 'state ', trim(id), ' ', status
    if (.not. advanced) return
    do age = levels - 1, 0, -1
      column = modulo(newest - 1 - age, arrays) + 1
      call print_field({{sizes}}, u({{colons}}, column))
    end do
  end subroutine answer

  !> Step by step, also outside the stable range.
  subroutine advance(steps, {{checkArguments}}, u, newest)
    integer,  intent(in)    :: steps, {{sizes}}
    {{parameterDeclarations}}
    real(wp), intent(inout) :: u({{extent}}, arrays)
    integer,  intent(inout) :: newest
    integer :: {{advanceLocals}}
    {{before}}
    do k = 1, steps
      {{advance}}
    end do
  end subroutine advance

  subroutine read_field({{sizes}}, u)
    integer,  intent(in)    :: {{sizes}}
    real(wp), intent(inout) :: u({{extent}})
    integer :: j{{planeIndex}}
    {{openPlanes}}
    do j = 1, ny
      call read_points(u(1:nx, j{{plane}}))
    end do
    {{closePlanes}}
  end subroutine read_field

  subroutine print_field({{sizes}}, u)
    integer,  intent(in) :: {{sizes}}
    real(wp), intent(in) :: u({{extent}})
    integer :: j{{planeIndex}}
    {{openPlanes}}
    do j = 1, ny
      call print_points(u(1:nx, j{{plane}}))
    end do
    {{closePlanes}}
  end subroutine print_field

  subroutine march(id, checked)
    character(len=*), intent(in) :: id
    logical, intent(in) :: checked
    integer :: {{sizes}}, steps, k, newest, status
    logical :: usable
    {{parameterLocals}}
    real(wp), allocatable :: u({{colons}}, :)
    {{readSizes}}
    steps = whole('the number of steps is missing')
    {{readParameters}}
    call line_end()
    allocate (u({{allocated}}, arrays))
    u = 0.0_wp
    do k = arrays - levels + 1, arrays
      call read_field({{sizes}}, u({{colons}}, k))
    end do
    newest = arrays
    if (checked) then
      call {{prefix}}_run(steps, {{checkArguments}}, u, {{runArguments}}status)
      usable = status == 0
    else
      status = {{prefix}}_check({{checkArguments}})
      usable = status == 0 .or. status == {{prefix}}_outside_bound
      if (usable) call advance(steps, {{checkArguments}}, u, newest)
    end if
    call answer(id, {{sizes}}, u, newest, status, usable)
  end subroutine march

  subroutine start(id)
    character(len=*), intent(in) :: id
{{#each start}}
    integer :: {{sizes}}, status
    {{parameterLocals}}
    real(wp), allocatable :: u({{colons}}, :), v({{colons}}), work({{colons}})
    {{readSizes}}
    {{readParameters}}
    call line_end()
    allocate (u({{allocated}}, arrays))
    allocate (v({{allocated}}))
    allocate (work({{allocated}}))
    u = 0.0_wp
    v = 0.0_wp
    work = 0.0_wp
    call read_field({{sizes}}, u({{colons}}, arrays - levels + 1))
{{#each second}}
    call read_field({{sizes}}, v)
{{/each}}
    call {{prefix}}_start({{arguments}})
    call answer(id, {{sizes}}, u, arrays, status, status == 0)
{{/each}}
{{#each startless}}
    call fail('this scheme has no start-up routine: '//trim(id))
{{/each}}
  end subroutine start

  subroutine pace(id)
    character(len=*), intent(in) :: id
    integer :: {{sizes}}, n, repeats, i, round, steps, newest, status
    {{parameterLocals}}
    real(wp) :: best, begin
    real(wp), allocatable :: u({{colons}}, :)
    {{readSizes}}
    repeats = whole('the number of repeats is missing')
    {{readParameters}}
    call line_end()
    status = {{prefix}}_check({{checkArguments}})
    if (status /= 0 .and. status /= {{prefix}}_outside_bound) call fail('the kernel refuses these arguments')
    allocate (u({{allocated}}, arrays))
    n = {{count}}
    u = 0.0_wp
    do i = 1, nx
      u(i, {{beyond}}:) = 1.0_wp + 0.01_wp*real(mod(i - 1, 7), wp)
    end do
    steps = 1 + 4000000/n
    newest = arrays
    best = huge(best)
    do round = 1, repeats
      begin = seconds()
      call advance(steps, {{checkArguments}}, u, newest)
      best = min(best, (seconds() - begin)/real(steps, wp)/real(n, wp))
    end do
    deallocate (u)
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
    case ('march')
      call march(id, .false.)
    case ('run')
      call march(id, .true.)
    case ('start')
      call start(id)
    case ('pace')
      call pace(id)
    case default
      call fail('unknown task; accepted: march, run, start, pace, end')
    end select
  end do
end program driver
