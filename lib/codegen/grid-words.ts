/** Places, loops and ghost cells of kernels in two and three dimensions: x runs fastest, then y, then z. */
import { componentsOf, type Place } from './expression-tree';
import type { TablePlan } from './kernel-plan';
import { AXES, minPoints } from './scheme-words';

/** Strides between neighbours along y and along z, counted in points of the flat array. */
const STRIDES = ['', 'row', 'plane'] as const;

/** "- row + 1" as signed parts, the widest stride first. */
export function flatParts(place: Place): { readonly negative: boolean; readonly text: string }[] {
  return componentsOf(place)
    .map((count, axis) => ({ count, stride: STRIDES[axis]! }))
    .filter(({ count }) => count !== 0)
    .reverse()
    .map(({ count, stride }) => {
      const size = Math.abs(count);
      const text = stride === '' ? String(size) : size === 1 ? stride : `${size}*${stride}`;
      return { negative: count < 0, text };
    });
}

/** Names of the strides that these places need. */
export function stridesOf(places: readonly Place[]): string[] {
  return ['row', 'plane'].filter((_, k) => places.some((place) => (place.across?.[k] ?? 0) !== 0));
}

/** Everything about one dimension that a template prints. */
export const axisViews = (plan: TablePlan) =>
  plan.halos.map((halo, k) => ({
    axis: AXES[k]!,
    AXIS: AXES[k]!.toUpperCase(),
    left: String(halo[0]),
    right: String(halo[1]),
    least: String(minPoints({ ...plan, halo })),
  }));

/** How the arrays lie in memory, for the header. */
export const layoutWords = (plan: TablePlan, language: 'c' | 'fortran' | 'python') => {
  const axes = plan.halos.map((_, k) => AXES[k]!);
  const order =
    language === 'fortran'
      ? `u(${axes.map((_, k) => 'ijk'[k]).join(', ')})`
      : `u[${axes
          .map((_, k) => 'ijk'[k])
          .reverse()
          .join('][')}]`;
  return `x runs fastest: the point (${axes.map((_, k) => 'ijk'[k]).join(', ')}) is ${order}.`;
};
