/** What the templates of a time method print, in every language. */
import type { TimeMethodFacts } from '@/lib/facts/facts';
import type { Rational } from '@/lib/numerics/rational';
import { C } from './c';
import { coefficientSource, type Coefficient } from './coefficient';
import { infix, type Assignment, type Dialect } from './expression-tree';
import { FORTRAN } from './fortran';
import type { KernelInput, KernelLanguage } from './kernel-request';
import type { View } from './kernel-source';
import type { MethodPlan, MultistepPlan, RungeKuttaPlan } from './method-plan';
import { PYTHON, pythonSweep } from './python';
import { scalarsOf, sweepArrays } from './scheme-words';
import { wrapStatement } from './wrap-text';

export interface MethodContext {
  readonly input: KernelInput;
  readonly facts: TimeMethodFacts;
  readonly plan: MethodPlan;
  readonly prefix: string;
}

const DIALECTS: Readonly<Record<KernelLanguage, Dialect>> = {
  c: C,
  fortran: FORTRAN,
  // Whole arrays: no offsets occur.
  python: { literal: PYTHON.literal, element: (array) => array },
};

function coefficientLines(coefficients: readonly Coefficient[], language: KernelLanguage): string {
  return coefficients
    .map(({ name, value }) => {
      const text = coefficientSource(value, ['dt'], DIALECTS[language].literal);
      if (language === 'c') return `const double ${name} = ${text};`;
      return language === 'python' ? `self.${name} = ${text}` : `${name} = ${text}`;
    })
    .join('\n');
}

/** "t", "t + dt" or "t + 0.5*dt". */
export function abscissa(c: Rational, language: KernelLanguage): string {
  if (c.num === 0n) return 't';
  if (c.num === c.den) return 't + dt';
  return c.num < 0n
    ? `t - ${DIALECTS[language].literal({ num: -c.num, den: c.den })}*dt`
    : `t + ${DIALECTS[language].literal(c)}*dt`;
}

const pointer = ({ name, written }: { name: string; written: boolean }) =>
  `${written ? '' : 'const '}double *restrict ${name}`;

/** A static row function of C, or a contained subroutine of Fortran, for the sums of one stage. */
function rowView(name: string, assignments: readonly Assignment[], language: 'c' | 'fortran'): View {
  const arrays = sweepArrays(assignments);
  const scalars = scalarsOf(assignments);
  if (language === 'c') {
    const parameters = ['ptrdiff_t n', ...scalars.map((s) => `double ${s}`), ...arrays.map(pointer)];
    const lines = assignments.map((a) => wrapStatement(`${C.element(target(a), 0)} = ${infix(a.node, C)};`, 96));
    return {
      signature: wrapStatement(`static void ${name}(${parameters.join(', ')})`, 96),
      open: lines.length > 1 ? ' {' : '',
      body: lines.join('\n'),
      braces: lines.length > 1 ? [{}] : [],
    };
  }
  return {
    name,
    signature: `${name}(${['n', ...scalars, ...arrays.map((a) => a.name)].join(', ')})`,
    scalars: `real(wp), intent(in)    :: ${scalars.join(', ')}`,
    arrays: arrays
      .map((a) => `real(wp), intent(${a.written ? 'inout' : 'in'})${a.written ? '' : '   '} :: ${a.name}(n)`)
      .join('\n'),
    body: assignments
      .map((a) => wrapStatement(`${FORTRAN.element(target(a), 0)} = ${infix(a.node, FORTRAN)}`, 100, ' &'))
      .join('\n'),
  };
}

export const target = (a: Assignment) => (a.kind === 'store' ? a.array : a.name);

/** Calls of the right-hand side and of the rows, in order. */
function stageCalls(plan: RungeKuttaPlan, row: string, language: KernelLanguage, skipFirst: boolean): string {
  return plan.stages
    .flatMap(({ c, source, slope, assignments }, k) => {
      const time = abscissa(c, language);
      const names = [...scalarsOf(assignments), ...sweepArrays(assignments).map((a) => a.name)].join(', ');
      const first = skipFirst && k === 0;
      if (language === 'c')
        return [...(first ? [] : [`rhs(n, ${time}, ${source}, ${slope}, context);`]), `${row}${k + 1}(n, ${names});`];
      if (language === 'fortran')
        return [...(first ? [] : [`call rhs(n, ${time}, ${source}, ${slope})`]), `call ${row}${k + 1}(n, ${names})`];
      return [...(first ? [] : [`self.rhs(${time}, ${source}, out=${slope})`]), ...pythonLines(assignments)];
    })
    .join('\n');
}

/** NumPy calls on whole arrays; scratch arrays are attributes. */
function pythonLines(assignments: readonly Assignment[]): string[] {
  const { lines } = pythonSweep(assignments, (name) => `self.${name}`);
  return lines.map((line) => line.replace(/\b([st])\b(?=[,)])/g, 'self.$1'));
}

const scratchOf = (assignments: readonly Assignment[]) => pythonSweep(assignments, (name) => `self.${name}`).scratch;

function rungeKuttaView({ plan, prefix }: { plan: RungeKuttaPlan; prefix: string }, language: KernelLanguage): View {
  const coefficients = coefficientLines(plan.coefficients, language);
  const work = plan.work.join(', ');
  const arrays = String(plan.work.length + 1);
  if (language === 'c')
    return {
      prefix,
      PREFIX: prefix.toUpperCase(),
      arrays,
      coefficients,
      rows: plan.stages.map((s, k) => rowView(`sum${k + 1}`, s.assignments, 'c')),
      workParameters: plan.work.map((name) => `double *${name}`).join(', '),
      workArguments: plan.work.map((_, k) => `level[${k}]`).join(', '),
      newest: String(plan.work.length),
      calls: stageCalls(plan, 'sum', 'c', false),
    };
  if (language === 'fortran')
    return {
      prefix,
      arrays,
      coefficients,
      locals: plan.coefficients.length > 0 ? `real(wp) :: ${plan.coefficients.map((c) => c.name).join(', ')}` : '',
      rows: plan.stages.map((s, k) => rowView(`sum${k + 1}`, s.assignments, 'fortran')),
      work,
      workColumns: plan.work.map((_, k) => `u(:, ${k + 1})`).join(', '),
      newest: arrays,
      calls: stageCalls(plan, 'sum', 'fortran', false),
    };
  const scratch = [...new Set(plan.stages.flatMap((s) => scratchOf(s.assignments)))];
  return {
    arrays,
    coefficients,
    scratchLines: scratch.map((name) => `self.${name} = np.empty(self.n)`).join('\n'),
    unpack: [...plan.work, 'u'].join(', '),
    calls: ['dt = self.dt', ...stageCalls(plan, 'sum', 'python', false).split('\n')].join('\n'),
  };
}

function multistepView({ plan, prefix }: { plan: MultistepPlan; prefix: string }, language: KernelLanguage): View {
  const { levels, slopes, start } = plan;
  const coefficients = coefficientLines(plan.coefficients, language);
  const arrays = sweepArrays([plan.assignment]);
  const scalars = scalarsOf([plan.assignment]);
  const startWork = start ? start.work : [];
  const startCoefficients = start ? coefficientLines(start.coefficients, language) : '';
  const common = {
    levels: String(levels),
    slopes: String(slopes),
    steps: String(plan.steps),
    coefficients,
  };
  if (language === 'c') {
    const place = (name: string) => {
      const level = plan.levelNames.indexOf(name);
      if (level >= 0) return `level[${levels - 1 - level}]`;
      return `slope[${slopes - 1 - plan.slopeNames.indexOf(name)}]`;
    };
    return {
      ...common,
      prefix,
      PREFIX: prefix.toUpperCase(),
      newest: String(levels - 1),
      rows: [rowView('sum', [plan.assignment], 'c')],
      rowArguments: ['n', ...scalars, ...arrays.map((a) => place(a.name))].join(', '),
      startDeclaration: start ? [{}] : [],
      starting: start
        ? [
            {
              rows: start.stages.map((s, k) => rowView(`start${k + 1}`, s.assignments, 'c')),
              order: String(plan.startOrder),
              coefficients: startCoefficients,
              arrays: [
                `double *const u = level[${levels - 1}];`,
                ...(levels > 1 ? ['double *const v = level[0];'] : []),
                `double *const f = slope[0];`,
                ...startWork.map((name, k) => `double *const ${name} = work[${k}];`),
              ].join('\n'),
              work: String(startWork.length),
              calls: stageCalls(start, 'start', 'c', true),
            },
          ]
        : [],
    };
  }
  if (language === 'fortran') {
    const place = (name: string) => {
      const level = plan.levelNames.indexOf(name);
      if (level >= 0) return levels === 1 ? 'u(:, 1)' : `u(:, modulo(newest-${level + 1}, ${levels})+1)`;
      const slope = plan.slopeNames.indexOf(name);
      return slopes === 1 ? 'f(:, 1)' : `f(:, modulo(recent-${slope + 1}, ${slopes})+1)`;
    };
    const row = rowView('sum', [plan.assignment], 'fortran');
    return {
      ...common,
      prefix,
      locals: plan.coefficients.length > 0 ? `real(wp) :: ${plan.coefficients.map((c) => c.name).join(', ')}` : '',
      rows: [row],
      call: wrapStatement(`call sum(${['n', ...scalars, ...arrays.map((a) => place(a.name))].join(', ')})`, 100, ' &'),
      startPublic: start ? [{}] : [],
      starting: start
        ? [
            {
              rows: start.stages.map((s, k) => rowView(`start${k + 1}`, s.assignments, 'fortran')),
              order: String(plan.startOrder),
              coefficients: startCoefficients,
              locals: `real(wp) :: ${start.coefficients.map((c) => c.name).join(', ')}`,
              work: String(startWork.length),
              arguments: [
                'n',
                't',
                'dt',
                'u(:, newest)',
                ...(levels > 1 ? [`u(:, modulo(newest, ${levels})+1)`] : []),
                'f(:, recent)',
                ...startWork.map((_, k) => `work(:, ${k + 1})`),
                'rhs',
              ].join(', '),
              inner: ['n', 't', 'dt', 'u', ...(levels > 1 ? ['v'] : []), 'f', ...startWork, 'rhs'].join(', '),
              uIntent: levels > 1 ? 'in)   ' : 'inout)',
              outputs: [...(levels > 1 ? ['v'] : []), ...startWork]
                .map((name) => `real(wp), intent(inout) :: ${name}(n)`)
                .join('\n'),
              calls: stageCalls(start, 'start', 'fortran', true),
            },
          ]
        : [],
    };
  }
  const scratch = [
    ...new Set([
      ...scratchOf([plan.assignment]),
      ...(start ? start.stages.flatMap((s) => scratchOf(s.assignments)) : []),
    ]),
  ];
  return {
    ...common,
    startCoefficients,
    scratchLines: scratch.map((name) => `self.${name} = np.empty(self.n)`).join('\n'),
    unpackLevels: unpacked([...plan.levelNames].reverse()),
    unpackSlopes: unpacked([...plan.slopeNames].reverse()),
    lines: pythonLines([plan.assignment]).join('\n'),
    starting: start
      ? [
          {
            order: String(plan.startOrder),
            arrays: [
              ...(levels > 1 ? ['u, v = self.levels[-1], self.levels[0]'] : ['u = self.levels[-1]']),
              `${startWork.join(', ')} = ${startWork.map(() => 'np.empty(self.n)').join(', ')}`,
            ].join('\n'),
            calls: stageCalls(start, 'start', 'python', true),
          },
        ]
      : [],
  };
}

const unpacked = (names: readonly string[]) => (names.length === 1 ? `(${names[0]!},)` : names.join(', '));

export function methodView({ plan, prefix }: MethodContext, language: KernelLanguage): View {
  return plan.shape === 'runge-kutta'
    ? rungeKuttaView({ plan, prefix }, language)
    : multistepView({ plan, prefix }, language);
}

export function methodDriverView({ plan, prefix }: MethodContext, language: KernelLanguage): View {
  const own: View =
    plan.shape === 'runge-kutta'
      ? { arrays: String(plan.work.length + 1) }
      : {
          levels: String(plan.levels),
          slopes: String(plan.slopes),
          steps: String(plan.steps),
          startWork: String(plan.start ? plan.start.work.length : 0),
          starting: plan.start ? [{}] : [],
          startless: plan.start ? [] : [{}],
        };
  if (language === 'python')
    return plan.shape === 'runge-kutta'
      ? {}
      : { steps: String(plan.steps), starting: own.starting!, startless: own.startless! };
  return language === 'fortran' ? { ...own, prefix, file: `${prefix}.f90` } : { ...own, prefix };
}
