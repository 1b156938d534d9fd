/** The few readings that a catalog line shows, taken from the facts and the definition. */
import type { Definition, SchemeDefinition, StencilDefinition } from '@/lib/entries/definition';
import { schemeCurves } from '@/lib/numerics/curves';
import { compileScheme } from '@/lib/numerics/numeric-scheme';
import { equals, isZero, toNumber, type Rational } from '@/lib/numerics/rational';
import { StencilSymbol } from '@/lib/numerics/stencil-symbol';
import { newestOf } from '@/lib/numerics/storage';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import { canonicalScheme } from './canonical-scheme';
import { canonicalStencil } from './canonical-stencil';
import type { Facts, SchemeFacts, StabilityFacts, StencilFacts, TimeMethodFacts } from './facts';
import type { FactsSummary } from './facts-summary';
import { stageScheme } from './stage-scheme';

const SAMPLES = 25;
const POSITIONS = Array.from({ length: SAMPLES }, (_, k) => (Math.PI * k) / (SAMPLES - 1));

type Bounds = FactsSummary['bounds'];
type Sketch = FactsSummary['sketch'];

const numberOf = (text: string | null) => {
  const value = text === null ? NaN : Number(text);
  return Number.isFinite(value) ? value : null;
};

function boundsOf(stability: StabilityFacts): Bounds {
  return stability.intervals.map((i) => ({
    lo: numberOf(i.lo),
    hi: numberOf(i.hi),
    loExact: i.loExact,
    hiExact: i.hiExact,
    loIncluded: i.loIncluded ?? false,
    hiIncluded: i.hiIncluded ?? false,
  }));
}

/** Three quarters of the bound, or of one half where there is none. */
function curveValue(bounds: Bounds): number {
  const upper = bounds.find((b) => b.hi !== null && b.hi > 0)?.hi;
  if (upper) return 0.75 * upper;
  const lower = bounds.find((b) => b.lo !== null && b.lo < 0 && (b.hi ?? 1) <= 0)?.lo;
  return lower ? 0.75 * lower : bounds.length > 0 ? 0.75 : 0.375;
}

const finite = (value: number | null) => (value !== null && Number.isFinite(value) ? value : null);

function schemeCurveSamples(scheme: CanonicalScheme, at: number): FactsSummary['curves'] {
  const numeric = compileScheme(scheme);
  const direction = new Array<number>(scheme.dims).fill(1);
  const points = schemeCurves(
    numeric,
    scheme.parameters.map(() => at),
    direction,
    POSITIONS,
  );
  return {
    at: scheme.parameters.length > 0 ? at : null,
    modulus: points.map((p) => finite(p.modulus) ?? finite(p.maxModulus) ?? 0),
    phase: points.map((p) => finite(p.phaseSpeed) ?? finite(p.decayRate)),
  };
}

const alongX = (offset: readonly Rational[]) => offset.slice(1).every(isZero);

/** Sites on the line through the point in the first direction, and what they are for. */
function schemeSketch(definition: SchemeDefinition, scheme: CanonicalScheme): Sketch {
  const stages = definition.form === 'lines' && definition.time.kind === 'runge-kutta' ? definition.time.b.length : 0;
  const terms =
    scheme.form === 'scalar' ? stageScheme(definition, scheme).terms : scheme.equations.flatMap((e) => e.terms);
  const newest = newestOf(terms);
  const isSolved = scheme.form === 'scalar' && terms.filter((t) => equals(t.level, newest)).length > 1;
  const sites = new Map<string, Sketch['sites'][number]>();
  for (const { level, offset } of terms) {
    if (!alongX(offset)) continue;
    const site = { level: toNumber(level), offset: toNumber(offset[0]!) };
    const isNewest = equals(level, newest);
    const role = !isNewest ? 'known' : isSolved && site.offset !== 0 ? 'coupled' : 'computed';
    sites.set(`${site.level},${site.offset}`, { ...site, role });
  }
  return { sites: [...sites.values()].slice(0, 64), stages };
}

function summariseScheme(definition: SchemeDefinition, facts: SchemeFacts): FactsSummary {
  const { scheme } = canonicalScheme(definition);
  const bounds = boundsOf(facts.stability);
  return {
    dims: facts.halo.length,
    explicit: facts.storage.explicit,
    // A method printed in decimals is known by the order that its author gave it.
    orderTime: facts.order.pT === null ? null : Math.max(facts.order.pT, facts.timeMethod?.orderNominal ?? 0),
    orderSpace: facts.order.pX,
    arrays: facts.storage.arraysInPlace,
    levels: facts.levels,
    halo: facts.halo[0] ?? null,
    operations: facts.cost.operations,
    bytes: facts.cost.bytesDouble,
    parameter: facts.stability.parameter,
    verdict: facts.stability.verdict,
    bounds,
    dissipative: facts.dissipation?.kreissDissipative ?? null,
    sketch: scheme ? schemeSketch(definition, scheme) : { sites: [], stages: 0 },
    curves: scheme && schemeCurveSamples(scheme, curveValue(bounds)),
  };
}

const firstHalo = (halo: StencilFacts['halo']): [number, number] | null => {
  const [first, second] = halo;
  return typeof first === 'number' ? [first, typeof second === 'number' ? second : 0] : (first ?? null);
};

function stencilCurves(definition: StencilDefinition, order: number): FactsSummary['curves'] {
  const { stencil } = canonicalStencil(definition);
  if (!stencil || stencil.dims !== 1 || order === 0) return null;
  const row = (r: { offsets: readonly (readonly Rational[])[]; weights: readonly Rational[] }) => ({
    offsets: r.offsets.map((x) => x[0]!),
    weights: r.weights,
  });
  const symbol = new StencilSymbol(row(stencil), stencil.lhs && row(stencil.lhs), order);
  const ratios = POSITIONS.map((theta): [number, number] => {
    if (theta === 0) return [1, 0];
    const [re, im] = symbol.kappa(theta);
    return [re / theta ** order, im / theta ** order];
  });
  const modulus = ratios.map(([re, im]) => finite(Math.hypot(re, im)) ?? 0);
  return { at: null, modulus, phase: ratios.map(([re]) => finite(re)) };
}

function summariseStencil(definition: StencilDefinition, facts: StencilFacts): FactsSummary {
  const { stencil } = canonicalStencil(definition);
  const known = stencil?.offsets.filter((x, k) => alongX(x) && !isZero(stencil.weights[k]!)) ?? [];
  const coupled = stencil?.lhs?.offsets.filter((y, k) => alongX(y) && !isZero(stencil.lhs!.weights[k]!)) ?? [];
  const left = coupled.length > 0 ? coupled.map((y) => toNumber(y[0]!)) : [0];
  return {
    dims: definition.dims,
    explicit: facts.explicit,
    orderTime: null,
    orderSpace: facts.order ?? facts.nominal?.order ?? null,
    arrays: null,
    levels: null,
    halo: firstHalo(facts.halo),
    operations: facts.cost.operations,
    bytes: facts.cost.bytesDouble,
    parameter: null,
    verdict: null,
    bounds: [],
    dissipative: null,
    sketch: {
      sites: [
        ...left.map((offset) => ({
          level: 1,
          offset,
          role: offset === 0 ? ('computed' as const) : ('coupled' as const),
        })),
        ...known.map((x) => ({ level: 0, offset: toNumber(x[0]!), role: 'known' as const })),
      ],
      stages: 0,
    },
    curves: stencilCurves(definition, definition.derivative ?? 0),
  };
}

function summariseTimeMethod(facts: TimeMethodFacts): FactsSummary {
  const levels = facts.steps === null ? 2 : facts.steps + 1;
  return {
    dims: 1,
    explicit: facts.explicit,
    orderTime: facts.orderNonlinear ?? facts.orderLinear,
    orderSpace: null,
    arrays: facts.registersLowStorage ?? facts.registersAccumulating ?? facts.registersGeneral,
    levels,
    halo: null,
    operations: null,
    bytes: null,
    parameter: null,
    verdict: facts.zeroStable ? null : 'unstable for all nonzero values',
    bounds: [],
    dissipative: null,
    sketch: {
      sites: Array.from({ length: levels }, (_, k) => ({
        level: 1 - k,
        offset: 0,
        role: k === 0 ? ('computed' as const) : ('known' as const),
      })),
      stages: facts.stages ?? 0,
    },
    curves: null,
  };
}

/** @param definition the definition that the facts are of */
export function summarise(definition: Definition, facts: Facts): FactsSummary {
  if (facts.kind === 'scheme' && definition.kind === 'scheme') return summariseScheme(definition, facts);
  if (facts.kind === 'stencil' && definition.kind === 'stencil') return summariseStencil(definition, facts);
  if (facts.kind === 'time-method') return summariseTimeMethod(facts);
  throw new TypeError(`summarise: facts of a ${facts.kind} do not belong to a ${definition.kind}`);
}
