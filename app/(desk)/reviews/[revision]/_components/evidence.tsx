import { type NoiseData, NoisePlot } from '@/components/plots/noise-plot';
import { RefinementPlot } from '@/components/plots/refinement-plot';
import { refinementSeries } from '@/components/trials/refinement-series';
import type { SheetView } from '@/lib/entries/entry';
import { type Drawing, drawingOf } from '@/lib/facts/drawing';
import { decimalText, symbolText } from '@/lib/facts/reading-texts';
import { schemeCurves } from '@/lib/numerics/curves';
import { noiseExponents } from '@/lib/reviews/noise';

const WAVES = 256;
const THETA = Array.from({ length: WAVES }, (_, k) => ((k + 0.5) * Math.PI) / WAVES);
const STEPS = Array.from({ length: 81 }, (_, k) => 5 * k);
/** Past the bound by this much, where there is no earlier bound to look at. */
const EXCESS = 1.02;

interface EvidenceProps {
  was: SheetView | null;
  now: SheetView;
}

/** Largest growth factor of every wave, all parameters at one value, waves along the diagonal. */
function growthAt({ numeric }: Drawing, value: number): number[] {
  if (!numeric) return [];
  const direction = Array.from({ length: numeric.dims }, () => 1);
  const parameters = numeric.parameters.map(() => value);
  return schemeCurves(numeric, parameters, direction, THETA).map((point) => point.maxModulus);
}

const drawn = ({ definition, facts, summary }: SheetView) => drawingOf(definition, facts, summary);

/** The scheme at its bound, and at the bound that was booked before, or a little past its own; null where it has none. */
function noiseData({ was, now }: EvidenceProps): NoiseData | null {
  const drawing = drawn(now);
  const { numeric, limit } = drawing;
  if (!numeric || limit === null || limit === 0) return null;
  const symbol = symbolText(now.summary?.parameter ?? 'lambda');
  const before = was ? drawn(was).limit : null;
  const isMoved = before !== null && before > limit * (1 + 1e-9);
  const past = isMoved ? before : limit * EXCESS;
  const named = (value: number, what: string) => `${symbol} = ${decimalText(value)}, ${what}`;
  return {
    label: `Size of noise against steps at ${named(limit, 'the bound')} and at ${named(past, isMoved ? 'the bound before' : 'past it')}`,
    steps: STEPS,
    lines: [
      {
        name: named(past, isMoved ? `booked in revision ${was?.revision ?? ''}` : '2 % past the bound'),
        look: 'cr',
        exponents: noiseExponents(growthAt(drawing, past), STEPS),
      },
      {
        name: named(limit, `revision ${now.revision}`),
        look: 'c1',
        exponents: noiseExponents(growthAt(drawing, limit), STEPS),
      },
    ],
  };
}

/** What the eye can judge beside the readings: noise at the bound, and the errors that the trial measured. */
export function Evidence({ was, now }: EvidenceProps) {
  const noise = now.facts?.kind === 'scheme' ? noiseData({ was, now }) : null;
  const series = now.latestTrial ? refinementSeries(now.latestTrial.findings) : null;
  return (
    <div className="right">
      <div className="leafhd">
        <span>{noise ? 'Evidence for the bound' : 'Evidence'}</span>
        <span>{noise ? `${WAVES} waves, from their growth factors` : series ? 'measured by the trial' : ''}</span>
      </div>
      {noise && (
        <figure className="after">
          <NoisePlot data={noise} id={`evidence-${now.revisionId}`} />
        </figure>
      )}
      {!noise && series && (
        <figure className="after">
          <RefinementPlot series={series} />
        </figure>
      )}
      {!noise && !series && (
        <p className="cap after">There is no curve to show for it: it has no bound and no trial.</p>
      )}
    </div>
  );
}
