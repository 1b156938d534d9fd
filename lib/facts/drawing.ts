/** All that a page draws of a definition: its rule, its sketch, its scheme as numbers for the curves. */
import type { Definition, SchemeDefinition } from '@/lib/entries/definition';
import { type NumericScheme, characteristicOf, compileScheme } from '@/lib/numerics/numeric-scheme';
import { toNumber } from '@/lib/numerics/rational';
import { canonicalScheme } from './canonical-scheme';
import { canonicalStencil } from './canonical-stencil';
import type { Facts } from './facts';
import type { FactsSummary } from './facts-summary';
import { largestStable } from './reading-texts';
import { ruleLatex } from './rule-latex';
import { stageScheme } from './stage-scheme';
import { type SketchModel, schemeSketch, stencilSketch } from './sketch-model';

export interface Drawing {
  /** LaTeX lines of the marching rule. */
  readonly rule: readonly string[];
  readonly sketch: SketchModel | null;
  /** For the curves; null for stencils, time methods and definitions that do not hold. */
  readonly numeric: NumericScheme | null;
  /** Largest stable value of the common parameter; null without end, 0 where there is none. */
  readonly limit: number | null;
}

function schemeDrawing(definition: SchemeDefinition, facts: Facts | null, summary: FactsSummary | null): Drawing {
  const rule = ruleLatex(definition);
  const { scheme } = canonicalScheme(definition);
  const limit = summary ? largestStable(summary) : null;
  if (!scheme) return { rule, sketch: null, numeric: null, limit };
  const stages = definition.form === 'lines' && definition.time.kind === 'runge-kutta' ? definition.time.b.length : 0;
  const scalar = scheme.form === 'scalar' ? stageScheme(definition, scheme) : characteristicOf(scheme).scalar;
  const at = limit === null || limit === 0 ? null : Number((limit * 0.8).toPrecision(2));
  return {
    rule,
    sketch: facts?.kind === 'scheme' ? schemeSketch(scalar, facts, at, stages) : null,
    numeric: compileScheme(scheme),
    limit,
  };
}

/** @param facts null where the definition has none: the rule is still drawn */
export function drawingOf(definition: Definition, facts: Facts | null, summary: FactsSummary | null): Drawing {
  if (definition.kind === 'scheme') return schemeDrawing(definition, facts, summary);
  const nothing = { rule: ruleLatex(definition), sketch: null, numeric: null, limit: null };
  if (definition.kind === 'time-method' || facts?.kind !== 'stencil') return nothing;
  const { stencil } = canonicalStencil(definition);
  if (!stencil) return nothing;
  return {
    ...nothing,
    sketch: stencilSketch(
      stencil.dims,
      stencil.offsets.map((offset) => offset.map(toNumber)),
      facts,
    ),
  };
}
