import { StaffBound } from '@/components/marks/staff-bound';
import { Letters } from '@/components/math/letters';
import { StabilityMap } from '@/components/plots/stability-map';
import type { Definition } from '@/lib/entries/definition';
import { boundSentences, methodText } from '@/lib/facts/bound-texts';
import type { Drawing } from '@/lib/facts/drawing';
import type { SchemeFacts, StabilityFacts } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import { symbolText } from '@/lib/facts/reading-texts';
import { regionTexts } from '@/lib/facts/region-texts';
import { stabilityMapModel } from '@/lib/facts/stability-map-model';
import { staffReading } from '@/lib/facts/staff-reading';
import { GrowthAt } from './growth-at';
import { Part } from './part';
import { RegionTable } from './region-table';

interface BoundPartProps {
  figure: number;
  definition: Definition;
  facts: SchemeFacts;
  summary: FactsSummary;
  drawing: Drawing;
}

const quotient = (text: string) => {
  const [num, den] = text.split('/').map(Number);
  return num! / (den ?? 1);
};

/** The law of growth on one side of 0, where the series give its factor. */
function lawOf({ growth }: StabilityFacts) {
  const side = growth?.positive ?? growth?.negative;
  return side?.factor && side.tolerance ? { q: quotient(side.q), factor: side.factor } : null;
}

/** A staff shows one number that is known to be stable or not; regions have their map. */
const hasStaff = ({ verdict }: StabilityFacts) =>
  verdict === 'conditionally stable' || verdict === 'unconditionally stable' || verdict.includes('unstable');

/** The bound on the staff, what happens at it, the region of several numbers, and how all of it was found. */
export function BoundPart({ figure, definition, facts, summary, drawing }: BoundPartProps) {
  const { stability } = facts;
  const methods = [...new Set(stability.intervals.map(({ method, tolerance }) => methodText(method, tolerance)))];
  const isUnstable = stability.verdict.includes('unstable');
  const map = definition.kind === 'scheme' && !isUnstable ? stabilityMapModel(definition) : null;
  const region = regionTexts(stability);
  return (
    <Part
      id="bound"
      figure={figure}
      name="Bound"
      aside={
        <>
          <a href="/definitions#stability">von Neumann</a>;{' '}
          {methods.length > 0 ? methods.join(', ') : methodText(stability.method)}
        </>
      }
    >
      {hasStaff(stability) && <StaffBound reading={staffReading(stability, summary)} />}
      <div className="cap boundcap">
        {boundSentences(stability).map((sentence) => (
          <p key={sentence}>
            <Letters text={sentence} />
          </p>
        ))}
        {isUnstable && drawing.numeric && stability.parameter && (
          <GrowthAt
            numeric={drawing.numeric}
            symbol={symbolText(stability.parameter)}
            start={stability.growth?.negative && !stability.growth.positive ? -0.4 : 0.4}
            law={lawOf(stability)}
          />
        )}
        {region.length > 0 && <RegionTable lines={region} />}
        {map && <StabilityMap map={map} condition={stability.region} />}
        <p className="caution">
          Von Neumann analysis is for constant coefficients on periodic or infinite domains. With boundaries, variable
          coefficients or nonlinear terms it is necessary and not always sufficient.
        </p>
      </div>
    </Part>
  );
}
