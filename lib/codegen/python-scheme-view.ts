/** What the Python template of a scheme prints. */
import { boundCondition, boundText } from './bound';
import { coefficientSource, type Coefficient } from './coefficient';
import { infix, type Assignment, type Dialect, type Place } from './expression-tree';
import { haloLines } from './halo-text';
import type { StagesPlan, TablePlan } from './kernel-plan';
import type { View } from './kernel-source';
import { PYTHON, pythonSweep, type PythonSweep } from './python';
import {
  arraysOf,
  arrayWords,
  levelsOf,
  minPoints,
  oldestOf,
  runAbout,
  sizesOf,
  startAbout,
  taylorNode,
  type SchemeContext,
} from './scheme-words';
import { wrapStatement } from './wrap-text';

const coefficientLines = (coefficients: readonly Coefficient[], symbols: readonly string[], prefix = '') =>
  coefficients.map(({ name, value }) => `${prefix}${name} = ${coefficientSource(value, symbols, PYTHON.literal)}`);

const tuple = (names: readonly string[]) => (names.length === 1 ? `(${names[0]!},)` : names.join(', '));

export class PythonSchemeView {
  protected readonly symbols: string[];
  protected readonly sizes: string[];

  constructor(protected readonly context: SchemeContext) {
    this.symbols = context.plan.parameters.map((p) => p.name);
    this.sizes = sizesOf(context.plan);
  }

  protected get periodic() {
    return this.context.options.boundary === 'periodic';
  }
  private get fillArguments() {
    return this.periodic ? [] : ['fill'];
  }
  private fill(array: string) {
    return this.periodic ? `fill_halo(${array})` : `fill(${array})`;
  }

  private sweep(assignments: readonly Assignment[]): PythonSweep {
    return pythonSweep(assignments, (name) => `self.${name}`);
  }

  /** Distance of a neighbour within the array. */
  protected shift({ offset }: Place): string {
    return String(offset);
  }
  /** Slices of whole arrays, for the start-up that is called once. */
  private get sliced(): Dialect {
    return {
      literal: PYTHON.literal,
      element: (array, offset, across) => `at(${array}, ${this.shift({ offset, across })})`,
    };
  }

  private sweepParts(sweep: PythonSweep) {
    return {
      names: tuple([...sweep.views.map((v) => v.name), ...sweep.scratch]),
      views: [
        ...sweep.views.map((v) => `_part(${v.array}, a, b, ${this.shift(v)}),`),
        ...sweep.scratch.map((name) => `${name}[: b - a],`),
      ].join('\n'),
      lines: sweep.lines.join('\n'),
    };
  }

  private turning(plan: TablePlan): View[] {
    const names = [...arrayWords(plan)].reverse().map((a) => a.name);
    return [{ unpack: tuple(names), ...this.sweepParts(this.sweep(plan.sweep.assignments)) }];
  }

  private staging(plan: StagesPlan): View[] {
    const sources = [...new Set(plan.sweeps.map((s) => s.source))];
    return [
      {
        unpack: tuple([...plan.work, 'u']),
        keep: [
          ...sources.map((name) => `self._${name} = ${name}`),
          ...(this.periodic ? [] : ['self._fill = fill']),
        ].join('\n'),
        stages: plan.sweeps.map(({ source, assignments }, k) => ({
          name: `stage${k + 1}`,
          fill: this.periodic ? `fill_halo(self._${source})` : `self._fill(self._${source})`,
          ...this.sweepParts(this.sweep(assignments)),
        })),
      },
    ];
  }

  private start(plan: TablePlan): View[] {
    const { start } = plan;
    if (!start) return [];
    const second = plan.timeOrder === 2;
    const oldest = oldestOf(plan);
    const loop = {
      terms: String(start.terms),
      fill_u: this.fill('u'),
      fill_w: this.fill('w'),
      body: infix(taylorNode(start, plan.timeOrder), this.sliced),
    };
    const about = startAbout(this.context).filter((line) => !line.startsWith('work:'));
    return [
      {
        startArguments: ['levels', ...this.symbols, ...(second ? ['v'] : []), ...this.fillArguments].join(', '),
        checkArguments: [...this.sizes, ...this.symbols].join(', '),
        about: about.map((line) => ({ line: line.replace(/^Start-up: makes/, 'Makes') })),
        coefficients: coefficientLines(start.coefficients, this.symbols).join('\n'),
        firstOrder: second ? [] : [{ ...loop, second: String(oldest + 1) }],
        secondOrder: second ? [{ ...loop, oldest: String(oldest) }] : [],
      },
    ];
  }

  /** Statements of one step on a `step` object. */
  advance(): string {
    return this.context.plan.shape === 'stages' ? 'step()' : `${this.fill('step.levels[-1]')}\nstep()`;
  }

  /** Ghost cells of the older levels, which later steps find filled. */
  before(): string {
    const { plan } = this.context;
    if (plan.shape !== 'table') return '';
    return plan.known
      .map((name, age) => ({ name, age }))
      .filter(({ name, age }) => age > 0 && name !== 'w')
      .map(({ age }) => this.fill(`step.levels[${-age - 1}]`))
      .join('\n');
  }

  protected classAbout(): string[] {
    const { plan } = this.context;
    if (plan.shape === 'stages')
      return [
        'levels: work arrays, then u, which is advanced in place; all of length(n).',
        this.periodic
          ? 'The stages fill the ghost cells of what they read.'
          : 'fill(u) is called for the ghost cells of u and of every stage.',
      ];
    const [left, right] = plan.halo;
    return [
      'levels: arrays of length(n), the oldest first; rotated by every call, the newest last.',
      ...arrayWords(plan).map((a) => `${a.name}: ${a.words}`),
      left + right > 0 ? 'Fill the ghost cells of levels[-1] before the call.' : 'No ghost cells are read.',
    ];
  }

  /** What the templates of a row and of a grid have in common. */
  protected common(): View {
    const { plan, bound } = this.context;
    const condition = boundCondition(bound, { and: 'and', or: 'or', decimal: (text) => text, literal: PYTHON.literal });
    const refused = [
      ...this.symbols.map((name) => ({
        condition: `not math.isfinite(${name})`,
        message: `f"${name} = {${name}} is not a finite number"`,
      })),
      ...(plan.divisor
        ? [
            {
              condition: `not abs(${coefficientSource(plan.divisor, this.symbols, PYTHON.literal)}) > 0.0`,
              message: '"the coefficient of the new level is 0 here"',
            },
          ]
        : []),
    ];
    const sweeps = plan.shape === 'table' ? [plan.sweep] : plan.sweeps;
    const scratch = [...new Set(sweeps.flatMap((s) => this.sweep(s.assignments).scratch))];
    const [first, ...rest] = runAbout(this.context).join(' ').split('. ');
    const fillInStep = plan.shape === 'stages' ? this.fillArguments : [];
    return {
      levels: String(levelsOf(plan)),
      arrays: String(arraysOf(plan)),
      checkArguments: [...this.sizes, ...this.symbols].join(', '),
      checkCall: [...this.sizes.map((size) => `step.${size}`), ...this.symbols].join(', '),
      refused,
      bounded: condition
        ? [
            {
              outside: wrapStatement(`not (${condition})`, 90),
              message: `f"${this.symbols.map((name) => `${name} = {${name}}`).join(', ')} is outside the stable range ${boundText(bound)}"`,
            },
          ]
        : [],
      classAbout: this.classAbout().map((line) => ({ line })),
      initArguments: ['levels', ...this.symbols, ...fillInStep].join(', '),
      initScalars: [
        ...this.symbols.map((name) => `self.${name} = ${name} = float(${name})`),
        ...coefficientLines(plan.coefficients, this.symbols, 'self.'),
      ].join('\n'),
      scratchLines: scratch.map((name) => `${name} = np.empty(size)`).join('\n'),
      turning: plan.shape === 'table' ? this.turning(plan) : [],
      start: plan.shape === 'table' ? this.start(plan) : [],
      runArguments: ['nsteps', 'levels', ...this.symbols, ...this.fillArguments].join(', '),
      runFirst: 'Marches nsteps steps and returns the arrays, the newest level last.',
      runAbout: [first!.replace(/^nsteps steps$/, ''), ...rest]
        .filter((line) => line !== '')
        .map((line) => ({ line: `${line.replace(/\.$/, '')}.` })),
      stepArguments: ['levels', ...this.symbols, ...fillInStep].join(', '),
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
      periodic: this.periodic ? [{ fillLines: haloLines('python', plan.halo) }] : [],
      staging: plan.shape === 'stages' ? this.staging(plan) : [],
    };
  }

  /** What the drivers of a row and of a grid have in common. */
  protected commonDriver(): View {
    const { plan } = this.context;
    const started = plan.shape === 'table' && plan.start !== null;
    const second = plan.timeOrder === 2;
    const fill = this.fillArguments.map((name) => `, ${name}`).join('');
    const kernelFill = (text: string) => text.replaceAll('fill_halo(', 'kernel.fill_halo(');
    return {
      count: String(this.symbols.length),
      stepFill: plan.shape === 'stages' ? fill : '',
      runFill: fill,
      before: kernelFill(this.before()),
      advance: kernelFill(this.advance()),
      start: started ? [{ second: second ? [{}] : [], startTail: `${second ? ', v' : ''}${fill}` }] : [],
      startless: started ? [] : [{}],
    };
  }

  /** What the driver's template prints. */
  driver(): View {
    return {
      ...this.commonDriver(),
      caller: this.periodic ? [] : [{ fillLines: haloLines('python', this.context.plan.halo) }],
    };
  }
}
