import { decimalText } from '@/lib/facts/reading-texts';
import type { NumericScheme } from '@/lib/numerics/numeric-scheme';
import { marchPulse, pulseTravel } from '@/lib/numerics/pulse';
import { useNarrow } from './use-narrow';

const WIDE = { width: 700, height: 190, left: 34, right: 686, top: 30, bottom: 156 };
const NARROW = { width: 358, height: 200, left: 30, right: 348, top: 30, bottom: 166 };
const CELLS = 96;
const RANGE = [-0.5, 1.1] as const;
const TICKS = [0, 24, 48, 72, 95];

/** A pulse after some steps, marched by the draft, beside where it should be. */
export function PulsePlot({
  numeric,
  parameters,
  steps,
}: {
  numeric: NumericScheme;
  parameters: readonly number[];
  steps: number;
}) {
  const m = useNarrow() ? NARROW : WIDE;
  const pulse = marchPulse(numeric, parameters, { cells: CELLS, steps });
  const travel = pulseTravel(numeric, parameters, steps);
  const x = (cell: number) => m.left + (cell / (CELLS - 1)) * (m.right - m.left);
  const y = (value: number) => m.bottom - ((value - RANGE[0]) / (RANGE[1] - RANGE[0])) * (m.bottom - m.top);
  const line = (values: readonly (number | null)[]) =>
    values
      .map((value, cell) =>
        value === null ? null : `${x(cell).toFixed(1)},${y(Math.max(-3, Math.min(4, value))).toFixed(1)}`,
      )
      .filter((point) => point !== null)
      .join(' ');
  const highest = (values: readonly (number | null)[]) =>
    values.reduce<number>((best, value, cell) => ((value ?? -1) > (values[best] ?? -1) ? cell : best), 0);
  const isLost = pulse.computed.some((value) => value === null || Math.abs(value) > 3);
  const [mine, due] = [highest(pulse.computed), highest(pulse.exact)];
  const title = `A pulse after ${steps} steps${travel === 0 ? '' : `, ${decimalText(travel, 4)} cells of travel`}`;
  const sentence = isLost
    ? 'The draft has grown beyond the plot.'
    : `Highest at cell ${mine} with ${decimalText(pulse.computed[mine] ?? 0, 3)}; exact at cell ${due} with ${decimalText(pulse.exact[due] ?? 0, 3)}.`;
  return (
    <figure className="pulse">
      <svg
        viewBox={`0 0 ${m.width} ${m.height}`}
        className="plot"
        style={{ maxWidth: m.width * 1.1 }}
        role="img"
        aria-label={`${title}. ${sentence}`}
      >
        {[0, 0.5, 1].map((value) => (
          <g key={value}>
            <path d={`M${m.left} ${y(value)}H${m.right}`} className="p-grid" />
            <text x={m.left - 8} y={y(value) + 4} className="p-t" textAnchor="end">
              {value}
            </text>
          </g>
        ))}
        {TICKS.map((cell) => (
          <g key={cell}>
            <path d={`M${x(cell)} ${m.bottom}v6`} className="p-ax" />
            <text x={x(cell)} y={m.bottom + 20} className="p-t" textAnchor="middle">
              {cell}
            </text>
          </g>
        ))}
        <path d={`M${m.left} ${m.top}V${m.bottom}H${m.right}`} className="p-ax" />
        <clipPath id="draft-pulse">
          <rect x={m.left} y={m.top - 1} width={m.right - m.left} height={m.bottom - m.top + 2} />
        </clipPath>
        <g clipPath="url(#draft-pulse)">
          <polyline points={line(pulse.exact)} className="p-line c2" />
          <polyline points={line(pulse.computed)} className="p-line c1" />
        </g>
        <text x="0" y="11" className="p-y">
          {title}
        </text>
        <text x={x(due) - 10} y={y(pulse.exact[due] ?? 0) + 4} className="p-l" textAnchor="end">
          exact
        </text>
        {!isLost && (
          <text x={x(mine) + 14} y={y((pulse.computed[mine] ?? 0) * 0.7)} className="p-l">
            this draft
          </text>
        )}
      </svg>
      <figcaption className="cap">{sentence}</figcaption>
    </figure>
  );
}
