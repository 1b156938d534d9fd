import type { FactsSummary } from '@/lib/facts/facts-summary';
import { largestStable } from '@/lib/facts/reading-texts';
import { StaffBlocks } from './staff-blocks';

const LENGTH = 112;

/** The staff of a catalog line, graduated 0 … `span`; decoration beside the written bound. */
export function StaffGauge({ summary, span = 2 }: { summary: FactsSummary; span?: number }) {
  if (summary.parameter === null) return null;
  const limit = largestStable(summary);
  const perUnit = LENGTH / span;
  const reached = limit === null ? LENGTH : Math.min(limit * perUnit, LENGTH);
  const beyond = limit === null || limit > span;
  const start = Math.max(0, Math.min(...summary.bounds.map((bound) => bound.lo ?? 0), Infinity)) * perUnit;
  const from = Number.isFinite(start) ? Math.min(start, LENGTH) : 0;

  return (
    <svg className="gauge" width="119" height="17" viewBox="0 0 119 17" aria-hidden="true">
      {!beyond && <rect x={reached} y="2" width={LENGTH - reached} height="12" fill="url(#hatch)" opacity=".8" />}
      {from > 0.5 && <rect x="0" y="2" width={from} height="12" fill="url(#hatch)" opacity=".8" />}
      {reached > 0 && <StaffBlocks x={from} y={2} tenth={perUnit / 10} half={6} end={reached} />}
      <path d={`M0 14.5H${LENGTH}`} className="g-base" />
      {beyond ? (
        <path d={`M${LENGTH} 14.5h6M${LENGTH + 3} 11.5l3 3-3 3`} className="g-base" />
      ) : (
        reached > 0 && <path d={`M${reached} 0V17`} className="g-lim" />
      )}
    </svg>
  );
}
