import { CurveTable } from '@/components/plots/curve-table';
import { SavePlot } from '@/components/plots/save-plot';
import { ThetaPlot, type ThetaPlotData } from '@/components/plots/theta-plot';
import { type ComparedCurves, POSITIONS } from '@/lib/comparisons/side-by-side';
import { decimalText } from '@/lib/facts/reading-texts';

const LOOKS = ['c1', 'c2', 'c3', 'c4'] as const;

/** Growth and speed of all of them on the same axes, each at three quarters of its own bound. */
export function ComparedPlots({
  curves,
  looks,
  decays,
}: {
  curves: readonly ComparedCurves[];
  looks: ReadonlyMap<string, number>;
  decays: boolean;
}) {
  if (curves.length === 0) return null;
  const named = curves.map(({ callNumber, modulus, rate }) => ({
    name: callNumber,
    look: LOOKS[looks.get(callNumber) ?? 0] ?? 'c1',
    modulus,
    rate,
  }));
  const growth: ThetaPlotData = {
    title: 'Growth a step, |g|',
    label: `Growth a step against phase angle for ${named.map(({ name }) => name).join(', ')}`,
    theta: POSITIONS,
    curves: named.map(({ name, look, modulus }) => ({ name, look, values: modulus })),
    range: [0, 1.25],
    growthAbove: 1,
  };
  const speed: ThetaPlotData = {
    title: decays ? 'Decay ÷ true decay' : 'Phase speed ÷ true speed',
    label: `${decays ? 'Decay' : 'Phase speed'} relative to the true one for ${named.map(({ name }) => name).join(', ')}`,
    theta: POSITIONS,
    curves: named.map(({ name, look, rate }) => ({ name, look, values: rate })),
    range: [0, 1.25],
    reference: 1,
  };
  return (
    <>
      <div className="twoup">
        {[growth, speed].map((data, k) => (
          <figure key={data.title}>
            <ThetaPlot data={data} id={`side-${k}`} />
            <CurveTable data={data} />
            <SavePlot data={data} name={k === 0 ? 'side-by-side-growth' : 'side-by-side-speed'} />
          </figure>
        ))}
      </div>
      <p className="cap">
        Curves at three quarters of each bound:{' '}
        {curves.map(({ callNumber, at }) => `${callNumber} at ${decimalText(at, 3)}`).join(', ')}.
      </p>
    </>
  );
}
