/** Noise against steps, its size on a logarithmic scale: what a value past the bound does to a run. */
interface NoiseLine {
  readonly name: string;
  /** cr past the bound. */
  readonly look: 'c1' | 'cr';
  /** log₁₀ of the size after each of `steps`. */
  readonly exponents: readonly number[];
}

export interface NoiseData {
  /** Sentence for those who cannot see the plot. */
  readonly label: string;
  readonly steps: readonly number[];
  readonly lines: readonly NoiseLine[];
}

const SIZES = {
  d: { width: 560, height: 300, left: 44, right: 540, top: 32, bottom: 258, parts: 4 },
  m: { width: 358, height: 260, left: 36, right: 344, top: 32, bottom: 218, parts: 2 },
} as const;

/** Decades from the top to the bottom of the plot: at least from 1 to 100, at most to 10¹². */
function decadesOf({ lines }: NoiseData): { low: number; high: number; by: number } {
  const all = lines.flatMap(({ exponents }) => exponents).filter(Number.isFinite);
  const high = Math.min(12, Math.max(2, Math.ceil(Math.max(...all))));
  const low = Math.max(-4, Math.min(0, Math.floor(Math.min(...all))));
  const by = Math.max(1, Math.ceil((high - low) / 4));
  return { low, high, by };
}

function Drawing({ data, size, id }: { data: NoiseData; size: (typeof SIZES)['d' | 'm']; id: string }) {
  const { left, right, top, bottom, width, height, parts } = size;
  const { low, high, by } = decadesOf(data);
  const last = data.steps.at(-1) ?? 1;
  const x = (step: number) => left + ((right - left) * step) / last;
  const y = (exponent: number) => bottom - ((bottom - top) * (exponent - low)) / (high - low);
  const ticks = Array.from({ length: Math.floor((high - low) / by) + 1 }, (_, k) => low + k * by);
  return (
    <svg
      className="plot"
      viewBox={`0 0 ${width} ${height}`}
      style={{ maxWidth: width * 1.1 }}
      role="img"
      aria-label={data.label}
    >
      {ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${left} ${y(tick)}H${right}`} className="p-grid" />
          <text x={left - 8} y={y(tick) + 4} className="p-t" textAnchor="end">
            {tick === 0 ? (
              '1'
            ) : (
              <>
                10
                <tspan dy="-5" fontSize="10">
                  {String(tick).replace('-', '−')}
                </tspan>
              </>
            )}
          </text>
        </g>
      ))}
      {Array.from({ length: parts + 1 }, (_, k) => (last * k) / parts).map((step) => (
        <g key={step}>
          <path d={`M${x(step)} ${bottom}v6`} className="p-ax" />
          <text x={x(step)} y={bottom + 20} className="p-t" textAnchor="middle">
            {step}
          </text>
        </g>
      ))}
      <path d={`M${left} ${top}V${bottom}H${right}`} className="p-ax" />
      <clipPath id={id}>
        <rect x={left} y={top - 1} width={right - left} height={bottom - top + 2} />
      </clipPath>
      {data.lines.map(({ name, look, exponents }, k) => {
        const at = Math.floor(data.steps.length * 0.45);
        const height = y(Math.min(high, Math.max(low, exponents[at] ?? low)));
        return (
          <g key={name}>
            <polyline
              className={`p-line ${look}`}
              clipPath={`url(#${id})`}
              points={data.steps
                .map(
                  (step, j) =>
                    `${x(step).toFixed(1)},${y(Math.max(low - 1, Math.min(high + 1, exponents[j] ?? low))).toFixed(1)}`,
                )
                .join(' ')}
            />
            <text
              x={right}
              y={look === 'cr' ? Math.max(top + 14, height - 10) : bottom - 10 - 18 * k}
              className="p-l"
              textAnchor="end"
            >
              {name}
            </text>
          </g>
        );
      })}
      <text x="0" y="11" className="p-y">
        Noise after so many steps, start = 1
      </text>
      <text x={right} y={height - 3} className="p-x" textAnchor="end">
        steps
      </text>
    </svg>
  );
}

/** Drawn for a page and for a phone. */
export const NoisePlot = ({ data, id }: { data: NoiseData; id: string }) => (
  <>
    <div className="pl-d">
      <Drawing data={data} size={SIZES.d} id={`${id}-d`} />
    </div>
    <div className="pl-m">
      <Drawing data={data} size={SIZES.m} id={`${id}-m`} />
    </div>
  </>
);
