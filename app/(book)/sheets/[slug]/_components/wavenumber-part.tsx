import { CurveTable } from '@/components/plots/curve-table';
import { SavePlot } from '@/components/plots/save-plot';
import { ThetaPlot, type ThetaPlotData } from '@/components/plots/theta-plot';
import type { StencilDefinition } from '@/lib/entries/definition';
import { wavenumberCurve } from '@/lib/facts/wavenumber-curve';
import { Part } from './part';

interface WavenumberPartProps {
  figure: number;
  definition: StencilDefinition;
  slug: string;
}

function plotOf(definition: StencilDefinition): ThetaPlotData | null {
  const points = wavenumberCurve(definition);
  const power = definition.derivative ?? 0;
  if (!points || points.some(({ re, im }) => !Number.isFinite(re) || !Number.isFinite(im))) return null;
  const exact = points.map(({ theta }) => theta ** power);
  const tops = points.flatMap(({ re, im }) => [re, im]);
  const hasDamping = points.some(({ im }) => Math.abs(im) > 1e-12);
  return {
    title: power === 1 ? 'Modified wavenumber κ' : `Modified symbol κ ~ θ${['⁰', '', '²', '³', '⁴'][power] ?? ''}`,
    label: 'Modified wavenumber against phase angle, beside the exact one',
    theta: points.map(({ theta }) => theta),
    curves: [
      { name: 'Re κ', look: 'c1', values: points.map(({ re }) => re) },
      ...(hasDamping ? ([{ name: 'Im κ', look: 'c2', values: points.map(({ im }) => im) }] as const) : []),
      { name: 'exact', look: 'cg', values: exact },
    ],
    range: [Math.min(0, ...tops), Math.max(...exact, ...tops)],
  };
}

/** The modified wavenumber of a stencil beside the true one. */
export function WavenumberPart({ figure, definition, slug }: WavenumberPartProps) {
  const plot = plotOf(definition);
  return (
    <Part id="curves" figure={figure} name="Resolution" aside="upper scale: points per wave">
      {plot ? (
        <figure className="lonefigure">
          <ThetaPlot data={plot} id={`${slug}-kappa`} />
          <figcaption className="cap">
            Where the curve leaves the exact one, waves are no longer differentiated as they should be.
          </figcaption>
          <CurveTable data={plot} />
          <SavePlot data={plot} name={`${slug}-wavenumber`} />
        </figure>
      ) : (
        <p className="cap">
          No curve: the modified wavenumber of these offsets is not defined as a function of one angle.
        </p>
      )}
    </Part>
  );
}
