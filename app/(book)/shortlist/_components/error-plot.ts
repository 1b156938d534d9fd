/** The plot of the shortlist: error of the worst speed against points a wavelength, for the first of each kind. */
import type { LogPlotData } from '@/components/plots/log-plot';
import { errorCurve } from '@/lib/shortlist/candidate';
import type { Requirement } from '@/lib/shortlist/requirement';
import type { Placed } from '@/lib/shortlist/shortlist';

const CURVES_MAX = 3;
const LOOKS = ['c1', 'c2', 'c3'] as const;
const TICKS = [5, 10, 20, 50, 100, 200, 500, 1000, 2000, 5000, 1e4, 1e5, 1e6];
const PERCENTS = [100, 10, 1, 0.1, 0.01, 0.001, 1e-4, 1e-5, 1e-6, 1e-7];

/** null where nothing can be drawn. */
export function errorPlot(placed: readonly Placed[], asked: Requirement): LogPlotData | null {
  const drawn = placed.filter(({ cost }) => cost !== null).slice(0, CURVES_MAX);
  if (drawn.length === 0) return null;
  const needed = Math.max(...drawn.map(({ cost }) => cost!.pointsPerWave));
  const pointsMax = Math.max(40, needed * 2.5);
  const low = Math.min(asked.errorPercent / 6, 1);
  const travelled = asked.equation === 'diffusion' ? 'e-foldings' : 'wavelengths';
  const curves = drawn.map(({ candidate, cost }, k) => ({
    name: candidate.callNumber,
    look: LOOKS[k]!,
    points: errorCurve(candidate.numeric, cost!.parameter, asked.slowest / asked.fastest, asked.duration, pointsMax)
      .filter(({ error }) => Number.isFinite(error) && error > 0)
      .map(({ points, error }) => [points, error * 100] as const),
  }));
  return {
    title: `Error after ${asked.duration} ${travelled}, worst speed`,
    unitX: 'points a wavelength',
    label: `Error of the worst speed against points a wavelength for ${curves.map(({ name }) => name).join(', ')}; at ${asked.errorPercent} per cent they need ${drawn.map(({ cost }) => Math.ceil(cost!.pointsPerWave)).join(', ')} points`,
    x: [8, pointsMax],
    y: [low, 240],
    ticksX: thinned(TICKS.filter((at) => at >= 8 && at <= pointsMax)).map((at) => ({ at, text: String(at) })),
    ticksY: PERCENTS.filter((at) => at >= low).map((at) => ({
      at,
      text: `${at >= 1e-3 ? at : at.toExponential(0)} %`,
    })),
    reference: { at: asked.errorPercent, text: `${asked.errorPercent} %` },
    curves,
  };
}

const thinned = (ticks: readonly number[]) =>
  ticks.length <= 8 ? ticks : ticks.filter((at) => Number.isInteger(Math.log10(at)));
