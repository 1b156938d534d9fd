import { StaffBound } from '@/components/marks/staff-bound';
import { Letters } from '@/components/math/letters';
import { boundSentences, methodText } from '@/lib/facts/bound-texts';
import type { SchemeFacts } from '@/lib/facts/facts';
import type { FactsSummary } from '@/lib/facts/facts-summary';
import { staffReading } from '@/lib/facts/staff-reading';
import { Part } from './part';

/** The bound on the staff, what happens at it, and how it was found. */
export function BoundPart({ figure, facts, summary }: { figure: number; facts: SchemeFacts; summary: FactsSummary }) {
  const { stability } = facts;
  const methods = [...new Set(stability.intervals.map(({ method, tolerance }) => methodText(method, tolerance)))];
  return (
    <Part
      id="bound"
      figure={figure}
      name="Bound"
      aside={`von Neumann; ${methods.length > 0 ? methods.join(', ') : methodText(stability.method)}`}
    >
      <StaffBound reading={staffReading(stability, summary)} />
      <div className="cap boundcap">
        {boundSentences(stability).map((sentence) => (
          <p key={sentence}>
            <Letters text={sentence} />
          </p>
        ))}
        <p className="caution">
          Von Neumann analysis is for constant coefficients on periodic or infinite domains. With boundaries, variable
          coefficients or nonlinear terms it is necessary and not always sufficient.
        </p>
      </div>
    </Part>
  );
}
