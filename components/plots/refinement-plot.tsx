const SIZE = { width: 356, height: 260, left: 44, right: 336, top: 30, bottom: 218 };

/** What a refinement finding measured: largest error on each grid. */
export interface RefinementSeries {
  readonly name: string;
  readonly grids: readonly number[];
  readonly errors: readonly number[];
  readonly slope: number;
  /** What `grids` counts, where it is not points. */
  readonly unit?: string;
}

const powerOfTen = (exponent: number) =>
  exponent >= -2 && exponent <= 0 ? (
    String(10 ** exponent)
  ) : (
    <>
      10
      <tspan dy="-5" fontSize="10">
        {String(exponent).replace('-', '−')}
      </tspan>
    </>
  );

/** Largest error against points, both logarithmic, with the measured slope. */
export function RefinementPlot({ series }: { series: RefinementSeries }) {
  const drawable = series.grids
    .map((points, k) => ({ points, error: series.errors[k] ?? 0 }))
    .filter(({ error }) => error > 0);
  if (drawable.length < 2) return null;
  const logs = drawable.map(({ error }) => Math.log10(error));
  const low = Math.floor(Math.min(...logs) - 0.05);
  const high = Math.ceil(Math.max(...logs) + 0.05);
  const step = Math.max(1, Math.ceil((high - low) / 6));
  const [first, last] = [Math.log2(drawable[0]!.points), Math.log2(drawable.at(-1)!.points)];
  const xOf = (points: number) =>
    SIZE.left + 20 + ((Math.log2(points) - first) / (last - first)) * (SIZE.right - SIZE.left - 40);
  const yOf = (log: number) => SIZE.bottom - ((log - low) / (high - low)) * (SIZE.bottom - SIZE.top);
  const middle = drawable[Math.floor(drawable.length / 2)]!;
  const unit = series.unit ?? 'points';
  const spoken = drawable.map(({ points, error }) => `${points} ${unit} ${error.toExponential(1)}`).join(', ');

  return (
    <svg
      className="plot"
      viewBox={`0 0 ${SIZE.width} ${SIZE.height}`}
      style={{ maxWidth: SIZE.width * 1.1 }}
      role="img"
      aria-label={`Largest error against ${unit}: ${spoken}; slope ${series.slope.toFixed(2)}`}
    >
      {Array.from({ length: Math.floor((high - low) / step) + 1 }, (_, k) => low + k * step).map((exponent) => (
        <g key={exponent}>
          <path d={`M${SIZE.left} ${yOf(exponent)}H${SIZE.right}`} className="p-grid" />
          <text x={SIZE.left - 8} y={yOf(exponent) + 4} className="p-t" textAnchor="end">
            {powerOfTen(exponent)}
          </text>
        </g>
      ))}
      {drawable.map(({ points }) => (
        <g key={points}>
          <path d={`M${xOf(points)} ${SIZE.bottom}v6`} className="p-ax" />
          <text x={xOf(points)} y={SIZE.bottom + 20} className="p-t" textAnchor="middle">
            {points}
          </text>
        </g>
      ))}
      <path d={`M${SIZE.left} ${SIZE.top}V${SIZE.bottom}H${SIZE.right}`} className="p-ax" />
      <polyline
        points={drawable.map(({ points }, k) => `${xOf(points).toFixed(1)},${yOf(logs[k]!).toFixed(1)}`).join(' ')}
        className="p-line c1"
      />
      {drawable.map(({ points }, k) => (
        <circle key={points} cx={xOf(points)} cy={yOf(logs[k]!)} r="3.5" className="p-dot c1" />
      ))}
      <text x={xOf(middle.points) + 12} y={yOf(Math.log10(middle.error)) - 4} className="p-l">
        slope {series.slope.toFixed(2)}
      </text>
      <text x="0" y="11" className="p-y">
        Largest error, {series.name}
      </text>
      <text x={SIZE.right} y={SIZE.height - 3} className="p-x" textAnchor="end">
        {unit}
      </text>
    </svg>
  );
}
