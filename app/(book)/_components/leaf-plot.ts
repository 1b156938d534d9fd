import type { ThetaPlotData } from '@/components/plots/theta-plot';
import type { Drawing } from '@/lib/facts/drawing';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import { decimalText, symbolText } from '@/lib/facts/reading-texts';
import { schemeCurves } from '@/lib/numerics/curves';

const SAMPLES = 49;
const POSITIONS = Array.from({ length: SAMPLES }, (_, k) => (k * Math.PI) / (SAMPLES - 1));
const LOOKS = ['c1', 'c2', 'c3'] as const;
const rounded = (value: number | null) => (value === null ? null : Number(value.toFixed(4)));

/** Phase speed (or decay) at three values below the bound, small enough for the facing leaf. */
export function leafPlot({ numeric, limit }: Drawing, summary: FactsSummary | null): ThetaPlotData | null {
  if (!numeric || !summary?.parameter) return null;
  const symbol = symbolText(summary.parameter);
  const decays = numeric.equation.includes('diffusion') && !numeric.equation.startsWith('advection');
  const values = limit === null || limit === 0 ? [0.75, 0.25] : [0.95 * limit, 0.75 * limit, 0.25 * limit];
  const title = decays ? 'Decay ÷ true decay' : 'Phase speed ÷ true speed';
  return {
    title,
    label: `${title} against phase angle at ${values.map((value) => `${symbol} = ${decimalText(value, 3)}`).join(', ')}`,
    theta: POSITIONS.map((theta) => Number(theta.toFixed(5))),
    curves: values.map((value, k) => ({
      name: k === 0 ? `${symbol} = ${decimalText(value, 3)}` : decimalText(value, 3),
      look: LOOKS[k] ?? 'c1',
      values: schemeCurves(
        numeric,
        numeric.parameters.map(() => value),
        Array.from({ length: numeric.dims }, () => 1),
        POSITIONS,
      ).map((point) => rounded(decays ? point.decayRate : point.phaseSpeed)),
    })),
    range: [0, 1.1],
    reference: 1,
  };
}
