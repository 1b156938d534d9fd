!> Driver of {{file}} for a trial: reads tasks from the file named by its first argument, answers on standard output.
module driver_state
  use, intrinsic :: iso_fortran_env, only: wp => real64
  use {{prefix}}
  use task_file
  implicit none
  private
  public :: march, start, pace

  real(wp) :: numbers(2) = 0.0_wp
  integer :: number_count = 0

contains

  !> The periodic test problem u' = -lambda (u(i+1) - u(i-1))/2 + r (u(i+1) - 2 u(i) + u(i-1)), with dt = 1.
  subroutine problem(n, t, u, f)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: t
    real(wp), intent(in)    :: u(n)
    real(wp), intent(inout) :: f(n)
    real(wp) :: half, r, left, right
    integer :: i
    half = 0.5_wp*numbers(1)
    r = numbers(2)
    do i = 1, n
      left = u(modulo(i-2, n) + 1)
      right = u(modulo(i, n) + 1)
      f(i) = -(half*(right - left))
      if (number_count == 2) f(i) = f(i) + r*((right + left) - 2.0_wp*u(i))
    end do
    associate (unused => t)
    end associate
  end subroutine problem

  subroutine read_numbers()
    numbers = 0.0_wp
    numbers(1) = bits('accepted: one number (lambda) or two (lambda, r)')
    number_count = 1
    if (more()) then
      numbers(2) = bits('accepted: one number (lambda) or two (lambda, r)')
      number_count = 2
    end if
    call line_end()
  end subroutine read_numbers

  !> A number of the problem that is not finite is refused as a time step that is not.
  function time_step() result(dt)
    real(wp) :: dt
    dt = 1.0_wp + sum(numbers - numbers)
  end function time_step

  subroutine march(id)
    character(len=*), intent(in) :: id
    integer :: n, steps, status
    real(wp), allocatable :: u(:, :)
    n = whole('n is missing')
    steps = whole('the number of steps is missing')
    call read_numbers()
    allocate (u(max(n, 0), {{prefix}}_arrays))
    u = 0.0_wp
    call read_points(u(:, {{prefix}}_arrays))
    call {{prefix}}_run(steps, n, 0.0_wp, time_step(), u, problem, status)
    write (*, '(3a,i0)') 'state ', trim(id), ' ', status
    if (status == 0) call print_points(u(:, {{prefix}}_arrays))
  end subroutine march

  subroutine start(id)
    character(len=*), intent(in) :: id
    call fail('a one-step method has no start-up routine: '//trim(id))
  end subroutine start

  subroutine pace(id)
    character(len=*), intent(in) :: id
    integer :: n, repeats, i, round, steps, status
    real(wp) :: best, begin
    real(wp), allocatable :: u(:, :)
    n = whole('n is missing')
    repeats = whole('the number of repeats is missing')
    call read_numbers()
    if ({{prefix}}_check(n, 0.0_wp, time_step()) /= 0) call fail('the kernel refuses these arguments')
    allocate (u(n, {{arrays}}))
    do i = 1, n
      u(i, :) = 1.0_wp + 0.01_wp*real(mod(i - 1, 7), wp)
    end do
    steps = 1 + 1000000/n
    best = huge(best)
    do round = 1, repeats
      begin = seconds()
      call {{prefix}}_run(steps, n, 0.0_wp, 1.0_wp, u, problem, status)
      if (status /= 0) call fail('the kernel refuses these arguments')
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
    case ('march', 'run')
      call march(id)
    case ('start')
      call start(id)
    case ('pace')
      call pace(id)
    case default
      call fail('unknown task; accepted: march, run, start, pace, end')
    end select
  end do
end program driver
