/** Fortran 2018: literals carry the kind of iso_fortran_env, indices start at 1. */
import type { Rational } from '@/lib/numerics/rational';
import { literalSource } from './coefficient';
import type { Dialect } from './expression-tree';

const shift = (offset: number) => (offset === 0 ? '' : offset < 0 ? `-${-offset}` : `+${offset}`);

export const FORTRAN: Dialect = {
  literal: (value: Rational) => literalSource(value, '_wp'),
  element: (array, offset) => `${array}(i${shift(offset)})`,
};
export const FORTRAN_SUFFIX = 'f90';
