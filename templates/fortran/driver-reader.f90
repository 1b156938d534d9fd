!> Reads tasks and writes answers: doubles travel as the 16 hexadecimal digits of their bits.
module task_file
  use, intrinsic :: iso_fortran_env, only: wp => real64, int64, error_unit, iostat_end
  implicit none
  private
  public :: open_tasks, next_line, word, whole, bits, more, line_end, read_points, print_points, seconds, triad, fail

  integer :: unit = -1
  integer :: line_number = 0
  integer :: place = 1
  character(len=4096) :: line = ''

contains

  subroutine fail(what)
    character(len=*), intent(in) :: what
    write (error_unit, '(a,i0,2a)') 'line ', line_number, ' of the tasks: ', what
    error stop 2
  end subroutine fail

  subroutine open_tasks()
    character(len=4096) :: name
    integer :: status
    if (command_argument_count() /= 1) then
      write (error_unit, '(a)') 'usage: driver TASKS'
      error stop 2
    end if
    call get_command_argument(1, name)
    open (newunit=unit, file=trim(name), status='old', action='read', iostat=status)
    if (status /= 0) then
      write (error_unit, '(2a)') trim(name), ': cannot be read'
      error stop 2
    end if
  end subroutine open_tasks

  subroutine next_line()
    integer :: status
    line_number = line_number + 1
    read (unit, '(a)', iostat=status) line
    if (status /= 0) call fail("the file ends before 'end'")
    place = 1
  end subroutine next_line

  !> The next word of the line, or blanks.
  function found() result(text)
    character(len=256) :: text
    integer :: length
    text = ''
    do while (place <= len(line))
      if (line(place:place) /= ' ' .and. line(place:place) /= achar(9) .and. line(place:place) /= achar(13)) exit
      place = place + 1
    end do
    length = 0
    do while (place <= len(line))
      if (line(place:place) == ' ' .or. line(place:place) == achar(9) .or. line(place:place) == achar(13)) exit
      length = length + 1
      if (length > len(text)) call fail('a word is too long')
      text(length:length) = line(place:place)
      place = place + 1
    end do
  end function found

  function word(what) result(text)
    character(len=*), intent(in) :: what
    character(len=256) :: text
    text = found()
    if (text == '') call fail(what)
  end function word

  function whole(what) result(value)
    character(len=*), intent(in) :: what
    character(len=256) :: text
    integer :: value, status
    text = word(what)
    if (verify(trim(text), '+-0123456789') /= 0) call fail(what)
    read (text, *, iostat=status) value
    if (status /= 0) call fail(what)
  end function whole

  function bits(what) result(value)
    character(len=*), intent(in) :: what
    character(len=256) :: text
    real(wp) :: value
    integer(int64) :: pattern
    integer :: status
    text = word(what)
    if (len_trim(text) /= 16 .or. verify(trim(text), '0123456789abcdefABCDEF') /= 0) &
      call fail('expected the 16 hexadecimal digits of a double')
    read (text(1:16), '(z16)', iostat=status) pattern
    if (status /= 0) call fail('expected the 16 hexadecimal digits of a double')
    value = transfer(pattern, value)
  end function bits

  !> Whether the line has a further word.
  function more()
    logical :: more
    integer :: before
    before = place
    more = found() /= ''
    place = before
  end function more

  subroutine line_end()
    if (found() /= '') call fail('there are more words than this task has')
  end subroutine line_end

  subroutine read_points(u)
    real(wp), intent(out) :: u(:)
    integer :: i
    do i = 1, size(u)
      call next_line()
      u(i) = bits('expected the 16 hexadecimal digits of a double')
    end do
  end subroutine read_points

  subroutine print_points(u)
    real(wp), intent(in) :: u(:)
    integer :: i
    do i = 1, size(u)
      write (*, '(z16.16)') transfer(u(i), 0_int64)
    end do
  end subroutine print_points

  function seconds() result(now)
    real(wp) :: now
    integer(int64) :: count, rate
    call system_clock(count, rate)
    now = real(count, wp)/real(rate, wp)
  end function seconds

  pure subroutine add_scaled(n, b, c, a)
    integer,  intent(in)    :: n
    real(wp), intent(in)    :: b(n), c(n)
    real(wp), intent(inout) :: a(n)
    integer :: i
    do i = 1, n
      a(i) = b(i) + 0.5_wp*c(i)
    end do
  end subroutine add_scaled

  !> Best rate of an own triad a = b + s c on arrays of n doubles, in bytes a second; the store counts twice.
  function triad(n, repeats) result(rate)
    integer, intent(in) :: n, repeats
    real(wp) :: rate, best, begin
    real(wp), allocatable :: a(:), b(:), c(:)
    integer :: r, k, sweeps
    allocate (a(n), b(n), c(n))
    a = 0.0_wp
    b = 1.0_wp
    c = 0.0_wp
    sweeps = 1 + 2000000/n
    best = huge(best)
    do r = 1, repeats
      begin = seconds()
      do k = 1, sweeps
        call add_scaled(n, b, c, a)
        call add_scaled(n, b, a, c)
      end do
      best = min(best, (seconds() - begin)/real(2*sweeps, wp))
    end do
    rate = 32.0_wp*real(n, wp)/best
  end function triad

end module task_file

