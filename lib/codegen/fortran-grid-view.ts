/** What the Fortran template of a scheme in two or three dimensions prints: nested loops, x innermost. */
import { infix, type Assignment, type Dialect } from './expression-tree';
import { FORTRAN } from './fortran';
import { FortranSchemeView } from './fortran-scheme-view';
import { statement } from './fortran-text';
import { axisViews } from './grid-words';
import { gridHaloLines, haloExtent } from './halo-text';
import type { TablePlan } from './kernel-plan';
import type { View } from './kernel-source';
import type { SchemeContext } from './scheme-words';

const INDICES = ['i', 'j', 'k'] as const;

/** u(i-1,j) */
const GRID: Dialect = {
  literal: FORTRAN.literal,
  element: (array, offset, across = []) => {
    const index = (o: number, axis: number) => `${INDICES[axis]!}${o === 0 ? '' : o < 0 ? o : `+${o}`}`;
    return `${array}(${[offset, ...across].map(index).join(',')})`;
  },
};

export class FortranGridView extends FortranSchemeView {
  private readonly table: TablePlan;

  constructor(context: SchemeContext, plan: TablePlan) {
    super(context);
    this.table = plan;
  }

  protected override sweepBody(assignments: readonly Assignment[]): string {
    const origin = this.sizes.slice(1).map(() => 0);
    const lines = assignments.flatMap((assignment) => {
      const target = assignment.kind === 'value' ? assignment.name : GRID.element(assignment.array, 0, origin);
      return statement(`${target} = ${infix(assignment.node, GRID)}`).split('\n');
    });
    return this.sizes
      .reduce<readonly string[]>(
        (body, size, axis) => [`do ${INDICES[axis]!} = 1, ${size}`, ...body.map((line) => `  ${line}`), 'end do'],
        lines,
      )
      .join('\n');
  }

  private get points() {
    return this.sizes.map((size) => `1:${size}`).join(', ');
  }
  private get fillLines() {
    return gridHaloLines('fortran', this.table.halos);
  }

  override view(): View {
    const { prefix } = this.context;
    return {
      ...this.common(),
      axes: axisViews(this.table),
      sizes: this.sizes.join(', '),
      points: this.points,
      indices: INDICES.slice(0, this.sizes.length).join(', '),
      tooSmall: this.sizes.map((size) => `${size} < ${prefix}_min_${size}`).join(' .or. '),
      periodic: this.periodic ? [{ fillLines: this.fillLines }] : [],
    };
  }

  override driver(): View {
    const flat = this.sizes.length === 2;
    const { staged: _staged, ...common } = this.commonDriver();
    return {
      ...common,
      sizes: this.sizes.join(', '),
      count: this.sizes.join('*'),
      colons: this.sizes.map(() => ':').join(', '),
      beyond: this.sizes
        .slice(1)
        .map(() => ':, ')
        .join(''),
      readSizes: this.sizes.map((size) => `${size} = whole('${size} is missing')`).join('\n'),
      allocated: this.sizes.map((size, k) => haloExtent(this.table.halos[k]!, `max(${size}, 0)`)).join(', '),
      plane: flat ? '' : ', k',
      planeIndex: flat ? '' : ', k',
      openPlanes: flat ? '' : 'do k = 1, nz',
      closePlanes: flat ? '' : 'end do',
      caller: this.periodic ? [] : [{ fillLines: this.fillLines }],
    };
  }
}
