/** Everything that a template may print of a revision, already computed. */
import { CONVENTIONS } from '@/lib/numerics/equation';
import { boundOf, boundText } from './bound';
import { CGridView } from './c-grid-view';
import { CSchemeView } from './c-scheme-view';
import { FortranGridView } from './fortran-grid-view';
import { FortranSchemeView } from './fortran-scheme-view';
import { firstLine, schemeHeader } from './header-text';
import { none, type Planned } from './kernel-plan';
import type { KernelInput, KernelLanguage, KernelOptions } from './kernel-request';
import type { View } from './kernel-source';
import { planMethod } from './method-plan';
import { methodHeader } from './method-header';
import { methodDriverView, methodView, type MethodContext } from './method-view';
import { PythonGridView } from './python-grid-view';
import { PythonSchemeView } from './python-scheme-view';
import { planScheme } from './scheme-plan';
import { isGrid, kernelPrefix, schemeCalling, schemeNotes, type SchemeContext } from './scheme-words';
import { planStencil } from './stencil-plan';
import { derivativeWords, stencilDriverView, stencilHeader, stencilView, type StencilContext } from './stencil-view';

export interface Described {
  readonly prefix: string;
  readonly firstLine: string;
  readonly header: readonly string[];
  /** Template without suffix: "scheme", "stencil", "runge-kutta", "multistep". */
  readonly template: string;
  readonly view: View;
  /** Margin notes: the first line below the header that contains `anchor`. */
  readonly notes: readonly { readonly anchor: string; readonly text: string }[];
}

export interface DescribedDriver {
  readonly prefix: string;
  readonly template: string;
  readonly view: View;
}

interface Printable {
  kernel(language: KernelLanguage): Described;
  driver(language: KernelLanguage): DescribedDriver;
}

const ROW_VIEWS = { c: CSchemeView, fortran: FortranSchemeView, python: PythonSchemeView };
const GRID_VIEWS = { c: CGridView, fortran: FortranGridView, python: PythonGridView };

function schemeView(context: SchemeContext, language: KernelLanguage) {
  const { plan } = context;
  return isGrid(plan) ? new GRID_VIEWS[language](context, plan) : new ROW_VIEWS[language](context);
}

function printableScheme(context: SchemeContext): Printable {
  const { input, options, prefix, plan, bound } = context;
  const halos = isGrid(plan) ? plan.halos : [plan.halo];
  return {
    kernel: (language) => ({
      prefix,
      firstLine: firstLine(input, halos, boundText(bound), options),
      header: schemeHeader(context, language, schemeCalling(context, language)),
      template: isGrid(plan) ? 'grid' : 'scheme',
      view: schemeView(context, language).view(),
      notes: schemeNotes(context, language),
    }),
    driver: (language) => ({
      prefix,
      template: isGrid(plan) ? 'driver-grid' : 'driver-scheme',
      view: schemeView(context, language).driver(),
    }),
  };
}

function printableStencil(context: StencilContext): Printable {
  const { input, options, prefix, plan, facts } = context;
  const what = `${derivativeWords(plan.derivative)}, ${facts.order === null ? 'exact' : `order ${facts.order}`}`;
  return {
    kernel: (language) => ({
      prefix,
      firstLine: firstLine(input, [plan.halo], what, options),
      header: stencilHeader(context, language),
      template: 'stencil',
      view: stencilView(context, language),
      notes: [
        {
          anchor: { c: 'd[i] =', fortran: 'd(i) =', python: 'out=' }[language],
          text: 'Equal and opposite weights share one product.',
        },
      ],
    }),
    driver: (language) => ({ prefix, template: 'driver-stencil', view: stencilDriverView(context, language) }),
  };
}

function printableMethod(context: MethodContext): Printable {
  const { input, prefix, plan, facts } = context;
  const reach = facts.imaginaryLimit === null ? null : Number(Number(facts.imaginaryLimit).toPrecision(6));
  const limit =
    reach === null
      ? 'the whole imaginary axis'
      : reach === 0
        ? 'nothing of the imaginary axis'
        : `the imaginary axis to ${reach}`;
  return {
    kernel: (language) => ({
      prefix,
      firstLine: `${input.callNumber} r${input.revision}   order ${facts.orderLinear}; stable on ${limit}   no halo`,
      header: methodHeader(context, language),
      template: plan.shape,
      view: methodView(context, language),
      notes: [
        {
          anchor: { c: 'restrict', fortran: 'intent(in', python: 'out=' }[language],
          text:
            plan.shape === 'multistep'
              ? 'The oldest slope makes room for the newest.'
              : 'Each slope joins its sums at once; one slope is stored.',
        },
      ],
    }),
    driver: (language) => ({ prefix, template: `driver-${plan.shape}`, view: methodDriverView(context, language) }),
  };
}

function printable(input: KernelInput, options: KernelOptions): Planned<Printable> {
  const { definition, facts } = input;
  const prefix = kernelPrefix(input.callNumber);
  if (definition.kind === 'scheme' && facts.kind === 'scheme') {
    if (!facts.order.consistent) return none(facts.order.reason ?? 'The scheme is not consistent with its equation.');
    const planned = planScheme(definition, facts);
    if (planned.kind === 'none') return planned;
    return {
      kind: 'plan',
      plan: printableScheme({
        input,
        facts,
        options,
        plan: planned.plan,
        bound: boundOf(
          facts,
          planned.plan.parameters.map((p) => p.symbol),
          isGrid(planned.plan) ? CONVENTIONS[definition.equation].nonNegative : [],
        ),
        prefix,
      }),
    };
  }
  if (definition.kind === 'stencil' && facts.kind === 'stencil') {
    if (!facts.consistent && !facts.nominal) return none('The weights do not approximate this derivative.');
    const planned = planStencil(definition);
    if (planned.kind === 'none') return planned;
    return { kind: 'plan', plan: printableStencil({ input, facts, options, plan: planned.plan, prefix }) };
  }
  if (definition.kind === 'time-method' && facts.kind === 'time-method') {
    const planned = planMethod(definition, facts.orderNominal ?? facts.orderLinear);
    if (planned.kind === 'none') return planned;
    return { kind: 'plan', plan: printableMethod({ input, facts, plan: planned.plan, prefix }) };
  }
  return none('The facts do not belong to this definition.');
}

export function describeKernel(
  input: KernelInput,
  language: KernelLanguage,
  options: KernelOptions,
): Planned<Described> {
  const planned = printable(input, options);
  return planned.kind === 'none' ? planned : { kind: 'plan', plan: planned.plan.kernel(language) };
}

export function describeDriver(
  input: KernelInput,
  language: KernelLanguage,
  options: KernelOptions,
): Planned<DescribedDriver> {
  const planned = printable(input, options);
  return planned.kind === 'none' ? planned : { kind: 'plan', plan: planned.plan.driver(language) };
}
