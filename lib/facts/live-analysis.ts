/** All that the drafting table shows of a definition while it is being written, as data that a worker can send. */
import temml from 'temml';
import { createBudget } from '@/lib/numerics/budget';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { evaluate } from '@/lib/numerics/polynomial';
import { analyseDefinition } from './analyse-definition';
import { canonicalScheme } from './canonical-scheme';
import { readDefinition } from './definition-shape';
import { drawingOf } from './drawing';
import type { Analysis, Problem } from './facts';
import type { FactsSummary } from './facts-summary';
import { type Moment, schemeMoments } from './moments';
import type { Reading } from './readings';
import { schemeReadings } from './scheme-readings';
import { stencilReadings, timeMethodReadings } from './stencil-readings';
import { type SketchModel } from './sketch-model';
import { summarise } from './summarise';

export interface LiveMoment extends Omit<Moment, 'residual'> {
  /** The residual as monomials, for its value at a parameter. */
  readonly terms: readonly { readonly powers: readonly number[]; readonly factor: number }[];
}

export interface LiveAnalysis {
  readonly verdict: Analysis['verdict'];
  readonly problems: readonly Problem[];
  readonly readings: readonly Reading[];
  readonly summary: FactsSummary | null;
  /** MathML of each line of the rule. */
  readonly rule: readonly string[];
  /** Weights of a stencil, given or found. */
  readonly weights: readonly string[] | null;
  readonly sketch: SketchModel | null;
  readonly numeric: NumericScheme | null;
  readonly limit: number | null;
  readonly moments: readonly LiveMoment[];
}

/** The stability search ends here while somebody types; what is kept is analysed again on the server. */
const TIME_LIMIT_MS = 6_000;

function momentsOf(scheme: ScalarScheme): LiveMoment[] {
  return schemeMoments(scheme).map(({ residual, ...moment }) => ({
    ...moment,
    terms: residual.map(({ powers, re, im }) => ({
      powers,
      factor: evaluate(
        [{ powers: powers.map(() => 0), re, im }],
        powers.map(() => 1),
      )[0],
    })),
  }));
}

function readingsOf(analysis: Analysis, summary: FactsSummary | null): readonly Reading[] {
  const { facts } = analysis;
  if (!facts || !summary) return [];
  if (facts.kind === 'scheme') return schemeReadings(facts, summary, null);
  return facts.kind === 'stencil' ? stencilReadings(facts) : timeMethodReadings(facts);
}

/** Anything in, never thrown at: a definition without meaning has its problems and what can still be drawn. */
export function liveAnalysis(input: unknown): LiveAnalysis {
  const analysis = analyseDefinition(input, { budget: createBudget({ timeLimitMs: TIME_LIMIT_MS }) });
  const { definition } = readDefinition(input);
  const { verdict, problems } = analysis;
  const nothing = {
    verdict,
    problems,
    readings: [],
    summary: null,
    rule: [],
    weights: null,
    sketch: null,
    numeric: null,
    limit: null,
    moments: [],
  };
  if (!definition) return nothing;
  const facts = verdict === 'invalid' ? null : analysis.facts;
  const summary = facts && summarise(definition, facts);
  const { rule, sketch, numeric, limit } = drawingOf(definition, facts, summary);
  const scheme = definition.kind === 'scheme' ? canonicalScheme(definition).scheme : null;
  return {
    verdict,
    problems,
    readings: readingsOf(analysis, summary),
    summary,
    rule: rule.map((latex) => temml.renderToString(latex, { displayMode: false, throwOnError: false, trust: false })),
    weights: facts?.kind === 'stencil' ? facts.weights : null,
    sketch,
    numeric: verdict === 'invalid' ? null : numeric,
    limit,
    moments: scheme?.form === 'scalar' ? momentsOf(scheme) : [],
  };
}
