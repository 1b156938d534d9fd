/** What the Fortran template of a scheme prints. */
import { boundCondition } from './bound';
import { coefficientSource } from './coefficient';
import { type Assignment } from './expression-tree';
import { FORTRAN } from './fortran';
import {
  assignmentLine,
  coefficientLines,
  listed,
  localDeclaration,
  scalarDeclaration,
  statement,
} from './fortran-text';
import { haloExtent, haloLines } from './halo-text';
import type { StagesPlan, TablePlan } from './kernel-plan';
import type { View } from './kernel-source';
import {
  arraysOf,
  arrayWords,
  boundWords,
  isGrid,
  levelsOf,
  minPoints,
  oldestOf,
  runAbout,
  scalarsOf,
  sizesOf,
  startAbout,
  sweepArrays,
  taylorNode,
  type SchemeContext,
} from './scheme-words';
import { wrapStatement } from './wrap-text';

export class FortranSchemeView {
  protected readonly symbols: string[];
  protected readonly sizes: string[];
  /** Bounds of an array, ghost cells included. */
  protected readonly extent: string;
  /** What stands for all of them in a section. */
  private readonly whole: string;

  constructor(protected readonly context: SchemeContext) {
    const { plan } = context;
    this.symbols = plan.parameters.map((p) => p.name);
    this.sizes = sizesOf(plan);
    const halos = isGrid(plan) ? plan.halos : [context.plan.halo];
    this.extent = halos.map((halo, k) => haloExtent(halo, this.sizes[k]!)).join(', ');
    this.whole = halos.map(() => ':').join(', ');
  }

  protected get periodic() {
    return this.context.options.boundary === 'periodic';
  }
  protected get fillArguments() {
    return this.periodic ? [] : ['fill'];
  }
  private get fillDeclaration() {
    return this.periodic ? '' : `procedure(${this.context.prefix}_fill) :: fill`;
  }
  private fill(array: string) {
    return this.periodic
      ? `call ${this.context.prefix}_fill_halo(${this.sizes.join(', ')}, ${array})`
      : `call fill(${this.sizes.join(', ')}, ${array})`;
  }

  protected arrayDeclaration(
    { name, written, words }: { name: string; written: boolean; words?: string },
    intent: string,
  ) {
    const shown = `real(wp), intent(${written ? intent : 'in'})`.padEnd(23);
    return `${shown} :: ${name}(${this.extent})${words ? `   ! ${words}` : ''}`;
  }

  protected tableRows(plan: TablePlan): View[] {
    const name = `${this.context.prefix}_step`;
    const arrays = arrayWords(plan);
    return [
      {
        name,
        notes: [{ note: 'One step.' }],
        signature: listed(name, [...this.sizes, ...this.symbols, ...arrays.map((a) => a.name)]),
        scalars: scalarDeclaration(this.symbols),
        arrayDeclarations: arrays.map((a) => this.arrayDeclaration(a, 'inout')).join('\n'),
        locals: localDeclaration(plan.coefficients.map((c) => c.name)),
        coefficients: coefficientLines(plan.coefficients, this.symbols),
        body: this.sweepBody(plan.sweep.assignments),
      },
    ];
  }

  /** What is done at every point. */
  protected sweepBody(assignments: readonly Assignment[]): string {
    return assignments.map(assignmentLine).join('\n');
  }

  /** Section of one column of u in start and run. */
  private column(index: string) {
    return `u(${this.whole}, ${index})`;
  }

  private stageRows(plan: StagesPlan): View[] {
    return plan.sweeps.map(({ assignments }, k) => {
      const name = `stage${k + 1}`;
      const scalars = scalarsOf(assignments);
      const arrays = sweepArrays(assignments);
      return {
        name,
        notes: k === 0 ? [{ note: 'k is dt times the slope; each stage adds it to the sums that need it.' }] : [],
        signature: listed(name, ['n', ...scalars, ...arrays.map((a) => a.name)]),
        scalars: scalarDeclaration(scalars),
        arrayDeclarations: arrays.map((a) => this.arrayDeclaration(a, 'inout')).join('\n'),
        locals: localDeclaration(assignments.flatMap((a) => (a.kind === 'value' ? [a.name] : []))),
        coefficients: '',
        body: assignments.map(assignmentLine).join('\n'),
      };
    });
  }

  private stagedStep(plan: StagesPlan): View[] {
    const name = `${this.context.prefix}_step`;
    const arrays = ['u', ...plan.work];
    const calls = plan.sweeps.flatMap(({ source, assignments }, k) => [
      this.fill(source),
      statement(
        `call stage${k + 1}(${['n', ...scalarsOf(assignments), ...sweepArrays(assignments).map((a) => a.name)].join(', ')})`,
      ),
    ]);
    return [
      {
        name,
        pure: this.periodic ? 'pure ' : '',
        signature: listed(name, ['n', ...this.symbols, ...arrays, ...this.fillArguments]),
        scalars: scalarDeclaration(this.symbols),
        arrayDeclarations: arrays.map((a) => this.arrayDeclaration({ name: a, written: true }, 'inout')).join('\n'),
        fillDeclaration: this.fillDeclaration,
        locals: localDeclaration(plan.coefficients.map((c) => c.name)),
        coefficients: coefficientLines(plan.coefficients, this.symbols),
        calls: calls.join('\n'),
      },
    ];
  }

  private start(plan: TablePlan): View[] {
    const { start } = plan;
    const { prefix } = this.context;
    if (!start) return [];
    const second = plan.timeOrder === 2;
    const oldest = oldestOf(plan) + 1;
    const target = this.column(second ? `${oldest}+k` : 'k');
    // Terms alternate between the work array and the new level, in which the last one ends.
    const loop = {
      terms: String(start.terms),
      leading: [...this.sizes, ...this.symbols].join(', '),
      fill_u: this.fill(this.column(second ? String(oldest) : 'k-1')),
      fill_k: this.fill(target),
      fill_work: this.fill('work'),
      first: start.terms % 2 === 0 ? target : 'work',
      newer: target,
      older: this.column(second ? String(oldest) : 'k-1'),
    };
    const arrays = [
      { name: 'u', written: false },
      ...(second ? [{ name: 'v', written: false }] : []),
      { name: 'y', written: false },
      { name: 'w', written: true },
    ];
    return [
      {
        seriesWords: second ? 'u + b v + c dt^2 L y' : 'u + c dt L y',
        signature: listed(`${prefix}_taylor`, [
          ...this.sizes,
          ...this.symbols,
          ...(second ? ['b'] : []),
          'c',
          ...arrays.map((a) => a.name),
        ]),
        scalars: scalarDeclaration([...this.symbols, ...(second ? ['b'] : []), 'c']),
        arrayDeclarations: arrays.map((a) => this.arrayDeclaration(a, 'inout')).join('\n'),
        locals: localDeclaration(start.coefficients.map((c) => c.name)),
        coefficients: coefficientLines(start.coefficients, this.symbols),
        body: this.sweepBody([{ kind: 'store', array: 'w', node: taylorNode(start, plan.timeOrder) }]),
        about: startAbout(this.context).map((line) => ({ line })),
        startSignature: listed(`${prefix}_start`, [
          ...this.sizes,
          ...this.symbols,
          'u',
          ...(second ? ['v'] : []),
          'work',
          ...this.fillArguments,
          'status',
        ]),
        firstOrder: second ? [] : [{ ...loop, second: String(oldest + 1) }],
        secondOrder: second
          ? [
              {
                ...loop,
                b: 'real(k, wp)/real(2*m-1, wp)',
                c: 'real(k*k, wp)/real((2*m-1)*(2*m), wp)',
              },
            ]
          : [],
      },
    ];
  }

  /** Statements of one step on the columns of u. */
  advance(): string {
    const { plan, prefix } = this.context;
    if (plan.shape === 'stages') {
      const columns = ['u', ...plan.work].map((_, k) => `u(:, ${k === 0 ? plan.work.length + 1 : k})`);
      return statement(`call ${prefix}_step(${['n', ...this.symbols, ...columns, ...this.fillArguments].join(', ')})`);
    }
    const read = arrayWords(plan)
      .filter((a) => !a.written)
      .map((_, age) => this.column(age === 0 ? 'newest' : `modulo(newest-${age + 1}, ${plan.arrays})+1`));
    return [
      `oldest = modulo(newest, ${plan.arrays}) + 1`,
      this.fill(this.column('newest')),
      statement(`call ${prefix}_step(${[...this.sizes, ...this.symbols, ...read, this.column('oldest')].join(', ')})`),
      'newest = oldest',
    ].join('\n');
  }

  /** Ghost cells of the older levels, which later steps find filled. */
  before(): string {
    const { plan } = this.context;
    if (plan.shape !== 'table') return '';
    return plan.known
      .map((name, age) => ({ name, age }))
      .filter(({ name, age }) => age > 0 && name !== 'w')
      .map(({ age }) => this.fill(this.column(`modulo(newest-${age + 1}, ${plan.arrays})+1`)))
      .join('\n');
  }

  /** What the templates of a row and of a grid have in common. */
  protected common(): View {
    const { plan, prefix, bound } = this.context;
    const rotating = plan.shape === 'table';
    const decimal = (text: string) => (text.startsWith('-') ? `(${text}_wp)` : `${text}_wp`);
    const condition = boundCondition(bound, { and: '.and.', or: '.or.', decimal, literal: FORTRAN.literal });
    const refused = [
      ...this.symbols.map((name) => `.not. ieee_is_finite(${name})`),
      ...(plan.divisor
        ? [`.not. abs(${coefficientSource(plan.divisor, this.symbols, FORTRAN.literal)}) > 0.0_wp`]
        : []),
    ];
    const start = plan.shape === 'table' ? this.start(plan) : [];
    return {
      prefix,
      extent: this.extent,
      levels: String(levelsOf(plan)),
      arrays: String(arraysOf(plan)),
      parameterWords: this.symbols.length > 0 ? this.symbols.join(' or ') : 'no parameter:',
      divisorWords: plan.divisor ? ', or the coefficient of the new level is 0' : '',
      boundWords: boundWords(bound),
      publics: [
        ...(this.periodic ? [{ name: `${prefix}_fill_halo` }] : [{ name: `${prefix}_fill` }]),
        ...(start.length > 0 ? [{ name: `${prefix}_start` }] : []),
      ],
      caller: this.periodic ? [] : [{}],
      checkArguments: [...this.sizes, ...this.symbols].join(', '),
      parameterDeclarations: scalarDeclaration(this.symbols),
      refused: refused.length > 0 ? [{ condition: wrapStatement(refused.join(' .or. '), 90, ' &') }] : [],
      bounded: condition ? [{ outside: wrapStatement(`.not. (${condition})`, 90, ' &') }] : [],
      rows: plan.shape === 'table' ? this.tableRows(plan) : this.stageRows(plan),
      start,
      fillDeclaration: this.fillDeclaration,
      runAbout: runAbout(this.context).map((line) => ({
        line: line.replace('on return the last is the newest', 'newest is the column of the newest level, in and out'),
      })),
      runSignature: listed(`${prefix}_run`, [
        'nsteps',
        ...this.sizes,
        ...this.symbols,
        'u',
        ...(rotating ? ['newest'] : []),
        ...this.fillArguments,
        'status',
      ]),
      rotating: rotating ? [{}] : [],
      runLocals: rotating ? 'k, oldest' : 'k',
      newestCheck: rotating ? ` .or. newest < 1 .or. newest > ${plan.arrays}` : '',
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
      periodic: this.periodic ? [{ fillLines: haloLines('fortran', plan.halo) }] : [],
      staged: plan.shape === 'stages' ? this.stagedStep(plan) : [],
    };
  }

  /** What the drivers of a row and of a grid have in common. */
  protected commonDriver(): View {
    const { plan, prefix } = this.context;
    const rotating = plan.shape === 'table';
    const started = plan.shape === 'table' && plan.start !== null;
    const second = plan.timeOrder === 2;
    return {
      file: `${prefix}.f90`,
      prefix,
      extent: this.extent,
      arrays: String(arraysOf(plan)),
      levels: String(levelsOf(plan)),
      checkArguments: [...this.sizes, ...this.symbols].join(', '),
      runArguments: [...(rotating ? ['newest'] : []), ...this.fillArguments].map((name) => `${name}, `).join(''),
      parameterDeclarations: scalarDeclaration(this.symbols),
      parameterLocals: localDeclaration(this.symbols),
      readParameters: this.symbols.map((name) => `${name} = bits('a parameter is missing')`).join('\n'),
      advanceLocals: rotating ? 'k, oldest' : 'k',
      before: this.before(),
      advance: this.advance(),
      staged: rotating ? [] : [{}],
      start: started
        ? [
            {
              second: second ? [{}] : [],
              arguments: [
                ...this.sizes,
                ...this.symbols,
                'u',
                ...(second ? ['v'] : []),
                'work',
                ...this.fillArguments,
                'status',
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
      lower: String(1 - halo[0]),
      haloRight: String(halo[1]),
      caller: this.periodic ? [] : [{ fillLines: haloLines('fortran', halo) }],
    };
  }
}
