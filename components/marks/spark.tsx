import type { FactsSummary } from '@/lib/facts/facts-summary';

const WIDTH = 88;
const FLOOR = 48;
/** Height of the value 1 above the floor. */
const UNIT = 31.4;

const yOf = (value: number) => FLOOR - Math.max(-0.1, Math.min(1.5, value)) * UNIT;

/** Points of the drawable runs of a curve; null samples break the line. */
function runs(values: readonly (number | null)[]): string[] {
  const lines: string[][] = [[]];
  values.forEach((value, k) => {
    if (value === null) lines.push([]);
    else lines.at(-1)!.push(`${((k / (values.length - 1)) * WIDTH).toFixed(1)},${yOf(value).toFixed(1)}`);
  });
  return lines.filter((line) => line.length > 1).map((line) => line.join(' '));
}

/** Damping (ink) and phase speed (blue) against the phase angle 0 … π, at ¾ of the bound. */
export function Spark({ curves }: { curves: FactsSummary['curves'] }) {
  if (!curves) return <span className="spark" />;
  return (
    <svg
      className="spark"
      width={WIDTH}
      height="52"
      viewBox={`0 0 ${WIDTH} 52`}
      role="img"
      aria-label="damping and phase speed against phase angle"
    >
      <path d={`M0 ${yOf(1).toFixed(1)}H${WIDTH}`} className="p-ref" />
      <path d={`M0 ${FLOOR}H${WIDTH}`} className="p-ax" />
      {runs(curves.phase).map((points) => (
        <polyline key={points} points={points} className="p-line c2" />
      ))}
      {runs(curves.modulus).map((points) => (
        <polyline key={points} points={points} className="p-line c1" />
      ))}
    </svg>
  );
}
