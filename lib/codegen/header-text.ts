/** The comment at the head of a kernel: what it is, how it is called, what to beware of. */
import type { Equation } from '@/lib/numerics/equation';
import { formatRational } from '@/lib/numerics/rational';
import { advisedText, boundText } from './bound';
import { coefficientSource } from './coefficient';
import { EQUATION_TEXT } from './equation-text';
import { infix, type Assignment, type Dialect } from './expression-tree';
import { GENERATOR_RELEASE } from './generator-release';
import type { KernelInput, KernelLanguage, KernelOptions } from './kernel-request';
import { layoutWords } from './grid-words';
import type { TablePlan } from './kernel-plan';
import { arraysOf, arrayWords, AXES, isGrid, levelsOf, oldestOf, type SchemeContext } from './scheme-words';
import { wrapProse } from './wrap-text';

const WIDTH = 92;
const LABEL = 12;

/** "Label       text", wrapped under itself. */
export function entry(label: string, text: string): string[] {
  return wrapProse(text, WIDTH - LABEL).map((line, k) => `${(k === 0 ? label : '').padEnd(LABEL)}${line}`);
}

export const CAUTIONS = [
  'Von Neumann analysis holds for constant coefficients on periodic or infinite domains; with boundaries, variable coefficients or nonlinear terms it is necessary but not always sufficient.',
  'A passed trial is evidence for this kernel, not for the code that calls it.',
  'Where results bear on safety, verification and validation under the applicable codes and by licensed practice remain with the user.',
];

const BITWISE: Readonly<Record<KernelLanguage, string>> = {
  c: 'C, Fortran and Python agree bit for bit when built with -ffp-contract=off (as here: -std=c11 -O3 -march=native -ffp-contract=off). Contraction to fused multiply-add, -Ofast and -ffast-math break it.',
  fortran:
    'C, Fortran and Python agree bit for bit when built with -ffp-contract=off (as here: -std=f2018 -O3 -march=native -ffp-contract=off). Contraction to fused multiply-add, -Ofast and -ffast-math break it.',
  python:
    'C, Fortran and Python agree bit for bit when the compiled ones are built with -ffp-contract=off. A library built with -Ofast in the same process flushes subnormal numbers here too.',
};

export const fileEnd = (input: KernelInput, language: KernelLanguage): string[] => [
  ...entry('Bitwise', BITWISE[language]),
  ...CAUTIONS.flatMap((text, k) => entry(k === 0 ? 'Cautions' : '', text)),
  ...(input.references.length > 0 ? input.references : ['none recorded']).flatMap((text, k) =>
    entry(k === 0 ? 'References' : '', text),
  ),
  ...entry('Licence', 'office internal.'),
  ...entry('Generator', `release ${GENERATOR_RELEASE}. Generated; change the entry, not this file.`),
];

function orderLines({ facts, plan }: SchemeContext): string[] {
  const { pT, pX, orderAtFixedParameter } = facts.order;
  const names = plan.parameters.map((p) => p.name).join(', ');
  const parts = [
    ...(pT === null ? [] : [`${pT} in time`]),
    ...(pX === null ? [] : [`${pX} in space`]),
    ...(orderAtFixedParameter === null || names === '' ? [] : [`${orderAtFixedParameter} at fixed ${names}`]),
  ];
  return entry('Order', parts.length > 0 ? `${parts.join(', ')}.` : 'see the sheet.');
}

/** A formula with levels and points: u[n-1,i+1]. */
function formulaDialect(levelOf: ReadonlyMap<string, string>): Dialect {
  return {
    literal: (value) => (value.den === 1n ? formatRational(value) : `(${formatRational(value)})`),
    element: (array, offset, across = []) => {
      const index = (o: number, axis: number) => `${'ijk'[axis]!}${o === 0 ? '' : o < 0 ? o : `+${o}`}`;
      const at = [offset, ...across].map(index).join(',');
      const level = levelOf.get(array);
      return level === undefined ? `${array}[${at}]` : `u[${level},${at}]`;
    },
  };
}

function formulaLines({ plan }: SchemeContext): string[] {
  const symbols = plan.parameters.map((p) => p.name);
  const levels = new Map<string, string>();
  if (plan.shape === 'table') plan.known.forEach((name, age) => levels.set(name, age === 0 ? 'n' : `n-${age}`));
  else levels.set('u', 'n');
  const dialect = formulaDialect(levels);
  const coefficients = plan.coefficients.map(
    ({ name, value }) => `${name} = ${coefficientSource(value, symbols, dialect.literal)}`,
  );
  const where = coefficients.length > 0 ? entry('', `with ${coefficients.join(', ')}`) : [];
  if (plan.shape === 'table') {
    const node = plan.sweep.assignments[0]!.node;
    const at = ['i', 'j', 'k'].slice(0, plan.halos.length).join(',');
    return [...entry('Formula', `u[n+1,${at}] = ${infix(node, dialect)}`), ...where];
  }
  const last = plan.sweeps.length - 1;
  const text = (assignment: Assignment, stage: number) => {
    const target =
      assignment.kind === 'value'
        ? assignment.name
        : stage === last && assignment.array === 'u'
          ? 'u[n+1,i]'
          : `${assignment.array}[i]`;
    return `${target} = ${infix(assignment.node, dialect)}`;
  };
  return [
    ...plan.sweeps.flatMap(({ assignments }, k) =>
      assignments.flatMap((a, line) => {
        const stage = line === 0 ? `stage ${k + 1}: ` : ' '.repeat(9);
        return entry(k === 0 && line === 0 ? 'Formula' : '', stage + text(a, k));
      }),
    ),
    ...where,
  ];
}

/** Terms of the truncation error that grow as dx alone goes to 0. */
function conditionLines({ facts }: SchemeContext): string[] {
  const worst = facts.order.conditionalTerms[0];
  if (!worst) return [];
  const factor = (name: string, power: number) => (power === 1 ? name : `${name}^${power}`);
  const ratio =
    worst.dx < 0
      ? `${factor('dt', worst.dt)}/${factor('dx', -worst.dx)}`
      : `${factor('dx', worst.dx)}/${factor('dt', -worst.dt)}`;
  return entry('', `Consistent only while ${ratio} goes to 0 with the grid.`);
}

function stabilityLines({ bound, plan }: SchemeContext): string[] {
  const advised = advisedText(bound);
  const parameters = plan.parameters.map((p) => p.name).join(', ');
  switch (bound.kind) {
    case 'pieces': {
      const reasons = bound.pieces.flatMap((p) => [p.hi, p.lo]).filter((end) => end && !end.included && end.why);
      return [
        ...entry('Stable', `for ${boundText(bound)}.`),
        ...(advised ? entry('', `Advised working value: ${advised}.`) : []),
        ...(reasons[0] ? entry('', `At the bound itself: ${reasons[0].why}.`) : []),
      ];
    }
    case 'always':
      return entry('Stable', `for every value of ${parameters || 'the parameters'}.`);
    case 'region':
      return [
        ...entry('Stable', `for ${boundText(bound)}.`),
        ...(bound.inequalities ? [] : entry('', 'No closed form: check refuses numbers that are not finite only.')),
      ];
    case 'never':
      return ['*'.repeat(WIDTH), ...entry('STABILITY', bound.sentence), '*'.repeat(WIDTH)];
    case 'unknown':
      return entry('Stable', `${bound.sentence} check() refuses numbers that are not finite only.`);
  }
}

function gridArraysLines(plan: TablePlan, language: KernelLanguage): string[] {
  const padded = plan.halos.map(([left, right], k) => `(n${AXES[k]!} + ${left + right})`).join(' x ');
  const ghosts = plan.halos.map(([left, right], k) => `${left} before and ${right} after along ${AXES[k]!}`).join(', ');
  return [
    ...entry('Arrays', `${plan.arrays} of ${padded} doubles, contiguous; ghost cells: ${ghosts}.`),
    ...entry('', layoutWords(plan, language)),
  ];
}

function arraysLines(context: SchemeContext, language: KernelLanguage): string[] {
  const { plan, facts } = context;
  const [left, right] = plan.halo;
  const lines = isGrid(plan)
    ? gridArraysLines(plan, language)
    : entry(
        'Arrays',
        `${arraysOf(plan)} of n + ${left + right} doubles, contiguous; ghost cells: ${left} before the first point, ${right} after the last.`,
      );
  if (plan.shape === 'table') {
    lines.push(...arrayWords(plan).flatMap((a) => entry('', `${a.name}: ${a.words}`)));
    lines.push(
      ...entry(
        'Storage',
        plan.inPlace
          ? `the oldest level is read only at the point being written and is overwritten in place: ${plan.arrays} arrays.`
          : `${levelsOf(plan)} kept level${levelsOf(plan) === 1 ? '' : 's'} and one array for the new level; rotate the arrays after each step.${facts.storage.arraysInPlace < plan.arrays ? ` The facts know of ${facts.storage.arraysInPlace} array${facts.storage.arraysInPlace === 1 ? '' : 's'}, swept in one direction; this kernel does not use that.` : ''}`,
      ),
    );
  } else
    lines.push(
      ...entry('', `u: level n in, level n+1 out; ${plan.work.join(', ')}: work space, need not be set.`),
      ...entry(
        'Storage',
        `slopes are not stored: each is added at once to the sums that need it. ${arraysOf(plan)} arrays.`,
      ),
    );
  lines.push(
    ...entry(
      'Work',
      `${facts.cost.operations} operations and ${facts.cost.bytesDouble} bytes a point and step by the facts.`,
    ),
  );
  return lines;
}

function startLines({ plan }: SchemeContext): string[] {
  if (plan.shape === 'stages' || plan.keptLevels === 1) return entry('Start-up', 'none: the initial level is enough.');
  const needed = plan.timeOrder === 2 ? 'u and dt u_t at the initial time' : 'the initial level';
  return entry(
    'Start-up',
    `start makes the ${plan.keptLevels} kept levels from ${needed}, to the order of the scheme.`,
  );
}

export function schemeHeader(context: SchemeContext, language: KernelLanguage, calling: readonly string[]): string[] {
  const { input, facts, options } = context;
  const definition = input.definition;
  const equation: Equation | null = definition.kind === 'scheme' ? definition.equation : null;
  const words = equation ? EQUATION_TEXT[equation] : null;
  const fill =
    options.boundary === 'periodic'
      ? 'periodic: fill_halo copies the ghost cells.'
      : 'the caller fills the ghost cells; run and start call the routine that they are given.';
  const sizes = oldestSentence(context);
  return [
    ...entry('Entry', `${input.callNumber}, revision ${input.revision}: ${input.title} (double precision).`),
    ...(words ? entry('Equation', `${words.equation}; ${words.numbers.join(', ')}.`) : []),
    ...formulaLines(context),
    ...orderLines(context),
    ...conditionLines(context),
    ...(facts.order.meaning ? entry('Error', facts.order.meaning.replaceAll('lambda', 'lam')) : []),
    ...stabilityLines(context),
    ...arraysLines(context, language),
    ...entry('Boundary', fill),
    ...startLines(context),
    ...entry('Units', 'u in any unit; time and space enter through the dimensionless numbers only.'),
    ...calling.map((line, k) => `${(k === 0 ? 'Calling' : '').padEnd(LABEL)}${line}`),
    ...sizes,
    ...fileEnd(input, language),
  ];
}

function oldestSentence({ plan }: SchemeContext): string[] {
  if (plan.shape === 'stages' || oldestOf(plan) === 0) return [];
  return entry('', 'The first array is the spare one.');
}

export function firstLine(
  input: KernelInput,
  halos: readonly (readonly [number, number])[],
  bound: string | null,
  options: KernelOptions,
): string {
  const filled = options.boundary === 'periodic' ? 'periodic fill included' : 'filled by the caller';
  return [
    `${input.callNumber} r${input.revision}`,
    ...(bound ? [bound] : []),
    `halo ${halos.map(([left, right]) => `${left}|${right}`).join(' x ')}, ${filled}`,
  ].join('   ');
}
