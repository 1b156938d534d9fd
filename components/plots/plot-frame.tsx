import type { ReactNode } from 'react';

/** Measures of a plot for the width it has: two drawings, never one scaled. */
export interface PlotSize {
  readonly width: number;
  readonly height: number;
  readonly left: number;
  readonly right: number;
  readonly top: number;
  readonly bottom: number;
}
export const WIDE_PLOT: PlotSize = { width: 560, height: 316, left: 36, right: 542, top: 52, bottom: 272 };
export const NARROW_PLOT: PlotSize = { width: 358, height: 270, left: 30, right: 346, top: 50, bottom: 228 };

export const thetaX = (size: PlotSize, theta: number) => size.left + (theta / Math.PI) * (size.right - size.left);
export const valueY = (size: PlotSize, value: number, [low, high]: readonly [number, number]) =>
  size.bottom - ((value - low) / (high - low)) * (size.bottom - size.top);

const THETA_TICKS = ['0', 'π/4', 'π/2', '3π/4', 'π'];
const POINTS_A_WAVE = [16, 8, 4, 2];

/** Points of a polyline, cut where the curve leaves the plot by far or has no value; coordinates to 0.1. */
export function polyline(
  size: PlotSize,
  theta: ArrayLike<number>,
  values: ArrayLike<number | null>,
  range: readonly [number, number],
): string[] {
  const lines: string[][] = [[]];
  const reach = range[1] - range[0];
  for (let k = 0; k < theta.length; k++) {
    const value = values[k] ?? null;
    if (value === null || !Number.isFinite(value) || value > range[1] + reach || value < range[0] - reach)
      lines.push([]);
    else lines.at(-1)!.push(`${thetaX(size, theta[k]!).toFixed(1)},${valueY(size, value, range).toFixed(1)}`);
  }
  return lines.filter((line) => line.length > 1).map((line) => line.join(' '));
}

interface Props {
  readonly size: PlotSize;
  readonly title: string;
  readonly label: string;
  readonly range: readonly [number, number];
  readonly ticks: readonly { readonly at: number; readonly text: string }[];
  /** Hatch the part above this value: growth. */
  readonly growthAbove?: number;
  readonly reference?: number;
  readonly clip: string;
  readonly children: ReactNode;
  /** Names and marks that may stand outside the clip. */
  readonly over?: ReactNode;
}

/** Axes of a plot against the phase angle: θ in parts of π below, points a wave above. */
export function ThetaFrame({ size, title, label, range, ticks, growthAbove, reference, clip, children, over }: Props) {
  const { left, right, top, bottom, width, height } = size;
  return (
    <svg
      className="plot"
      viewBox={`0 0 ${width} ${height}`}
      style={{ maxWidth: width * 1.1 }}
      role="img"
      aria-label={label}
    >
      {growthAbove !== undefined && (
        <rect
          x={left}
          y={top}
          width={right - left}
          height={valueY(size, growthAbove, range) - top}
          fill="url(#hatch)"
          className="p-hatch"
        />
      )}
      {ticks.map(({ at, text }) => (
        <g key={at}>
          <path d={`M${left} ${valueY(size, at, range)}H${right}`} className="p-grid" />
          <text x={left - 8} y={valueY(size, at, range) + 4} className="p-t" textAnchor="end">
            {text}
          </text>
        </g>
      ))}
      {THETA_TICKS.map((text, k) => (
        <g key={text}>
          <path d={`M${thetaX(size, (k * Math.PI) / 4)} ${bottom}v6`} className="p-ax" />
          <text x={thetaX(size, (k * Math.PI) / 4)} y={bottom + 20} className="p-t" textAnchor="middle">
            {text}
          </text>
        </g>
      ))}
      {POINTS_A_WAVE.map((points) => (
        <g key={points}>
          <path d={`M${thetaX(size, (2 * Math.PI) / points)} ${top}v-5`} className="p-ax" />
          <text x={thetaX(size, (2 * Math.PI) / points)} y={top - 9} className="p-t" textAnchor="middle">
            {points}
          </text>
        </g>
      ))}
      <path d={`M${left} ${top}H${right}`} className="p-fr" />
      <path d={`M${left} ${top}V${bottom}H${right}`} className="p-ax" />
      {reference !== undefined && <path d={`M${left} ${valueY(size, reference, range)}H${right}`} className="p-ref" />}
      <clipPath id={clip}>
        <rect x={left} y={top - 1} width={right - left} height={bottom - top + 2} />
      </clipPath>
      <g clipPath={`url(#${clip})`}>{children}</g>
      <text x="0" y="11" className="p-y">
        {title}
      </text>
      <text x={right} y={height - 3} className="p-x" textAnchor="end">
        {size.width > 400 ? 'phase angle θ = kΔx' : 'phase angle θ'}
      </text>
      {over}
    </svg>
  );
}
