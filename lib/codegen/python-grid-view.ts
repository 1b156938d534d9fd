/** What the Python template of a scheme in two or three dimensions prints: ufuncs on flat views of whole rows. */
import { type Place } from './expression-tree';
import { axisViews, flatParts } from './grid-words';
import { gridHaloLines } from './halo-text';
import type { TablePlan } from './kernel-plan';
import type { View } from './kernel-source';
import { PythonSchemeView } from './python-scheme-view';
import type { SchemeContext } from './scheme-words';

export class PythonGridView extends PythonSchemeView {
  private readonly table: TablePlan;

  constructor(context: SchemeContext, plan: TablePlan) {
    super(context);
    this.table = plan;
  }

  protected override shift(place: Place): string {
    const parts = flatParts(place);
    if (parts.length === 0) return '0';
    return parts
      .map(({ negative, text }, k) => (k === 0 ? `${negative ? '-' : ''}${text}` : ` ${negative ? '-' : '+'} ${text}`))
      .join('');
  }

  protected override classAbout(): string[] {
    const sizes = this.sizes.join(', ');
    return super.classAbout().map((line) => line.replace('length(n)', `shape(${sizes})`));
  }

  private get flat() {
    return this.sizes.length === 2;
  }
  /** Slices that leave the ghost cells out, the outermost axis first. */
  private get interior() {
    return this.table.halos
      .map(([left, right]) => `${left === 0 ? '' : left}:${right === 0 ? '' : -right}`)
      .reverse()
      .join(', ');
  }
  private get fillLines() {
    return gridHaloLines('python', this.table.halos);
  }

  override view(): View {
    const reversed = [...this.sizes].reverse();
    const AXIS = ['X', 'Y', 'Z'] as const;
    const padded = this.sizes.map((size, k) => `${size} + HALO_${AXIS[k]!}_LEFT + HALO_${AXIS[k]!}_RIGHT`);
    return {
      ...this.common(),
      axes: axisViews(this.table),
      sizes: this.sizes.join(', '),
      dims: String(this.sizes.length),
      shape: [...padded].reverse().join(', '),
      least: this.sizes.map((size, k) => ({ size, MIN: `MIN_N${AXIS[k]!}`, value: `{${size}}` })),
      interior: this.interior,
      unpackShape: reversed.join(', '),
      sizesFromShape: this.sizes
        .map((size, k) => `${size} -= HALO_${AXIS[k]!}_LEFT + HALO_${AXIS[k]!}_RIGHT`)
        .join('\n'),
      planesToo: this.flat ? '' : ' and planes',
      planeStride: this.flat ? '' : `plane = row * (${padded[1]!})`,
      strides: this.flat ? 'row' : 'row, plane',
      first: this.flat ? 'HALO_Y_LEFT * row + HALO_X_LEFT' : 'HALO_Z_LEFT * plane + HALO_Y_LEFT * row + HALO_X_LEFT',
      last: `first + ${this.flat ? '' : '(nz - 1) * plane + '}(ny - 1) * row + nx`,
      selfSizes: this.sizes.map((size) => `self.${size}`).join(', '),
      periodic: this.periodic ? [{ fillLines: this.fillLines }] : [],
    };
  }

  override driver(): View {
    return {
      ...this.commonDriver(),
      dims: String(this.sizes.length),
      interior: this.interior,
      sizeWords: this.sizes.map((size) => size.toUpperCase()).join(' '),
      caller: this.periodic ? [] : [{ fillLines: this.fillLines }],
    };
  }
}
