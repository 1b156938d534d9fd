/** Words about a planned scheme that all languages print alike. */
import type { SchemeFacts } from '@/lib/facts/facts';
import { boundText, type Bound } from './bound';
import type { KernelInput, KernelLanguage, KernelOptions } from './kernel-request';
import { wrapProse } from './wrap-text';
import { difference, named, product, read, readsOf, sum, type Assignment, type Node } from './expression-tree';
import type { SchemePlan, StartPlan, TablePlan } from './kernel-plan';

/** "AD 003" → "lb_ad003" */
export const kernelPrefix = (callNumber: string) => `lb_${callNumber.toLowerCase().replace(/[^a-z0-9]/g, '')}`;

export const AXES = ['x', 'y', 'z'] as const;

export interface SchemeContext {
  readonly input: KernelInput;
  readonly facts: SchemeFacts;
  readonly options: KernelOptions;
  readonly plan: SchemePlan;
  readonly bound: Bound;
  readonly prefix: string;
}

/** Arrays that the caller provides: work arrays of the stages come first, u last. */
export const arraysOf = (plan: SchemePlan) => (plan.shape === 'table' ? plan.arrays : plan.work.length + 1);
/** Whether the kernel sweeps a grid of two or three dimensions. */
export const isGrid = (plan: SchemePlan): plan is TablePlan => plan.shape === 'table' && plan.halos.length > 1;

/** Names of the numbers of points: n along a row, nx, ny, nz on a grid. */
export const sizesOf = (plan: SchemePlan) =>
  isGrid(plan) ? AXES.slice(0, plan.halos.length).map((axis) => `n${axis}`) : ['n'];
export const levelsOf = (plan: SchemePlan) => (plan.shape === 'table' ? plan.keptLevels : 1);
export const minPoints = (plan: SchemePlan) => Math.max(1, ...plan.halo);

/** Index of the oldest kept level among the arrays. */
export const oldestOf = (plan: TablePlan) => plan.arrays - plan.keptLevels;

/** Whether the check compares the parameters with a bound. */
const isChecked = (bound: Bound) => bound.kind === 'pieces' || (bound.kind === 'region' && bound.inequalities !== null);

export const boundWords = (bound: Bound) =>
  isChecked(bound) ? `not within ${boundText(bound)}` : 'never returned: no bound is checked';

export const levelWords = (age: number) => (age === 0 ? 'level n' : `level n-${age}`);

/** What each array of the step holds. */
export function arrayWords(
  plan: TablePlan,
): { readonly name: string; readonly words: string; readonly written: boolean }[] {
  const read = plan.known
    .map((name, age) => ({ name, words: levelWords(age), written: false }))
    .filter((array) => array.name !== 'w');
  const w = plan.inPlace ? `${levelWords(plan.keptLevels - 1)} in, level n+1 out` : 'level n+1 out';
  return [...read, { name: 'w', words: w, written: true }];
}

/** Coefficients and parameters that a sweep reads, in order of first use. */
export function scalarsOf(assignments: readonly Assignment[]): string[] {
  const values = new Set(assignments.flatMap((a) => (a.kind === 'value' ? [a.name] : [])));
  const names: string[] = [];
  const visit = (node: Node) => {
    if (node.kind === 'name' && !values.has(node.name) && !names.includes(node.name)) names.push(node.name);
    if (node.kind === 'negation') visit(node.operand);
    if (node.kind === 'sum' || node.kind === 'difference' || node.kind === 'product') {
      visit(node.left);
      visit(node.right);
    }
  };
  assignments.forEach((a) => visit(a.node));
  return names;
}

/** Arrays of a sweep, those only read first. */
export function sweepArrays(assignments: readonly Assignment[]): { name: string; written: boolean }[] {
  const written = new Set(assignments.flatMap((a) => (a.kind === 'store' ? [a.array] : [])));
  const names = new Set(assignments.flatMap((a) => readsOf(a.node).map((r) => r.array)));
  const read = [...names].filter((name) => !written.has(name));
  return [...read.map((name) => ({ name, written: false })), ...[...written].map((name) => ({ name, written: true }))];
}

/** u + c·(dt L y), or u + b·v + c·(dt² L y): one term of the Taylor series at a point. */
export function taylorNode({ operator }: StartPlan, timeOrder: 1 | 2): Node {
  const here = readsOf(operator)[0]?.across?.map(() => 0);
  const own = (array: string) => read(array, 0, here);
  const base = timeOrder === 1 ? own('u') : sum(own('u'), product(named('b'), own('v')));
  return operator.kind === 'negation'
    ? difference(base, product(named('c'), operator.operand))
    : sum(base, product(named('c'), operator));
}

export function startAbout({ plan }: SchemeContext): string[] {
  if (plan.shape !== 'table' || !plan.start) return [];
  const { start, timeOrder, keptLevels } = plan;
  const series =
    timeOrder === 1
      ? `by the Taylor series in time with ${start.terms} terms (a Runge-Kutta step of ${start.terms} stages)`
      : `by the Taylor series in time through dt^${2 * start.terms}`;
  return [
    ...wrapProse(
      `Start-up: makes ${keptLevels - 1 === 1 ? 'the second level' : `${keptLevels - 1} further levels`} ${series}, with differences of order ${start.spaceOrder} in space.`,
      88,
    ),
    timeOrder === 1
      ? 'In: the initial level in the oldest kept array. Out: all kept levels, the oldest first.'
      : 'In: u in the oldest kept array, v = dt u_t. Out: all kept levels, the oldest first.',
    'work: one more array of the same length.',
  ];
}

export function runAbout({ plan }: SchemeContext): string[] {
  if (plan.shape === 'stages')
    return ['nsteps steps. The last array is u, advanced in place; the others are work space.'];
  const spare =
    oldestOf(plan) > 0 ? 'The first array is spare; then come the kept levels' : 'The arrays are the kept levels';
  return [`nsteps steps. ${spare}, the oldest first.`, 'They are rotated: on return the last is the newest.'];
}

/** How the routines are called, a few lines for the header. */
export function schemeCalling({ plan, prefix, options }: SchemeContext, language: KernelLanguage): string[] {
  const symbols = plan.parameters.map((p) => p.name);
  const arrays = arraysOf(plan);
  const sizes = sizesOf(plan);
  const all = sizes.join(', ');
  const starts = plan.shape === 'table' && plan.start !== null;
  const initial = plan.timeOrder === 2 ? ['v'] : [];
  const fill = options.boundary === 'periodic' ? [] : language === 'c' ? ['fill', 'context'] : ['fill'];
  const call = (name: string, items: readonly string[]) => `${name}(${items.join(', ')})`;
  if (language === 'c')
    return [
      `double *level[${arrays}];   each of ${prefix}_length(${all}) doubles`,
      ...(starts
        ? [`status = ${call(`${prefix}_start`, [...sizes, ...symbols, 'level', ...initial, 'work', ...fill])};`]
        : []),
      `status = ${call(`${prefix}_run`, ['nsteps', ...sizes, ...symbols, 'level', ...fill])};   result in level[${arrays - 1}]`,
      'status 0: done; other values: see the second enum. step itself checks nothing: call check once.',
    ];
  if (language === 'fortran') {
    const halos = isGrid(plan) ? plan.halos : [plan.halo];
    const extent = halos.map(([left, right], k) => `${1 - left}:${sizes[k]!}+${right}`).join(', ');
    const shape = `u(${extent}, ${arrays})`;
    const points = sizes.map((size) => `1:${size}`).join(', ');
    return [
      `real(real64) :: ${shape}   allocated by the caller`,
      ...(starts
        ? [`call ${call(`${prefix}_start`, [...sizes, ...symbols, 'u', ...initial, 'work', ...fill, 'status'])}`]
        : []),
      `newest = ${arrays}`,
      `call ${call(`${prefix}_run`, ['nsteps', ...sizes, ...symbols, 'u', 'newest', ...fill, 'status'])}   result in u(${points}, newest)`,
      'status 0: done; other values: see the parameters below. step itself checks nothing: call check once.',
    ];
  }
  const within = ([left]: readonly [number, number], size: string) => `${left}:${left} + ${size}`;
  const inside = isGrid(plan)
    ? plan.halos.map((halo, k) => within(halo, sizes[k]!)).reverse()
    : [within(plan.halo, 'n')];
  const result = `levels[-1][${inside.join(', ')}]`;
  return [
    `levels = [numpy.zeros(${isGrid(plan) ? 'shape' : 'length'}(${all})) for _ in range(${arrays})]`,
    ...(starts ? [call('start', ['levels', ...symbols, ...initial, ...fill])] : []),
    `levels = ${call('run', ['nsteps', 'levels', ...symbols, ...fill])}   result in ${result}`,
    'Bad arguments raise ValueError. Step checks shapes when it is made, not at every call.',
  ];
}

/** Margin notes for the page. */
export function schemeNotes({ plan }: SchemeContext, language: KernelLanguage): { anchor: string; text: string }[] {
  const update = { c: 'w[i] = ', fortran: isGrid(plan) ? 'w(i,j' : 'w(i) = ', python: 'np.' }[language];
  const storage =
    plan.shape === 'table'
      ? plan.inPlace
        ? 'In place: a further array is never needed.'
        : 'The new level has an array of its own; rotate after each step.'
      : 'Each slope joins its sums at once: no slope is stored.';
  const alias = {
    c: { anchor: 'restrict', text: 'No alias between the arrays: the loop vectorises.' },
    fortran: { anchor: 'intent(in', text: 'Dummy arguments cannot alias: the loop vectorises.' },
    python: { anchor: 'out=', text: 'Results go to prepared arrays: nothing is allocated in a step.' },
  }[language];
  return [{ anchor: 'halo', text: 'The bound travels in the first line.' }, alias, { anchor: update, text: storage }];
}
