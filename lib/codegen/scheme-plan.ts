/** From a scheme's definition to the plan of its kernel, or the reason why none is printed. */
import type { SchemeDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import type { SchemeFacts } from '@/lib/facts/facts';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { none, type Planned, type SchemePlan } from './kernel-plan';
import { planStages } from './stages-plan';
import { planTable } from './table-plan';

export function planScheme(definition: SchemeDefinition, facts: SchemeFacts): Planned<SchemePlan> {
  if (definition.form === 'system')
    return none('Kernels of systems (several unknowns) are not printed yet; schemes with one unknown are.');
  if (CONVENTIONS[definition.equation].complex)
    return none(`The ${definition.equation} equation has complex unknowns; kernels are printed for real ones.`);
  const { scheme, problems } = canonicalScheme(definition);
  if (!scheme || scheme.form !== 'scalar')
    return none(
      `The definition cannot be read: ${problems.find((p) => p.severity === 'error')?.message ?? 'it has no scalar form'}.`,
    );
  const staged = definition.form === 'lines' && definition.time.kind === 'runge-kutta' && definition.time.b.length > 1;
  return staged && definition.form === 'lines' ? planStages(definition, scheme) : planTable(scheme, facts);
}
