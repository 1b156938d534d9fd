import { CurvesPlot } from '@/components/plots/curves-plot';
import { symbolText } from '@/lib/facts/reading-texts';
import type { Drawing } from '@/lib/facts/drawing';
import type { SheetView } from '@/lib/entries/entry';
import { Part } from './part';

/** Damping and speed against the phase angle, with the staff that moves the parameter. */
export const CurvesPart = ({ figure, sheet, drawing }: { figure: number; sheet: SheetView; drawing: Drawing }) => (
  <Part id="curves" figure={figure} name="Damping and speed" aside="upper scale: points per wave">
    {drawing.numeric && sheet.summary?.parameter ? (
      <CurvesPlot
        numeric={drawing.numeric}
        symbol={symbolText(sheet.summary.parameter)}
        limit={drawing.limit}
        slug={sheet.slug}
      />
    ) : (
      <p className="cap">There are no curves: the definition gives no amplification factor.</p>
    )}
  </Part>
);
