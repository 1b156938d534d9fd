import { RefinementPlot } from '@/components/plots/refinement-plot';
import { ThetaPlot, type ThetaPlotData } from '@/components/plots/theta-plot';
import { refinementSeries } from '@/components/trials/refinement-series';
import type { SheetView } from '@/lib/entries/entry';
import { type Drawing, drawingOf } from '@/lib/facts/drawing';
import { decimalText, symbolText } from '@/lib/facts/reading-texts';
import { schemeCurves } from '@/lib/numerics/curves';

const SAMPLES = 193;
const THETA = Array.from({ length: SAMPLES }, (_, k) => (k * Math.PI) / (SAMPLES - 1));

interface EvidenceProps {
  was: SheetView | null;
  now: SheetView;
}

/** Largest growth factor of every wave, all parameters at one value, waves along the diagonal. */
function growthAt({ numeric }: Drawing, value: number) {
  if (!numeric) return null;
  const parameters = numeric.parameters.map(() => value);
  const direction = Array.from({ length: numeric.dims }, () => 1);
  return schemeCurves(numeric, parameters, direction, THETA).map((point) => point.maxModulus);
}

const drawn = ({ definition, facts, summary }: SheetView) => drawingOf(definition, facts, summary);
/** Where a scheme is looked at: its bound, or 1 where it has none. */
const boundOf = ({ limit }: Drawing) => (limit ? limit : 1);

/** Growth at the bound that each revision books: what the old bound does to the new scheme can be seen. */
function growthData({ was, now }: EvidenceProps): ThetaPlotData | null {
  const after = drawn(now);
  const symbol = symbolText(now.summary?.parameter ?? 'lambda');
  const values = growthAt(after, boundOf(after));
  if (!values) return null;
  const named = (value: number, revision: number) => `${symbol} = ${decimalText(value)}, revision ${revision}`;
  const before = was && drawn(was);
  const isMoved = before !== null && boundOf(before) !== boundOf(after);
  const old =
    before && (isMoved || before.rule.join() !== after.rule.join()) ? growthAt(before, boundOf(before)) : null;
  return {
    title: 'Growth a step at the bound, |g|',
    label: `Largest growth factor a step against phase angle at the bound that is booked${was ? ', before and now' : ''}`,
    theta: THETA,
    curves: [
      { name: named(boundOf(after), now.revision), look: 'c1', values },
      ...(old && before && was
        ? [{ name: named(boundOf(before), was.revision), look: 'cr' as const, values: old }]
        : []),
    ],
    range: [0, 1.5],
    growthAbove: 1,
  };
}

/** What the eye can judge beside the readings: growth at the bound, and the errors that the trial measured. */
export function Evidence({ was, now }: EvidenceProps) {
  const growth = now.facts?.kind === 'scheme' ? growthData({ was, now }) : null;
  const series = now.latestTrial ? refinementSeries(now.latestTrial.findings) : null;
  return (
    <div className="right">
      <div className="leafhd">
        <span>Evidence</span>
        <span>{growth ? 'computed from the definition' : series ? 'measured by the trial' : ''}</span>
      </div>
      {growth && (
        <figure>
          <ThetaPlot data={growth} id={`evidence-${now.revisionId}`} />
        </figure>
      )}
      {!growth && series && (
        <figure>
          <RefinementPlot series={series} />
        </figure>
      )}
      {!growth && !series && <p className="cap after">There is no curve to show for this kind of entry yet.</p>}
    </div>
  );
}
