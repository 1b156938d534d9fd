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

  !> Appends the newest level to the last k levels.
  subroutine keep(u, kept)
    real(wp), intent(in)    :: u(:)
    real(wp), intent(inout) :: kept(:, :)
    integer :: k
    do k = 1, size(kept, 2) - 1
      kept(:, k) = kept(:, k+1)
    end do
    kept(:, size(kept, 2)) = u
  end subroutine keep

  subroutine answer(id, kept, status)
    character(len=*), intent(in) :: id
    real(wp), intent(in) :: kept(:, :)
    integer,  intent(in) :: status
    integer :: k
    write (*, '(3a,i0)') 'state ', trim(id), ' ', status
    if (status /= 0) return
    do k = 1, size(kept, 2)
      call print_points(kept(:, k))
    end do
  end subroutine answer

  subroutine march(id)
    character(len=*), intent(in) :: id
    integer :: n, steps, k, newest, recent, status
    real(wp), allocatable :: u(:, :), f(:, :), kept(:, :)
    n = whole('n is missing')
    steps = whole('the number of steps is missing')
    call read_numbers()
    allocate (u(max(n, 0), {{levels}}), f(max(n, 0), {{slopes}}), kept(max(n, 0), {{steps}}))
    u = 0.0_wp
    f = 0.0_wp
    kept = 0.0_wp
    newest = {{levels}}
    recent = {{slopes}}
    do k = 1, {{steps}}
      newest = modulo(newest, {{levels}}) + 1
      call read_points(u(:, newest))
      call keep(u(:, newest), kept)
      if (k < {{steps}}) then
        recent = modulo(recent, {{slopes}}) + 1
        call problem(n, 0.0_wp, u(:, newest), f(:, recent))
      end if
    end do
    status = {{prefix}}_check(n, 0.0_wp, time_step())
    do k = 0, steps - 1
      if (status /= 0) exit
      call {{prefix}}_run(1, n, real(k, wp), 1.0_wp, u, f, newest, recent, problem, status)
      call keep(u(:, newest), kept)
    end do
    call answer(id, kept, status)
  end subroutine march

  subroutine start(id)
    character(len=*), intent(in) :: id
{{#each starting}}
    integer :: n, k, newest, recent, status
    real(wp), allocatable :: u(:, :), f(:, :), kept(:, :), work(:, :)
    n = whole('n is missing')
    call read_numbers()
    allocate (u(max(n, 0), {{levels}}), f(max(n, 0), {{slopes}}), kept(max(n, 0), {{steps}}), work(max(n, 0), {{startWork}}))
    u = 0.0_wp
    f = 0.0_wp
    kept = 0.0_wp
    work = 0.0_wp
    newest = {{levels}}
    recent = {{slopes}}
    call read_points(u(:, newest))
    call keep(u(:, newest), kept)
    status = {{prefix}}_check(n, 0.0_wp, time_step())
    do k = 0, {{steps}} - 2
      if (status /= 0) exit
      call {{prefix}}_start(n, real(k, wp), 1.0_wp, u, f, newest, recent, work, problem, status)
      call keep(u(:, newest), kept)
    end do
    call answer(id, kept, status)
{{/each}}
{{#each startless}}
    call fail('this method has no start-up routine: '//trim(id))
{{/each}}
  end subroutine start

  subroutine pace(id)
    character(len=*), intent(in) :: id
    integer :: n, repeats, i, round, steps, newest, recent, status
    real(wp) :: best, begin
    real(wp), allocatable :: u(:, :), f(:, :)
    n = whole('n is missing')
    repeats = whole('the number of repeats is missing')
    call read_numbers()
    if ({{prefix}}_check(n, 0.0_wp, time_step()) /= 0) call fail('the kernel refuses these arguments')
    allocate (u(n, {{levels}}), f(n, {{slopes}}))
    f = 0.0_wp
    do i = 1, n
      u(i, :) = 1.0_wp + 0.01_wp*real(mod(i - 1, 7), wp)
    end do
    newest = {{levels}}
    recent = {{slopes}}
    steps = 1 + 1000000/n
    best = huge(best)
    do round = 1, repeats
      begin = seconds()
      call {{prefix}}_run(steps, n, 0.0_wp, 1.0_wp, u, f, newest, recent, problem, status)
      if (status /= 0) call fail('the kernel refuses these arguments')
      best = min(best, (seconds() - begin)/real(steps, wp)/real(n, wp))
    end do
    deallocate (u, f)
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
