/** What the C template of a scheme prints. */
import { boundCondition } from './bound';
import { C } from './c';
import { coefficientSource, type Coefficient } from './coefficient';
import { infix, type Assignment } from './expression-tree';
import type { View } from './kernel-source';
import { haloLines } from './halo-text';
import type { StagesPlan, StartPlan, TablePlan } from './kernel-plan';
import {
  arraysOf,
  arrayWords,
  boundWords,
  levelsOf,
  minPoints,
  oldestOf,
  startAbout,
  runAbout,
  scalarsOf,
  sizesOf,
  sweepArrays,
  taylorNode,
  type SchemeContext,
} from './scheme-words';
import { wrapStatement } from './wrap-text';

const WIDTH = 96;
export const statement = (text: string) => wrapStatement(text, WIDTH);
/** An argument list, broken between arguments. */
export const listed = (head: string, items: readonly string[]) => statement(`${head}(${items.join(', ')})`);

export function coefficientLines(coefficients: readonly Coefficient[], symbols: readonly string[]): string {
  return coefficients
    .map(({ name, value }) => statement(`const double ${name} = ${coefficientSource(value, symbols, C.literal)};`))
    .join('\n');
}

function assignmentLine(assignment: Assignment): string {
  const target = assignment.kind === 'value' ? `const double ${assignment.name}` : C.element(assignment.array, 0);
  return statement(`${target} = ${infix(assignment.node, C)};`);
}

export const pointer = ({ name, written }: { name: string; written: boolean }) =>
  `${written ? '' : 'const '}double *restrict ${name}`;

export class CSchemeView {
  protected readonly symbols: string[];
  protected readonly parameters: string[];
  protected readonly sizes: string[];

  constructor(protected readonly context: SchemeContext) {
    this.symbols = context.plan.parameters.map((p) => p.name);
    this.parameters = this.symbols.map((name) => `double ${name}`);
    this.sizes = sizesOf(context.plan);
  }

  protected get sizeParameters() {
    return this.sizes.map((name) => `ptrdiff_t ${name}`);
  }

  protected get periodic() {
    return this.context.options.boundary === 'periodic';
  }
  private get fillParameters() {
    return this.periodic ? [] : [`${this.context.prefix}_fill *fill`, 'void *context'];
  }
  protected get fillArguments() {
    return this.periodic ? [] : ['fill', 'context'];
  }
  private fill(array: string) {
    return this.periodic
      ? `${this.context.prefix}_fill_halo(${this.sizes.join(', ')}, ${array});`
      : `fill(${this.sizes.join(', ')}, ${array}, context);`;
  }

  protected tableRows(plan: TablePlan): View[] {
    const { prefix } = this.context;
    const arrays = arrayWords(plan);
    const signature = listed(`void ${prefix}_step`, [
      ...this.sizeParameters,
      ...this.parameters,
      ...arrays.map(pointer),
    ]);
    return [
      {
        notes: [{ note: `One step. ${arrays.map((a) => `${a.name}: ${a.words}`).join('; ')}.` }],
        signature,
        coefficients: coefficientLines(plan.coefficients, this.symbols),
        open: '',
        body: plan.sweep.assignments.map(assignmentLine).join('\n'),
        braces: [],
      },
    ];
  }

  private stageRows(plan: StagesPlan): View[] {
    return plan.sweeps.map(({ assignments }, k) => ({
      notes: k === 0 ? [{ note: 'k is dt times the slope; each stage adds it to the sums that need it.' }] : [],
      signature: listed(`static void stage${k + 1}`, [
        'ptrdiff_t n',
        ...scalarsOf(assignments).map((name) => `double ${name}`),
        ...sweepArrays(assignments).map(pointer),
      ]),
      coefficients: '',
      open: assignments.length > 1 ? ' {' : '',
      body: assignments.map(assignmentLine).join('\n'),
      braces: assignments.length > 1 ? [{}] : [],
    }));
  }

  private stagedStep(plan: StagesPlan): View[] {
    const calls = plan.sweeps.flatMap(({ source, assignments }, k) => [
      this.fill(source),
      `stage${k + 1}(${['n', ...scalarsOf(assignments), ...sweepArrays(assignments).map((a) => a.name)].join(', ')});`,
    ]);
    return [
      {
        signature: listed(`void ${this.context.prefix}_step`, this.stagedParameters(plan)),
        coefficients: coefficientLines(plan.coefficients, this.symbols),
        calls: calls.join('\n'),
      },
    ];
  }

  private stagedParameters(plan: StagesPlan) {
    const arrays = ['u', ...plan.work].map((name) => `double *${name}`);
    return ['ptrdiff_t n', ...this.parameters, ...arrays, ...this.fillParameters];
  }

  protected taylor(start: StartPlan): View {
    const { plan, prefix } = this.context;
    const second = plan.timeOrder === 2;
    return {
      signature: listed(`static void ${prefix}_taylor`, [
        ...this.sizeParameters,
        ...this.parameters,
        ...(second ? ['double b'] : []),
        'double c',
        'const double *restrict u',
        ...(second ? ['const double *restrict v'] : []),
        'const double *restrict y',
        'double *restrict w',
      ]),
      coefficients: coefficientLines(start.coefficients, this.symbols),
      body: statement(`w[i] = ${infix(taylorNode(start, plan.timeOrder), C)};`),
      seriesWords: second ? 'u + b v + c dt^2 L y' : 'u + c dt L y',
    };
  }

  private startParameters(plan: TablePlan) {
    return [
      ...this.sizeParameters,
      ...this.parameters,
      `double *const level[${plan.arrays}]`,
      ...(plan.timeOrder === 2 ? ['const double *v'] : []),
      'double *work',
      ...this.fillParameters,
    ];
  }

  private start(plan: TablePlan): View[] {
    const { start } = plan;
    if (!start) return [];
    const loop = {
      terms: String(start.terms),
      leading: [...this.sizes, ...this.symbols].join(', '),
      fill_u: this.fill('u'),
      fill_w: this.fill('w'),
    };
    const oldest = oldestOf(plan);
    return [
      {
        ...this.taylor(start),
        about: startAbout(this.context).map((line) => ({ line })),
        parameters: this.startParameters(plan).join(', '),
        alsoNull: plan.timeOrder === 2 ? ' || !v' : '',
        firstOrder: plan.timeOrder === 1 ? [{ ...loop, second: String(oldest + 1) }] : [],
        secondOrder: plan.timeOrder === 2 ? [{ ...loop, oldest: String(oldest) }] : [],
      },
    ];
  }

  private runParameters() {
    const level = `double *${this.context.plan.shape === 'table' ? '' : 'const '}level[${arraysOf(this.context.plan)}]`;
    return ['ptrdiff_t nsteps', ...this.sizeParameters, ...this.parameters, level, ...this.fillParameters];
  }

  /** Statements of one step on level[], shared by run and by the driver. */
  advance(): string {
    const { plan, prefix } = this.context;
    if (plan.shape === 'stages') {
      const arrays = ['u', ...plan.work].map((_, k) => `level[${k === 0 ? plan.work.length : k - 1}]`);
      return `${prefix}_step(${['n', ...this.symbols, ...arrays, ...this.fillArguments].join(', ')});`;
    }
    const last = plan.arrays - 1;
    const read = arrayWords(plan)
      .filter((a) => !a.written)
      .map((_, age) => `level[${last - age}]`);
    return [
      this.fill(`level[${last}]`),
      `${prefix}_step(${[...this.sizes, ...this.symbols, ...read, 'level[0]'].join(', ')});`,
      'double *const newest = level[0];',
      ...Array.from({ length: last }, (_, k) => `level[${k}] = level[${k + 1}];`),
      `level[${last}] = newest;`,
    ].join('\n');
  }

  /** Ghost cells of the older levels, which later steps find filled. */
  before(): string {
    const { plan } = this.context;
    if (plan.shape !== 'table') return '';
    const older = plan.known.map((name, age) => ({ name, age })).filter(({ name, age }) => age > 0 && name !== 'w');
    return older.map(({ age }) => this.fill(`level[${plan.arrays - 1 - age}]`)).join('\n');
  }

  declarations(): string {
    const { plan, prefix } = this.context;
    const table = plan.shape === 'table' ? plan : null;
    const step = table
      ? [...this.sizeParameters, ...this.parameters, ...arrayWords(table).map(pointer)]
      : this.stagedParameters(plan as StagesPlan);
    return [
      listed(`ptrdiff_t ${prefix}_length`, this.sizeParameters),
      listed(`int ${prefix}_check`, [...this.sizeParameters, ...this.parameters]),
      listed(`int ${prefix}_check_state`, [...this.sizeParameters, 'const double *u']),
      ...(this.periodic ? [listed(`void ${prefix}_fill_halo`, [...this.sizeParameters, 'double *u'])] : []),
      listed(`void ${prefix}_step`, step),
      ...(table?.start ? [listed(`int ${prefix}_start`, this.startParameters(table))] : []),
      listed(`int ${prefix}_run`, this.runParameters()),
    ]
      .map((line) => `${line};`)
      .join('\n');
  }

  /** What the templates of a row and of a grid have in common. */
  protected common(): View {
    const { plan, prefix, bound } = this.context;
    const condition = boundCondition(bound, { and: '&&', or: '||', decimal: (text) => text, literal: C.literal });
    const refused = [
      ...this.symbols.map((name) => `!isfinite(${name})`),
      ...(plan.divisor ? [`!(fabs(${coefficientSource(plan.divisor, this.symbols, C.literal)}) > 0.0)`] : []),
    ];
    return {
      prefix,
      PREFIX: prefix.toUpperCase(),
      levels: String(levelsOf(plan)),
      arrays: String(arraysOf(plan)),
      parameterWords: this.symbols.length > 0 ? this.symbols.join(' or ') : 'no parameter:',
      divisorWords: plan.divisor ? ', or the coefficient of the new level is 0' : '',
      boundWords: boundWords(bound),
      caller: this.periodic ? [] : [{}],
      declarations: this.declarations(),
      checkParameters: [...this.sizeParameters, ...this.parameters].join(', '),
      checkArguments: [...this.sizes, ...this.symbols].join(', '),
      refused: refused.length > 0 ? [{ condition: statement(refused.join(' || ')) }] : [],
      bounded: condition ? [{ outside: statement(`!(${condition})`) }] : [],
      rows: plan.shape === 'table' ? this.tableRows(plan) : this.stageRows(plan),
      start: plan.shape === 'table' ? this.start(plan) : [],
      runAbout: runAbout(this.context).map((line) => ({ line })),
      runParameters: this.runParameters().join(', '),
      runBefore: this.before(),
      runBody: this.advance(),
    };
  }

  view(): View {
    const { plan } = this.context;
    return {
      ...this.common(),
      haloLeft: String(plan.halo[0]),
      haloRight: String(plan.halo[1]),
      minPoints: String(minPoints(plan)),
      periodic: this.periodic ? [{ fillLines: haloLines('c', plan.halo) }] : [],
      staged: plan.shape === 'stages' ? this.stagedStep(plan) : [],
    };
  }

  protected commonDriver(): View {
    const { plan, prefix } = this.context;
    const started = plan.shape === 'table' && plan.start !== null;
    const second = plan.timeOrder === 2;
    return {
      prefix,
      declarations: this.declarations(),
      arrays: String(arraysOf(plan)),
      levels: String(levelsOf(plan)),
      parameters: this.symbols.map((name) => ({ name })),
      checkArguments: [...this.sizes, ...this.symbols].join(', '),
      fillArguments: this.fillArguments.map((name) => `, ${name}`).join(''),
      before: this.before(),
      advance: this.advance(),
      start: started
        ? [
            {
              second: second ? [{}] : [],
              arguments: [
                ...this.sizes,
                ...this.symbols,
                'level',
                ...(second ? ['v'] : []),
                'work',
                ...this.fillArguments,
              ].join(', '),
            },
          ]
        : [],
      startless: started ? [] : [{}],
    };
  }

  /** What the driver's template prints. */
  driver(): View {
    const { halo } = this.context.plan;
    return {
      ...this.commonDriver(),
      caller: this.periodic ? [] : [{ fillLines: haloLines('c', halo) }],
      haloLeft: String(halo[0]),
    };
  }
}
