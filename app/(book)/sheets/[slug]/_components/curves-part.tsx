import { CurvesPlot } from '@/components/plots/curves-plot';
import type { SheetView } from '@/lib/entries/entry';
import type { Drawing } from '@/lib/facts/drawing';
import type { SchemeFacts } from '@/lib/facts/facts';
import { symbolText } from '@/lib/facts/reading-texts';
import { parseRational, toNumber } from '@/lib/numerics/rational';
import { ModifiedEquation } from './modified-equation';
import { Part } from './part';

/** Which number the slider moves, how far, and at what the others stay; one slider moves all where they may be equal. */
function sliderOf({ stability, dissipation }: SchemeFacts, drawing: Drawing) {
  if (stability.parameter) return { symbol: symbolText(stability.parameter), limit: drawing.limit, held: undefined };
  const names = drawing.numeric?.parameters ?? [];
  const [first] = names;
  const r = dissipation?.at['r'];
  const cut = stability.lambdaLimitAtR?.find((each) => each.r === r);
  if (!first || !cut) return null;
  const held = names.map((name) => (name === first ? null : toNumber(parseRational(cut.r))));
  return { symbol: symbolText(first), limit: cut.lambdaMaxExact, held };
}

/** What the scheme adds, damping and speed against the phase angle, with the staff that moves the parameter. */
export function CurvesPart({ figure, sheet, drawing }: { figure: number; sheet: SheetView; drawing: Drawing }) {
  const facts = sheet.facts?.kind === 'scheme' ? sheet.facts : null;
  const slider = facts && sliderOf(facts, drawing);
  return (
    <Part
      id="curves"
      figure={figure}
      name="Damping and speed"
      aside={
        <>
          upper scale: points per wave; <a href="/definitions#speed">numeric</a>
        </>
      }
    >
      {facts && <ModifiedEquation order={facts.order} />}
      {drawing.numeric && slider ? (
        <CurvesPlot numeric={drawing.numeric} {...slider} slug={sheet.slug} />
      ) : (
        <p className="cap">There are no curves: the definition leaves no number that could be moved.</p>
      )}
    </Part>
  );
}
