/** The readings of a scheme, each with what it means and how it was obtained. */
import { boundClause } from './bound-texts';
import type { OrderFacts, SchemeFacts } from './facts';
import type { FactsSummary } from './facts-summary';
import { boundRuns, raised, signed, symbolText, withSymbols } from './reading-texts';
import { type Reading, counted, countWord } from './readings';

export interface ObservedOrder {
  readonly slope: string;
  readonly grids: number;
  /** "grid", or "step" where time alone was refined. */
  readonly refined: string;
}

const exponent = (power: number) => (power === 1 ? '' : raised(String(Math.abs(power))));

/** "Δx²/Δt": a term of the truncation error that has a step below the line. */
function conditionalText({ dt, dx }: { dt: number; dx: number }): string {
  const factor = (name: string, power: number) => (power === 0 ? '' : `${name}${exponent(power)}`);
  const above = [factor('Δt', Math.max(0, dt)), factor('Δx', Math.max(0, dx))].filter(Boolean).join(' ');
  const below = [factor('Δt', Math.max(0, -dt)), factor('Δx', Math.max(0, -dx))].filter(Boolean).join(' ');
  return below ? `${above || '1'}/${below}` : above;
}

/** "exact at λ = −1 and 1, 4 at r = 1/6" */
function specialText({ specialValues }: OrderFacts, symbol: string): string {
  const byOrder = new Map<string, string[]>();
  for (const { value, order } of specialValues) {
    const word = order === null ? 'exact' : String(order);
    byOrder.set(word, [...(byOrder.get(word) ?? []), signed(value)]);
  }
  return [...byOrder].map(([word, values]) => `${word} at ${symbol} = ${values.join(' and ')}`).join(', ');
}

function orderReadings(order: OrderFacts, parameter: string | null, observed: ObservedOrder | null): Reading[] {
  const seen = observed ? `observed ${observed.slope} on ${counted(observed.grids, observed.refined)}` : null;
  const symbol = symbolText(parameter ?? 'lambda');
  const special = specialText(order, symbol) || null;
  const isConditional = order.conditionalTerms.length > 0;
  const condition = slowestOf(order.conditionalTerms).map(conditionalText).join(' and ');
  const obtained = order.reason ? undefined : 'exact, from the truncated series';
  if (order.pT === null || order.pX === null) {
    const fixed = isConditional ? `at fixed ${symbol} only: consistent while ${condition} → 0` : `at fixed ${symbol}`;
    const fixedOrder = order.orderAtFixedParameter;
    return [
      {
        term: 'Order',
        value: fixedOrder === null ? 'exact' : String(fixedOrder),
        how: joined(fixed, seen, special, order.reason),
        obtained,
      },
    ];
  }
  const only = isConditional ? `conditionally consistent: only while ${condition} → 0` : null;
  return [
    { term: 'Order in time', value: String(order.pT), how: joined(only ?? seen, order.reason), obtained },
    { term: 'Order in space', value: String(order.pX), how: joined(seen, special), obtained },
  ];
}

/** Of the terms over the same power of Δt the one that tends to 0 last. */
const slowestOf = (terms: OrderFacts['conditionalTerms']) =>
  terms.filter(({ dt, dx }) => !terms.some((other) => other.dt === dt && other.dx < dx));

const joined = (...parts: readonly (string | null)[]) => parts.filter((part) => part !== null).join('; ');

/** What the leading term of the modified equation does. */
function addsReading({ modifiedEquationLeading: leading, meaning }: OrderFacts): Reading[] {
  if (!leading || !meaning) return [];
  return [
    {
      term: 'Adds',
      value: `(iθ)${exponent(leading.powerOfITheta)}`,
      how: withSymbols(meaning).replace(/\.$/, ''),
      obtained: 'exact',
    },
  ];
}

function levelReading({ levels, startUpSteps }: SchemeFacts): Reading[] {
  if (levels === null) return [];
  const names = Array.from({ length: levels }, (_, k) => {
    const by = k - levels + 2;
    return by === 0 ? 'n' : `n ${by > 0 ? '+' : '−'} ${Math.abs(by)}`;
  });
  const start = startUpSteps === 0 ? 'starts by itself' : `needs ${counted(startUpSteps, 'starting step')}`;
  return [{ term: 'Time levels', value: String(levels), how: `${names.join(', ')}; ${start}`, obtained: 'counted' }];
}

function modesReading({ computationalModes, rootsPerWave }: SchemeFacts): Reading[] {
  if (computationalModes === 0) return [];
  return [
    {
      term: 'Other modes',
      value: String(computationalModes),
      how: `${counted(computationalModes, 'computational mode')} beside the physical one; ${counted(rootsPerWave, 'root')} for each wave`,
      obtained: 'counted',
    },
  ];
}

function costReadings({ cost }: SchemeFacts): Reading[] {
  return [
    {
      term: 'Flops a point',
      value: String(cost.operations),
      how: `${counted(cost.additions, 'sum')}, ${counted(cost.multiplications, 'product')}, coefficients outside the loop`,
      obtained: 'counted',
    },
    {
      term: 'Bytes a point',
      value: String(cost.bytesDouble),
      how: `real64: ${counted(cost.loads, 'load')}, ${counted(cost.stores, 'store')}; ${cost.bytesSingle} in real32`,
      obtained: 'counted',
    },
  ];
}

const ON_A_GRID = 'numeric, on a grid of waves';
const EXPONENT = 'exponent exact, other waves on a grid';

function dampingReading({ dissipation }: SchemeFacts): Reading[] {
  if (!dissipation) return [];
  const at = Object.entries(dissipation.at)
    .map(([name, value]) => `${symbolText(name)} = ${value}`)
    .join(', ');
  const order = dissipation.principalRootDampingOrder;
  if (dissipation.conservative) {
    return [{ term: 'Damping', value: 'none', how: '|g| = 1 for every wave below the bound', obtained: ON_A_GRID }];
  }
  if (dissipation.kreissDissipative) {
    return [
      {
        term: 'Damping',
        value: `order ${dissipation.kreissOrder ?? order ?? ''}`.trim(),
        how: `dissipative in the sense of Kreiss: every wave but the mean is damped, at ${at}`,
        obtained: EXPONENT,
      },
    ];
  }
  if (order !== null && order < 0)
    return [{ term: 'Damping', value: 'growth', how: `the physical wave grows, at ${at}`, obtained: EXPONENT }];
  return [
    {
      term: 'Damping',
      value: order === null ? 'none' : `order ${order}`,
      how: `of the physical wave; not every wave is damped, at ${at}`,
      obtained: EXPONENT,
    },
  ];
}

/** The other form of storage, the direction of the sweep, registers of stages. */
function storageReadings({ storage }: SchemeFacts): Reading[] {
  const readings: Reading[] = [
    { term: 'Arrays', value: String(storage.arraysInPlace), how: storage.reason, obtained: 'counted' },
  ];
  const { arraysWithRollingBuffer: buffered, rollingBufferLayers: layers, sweep } = storage;
  if (buffered !== null && layers !== null && buffered < storage.arraysInPlace)
    readings.push({
      term: 'With a buffer',
      value: String(buffered),
      how: `and a rolling buffer of ${counted(layers, 'saved layer')}`,
      obtained: 'counted',
    });
  if (sweep)
    readings.push({
      term: 'Sweep',
      value: [...new Set(sweep)].join(', '),
      how: `in place, the points are written in ${sweep.length === 1 ? 'this order' : 'this order along each axis'}`,
      obtained: 'exact',
    });
  const registers = [
    storage.registersGeneral === null ? null : `${storage.registersGeneral} in general`,
    storage.registersAccumulating === null ? null : `${storage.registersAccumulating} when sums are accumulated`,
    storage.registersLowStorage === null ? null : `${storage.registersLowStorage} in low-storage form`,
  ].filter((text) => text !== null);
  if (registers.length > 0)
    readings.push({
      term: 'Registers',
      value: String(storage.arraysInPlace),
      how: `of the stages: ${registers.join(', ')}`,
      obtained: 'counted',
    });
  return readings;
}

/** Halo per dimension: "1 | 1", in several dimensions one pair an axis. */
const haloText = (halo: SchemeFacts['halo']) => halo.map(([left, right]) => `${left} | ${right}`).join(', ');

function haloHow(facts: SchemeFacts): string {
  const exchanges = facts.timeMethod?.stages ?? 1;
  const unknowns = facts.storage.unknowns ?? 1;
  return `${counted(exchanges, 'exchange')} a step, ${unknowns === 1 ? 'one field' : `${countWord(unknowns)} fields`}`;
}

/**
 * @param observed order that the latest trial measured, null where none has
 */
export function schemeReadings(facts: SchemeFacts, summary: FactsSummary, observed: ObservedOrder | null): Reading[] {
  return [
    ...orderReadings(facts.order, summary.parameter, observed),
    ...addsReading(facts.order),
    { term: 'Bound', value: boundRuns(summary), how: boundClause(facts.stability) },
    ...levelReading(facts),
    ...storageReadings(facts),
    { term: 'Halo', value: haloText(facts.halo), how: haloHow(facts), obtained: 'counted' },
    ...costReadings(facts),
    ...dampingReading(facts),
    ...modesReading(facts),
  ];
}
