/** Everything that a template may print of a revision, already computed. */
import { boundOf, boundText } from './bound';
import { CSchemeView } from './c-scheme-view';
import { FortranSchemeView } from './fortran-scheme-view';
import { firstLine, schemeHeader } from './header-text';
import { none, type Planned } from './kernel-plan';
import type { KernelInput, KernelLanguage, KernelOptions } from './kernel-request';
import type { View } from './kernel-source';
import { PythonSchemeView } from './python-scheme-view';
import { planScheme } from './scheme-plan';
import { kernelPrefix, schemeCalling, schemeNotes, type SchemeContext } from './scheme-words';

export interface Described {
  readonly prefix: string;
  readonly firstLine: string;
  readonly header: readonly string[];
  /** Template without suffix: "scheme", "stencil", … */
  readonly template: string;
  readonly view: View;
  /** Margin notes: the first line that contains `anchor`. */
  readonly notes: readonly { readonly anchor: string; readonly text: string }[];
}

export interface SchemeViewer {
  view(): View;
  driver(): View;
}

export function schemeViewer(context: SchemeContext, language: KernelLanguage): SchemeViewer {
  switch (language) {
    case 'c':
      return new CSchemeView(context);
    case 'fortran':
      return new FortranSchemeView(context);
    case 'python':
      return new PythonSchemeView(context);
  }
}

/** The scheme of a revision with all that its kernels in any language share. */
export function schemeContext(input: KernelInput, options: KernelOptions): Planned<SchemeContext> {
  const { definition, facts } = input;
  if (definition.kind !== 'scheme' || facts.kind !== 'scheme')
    return none('The facts do not belong to this definition.');
  const planned = planScheme(definition, facts);
  if (planned.kind === 'none') return planned;
  const context = {
    input,
    facts,
    options,
    plan: planned.plan,
    bound: boundOf(facts),
    prefix: kernelPrefix(input.callNumber),
  };
  return { kind: 'plan', plan: context };
}

export function describeKernel(
  input: KernelInput,
  language: KernelLanguage,
  options: KernelOptions,
): Planned<Described> {
  const planned = schemeContext(input, options);
  if (planned.kind === 'none') return planned;
  const context = planned.plan;
  return {
    kind: 'plan',
    plan: {
      prefix: context.prefix,
      firstLine: firstLine(input, context.plan.halo, boundText(context.bound), options),
      header: schemeHeader(context, language, schemeCalling(context, language)),
      template: 'scheme',
      view: schemeViewer(context, language).view(),
      notes: schemeNotes(context, language),
    },
  };
}

export interface DescribedDriver {
  readonly prefix: string;
  readonly template: string;
  readonly view: View;
}

export function describeDriver(
  input: KernelInput,
  language: KernelLanguage,
  options: KernelOptions,
): Planned<DescribedDriver> {
  const planned = schemeContext(input, options);
  if (planned.kind === 'none') return planned;
  const viewer = schemeViewer(planned.plan, language);
  return { kind: 'plan', plan: { prefix: planned.plan.prefix, template: 'driver-scheme', view: viewer.driver() } };
}
