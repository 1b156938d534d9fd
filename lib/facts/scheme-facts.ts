/** All facts of a scheme, put together from the engine's parts. */
import type { LinesScheme, SchemeDefinition } from '@/lib/entries/definition';
import type { Budget } from '@/lib/numerics/budget';
import type { CanonicalScheme } from '@/lib/numerics/canonical-scheme';
import type { CostResult } from '@/lib/numerics/cost';
import { operatorWork, rungeKuttaCost } from '@/lib/numerics/lines-cost';
import { meaningOf } from '@/lib/numerics/meaning';
import { formatRational, toNumber, type Rational } from '@/lib/numerics/rational';
import {
  rungeKuttaStorage,
  schemeCost,
  schemeHalo,
  startUpSteps,
  systemStorage,
  tableStorage,
  type StorageResult,
} from '@/lib/numerics/storage';
import { systemCharacteristic } from '@/lib/numerics/system-characteristic';
import { analyseTimeMethod, isExplicitTableau, tableauRegisters } from '@/lib/numerics/time-method';
import type { TruncationAnalysis } from '@/lib/numerics/truncation';
import { canonicalStencil } from './canonical-stencil';
import { readTimeMethod, type ExactTimeMethod } from './canonical-time-method';
import { nominalScheme } from './canonical-scheme';
import type { SchemeFacts, StabilityFacts } from './facts';
import { roundingOf } from './rounding';
import { representativeValues, schemeDissipationFacts, schemeStability, stablePair } from './scheme-stability';

/** Nonzero roots z at each wave. */
function rootsPerWave(scheme: CanonicalScheme): number {
  if (scheme.form === 'scalar') {
    const levels = scheme.terms.map((t) => toNumber(t.level));
    return Math.round(Math.max(...levels) - Math.min(...levels));
  }
  const { scalar, stationaryRoots } = systemCharacteristic(scheme);
  return rootsPerWave(scalar) + stationaryRoots;
}

/** Roots that the equation does not have; a first-order system for waves has one physical root for each unknown. */
function computationalModes(scheme: CanonicalScheme, roots: number): number {
  const isFirstOrderSystem =
    scheme.form === 'system' && scheme.timeOrder === 2 && scheme.unknowns.length === scheme.dims + 1;
  return Math.max(0, roots - (isFirstOrderSystem ? scheme.dims + 1 : scheme.timeOrder));
}

const timeMethodOf = (definition: SchemeDefinition): ExactTimeMethod | null =>
  definition.form === 'lines' ? readTimeMethod(definition.time, '/time', []) : null;

function storageOf(scheme: CanonicalScheme, time: ExactTimeMethod | null): StorageResult {
  if (scheme.form === 'system') return systemStorage(scheme);
  if (time?.kind !== 'runge-kutta') return tableStorage(scheme);
  return rungeKuttaStorage(
    scheme,
    time.b.length,
    isExplicitTableau(time.A) && tableStorage(scheme).explicit,
    tableauRegisters(time.A, time.b),
  );
}

function costOf(
  definition: SchemeDefinition,
  scheme: CanonicalScheme,
  time: ExactTimeMethod | null,
  storage: StorageResult,
): CostResult {
  if (definition.form !== 'lines' || time?.kind !== 'runge-kutta' || time.b.length === 1 || !storage.explicit)
    return schemeCost(scheme, storage);
  const weights = definition.space.map((s) => canonicalStencil(s).stencil?.weights ?? []);
  return rungeKuttaCost(time.A, time.b, operatorWork(weights));
}

/** Runge-Kutta lines exchange their halo before every stage: the reach of one evaluation of the operator. */
function haloOf(
  definition: SchemeDefinition,
  scheme: CanonicalScheme,
  time: ExactTimeMethod | null,
): [number, number][] {
  if (definition.form !== 'lines' || time?.kind !== 'runge-kutta') return schemeHalo(scheme);
  return stageHalo(definition, scheme.dims);
}

function stageHalo(definition: LinesScheme, dims: number): [number, number][] {
  const halo = Array.from({ length: dims }, (): [number, number] => [0, 0]);
  definition.space.forEach((space, k) => {
    const { stencil } = canonicalStencil(space);
    if (!stencil) return;
    const used = [
      ...stencil.offsets.filter((_, j) => stencil.weights[j]!.num !== 0n),
      ...(stencil.lhs?.offsets.filter((_, j) => stencil.lhs!.weights[j]!.num !== 0n) ?? []),
    ];
    for (const offset of used)
      offset.forEach((x: Rational, axis) => {
        const side = halo[stencil.dims === 1 && dims > 1 ? k : axis];
        if (!side) return;
        side[0] = Math.max(side[0], Math.ceil(-toNumber(x)));
        side[1] = Math.max(side[1], Math.ceil(toNumber(x)));
      });
  });
  return halo;
}

/** What follows from the shape of the scheme alone: levels, arrays, roots, halo, work, the time method. */
export function schemeStructure(definition: SchemeDefinition, scheme: CanonicalScheme) {
  const time = timeMethodOf(definition);
  const storage = storageOf(scheme, time);
  const roots = rootsPerWave(scheme);
  return {
    levels: storage.levels,
    rootsPerWave: roots,
    computationalModes: computationalModes(scheme, roots),
    startUpSteps: time?.kind === 'runge-kutta' ? 0 : startUpSteps(storage.levels),
    storage,
    halo: haloOf(definition, scheme, time),
    cost: costOf(definition, scheme, time, storage),
    timeMethod: time && analyseTimeMethod(time),
  };
}

const isUnstable = ({ verdict }: StabilityFacts) => verdict.includes('unstable for all');

/**
 * Decimals that miss a Taylor coefficient by rounding make almost every bounded wave grow by about that much: where the
 * method as meant has a bound, the bound is the answer, and the note says what the printed digits do.
 */
function stabilityOf(definition: SchemeDefinition, scheme: CanonicalScheme, budget: Budget) {
  const printed = schemeStability(scheme, budget);
  const meant = isUnstable(printed) && roundingOf(definition) > 0 ? nominalScheme(definition) : null;
  if (!meant) return { stability: printed, meant: scheme };
  const stability = schemeStability(meant, budget);
  if (isUnstable(stability) || stability.verdict === 'not decided within the time budget')
    return { stability: printed, meant: scheme };
  const note = `Taken as meant: coefficients of the stability function within the rounding of the printed decimals of 1/k! count as 1/k!. As printed the scheme is ${printed.verdict}, at the rate of that rounding.`;
  return { stability: { ...stability, note: [stability.note, note].filter(Boolean).join(' ') }, meant };
}

export function schemeFacts(
  definition: SchemeDefinition,
  scheme: CanonicalScheme,
  { order, added }: TruncationAnalysis,
  budget: Budget,
): SchemeFacts {
  const structure = schemeStructure(definition, scheme);
  budget.progress(0.2, 'stability');
  const { stability, meant } = stabilityOf(definition, scheme, budget);
  budget.progress(0.8, 'dissipation');
  const values = representativeValues(scheme, stability, order.specialValues);
  // A region without a stable pair on its cuts has no inside at which to judge damping.
  const isInside = stability.kind === 'one-parameter' || stablePair(stability) !== null;
  const dissipation = order.consistent && isInside && !budget.isSpent() ? schemeDissipationFacts(meant, values) : null;
  const at = scheme.parameters.map((name, k) => `${name} = ${formatRational(values[k]!)}`).join(', ');
  const axes = scheme.dims === 1 ? 0 : scheme.dims;
  budget.progress(1, 'done');
  return {
    kind: 'scheme',
    order: { ...order, meaning: added && meaningOf(added, scheme.equation, values.map(toNumber), axes, at) },
    ...structure,
    stability,
    dissipation,
  };
}
