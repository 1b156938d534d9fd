import { refinementSeries } from '@/components/trials/refinement-series';
import type { ObservedOrder } from '@/lib/facts/scheme-readings';
import type { TrialView } from '@/lib/trials/trial';

/** The order that the latest trial measured, for the readings. */
export function observedOrder(trial: TrialView | null): ObservedOrder | null {
  const series = trial ? refinementSeries(trial.findings) : null;
  return (
    series && {
      slope: series.slope.toFixed(2),
      grids: series.grids.length,
      refined: series.unit === 'steps' ? 'step' : 'grid',
    }
  );
}
