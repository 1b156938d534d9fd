/** From a revision to what its trial holds the kernels against. */
import type { Definition, LinesScheme, SchemeDefinition, StencilDefinition } from '@/lib/entries/definition';
import { canonicalScheme } from '@/lib/facts/canonical-scheme';
import { canonicalStencil } from '@/lib/facts/canonical-stencil';
import type { Facts, SchemeFacts, StencilFacts, TimeMethodFacts } from '@/lib/facts/facts';
import type { ScalarScheme } from '@/lib/numerics/canonical-scheme';
import { CONVENTIONS } from '@/lib/numerics/equation';
import { isZero, parseRational, toNumber } from '@/lib/numerics/rational';
import { gridGrowth, sampleScheme } from './characteristic';
import { chooseParameter } from './parameter-choice';
import { chooseByRegion, chooseSeveral, SURVEY } from './several-parameters';
import type { BoundEnd, MarchSubject, StencilSubject, Subject } from './subject';

export type SubjectAnswer =
  { readonly kind: 'subject'; readonly subject: Subject } | { readonly kind: 'none'; readonly reason: string };

const none = (reason: string): SubjectAnswer => ({ kind: 'none', reason });

function keptLevelsOf(scheme: ScalarScheme): number {
  const levels = scheme.terms.map(({ level }) => toNumber(level));
  return Math.max(...levels) - Math.min(...levels);
}

function reachOf(scheme: ScalarScheme): number {
  const newest = Math.max(...scheme.terms.map(({ level }) => toNumber(level)));
  const pivot = scheme.terms.find(({ level }) => toNumber(level) === newest)!;
  return Math.max(
    ...scheme.terms.flatMap(({ offset }) =>
      offset.map((o, axis) => Math.abs(toNumber(o) - toNumber(pivot.offset[axis]!))),
    ),
  );
}

function scalarOf(definition: SchemeDefinition): ScalarScheme | string {
  const { scheme, problems } = canonicalScheme(definition);
  if (!scheme) return problems[0]?.message ?? 'The definition cannot be read.';
  if (scheme.form !== 'scalar') return 'Trials march one unknown.';
  return scheme;
}

/** At fixed parameters; where several scale differently, with dt going as dx^(s/timeOrder). */
function orderOf(scheme: ScalarScheme, { consistent, orderAtFixedParameter, pT, pX }: SchemeFacts['order']) {
  if (!consistent) return null;
  if (orderAtFixedParameter !== null || pT === null || pX === null) return orderAtFixedParameter;
  const { spaceOrder, timeOrder } = CONVENTIONS[scheme.equation];
  return Math.min(pX, (pT * spaceOrder) / timeOrder);
}

function schemeSubject(definition: SchemeDefinition, facts: SchemeFacts): SubjectAnswer {
  const scheme = scalarOf(definition);
  if (typeof scheme === 'string') return none(scheme);
  const { order, stability, cost } = facts;
  const special = order.specialValues.flatMap(({ value }) => (Number.isFinite(Number(value)) ? [Number(value)] : []));
  const fractions = order.specialValues.flatMap(({ value }) =>
    /^-?\d+\/\d+$/.test(value) ? [toNumber(parseRational(value))] : [],
  );
  const one = scheme.parameters.length === 1;
  const byRegion = one ? null : chooseByRegion(scheme, facts);
  const choice = one
    ? chooseParameter(stability, [...special, ...fractions])
    : (byRegion ?? chooseSeveral(scheme, facts));
  const subject: MarchSubject = {
    kind: 'march',
    scheme,
    keptLevels: keptLevelsOf(scheme),
    halo: reachOf(scheme),
    order: orderOf(scheme, order),
    refine: 'grid',
    spaceSymbol: null,
    ...choice,
    checksBound: one || byRegion !== null,
    verdict: stability.verdict,
    operations: cost.operations,
    bytes: cost.bytesDouble,
  };
  return { kind: 'subject', subject };
}

/** A time method is tried on u_t + c u_x = nu u_xx with the three-point central differences. */
const central = (derivative: number, weights: string[]): StencilDefinition => ({
  kind: 'stencil',
  dims: 1,
  derivative,
  offsets: ['-1', '0', '1'],
  weights,
});

function timeMethodEnds(facts: TimeMethodFacts): BoundEnd[] {
  const ends: BoundEnd[] = [];
  const imaginary = Number(facts.imaginaryLimit ?? 0);
  // The central first difference reaches ±i, the central second difference −4.
  if (imaginary > 1e-6)
    ends.push({
      parameter: 'lambda',
      bound: imaginary,
      text: facts.imaginaryLimitExact ?? facts.imaginaryLimit!,
      inside: 0.99 * imaginary,
      outward: 1,
      vector: (value) => [value, 0],
    });
  const real = Math.abs(Number(facts.realLimit ?? 0)) / 4;
  if (real > 1e-6)
    ends.push({
      parameter: 'r',
      bound: real,
      text: `${facts.realLimitExact ?? facts.realLimit}/4`,
      inside: 0.99 * real,
      outward: 1,
      vector: (value) => [0, value],
    });
  return ends;
}

function timeMethodSubject(time: LinesScheme['time'], facts: TimeMethodFacts): SubjectAnswer {
  const scheme = scalarOf({
    kind: 'scheme',
    form: 'lines',
    equation: 'advection-diffusion',
    space: [central(1, ['-1/2', '0', '1/2']), central(2, ['1', '-2', '1'])],
    time,
  });
  if (typeof scheme === 'string') return none(scheme);
  const ends = timeMethodEnds(facts);
  const candidates = [
    ...ends.map(({ bound, vector }) => vector(0.7 * bound)),
    [0.3, 0.1],
    [-0.2, 0.05],
    [0.05, 0.02],
    [0, 0.05],
  ];
  const working = candidates.filter(
    (values) => gridGrowth(sampleScheme(scheme, values), SURVEY[1]).growth <= 1 + 1e-12,
  );
  const stages = facts.stages ?? 1;
  const subject: MarchSubject = {
    kind: 'march',
    scheme,
    keptLevels: keptLevelsOf(scheme),
    halo: reachOf(scheme),
    order: facts.orderNominal ?? facts.orderLinear,
    refine: 'time',
    spaceSymbol: ([lambda = 0, r = 0], theta) => [-2 * r * (1 - Math.cos(theta)), -lambda * Math.sin(theta)],
    working: working.length > 0 ? working.slice(0, 4) : [[0.3, 0]],
    stable: working.length > 0,
    ends,
    farInside: null,
    checksBound: false,
    verdict: ends.length > 0 ? 'conditionally stable' : 'without a bound on either axis',
    // Each stage or level reads three points for each of the two differences.
    operations: 12 * Math.max(stages, facts.steps ?? 1),
    bytes: 24 * stages,
  };
  return { kind: 'subject', subject };
}

function stencilSubject(definition: StencilDefinition, facts: StencilFacts): SubjectAnswer {
  if (definition.dims !== 1 || definition.lhs) return none('Trials apply explicit stencils in one dimension.');
  const { stencil, problems } = canonicalStencil(definition);
  if (!stencil) return none(problems[0]?.message ?? 'The definition cannot be read.');
  const used = stencil.weights.flatMap((weight, k) =>
    isZero(weight) ? [] : [{ weight, place: toNumber(stencil.offsets[k]![0]!) }],
  );
  const halves = used.map(({ place }) => Math.abs((place * 2) % 2) === 1);
  const shift = halves.length > 0 && halves.every(Boolean) ? 0.5 : 0;
  if (used.some(({ place }) => !Number.isInteger(place + shift)))
    return none('Trials apply stencils on whole or on half points, not on both or between.');
  const offsets = used.map(({ place }) => place + shift);
  const subject: StencilSubject = {
    kind: 'stencil',
    offsets,
    weights: used.map(({ weight }) => weight),
    derivative: stencil.operator[0]!.powers[0]!,
    shift,
    // Printed decimals satisfy their conditions to the last digit printed: the order they stand for is what shows.
    order: facts.nominal?.order ?? (facts.consistent ? facts.order : null),
    halo: Math.max(...offsets.map(Math.abs)),
    operations: facts.cost.operations,
    bytes: facts.cost.bytesDouble,
  };
  return { kind: 'subject', subject };
}

/** @returns the reason, where trials of this kind of definition are not made */
export function trialSubject(definition: Definition, facts: Facts): SubjectAnswer {
  if (definition.kind === 'scheme' && facts.kind === 'scheme') return schemeSubject(definition, facts);
  if (definition.kind === 'time-method' && facts.kind === 'time-method')
    return timeMethodSubject(definition.time, facts);
  if (definition.kind === 'stencil' && facts.kind === 'stencil') return stencilSubject(definition, facts);
  return none('The facts are those of another kind of definition.');
}
