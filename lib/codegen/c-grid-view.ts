/** What the C template of a scheme in two or three dimensions prints: whole rows as functions with restrict parameters. */
import { C } from './c';
import { coefficientLines, CSchemeView, listed, pointer, statement } from './c-scheme-view';
import { infix, readsOf, type Dialect, type Node } from './expression-tree';
import { axisViews, flatParts, stridesOf } from './grid-words';
import { gridHaloLines } from './halo-text';
import type { StartPlan, TablePlan } from './kernel-plan';
import type { View } from './kernel-source';
import { arrayWords, scalarsOf, taylorNode, type SchemeContext } from './scheme-words';
import { HARD_SPACE as S } from './wrap-text';

/** u[i - row + 1]: i runs along one row, whose first point the pointers meet. */
const GRID: Dialect = {
  literal: C.literal,
  element: (array, offset, across) => {
    const shift = flatParts({ offset, across }).map(({ negative, text }) => `${S}${negative ? '-' : '+'}${S}${text}`);
    return `${array}[i${shift.join('')}]`;
  },
};

interface RowArray {
  readonly name: string;
  readonly written: boolean;
}

export class CGridView extends CSchemeView {
  private readonly table: TablePlan;

  constructor(context: SchemeContext, plan: TablePlan) {
    super(context);
    this.table = plan;
  }

  /** The row function, and the loops that call it for every row. */
  private rowParts(name: string, node: Node, arrays: readonly RowArray[]): View {
    const scalars = scalarsOf([{ kind: 'store', array: 'w', node }]);
    const strides = stridesOf(readsOf(node));
    const call = ['nx', ...strides, ...scalars, ...arrays.map((a) => `${a.name} + at`)];
    return {
      rowSignature: listed(`static void ${name}_row`, [
        'ptrdiff_t n',
        ...strides.map((stride) => `ptrdiff_t ${stride}`),
        ...scalars.map((scalar) => `double ${scalar}`),
        ...arrays.map(pointer),
      ]),
      rowBody: statement(`w[i] = ${infix(node, GRID)};`),
      loops: this.loops([statement(`${name}_row(${call.join(', ')});`)]),
    };
  }

  /** Loops over the rows; `at` is the first point of a row. */
  private loops(inner: readonly string[]): string {
    const P = this.context.prefix.toUpperCase();
    const flat = this.table.halos.length === 2;
    const at = flat
      ? `(j + ${P}_HALO_Y_LEFT)*row + ${P}_HALO_X_LEFT`
      : `(k + ${P}_HALO_Z_LEFT)*plane + (j + ${P}_HALO_Y_LEFT)*row + ${P}_HALO_X_LEFT`;
    const body = [statement(`const ptrdiff_t at = ${at};`), ...inner].flatMap((text) => text.split('\n'));
    const loop = (index: string, size: string, lines: readonly string[]) => [
      `for (ptrdiff_t ${index} = 0; ${index} < ${size}; ++${index}) {`,
      ...lines.map((line) => `    ${line}`),
      '}',
    ];
    const rows = loop('j', 'ny', body);
    return (flat ? rows : loop('k', 'nz', rows)).join('\n');
  }

  /** Lengths of a row and a plane, ghost cells included. */
  private strides(halo = `${this.context.prefix.toUpperCase()}_HALO_`): string {
    const row = `const ptrdiff_t row = nx + ${halo}X_LEFT + ${halo}X_RIGHT;`;
    const plane = `const ptrdiff_t plane = row*(ny + ${halo}Y_LEFT + ${halo}Y_RIGHT);`;
    return this.table.halos.length === 2 ? row : `${row}\n${plane}`;
  }

  protected override tableRows(plan: TablePlan): View[] {
    const { prefix } = this.context;
    const arrays = arrayWords(plan);
    return [
      {
        about: `One step. ${arrays.map((a) => `${a.name}: ${a.words}`).join('; ')}.`,
        ...this.rowParts(`${prefix}_step`, plan.sweep.assignments[0]!.node, arrays),
        signature: listed(`void ${prefix}_step`, [...this.sizeParameters, ...this.parameters, ...arrays.map(pointer)]),
        coefficients: coefficientLines(plan.coefficients, this.symbols),
        strides: this.strides(),
      },
    ];
  }

  protected override taylor(start: StartPlan): View {
    const { plan, prefix } = this.context;
    const node = taylorNode(start, plan.timeOrder);
    const arrays = ['u', ...(plan.timeOrder === 2 ? ['v'] : []), 'y'].map((name) => ({ name, written: false }));
    const { signature, coefficients, seriesWords } = super.taylor(start);
    return {
      ...this.rowParts(`${prefix}_taylor`, node, [...arrays, { name: 'w', written: true }]),
      signature: signature!,
      coefficients: coefficients!,
      seriesWords: seriesWords!,
      strides: this.strides(),
    };
  }

  private get fillLines() {
    return gridHaloLines('c', this.table.halos);
  }

  override view(): View {
    const { prefix } = this.context;
    const P = prefix.toUpperCase();
    return {
      ...this.common(),
      axes: axisViews(this.table),
      lengths: this.sizes
        .map((size, k) => {
          const axis = ['X', 'Y', 'Z'][k]!;
          return `(${size} + ${P}_HALO_${axis}_LEFT + ${P}_HALO_${axis}_RIGHT)`;
        })
        .join('\n        * '),
      tooSmall: this.sizes.map((size, k) => `${size} < ${P}_MIN_N${['X', 'Y', 'Z'][k]!}`).join(' || '),
      sizes: this.sizes.join(', '),
      sizeParameters: this.sizeParameters.join(', '),
      rowStrides: this.strides(),
      stateLoops: this.loops([
        'for (ptrdiff_t i = 0; i < nx; ++i)',
        '    if (!isfinite(u[at + i]))',
        `        return ${P}_NAN_IN_STATE;`,
      ]),
      periodic: this.periodic ? [{ fillLines: this.fillLines }] : [],
    };
  }

  override driver(): View {
    const [x, y, z = { left: '0', right: '0' }] = axisViews(this.table);
    return {
      ...this.commonDriver(),
      caller: this.periodic ? [] : [{ fillLines: this.fillLines, rowStrides: this.strides('') }],
      sizes: this.sizes.join(', '),
      sizeParameters: this.sizeParameters.join(', '),
      readSizes: this.sizes.map((size) => `${size} = whole("${size} is missing");`).join('\n'),
      flat: this.sizes.length === 2 ? [{}] : [],
      xLeft: x!.left,
      xRight: x!.right,
      yLeft: y!.left,
      yRight: y!.right,
      zLeft: z.left,
      zRight: z.right,
    };
  }
}
