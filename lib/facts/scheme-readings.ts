/** The readings of a scheme, each with what it means and how it was obtained. */
import { boundClause } from './bound-texts';
import type { OrderFacts, SchemeFacts } from './facts';
import type { FactsSummary } from './facts-summary';
import { boundRuns, signed, symbolText } from './reading-texts';
import { type Reading, counted, countWord } from './readings';

export interface ObservedOrder {
  readonly slope: string;
  readonly grids: number;
  /** "grid", or "step" where time alone was refined. */
  readonly refined: string;
}

const exponent = (power: number) =>
  power === 1 ? '' : ['⁰', '¹', '²', '³', '⁴', '⁵', '⁶', '⁷', '⁸', '⁹'][Math.abs(power)];

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
  const seen = observed
    ? `observed ${observed.slope} on ${counted(observed.grids, observed.refined)}`
    : 'exact, from the truncated series';
  const symbol = symbolText(parameter ?? 'lambda');
  if (order.pT === null || order.pX === null) {
    const condition = order.conditionalTerms.map(conditionalText).join(' and ');
    const how = condition
      ? `at fixed ${symbol} only: consistent while ${condition} → 0`
      : `at fixed ${symbol}; ${seen}`;
    const raised = order.orderAtFixedParameter;
    return [{ term: 'Order', value: raised === null ? 'exact' : String(raised), how }];
  }
  const special = specialText(order, symbol);
  const condition =
    order.conditionalTerms.length > 0
      ? `only while ${order.conditionalTerms.map(conditionalText).join(' and ')} → 0`
      : null;
  return [
    { term: 'Order in time', value: String(order.pT), how: condition ?? seen },
    { term: 'Order in space', value: String(order.pX), how: special ? `${seen}; ${special}` : seen },
  ];
}

function levelReading({ levels, startUpSteps }: SchemeFacts): Reading[] {
  if (levels === null) return [];
  const names = Array.from({ length: levels }, (_, k) => {
    const by = k - levels + 2;
    return by === 0 ? 'n' : `n ${by > 0 ? '+' : '−'} ${Math.abs(by)}`;
  });
  const start = startUpSteps === 0 ? 'starts by itself' : `needs ${counted(startUpSteps, 'starting step')}`;
  return [{ term: 'Time levels', value: String(levels), how: `${names.join(', ')}; ${start}` }];
}

function modesReading({ computationalModes }: SchemeFacts): Reading[] {
  if (computationalModes === 0) return [];
  return [
    {
      term: 'Other modes',
      value: String(computationalModes),
      how: `${counted(computationalModes, 'computational mode')} beside the physical one`,
    },
  ];
}

function costReadings({ cost }: SchemeFacts): Reading[] {
  return [
    {
      term: 'Flops a point',
      value: String(cost.operations),
      how: `${counted(cost.additions, 'sum')}, ${counted(cost.multiplications, 'product')}, coefficients outside the loop`,
    },
    {
      term: 'Bytes a point',
      value: String(cost.bytesDouble),
      how: `real64: ${counted(cost.loads, 'load')}, ${counted(cost.stores, 'store')}; ${cost.bytesSingle} in real32`,
    },
  ];
}

function dampingReading({ dissipation }: SchemeFacts): Reading[] {
  if (!dissipation) return [];
  const at = Object.entries(dissipation.at)
    .map(([name, value]) => `${symbolText(name)} = ${value}`)
    .join(', ');
  const order = dissipation.principalRootDampingOrder;
  if (dissipation.conservative) {
    return [{ term: 'Damping', value: 'none', how: '|g| = 1 for every wave below the bound' }];
  }
  if (dissipation.kreissDissipative) {
    return [
      {
        term: 'Damping',
        value: `order ${dissipation.kreissOrder ?? order ?? ''}`.trim(),
        how: `dissipative in the sense of Kreiss: every wave but the mean is damped, at ${at}`,
      },
    ];
  }
  if (order !== null && order < 0)
    return [{ term: 'Damping', value: 'growth', how: `the physical wave grows, at ${at}` }];
  return [
    {
      term: 'Damping',
      value: order === null ? 'none' : `order ${order}`,
      how: `of the physical wave; not every wave is damped, at ${at}`,
    },
  ];
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
    { term: 'Bound', value: boundRuns(summary), how: boundClause(facts.stability) },
    ...levelReading(facts),
    { term: 'Arrays', value: String(facts.storage.arraysInPlace), how: facts.storage.reason },
    { term: 'Halo', value: haloText(facts.halo), how: haloHow(facts) },
    ...costReadings(facts),
    ...dampingReading(facts),
    ...modesReading(facts),
  ];
}
