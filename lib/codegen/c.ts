/** C11: literals, elements and reserved words. */
import type { Rational } from '@/lib/numerics/rational';
import { literalSource } from './coefficient';
import type { Dialect } from './expression-tree';
import { HARD_SPACE as S } from './wrap-text';

const shift = (offset: number) => (offset === 0 ? '' : offset < 0 ? `${S}-${S}${-offset}` : `${S}+${S}${offset}`);

export const C: Dialect = {
  literal: (value: Rational) => literalSource(value),
  element: (array, offset) => `${array}[i${shift(offset)}]`,
};
export const C_SUFFIX = 'c';
