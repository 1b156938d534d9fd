import { EQUATION_NAMES } from '@/lib/entries/catalog-conditions';
import type { SheetView } from '@/lib/entries/entry';

const DIMENSIONS = ['', 'one dimension', 'two dimensions', 'three dimensions'];

/** What stands beside the call number: equation or kind, dimensions, coupling. */
export function subtitleOf({ kind, equation, summary }: SheetView): string[] {
  const what = equation
    ? (EQUATION_NAMES[equation].split(',')[0] ?? equation)
    : kind === 'stencil'
      ? 'Stencil'
      : 'Time method';
  const dims = summary && kind !== 'time-method' ? `, ${DIMENSIONS[summary.dims] ?? ''}` : '';
  return [`${what}${dims}`, ...(summary ? [summary.explicit ? 'explicit' : 'implicit'] : [])];
}
