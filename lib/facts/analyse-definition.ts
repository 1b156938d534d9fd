/** The entry to the engine: anything in, facts or problems out. */
import { createBudget, type Budget } from '@/lib/numerics/budget';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { sampleRoots, type SampleRequest } from '@/lib/numerics/samples';
import { analyseStencil, inconsistencySentence } from '@/lib/numerics/stencil';
import { analyseTimeMethod } from '@/lib/numerics/time-method';
import { analyseTruncation, type TruncationAnalysis } from '@/lib/numerics/truncation';
import type { Definition, SchemeDefinition, StencilDefinition, TimeMethodDefinition } from '@/lib/entries/definition';
import { canonicalScheme, nominalScheme } from './canonical-scheme';
import { canonicalStencil } from './canonical-stencil';
import { readTimeMethod } from './canonical-time-method';
import { readDefinition } from './definition-shape';
import type { Analysis, Problem, SamplePoint } from './facts';
import { hasErrors, problemAt, warningAt } from './problem';
import { roundingOf } from './rounding';
import { schemeFacts } from './scheme-facts';

export interface AnalyseOptions {
  /** Points at which roots and speeds are asked for. */
  readonly at?: readonly SampleRequest[];
  /** How long the analysis may take; without one it takes what it needs. */
  readonly budget?: Budget;
}

const invalid = (problems: Problem[]): Analysis => ({ verdict: 'invalid', problems, facts: null });

function analyseStencilDefinition(definition: StencilDefinition): Analysis {
  const { stencil, problems } = canonicalStencil(definition);
  if (!stencil) return invalid(problems);
  const facts = analyseStencil(stencil);
  if (facts.consistent) return { verdict: 'facts', problems, facts };
  const sentence = inconsistencySentence(stencil, facts);
  if (facts.nominal)
    return {
      verdict: 'facts',
      problems: [
        ...problems,
        warningAt(
          '/weights',
          'nominally-consistent',
          `as printed, the formula ${sentence}; within the rounding of its decimals it is of order ${facts.nominal.order}`,
        ),
      ],
      facts,
    };
  return { verdict: 'inconsistent', problems: [...problems, problemAt('/weights', 'inconsistent', sentence)], facts };
}

function analyseTimeMethodDefinition(definition: TimeMethodDefinition): Analysis {
  const problems: Problem[] = [];
  const method = readTimeMethod(definition.time, '/time', problems);
  if (!method) return invalid(problems);
  const facts = analyseTimeMethod(method);
  if (facts.orderLinear >= 1 || (facts.orderNominal ?? 0) >= 1) return { verdict: 'facts', problems, facts };
  const sentence = 'does not integrate u_t = f: its order is below 1, so that a constant slope is not reproduced';
  return { verdict: 'inconsistent', problems: [...problems, problemAt('/time', 'inconsistent', sentence)], facts };
}

const placeOf = (definition: SchemeDefinition) =>
  definition.form === 'table' ? '/terms' : definition.form === 'system' ? '/equations' : '/space';

/** Orders within the rounding of the decimals: of the method as meant where that can be told, else by tolerance. */
function nominalOrders(definition: SchemeDefinition, scheme: CanonicalScheme, rounding: number): TruncationAnalysis {
  const tolerant = analyseTruncation(scheme, rounding);
  const meant = nominalScheme(definition);
  const exact = meant && analyseTruncation(meant);
  return exact?.order.consistent ? { ...exact, order: { ...exact.order, reason: tolerant.order.reason } } : tolerant;
}

/** The same definition with the equation's own numbers free: dt and dx can then be refined apart. */
function freed(definition: SchemeDefinition): SchemeDefinition {
  const { parameters, common } = CONVENTIONS[definition.equation];
  const family = Object.entries(definition.fixed ?? {}).filter(
    ([name]) => name !== common && !parameters.includes(name),
  );
  return { ...definition, path: undefined, fixed: Object.fromEntries(family) };
}

/** A cut ties dt to dx: the powers of each are those of the scheme from which it is cut. */
function withFreePowers(definition: SchemeDefinition, analysis: TruncationAnalysis): TruncationAnalysis {
  const { order } = analysis;
  if (!order.consistent || order.pT !== null || order.pX !== null || (!definition.path && !definition.fixed))
    return analysis;
  const { scheme } = canonicalScheme(freed(definition));
  const whole = scheme && analyseTruncation(scheme);
  if (!whole) return analysis;
  // On a cut through speed and diffusivity a wrong diffusivity looks like an error of the speed's order.
  if (!whole.order.consistent) return definition.equation === 'advection-diffusion' ? whole : analysis;
  const free = whole.order;
  const { pT, pX, conditionalTerms, mixedLowest, reason } = free;
  return { ...analysis, order: { ...order, pT, pX, conditionalTerms, mixedLowest, reason } };
}

function analyseSchemeDefinition(
  definition: SchemeDefinition,
  budget: Budget,
  at: readonly SampleRequest[] | undefined,
): Analysis {
  const { scheme, problems } = canonicalScheme(definition);
  if (!scheme) return invalid(problems);
  let orders = withFreePowers(definition, analyseTruncation(scheme));
  const rounding = orders.order.consistent ? 0 : roundingOf(definition);
  if (rounding > 0) {
    const nominal = nominalOrders(definition, scheme, rounding);
    if (nominal.order.consistent) {
      const sentence = `as printed, the scheme ${orders.order.reason ?? 'is not consistent'}; within the rounding of its decimals it is consistent`;
      problems.push(warningAt(placeOf(definition), 'nominally-consistent', sentence));
      orders = nominal;
    }
  }
  if (!orders.order.consistent)
    return {
      verdict: 'inconsistent',
      problems: [
        ...problems,
        problemAt(placeOf(definition), 'inconsistent', orders.order.reason ?? 'the scheme is not consistent'),
      ],
      facts: null,
    };
  const facts = schemeFacts(definition, scheme, orders, budget);
  const samples = at && samplePoints(scheme, at, problems);
  return { verdict: 'facts', problems, facts, ...(samples ? { samples } : {}) };
}

/** A point that cannot be read is reported; the others are answered. */
function samplePoints(scheme: CanonicalScheme, at: readonly SampleRequest[], problems: Problem[]): SamplePoint[] {
  return at.flatMap((request, k) => {
    try {
      return sampleRoots(scheme, [request]);
    } catch (error) {
      if (!(error instanceof RangeError || error instanceof TypeError)) throw error;
      problems.push(warningAt(`/at/${k}`, 'bad-sample', error.message));
      return [];
    }
  });
}

function analyse(definition: Definition, budget: Budget, at: readonly SampleRequest[] | undefined): Analysis {
  if (definition.kind === 'stencil') return analyseStencilDefinition(definition);
  if (definition.kind === 'time-method') return analyseTimeMethodDefinition(definition);
  return analyseSchemeDefinition(definition, budget, at);
}

/**
 * Facts of a definition, whatever stands in it: a malformed one gets problems with their places, an inconsistent one
 * the sentence that says what it does instead. A spent budget leaves the stability verdict
 * 'not decided within the time budget'; all other facts are complete.
 */
export function analyseDefinition(input: unknown, options: AnalyseOptions = {}): Analysis {
  const { definition, problems } = readDefinition(input);
  if (!definition) return invalid(problems);
  const analysis = analyse(definition, options.budget ?? createBudget(), options.at);
  return hasErrors(analysis.problems) && analysis.verdict === 'facts' ? invalid(analysis.problems) : analysis;
}
