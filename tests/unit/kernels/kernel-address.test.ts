import { describe, expect, it } from 'vitest';
import { readKernelAddress } from '@/lib/kernels/kernel-address';

const read = (file: string, query = '', revision = '1') =>
  readKernelAddress({ slug: 'leapfrog-central-2', revision, file }, new URLSearchParams(query));

describe('the address of a kernel', () => {
  it.each([
    ['lb_ad003.c', 'c'],
    ['lb_ad003.f90', 'fortran'],
    ['lb_ad003.py', 'python'],
  ])('%s asks for %s, with every option at its default', (file, language) => {
    expect(read(file)).toEqual({
      ok: true,
      address: {
        slug: 'leapfrog-central-2',
        revision: 1,
        fileName: file,
        language,
        options: { precision: 'double', boundary: 'periodic' },
      },
    });
  });

  it('takes the options from the query', () => {
    expect(read('lb_ad003.c', 'boundary=caller&precision=double')).toMatchObject({
      ok: true,
      address: { options: { precision: 'double', boundary: 'caller' } },
    });
  });

  it.each([
    // file, query, revision     what is wrong                              what is accepted
    ['lb_ad003.c', 'precision=half', '1', 'Option precision cannot be "half".', { precision: 'accepted: double' }],
    ['lb_ad003.c', 'boundary=', '1', 'Option boundary cannot be "".', { boundary: 'accepted: periodic, caller' }],
    [
      'lb_ad003.c',
      'threads=4',
      '1',
      'There is no option "threads".',
      { threads: 'accepted options: precision, boundary' },
    ],
    [
      'lb_ad003.rs',
      '',
      '1',
      '"lb_ad003.rs" is no kernel file.',
      { file: 'accepted: a name that ends in .c, .f90, .py' },
    ],
    ['lb_ad003', '', '1', '"lb_ad003" is no kernel file.', { file: expect.any(String) }],
    ['lb_ad003.c', '', '0', '"0" is no revision number.', { revision: 'accepted: a number from 1' }],
    ['lb_ad003.c', '', '1e3', '"1e3" is no revision number.', { revision: 'accepted: a number from 1' }],
    ['lb_ad003.constructor', '', '1', 'is no kernel file.', { file: expect.any(String) }],
  ])('%s?%s of revision %s is refused: %s', (file, query, revision, message, fields) => {
    expect(read(file, query, revision)).toEqual({ ok: false, message: expect.stringContaining(message), fields });
  });
});
