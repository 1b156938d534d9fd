/** What the templates of a stencil print, in every language. */
import type { StencilFacts } from '@/lib/facts/facts';
import { C } from './c';
import { coefficientSource } from './coefficient';
import { infix } from './expression-tree';
import { FORTRAN } from './fortran';
import { haloLines, haloExtent } from './halo-text';
import { entry, fileEnd } from './header-text';
import type { StencilPlan } from './kernel-plan';
import type { KernelInput, KernelLanguage, KernelOptions } from './kernel-request';
import type { View } from './kernel-source';
import { PYTHON, pythonSweep } from './python';
import { wrapStatement } from './wrap-text';

export interface StencilContext {
  readonly input: KernelInput;
  readonly facts: StencilFacts;
  readonly options: KernelOptions;
  readonly plan: StencilPlan;
  readonly prefix: string;
}

const ORDINALS = ['zeroth', 'first', 'second', 'third', 'fourth', 'fifth', 'sixth', 'seventh', 'eighth'];
export const derivativeWords = (m: number) => (m === 0 ? 'interpolation' : `${ORDINALS[m]!} derivative`);

const usesSpacing = (plan: StencilPlan) => plan.derivative > 0;

function coefficientLines({ plan }: StencilContext, language: KernelLanguage): string {
  const literal = { c: C, fortran: FORTRAN, python: PYTHON }[language].literal;
  return plan.coefficients
    .map(({ name, value }) => {
      const text = coefficientSource(value, ['h'], literal);
      if (language === 'c') return `const double ${name} = ${text};`;
      return language === 'python' ? `self.${name} = ${text}` : `${name} = ${text}`;
    })
    .join('\n');
}

export function stencilView(context: StencilContext, language: KernelLanguage): View {
  const { plan, prefix, options } = context;
  const periodic = options.boundary === 'periodic';
  const spacing = usesSpacing(plan);
  const common = {
    haloLeft: String(plan.halo[0]),
    haloRight: String(plan.halo[1]),
    minPoints: String(Math.max(1, ...plan.halo)),
    periodic: periodic ? [{ fillLines: haloLines(language, plan.halo) }] : [],
    spaced: spacing ? [{}] : [],
    coefficients: coefficientLines(context, language),
  };
  if (language === 'c')
    return {
      ...common,
      prefix,
      PREFIX: prefix.toUpperCase(),
      periodicDeclaration: periodic ? [{}] : [],
      spacingParameter: spacing ? ', double h' : '',
      spacingArgument: spacing ? ', h' : '',
      body: wrapStatement(`d[i] = ${infix(plan.node, C)};`, 96),
    };
  if (language === 'fortran')
    return {
      ...common,
      prefix,
      extent: haloExtent(plan.halo),
      periodicPublic: periodic ? [{}] : [],
      spacingArgument: spacing ? ', h' : '',
      locals: plan.coefficients.length > 0 ? `real(wp) :: ${plan.coefficients.map((c) => c.name).join(', ')}` : '',
      body: wrapStatement(`d(i) = ${infix(plan.node, FORTRAN)}`, 100, ' &'),
    };
  const sweep = pythonSweep([{ kind: 'store', array: 'd', node: plan.node }], (name) => `self.${name}`);
  const names = [...sweep.views.map((v) => v.name), ...sweep.scratch];
  return {
    ...common,
    imports: spacing ? 'import math\n' : '',
    spacingArgument: spacing ? ', h' : '',
    scratchLines: sweep.scratch.map((name) => `${name} = np.empty(size)`).join('\n'),
    names: names.length === 1 ? `(${names[0]!},)` : names.join(', '),
    views: [
      ...sweep.views.map((v) => `_part(${v.array}, a, b, ${v.offset}),`),
      ...sweep.scratch.map((name) => `${name}[: b - a],`),
    ].join('\n'),
    lines: sweep.lines.join('\n'),
  };
}

export function stencilDriverView({ plan, prefix, options }: StencilContext, language: KernelLanguage): View {
  const spacing = usesSpacing(plan);
  const own = options.boundary === 'periodic' ? [] : [{ fillLines: haloLines(language, plan.halo) }];
  const fill =
    options.boundary === 'periodic'
      ? { c: `${prefix}_fill_halo(n, u);`, fortran: `call ${prefix}_fill_halo(n, u)`, python: 'kernel.fill_halo(u)' }[
          language
        ]
      : { c: 'fill(n, u);', fortran: 'call fill(n, u)', python: 'fill(u)' }[language];
  const common = { caller: own, fill };
  if (language === 'c')
    return {
      ...common,
      prefix,
      haloLeft: String(plan.halo[0]),
      periodic: options.boundary === 'periodic' ? [{}] : [],
      spacingParameter: spacing ? ', double h' : '',
      spacingArgument: spacing ? ', h' : '',
      unused: spacing ? [] : [{}],
    };
  if (language === 'fortran')
    return {
      ...common,
      file: `${prefix}.f90`,
      prefix,
      extent: haloExtent(plan.halo),
      lower: String(1 - plan.halo[0]),
      haloRight: String(plan.halo[1]),
      spacingArgument: spacing ? ', h' : '',
    };
  return {
    ...common,
    spacingArgument: spacing ? ', h' : '',
    checked: spacing ? 'kernel.check(n, h)' : 'kernel.check(n)  # interpolation has no spacing',
  };
}

function formula({ plan }: StencilContext): string[] {
  const dialect = {
    literal: C.literal,
    element: (array: string, offset: number) =>
      `${array}[${offset === 0 ? 'i' : offset < 0 ? `i-${-offset}` : `i+${offset}`}]`,
  };
  const where = plan.coefficients.map(({ name, value }) => `${name} = ${coefficientSource(value, ['h'], C.literal)}`);
  return [
    ...entry('Formula', `d[i] = ${infix(plan.node, dialect)}`),
    ...(where.length > 0 ? entry('', `with ${where.join(', ')}`) : []),
  ];
}

const CALLING: Readonly<Record<KernelLanguage, (prefix: string, h: string) => string>> = {
  c: (prefix, h) =>
    `status = ${prefix}_apply(n${h}, u, d);   u, d: ${prefix}_length(n) doubles each, distinct; status 0: done, other values: see the second enum.`,
  fortran: (prefix, h) =>
    `call ${prefix}_apply(n${h}, u, d, status)   status 0: done; other values: see the parameters below.`,
  python: (_, h) =>
    `apply(u, d${h}), or step = Apply(u, d${h}) once and step() often. u, d: length(n) doubles each, distinct. Bad arguments raise ValueError.`,
};

export function stencilHeader(context: StencilContext, language: KernelLanguage): string[] {
  const { input, facts, plan, options, prefix } = context;
  const [left, right] = plan.halo;
  const error = facts.leadingError?.coefficient;
  const order = facts.order === null ? 'exact' : String(facts.order);
  return [
    ...entry('Entry', `${input.callNumber}, revision ${input.revision}: ${input.title} (double precision).`),
    ...entry(
      'Operator',
      plan.derivative === 0
        ? 'interpolation of u'
        : `${derivativeWords(plan.derivative)} of u on a uniform grid of spacing h`,
    ),
    ...formula(context),
    ...entry(
      'Order',
      `${order}${error ? `; leading error ${error} h^${facts.leadingError!.hPower} u^(${facts.leadingError!.derivative ?? '?'})` : ''}.`,
    ),
    ...(plan.staggered
      ? entry('Index', 'staggered: u[i] stands at x_i, d[i] at x_i + h/2, so that u[i] and u[i+1] are its neighbours.')
      : []),
    ...entry(
      'Arrays',
      `u: n + ${left + right} doubles, contiguous; ghost cells: ${left} before the first point, ${right} after the last. d: the same layout, only its n points are written.`,
    ),
    ...entry(
      'Boundary',
      options.boundary === 'periodic'
        ? 'periodic: fill_halo copies the ghost cells; call it before apply.'
        : 'the caller fills the ghost cells of u before apply.',
    ),
    ...entry('Work', `${facts.cost.operations} operations and ${facts.cost.bytesDouble} bytes a point by the facts.`),
    ...entry(
      'Units',
      plan.derivative === 0
        ? 'd in the unit of u.'
        : `d in the unit of u over that of h${plan.derivative > 1 ? ` to the power ${plan.derivative}` : ''}.`,
    ),
    ...entry('Calling', CALLING[language](prefix, usesSpacing(plan) ? ', h' : '')),
    ...fileEnd(input, language),
  ];
}
