/** The readings of whatever kind of entry. */
import type { Facts } from './facts';
import type { FactsSummary } from './facts-summary';
import type { Reading } from './readings';
import { type ObservedOrder, schemeReadings } from './scheme-readings';
import { stencilReadings, timeMethodReadings } from './stencil-readings';

/** @param observed order that a trial measured, null where none has; none of it where there are no facts */
export function entryReadings(
  facts: Facts | null,
  summary: FactsSummary | null,
  observed: ObservedOrder | null,
): readonly Reading[] {
  if (!facts || !summary) return [];
  if (facts.kind === 'scheme') return schemeReadings(facts, summary, observed);
  return facts.kind === 'stencil' ? stencilReadings(facts) : timeMethodReadings(facts);
}
